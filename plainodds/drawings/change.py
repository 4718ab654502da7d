"""A change drawn: two chances with their difference, and the same as marks to count."""

from __future__ import annotations

from collections.abc import Hashable

from matplotlib.axes import Axes

from plainodds.answers.change import ChangeAnswer
from plainodds.drawings.among import averaged_over, held_at
from plainodds.drawings.change_bridge import Bridge
from plainodds.drawings.change_layout import bridge_layout, bridge_notes
from plainodds.drawings.change_marks import Marks
from plainodds.drawings.furniture import Notes, Title
from plainodds.drawings.geometry import Margins, Room, slot_size
from plainodds.drawings.lettering import line_height
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.labels import average_chance_of, chance_of, why_no_interval
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures

__all__ = ["ChangeDrawing", "change_notes"]

_MOST_STRETCH = 1.3


class ChangeDrawing:
    """The picture of a change answer.

    Above, both chances on one axis in percent, with the bridge between them that is as
    long as their difference; beneath, the same chances as 100 or 1,000 marks.

    Parameters
    ----------
    axes : Axes
        Chances run along its x axis, from 0 to 1; its y axis is in points, downwards.
    answer : ChangeAnswer
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: ChangeAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        axes.set_axisbelow(True)
        self._title = Title(axes, theme)
        self._notes = Notes(axes, theme)
        self.bridge = Bridge(axes, theme)
        self.marks = Marks(axes, theme)
        self.update(answer)

    @staticmethod
    def title(answer: ChangeAnswer) -> str:
        """The chance that changes."""
        averaged = answer.question.others == "observed"
        return (average_chance_of if averaged else chance_of)(answer.subject.outcome)

    @staticmethod
    def structure(answer: ChangeAnswer) -> Hashable:
        """The same for all: every artist can follow every answer."""
        return "change"

    @staticmethod
    def natural_height(answer: ChangeAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        return _around(answer, theme, width) + Marks.height(answer, theme, width)

    @staticmethod
    def least_height(answer: ChangeAnswer, theme: Theme, width: float) -> float:
        """Height in points below which marks could not be counted."""
        return _around(answer, theme, width) + Marks.height(answer, theme, width, least=True)

    def update(self, answer: ChangeAnswer) -> None:
        """Show another answer."""
        self._answer = answer
        theme, em = self._theme, self._theme.font_size
        width, height = slot_size(self.axes)
        layout = bridge_layout(answer, theme, width)
        title = self.title(answer)
        above = Title.height(title, theme, width) + 0.6 * em
        notes = Notes.height(change_notes(answer), theme, width)
        marks = min(Marks.height(answer, theme, width), height - _around(answer, theme, width))
        below = _ticks_height(theme) + 0.9 * em + marks + notes
        spare = height - above - below - _MOST_STRETCH * layout.height
        below += max(0.0, spare)
        self._room.margins = Margins(layout.left, layout.right, bottom=below, top=above)
        self.bridge.update(answer, layout, *self._room.plot_size())
        self._title.place(title, -layout.left, above, width)
        top = -_ticks_height(theme) - 0.9 * em
        self.marks.place(answer, -layout.left, top, width, marks)
        self._notes.place(change_notes(answer), -layout.left, -below, width)


def _ticks_height(theme: Theme) -> float:
    return 0.3 * theme.font_size + line_height(theme.small)


def _around(answer: ChangeAnswer, theme: Theme, width: float) -> float:
    """Height in points of everything but the marks."""
    em = theme.font_size
    title = Title.height(ChangeDrawing.title(answer), theme, width) + 0.6 * em
    notes = Notes.height(change_notes(answer), theme, width)
    layout = bridge_layout(answer, theme, width)
    return title + layout.height + _ticks_height(theme) + 0.9 * em + notes


def change_notes(answer: ChangeAnswer) -> list[str]:
    """Say what the marks of uncertainty are, and over whom or where the chances hold."""
    question, subject = answer.question, answer.subject
    if answer.start.lower is None:
        notes = [why_no_interval(subject)]
    else:
        notes = [message("Lines, band and brackets: {}% intervals.", level_figures(question.level))]
    notes += bridge_notes(answer)
    if question.others != "observed":
        notes.append(held_at(subject, answer.held, question.others))
    else:
        notes.append(averaged_over(subject, [answer.counted], question.where))
    return [note for note in notes if note]
