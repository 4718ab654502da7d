"""The ruler, the ledger and the marks, each as a picture of its own."""

from __future__ import annotations

from collections.abc import Hashable
from typing import cast

from matplotlib.axes import Axes

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.drawings.change import ChangeDrawing, change_notes
from plainodds.drawings.change_marks import Marks
from plainodds.drawings.furniture import Notes, Title
from plainodds.drawings.geometry import Room, slot_size
from plainodds.drawings.ledger import Ledger
from plainodds.drawings.ruler import RulerDrawing
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare

__all__ = ["LedgerExcerpt", "MarksExcerpt", "RulerExcerpt"]

_BENEATH_TITLE = 0.7  # letters


class RulerExcerpt:
    """The ruler of a profile."""

    def __init__(self, axes: Axes, answer: ExcerptAnswer, theme: Theme) -> None:
        self.axes = axes
        self.ruler = RulerDrawing(axes, _profile(answer), theme)

    @staticmethod
    def title(answer: ExcerptAnswer) -> str:
        """The chance of the profile itself."""
        return RulerDrawing.title(_profile(answer))

    @staticmethod
    def structure(answer: ExcerptAnswer) -> Hashable:
        """Whether another profile is compared with."""
        return RulerDrawing.structure(_profile(answer))

    @staticmethod
    def natural_height(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        return RulerDrawing.natural_height(_profile(answer), theme, width)

    @staticmethod
    def least_height(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
        """Height in points below which texts would meet."""
        return RulerDrawing.least_height(_profile(answer), theme, width)

    def update(self, answer: ExcerptAnswer) -> None:
        """Show another answer of the same structure."""
        self.ruler.update(_profile(answer))


class LedgerExcerpt:
    """The ledger of a profile, beneath the chance that it leads to."""

    def __init__(self, axes: Axes, answer: ExcerptAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        self._title = Title(axes, theme)
        self.ledger = Ledger(axes, theme)
        self.update(answer)

    @staticmethod
    def title(answer: ExcerptAnswer) -> str:
        """The chance of the profile itself."""
        return RulerDrawing.title(_profile(answer))

    @staticmethod
    def structure(answer: ExcerptAnswer) -> Hashable:
        """The same for all."""
        return "ledger"

    @staticmethod
    def natural_height(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
        """Height in points that the lines need."""
        title = Title.height(LedgerExcerpt.title(answer), theme, width)
        lines = Ledger.height(_profile(answer), theme, width)
        return title + _BENEATH_TITLE * theme.font_size + lines

    @staticmethod
    def least_height(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
        """The same: lines have no air to lose."""
        return LedgerExcerpt.natural_height(answer, theme, width)

    def update(self, answer: ExcerptAnswer) -> None:
        """Show another answer."""
        self._answer = answer
        width, height = slot_size(self.axes)
        title = self._title.place(self.title(answer), 0.0, 0.0, width)
        top = height - title - _BENEATH_TITLE * self._theme.font_size
        self.ledger.place(_profile(answer), 0.0, top, width)


class MarksExcerpt:
    """The marks of a change, one for each case of a hundred or a thousand."""

    def __init__(self, axes: Axes, answer: ExcerptAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        self._title = Title(axes, theme)
        self._notes = Notes(axes, theme)
        self.marks = Marks(axes, theme)
        self.update(answer)

    @staticmethod
    def title(answer: ExcerptAnswer) -> str:
        """The chance that changes."""
        return ChangeDrawing.title(_change(answer))

    @staticmethod
    def structure(answer: ExcerptAnswer) -> Hashable:
        """The same for all."""
        return "marks"

    @staticmethod
    def natural_height(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        marks = Marks.height(_change(answer), theme, width)
        return _around(answer, theme, width) + marks

    @staticmethod
    def least_height(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
        """Height in points below which marks could not be counted."""
        marks = Marks.height(_change(answer), theme, width, least=True)
        return _around(answer, theme, width) + marks

    def update(self, answer: ExcerptAnswer) -> None:
        """Show another answer."""
        self._answer = answer
        width, height = slot_size(self.axes)
        title = self._title.place(self.title(answer), 0.0, 0.0, width)
        top = height - title - _BENEATH_TITLE * self._theme.font_size
        room = height - _around(answer, self._theme, width)
        self.marks.place(_change(answer), 0.0, top, width, room)
        self._notes.place(_notes(answer), 0.0, 0.0, width)


def _profile(answer: ExcerptAnswer) -> ProfileAnswer:
    """The whole of a ruler or a ledger, which `excerpt` takes from profiles only."""
    return cast(ProfileAnswer, answer.whole)


def _change(answer: ExcerptAnswer) -> ChangeAnswer:
    """The whole of marks, which `excerpt` takes from changes only."""
    return cast(ChangeAnswer, answer.whole)


def _notes(answer: ExcerptAnswer) -> list[str]:
    return change_notes(_change(answer))[-1:]


def _around(answer: ExcerptAnswer, theme: Theme, width: float) -> float:
    title = Title.height(MarksExcerpt.title(answer), theme, width)
    return title + _BENEATH_TITLE * theme.font_size + Notes.height(_notes(answer), theme, width)
