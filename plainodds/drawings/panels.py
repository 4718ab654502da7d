"""Several answers drawn as the panels of one figure."""

from __future__ import annotations

from collections.abc import Hashable
from typing import Any

from matplotlib.axes import Axes

from plainodds.answers.panels import PanelsAnswer, panel_letter
from plainodds.answers.questions import Answer
from plainodds.drawings.drawing import Drawing, fitting_theme
from plainodds.drawings.geometry import Room, corner, slot_size
from plainodds.drawings.kinds import drawing_of
from plainodds.drawings.lettering import letter, line_height
from plainodds.drawings.parts import Place, part_axes, set_place
from plainodds.drawings.sharing import line_up, share_scale
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.labels import listed

__all__ = ["PanelsDrawing"]

_LETTER = 1.2  # size of a panel's letter, in letters of the theme
_ACROSS, _BETWEEN = 2.4, 1.8  # between panels beside and beneath each other, in letters
_NARROWEST = 26.0  # letters


class PanelsDrawing:
    """Panels with letters, in rows.

    Parameters
    ----------
    axes : Axes
        Hold the letters; each panel has axes of its own within their slot.
    answer : PanelsAnswer
    theme : Theme

    Attributes
    ----------
    panels : list of Drawing
    letters : list of Text
    """

    def __init__(self, axes: Axes, answer: PanelsAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        top = corner(axes, 0, 1)
        self.letters = [
            letter(axes, theme, top, size=_LETTER * theme.font_size, weight="bold", down="top")
            for _ in answer.answers
        ]
        self.panels: list[Drawing[Any]] = []
        for each, place in zip(answer.answers, self._places(), strict=True):
            drawing = drawing_of(each)
            own = fitting_theme(drawing, each, theme, place.width, place.height)
            self.panels.append(drawing(part_axes(axes, place), each, own))
        self.update(answer)

    @staticmethod
    def title(answer: PanelsAnswer) -> str:
        """What the panels show, each told once."""
        titles = [drawing_of(each).title(each) for each in answer.answers]
        return listed(list(dict.fromkeys(titles)))

    @staticmethod
    def structure(answer: PanelsAnswer) -> Hashable:
        """How the panels are set, and the structure of each."""
        return (
            answer.question,
            tuple((drawing_of(each), drawing_of(each).structure(each)) for each in answer.answers),
        )

    @staticmethod
    def natural_height(answer: PanelsAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the panels look best."""
        heights = _row_heights(answer, theme, width, least=False)
        return sum(heights) + _around(len(heights), theme)

    @staticmethod
    def least_height(answer: PanelsAnswer, theme: Theme, width: float) -> float:
        """Height in points below which texts would meet."""
        heights = _row_heights(answer, theme, width, least=True)
        return sum(heights) + _around(len(heights), theme)

    def update(self, answer: PanelsAnswer) -> None:
        """Show other answers of the same structure."""
        self._answer = answer
        strip = _strip(self._theme)
        places = self._places()
        if answer.question.shared:
            share_scale(self.panels, answer.answers)
        for number, (drawing, each, place) in enumerate(
            zip(self.panels, answer.answers, places, strict=True)
        ):
            set_place(self.axes, drawing.axes, place)
            drawing.update(each)
            self.letters[number].set_text(panel_letter(number))
            self.letters[number].set_position((place.left, -(place.top - strip)))
        if answer.question.shared:
            columns = _columns(answer, self._theme, slot_size(self.axes)[0])
            for start in range(0, len(places), columns):
                row = slice(start, start + columns)
                line_up(self.panels[row], answer.answers[row])

    def _places(self) -> list[Place]:
        answer, theme = self._answer, self._theme
        width, height = slot_size(self.axes)
        columns = _columns(answer, theme, width)
        across = (width - (columns - 1) * _ACROSS * theme.font_size) / columns
        heights = _row_heights(answer, theme, width, least=False)
        room = height - _around(len(heights), theme)
        # a figure higher or lower than it would like to be gives to all or takes from all
        heights = [each * room / sum(heights) for each in heights]
        places, top = [], 0.0
        for tall in heights:
            top += _strip(theme)
            for column in range(columns):
                left = column * (across + _ACROSS * theme.font_size)
                places.append(Place(left, top, across, tall))
            top += tall + _BETWEEN * theme.font_size
        return places[: len(answer.answers)]


def _columns(answer: PanelsAnswer, theme: Theme, width: float) -> int:
    em = theme.font_size
    most = max(1, int((width + _ACROSS * em) / ((_NARROWEST + _ACROSS) * em)))
    return min(answer.question.columns, len(answer.answers), most)


def _strip(theme: Theme) -> float:
    """Height in points of the strip above a panel that holds its letter."""
    return line_height(_LETTER * theme.font_size) + 0.2 * theme.font_size


def _around(rows: int, theme: Theme) -> float:
    return rows * _strip(theme) + (rows - 1) * _BETWEEN * theme.font_size


def _row_heights(answer: PanelsAnswer, theme: Theme, width: float, *, least: bool) -> list[float]:
    """Height in points of each row: that of its highest panel."""
    columns = _columns(answer, theme, width)
    across = (width - (columns - 1) * _ACROSS * theme.font_size) / columns
    heights = [_height(each, theme, across, least) for each in answer.answers]
    return [max(heights[start : start + columns]) for start in range(0, len(heights), columns)]


def _height(answer: Answer, theme: Theme, width: float, least: bool) -> float:
    drawing = drawing_of(answer)
    height = drawing.least_height if least else drawing.natural_height
    return float(height(answer, theme, width))
