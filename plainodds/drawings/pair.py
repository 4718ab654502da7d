"""Two predictors together drawn: both, what one does as the other varies, the interaction."""

from __future__ import annotations

from collections.abc import Hashable

from matplotlib.axes import Axes

from plainodds.answers.curve import CurveAnswer
from plainodds.answers.pair import PairAnswer
from plainodds.drawings.curve import CurveDrawing
from plainodds.drawings.curve_levels import LevelsDrawing
from plainodds.drawings.furniture import Notes, Title
from plainodds.drawings.geometry import Margins, Room, slot_size
from plainodds.drawings.pair_effect import EffectPanel
from plainodds.drawings.pair_interaction import InteractionPanel
from plainodds.drawings.pair_layout import (
    TITLE_SIZE,
    least_height,
    natural_height,
    notes_of,
    pair_layout,
)
from plainodds.drawings.pair_map import MapPanel
from plainodds.drawings.parts import part_axes, set_place
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.pair_labels import pair_title

__all__ = ["PairDrawing"]


class _Lines(CurveDrawing):
    """Lines whose small print stands with the whole picture's."""

    @staticmethod
    def notes(answer: CurveAnswer) -> list[str]:
        """Nothing."""
        return []


class _Levels(LevelsDrawing):
    """Points whose small print stands with the whole picture's."""

    @staticmethod
    def notes(answer: CurveAnswer) -> list[str]:
        """Nothing."""
        return []


class PairDrawing:
    """The picture of an answer about two predictors together.

    Both together, as lines or as a map; the effect of the first along the second; and the
    interaction on both scales. Side by side where the width allows, else beneath each other.

    Parameters
    ----------
    axes : Axes
        Hold the heading and the notes; each part has axes of its own within their slot.
    answer : PairAnswer
    theme : Theme

    Attributes
    ----------
    together : CurveDrawing, LevelsDrawing, MapPanel or None
        None where the sample tells no chances.
    effect : EffectPanel
    interaction : InteractionPanel
    """

    def __init__(self, axes: Axes, answer: PairAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        self._title = Title(axes, theme, TITLE_SIZE)
        self._notes = Notes(axes, theme)
        layout = pair_layout(answer, theme, *slot_size(axes))
        self.together: CurveDrawing | LevelsDrawing | MapPanel | None = None
        if layout.together is not None:
            own = part_axes(axes, layout.together)
            if answer.surface is not None:
                self.together = MapPanel(own, answer, theme)
            elif answer.lines is not None:
                along = answer.subject.predictor(answer.lines.question.predictor)
                self.together = (_Lines if along.is_number else _Levels)(own, answer.lines, theme)
        self.effect = EffectPanel(part_axes(axes, layout.effect), answer, theme)
        self.interaction = InteractionPanel(part_axes(axes, layout.interaction), answer, theme)
        self.update(answer)

    @staticmethod
    def title(answer: PairAnswer) -> str:
        """The chance, and the two predictors."""
        return pair_title(answer)

    @staticmethod
    def structure(answer: PairAnswer) -> Hashable:
        """Scale and kind of each part, number of lines and levels; not the figures."""
        lines, effect = answer.lines, answer.effect
        b = answer.subject.predictor(answer.question.b)
        together: Hashable = "map" if answer.surface is not None else None
        if answer.surface is None and lines is not None:
            along = answer.subject.predictor(lines.question.predictor)
            kind = CurveDrawing if along.is_number else LevelsDrawing
            together = (along.is_number, kind.structure(lines))
        return (
            answer.question.scale,
            together,
            "number" if b.is_number else len(effect.at),
        )

    @staticmethod
    def natural_height(answer: PairAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        return natural_height(answer, theme, width)

    @staticmethod
    def least_height(answer: PairAnswer, theme: Theme, width: float) -> float:
        """Height in points below which texts would meet."""
        return least_height(answer, theme, width)

    def update(self, answer: PairAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme = self._theme
        width, height = slot_size(self.axes)
        layout = pair_layout(answer, theme, width, height)
        set_place(self.axes, self.effect.axes, layout.effect)
        set_place(self.axes, self.interaction.axes, layout.interaction)
        beside: Margins | None = None
        if self.together is not None and layout.together is not None:
            set_place(self.axes, self.together.axes, layout.together)
            if layout.beside:
                above, below = EffectPanel.around(answer, theme, layout.effect.width)
                beside = Margins(0.0, 0.0, below, above)
            beside = self._show_together(answer, beside)
        self.effect.update(answer, beside if layout.beside else None)
        self.interaction.update(answer)
        self._title.place(self.title(answer), 0.0, 0.0, width)
        self._notes.place(notes_of(answer), 0.0, 0.0, width)

    def _show_together(self, answer: PairAnswer, least: Margins | None) -> Margins | None:
        """Show both together, in line with the effect's plot; give the room that it takes."""
        if isinstance(self.together, MapPanel):
            self.together.update(answer, least.top if least else 0.0)
            return self.together.room.margins
        if self.together is not None and answer.lines is not None:
            self.together.frame.least = least or Margins(0.0, 0.0, 0.0, 0.0)
            self.together.update(answer.lines)
            return self.together.frame.room.margins
        return None
