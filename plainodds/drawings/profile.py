"""A profile drawn: the ruler, and beneath it the ledger."""

from __future__ import annotations

from collections.abc import Hashable

from matplotlib.axes import Axes

from plainodds.answers.profile import ProfileAnswer
from plainodds.drawings.geometry import slot_size
from plainodds.drawings.ledger import Ledger
from plainodds.drawings.ruler import RulerDrawing
from plainodds.drawings.theme import Theme

__all__ = ["ProfileDrawing"]


class ProfileDrawing:
    """The ruler of a profile answer with its ledger beneath.

    Parameters
    ----------
    axes : Axes
        The ruler's: the linear predictor runs across.
    answer : ProfileAnswer
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: ProfileAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        width, _ = slot_size(axes)
        self.ruler = RulerDrawing(axes, answer, theme, beneath=_beneath(answer, theme, width))
        self.ledger = Ledger(axes, theme)
        self._answer = answer
        self.ruler.room.resized = lambda: self.update(self._answer)
        self._place(answer)

    @staticmethod
    def title(answer: ProfileAnswer) -> str:
        """The chance of the profile itself."""
        return RulerDrawing.title(answer)

    @staticmethod
    def structure(answer: ProfileAnswer) -> Hashable:
        """Whether another profile is compared with."""
        return RulerDrawing.structure(answer)

    @staticmethod
    def natural_height(answer: ProfileAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        ruler = RulerDrawing.natural_height(answer, theme, width)
        return ruler + _beneath(answer, theme, width)

    @staticmethod
    def least_height(answer: ProfileAnswer, theme: Theme, width: float) -> float:
        """Height in points below which texts would meet."""
        ruler = RulerDrawing.least_height(answer, theme, width)
        return ruler + _beneath(answer, theme, width)

    def update(self, answer: ProfileAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        width, _ = slot_size(self.ruler.axes)
        self.ruler.beneath = _beneath(answer, self._theme, width)
        self.ruler.update(answer)
        self._place(answer)

    def _place(self, answer: ProfileAnswer) -> None:
        width, _ = slot_size(self.ruler.axes)
        margins = self.ruler.room.margins
        top = -self.ruler.foot - self._theme.font_size
        self.ledger.place(answer, -margins.left, top, width)


def _beneath(answer: ProfileAnswer, theme: Theme, width: float) -> float:
    return Ledger.height(answer, theme, width) + theme.font_size
