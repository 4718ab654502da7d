"""A finding drawn: its topic and what it weighs, and beneath them its evidence."""

from __future__ import annotations

from collections.abc import Hashable

from matplotlib.axes import Axes

from plainodds.answers.checks.finding import Topic
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.drawings.checks.amount import AMOUNT
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.calibration import CALIBRATION
from plainodds.drawings.checks.collinearity import COLLINEARITY
from plainodds.drawings.checks.convergence import CONVERGENCE
from plainodds.drawings.checks.dependence import DEPENDENCE
from plainodds.drawings.checks.discrimination import DISCRIMINATION
from plainodds.drawings.checks.influence import INFLUENCE
from plainodds.drawings.checks.levels import LEVELS
from plainodds.drawings.checks.missing import MISSING
from plainodds.drawings.checks.overall import OVERALL
from plainodds.drawings.checks.plate import Found, Plate, found_of
from plainodds.drawings.checks.separation import SEPARATION
from plainodds.drawings.checks.shape import SHAPE
from plainodds.drawings.checks.standard_errors import STANDARD_ERRORS
from plainodds.drawings.checks.told import TOLD
from plainodds.drawings.furniture import Notes, Title
from plainodds.drawings.geometry import Margins, Room, slot_size
from plainodds.drawings.lettering import line_height, text_width
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.checks.headings import (
    concern_label,
    concern_sign,
    finding_heading,
    picture_legend,
)

__all__ = ["SoundnessDrawing", "plate_of"]

_PLATES: dict[Topic, Plate] = {
    "convergence": CONVERGENCE,
    "separation": SEPARATION,
    "collinearity": COLLINEARITY,
    "standard errors": STANDARD_ERRORS,
    "amount": AMOUNT,
    "levels": LEVELS,
    "missing": MISSING,
    "shape": SHAPE,
    "calibration": CALIBRATION,
    "influence": INFLUENCE,
    "dependence": DEPENDENCE,
    "discrimination": DISCRIMINATION,
    "overall": OVERALL,
}


def plate_of(found: Found) -> Plate:
    """How a finding is drawn; one without anything to draw is told in words."""
    if found.finding.evidence is None:
        return TOLD
    plate = _PLATES[found.finding.topic]
    return plate if plate.has_picture(found) else TOLD


class SoundnessDrawing:
    """The finding that the question wants shown.

    Parameters
    ----------
    axes : Axes
        Across and up in the evidence's own units where the topic has such axes.
    answer : SoundnessAnswer
    theme : Theme

    Attributes
    ----------
    board : Board
        The artists, by name.
    """

    def __init__(self, axes: Axes, answer: SoundnessAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self.room = Room(axes, lambda: self.update(self._answer))
        self._plate = plate_of(found_of(answer))
        if self._plate.across == "log":
            axes.set_xscale("log")
        bare(axes)
        axes.set_axisbelow(True)
        self.board = Board(axes, theme)
        self._title = Title(axes, theme)
        self._notes = Notes(axes, theme)
        self.update(answer)

    @staticmethod
    def title(answer: SoundnessAnswer) -> str:
        """The topic, and the number whose shape is shown."""
        found = found_of(answer)
        return finding_heading(found.finding, found.subject)

    @staticmethod
    def structure(answer: SoundnessAnswer) -> Hashable:
        """The kind of picture, and what its marks are called."""
        found = found_of(answer)
        plate = plate_of(found)
        legend = ("", "") if plate is TOLD else picture_legend(found.finding, found.subject)
        return plate.name, plate.variant(found), legend

    @staticmethod
    def natural_height(answer: SoundnessAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        found = found_of(answer)
        plate = plate_of(found)
        return _around(found, plate, theme, width) + plate.natural_height(found, theme, width)

    @staticmethod
    def least_height(answer: SoundnessAnswer, theme: Theme, width: float) -> float:
        """Height in points below which texts would meet."""
        found = found_of(answer)
        plate = plate_of(found)
        return _around(found, plate, theme, width) + plate.least_height(found, theme, width)

    def update(self, answer: SoundnessAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        found = found_of(answer)
        plate, theme = plate_of(found), self._theme
        width, height = slot_size(self.axes)
        head, notes = _head_height(found, theme, width), plate.notes(found)
        foot = Notes.height(notes, theme, width)
        self.board.begin()
        inner = plate.paint(self.board, found, width, height - head - foot)
        margins = Margins(inner.left, inner.right, inner.bottom + foot, inner.top + head)
        self.room.margins = margins
        self._place_head(found, margins, width)
        self.board.end()
        self._notes.place(notes, -margins.left, -margins.bottom, width)

    def _place_head(self, found: Found, margins: Margins, width: float) -> None:
        theme, em = self._theme, self._theme.font_size
        corner = self.board.at(0, 1)
        top = self._title.place(self.title(self._answer), -margins.left, margins.top, width)
        middle = margins.top - top - 0.1 * em - line_height(em) / 2
        sign = concern_sign(found.finding.concern)
        self.board.write(sign, -margins.left, middle, corner, size=em)
        along = text_width(sign, theme, em) + 0.5 * em
        self.board.write(
            concern_label(found.finding.concern), -margins.left + along, middle, corner, size=em
        )


def _head_height(found: Found, theme: Theme, width: float) -> float:
    em = theme.font_size
    title = finding_heading(found.finding, found.subject)
    return Title.height(title, theme, width) + 0.1 * em + line_height(em) + 0.7 * em


def _around(found: Found, plate: Plate, theme: Theme, width: float) -> float:
    return _head_height(found, theme, width) + Notes.height(plate.notes(found), theme, width)
