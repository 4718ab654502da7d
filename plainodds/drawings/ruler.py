"""The ruler: chance, odds and log odds as three scales of one rule, a pointer for a profile.

What is above each other is the same thing said in three ways. Along the rule, equal
lengths are equal odds ratios; the arrow from one pointer to the other is theirs.
"""

from __future__ import annotations

from collections.abc import Callable, Hashable, Sequence

from matplotlib.axes import Axes
from matplotlib.patches import Rectangle
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.profile import ProfileAnswer
from plainodds.drawings.furniture import Notes, Title
from plainodds.drawings.geometry import Margins, Room, apart, corner, slot_size
from plainodds.drawings.lettering import line_height, text_width
from plainodds.drawings.ruler_figures import (
    FiguresBeneath,
    FiguresBeside,
    headline,
    notes,
    points_of,
)
from plainodds.drawings.ruler_parts import Lane, Move, Pointer, inside, lane_names
from plainodds.drawings.ruler_scales import (
    ScaleTicks,
    chance_scale,
    linear_predictor_scale,
    odds_scale,
    window,
)
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.lexicon import message

__all__ = ["RulerDrawing"]

_SCALES: tuple[Callable[..., ScaleTicks], ...] = (chance_scale, odds_scale, linear_predictor_scale)
_LANE = 2.75  # height of a lane, in letters
_HEADLINE = 1.2  # size of the headline, in letters
_NARROW = 40.0  # letters


class RulerDrawing:
    """The ruler of a profile answer.

    Parameters
    ----------
    axes : Axes
        The linear predictor runs across; up, the three lanes are a unit each.
    answer : ProfileAnswer
    theme : Theme
    beneath : float
        Points to leave free beneath the ruler.

    Attributes
    ----------
    foot : float
        Height in points of what stands beneath the rule itself: figures and notes.
    """

    foot: float

    def __init__(
        self, axes: Axes, answer: ProfileAnswer, theme: Theme, beneath: float = 0.0
    ) -> None:
        self.axes, self._theme, self.beneath = axes, theme, beneath
        self._answer = answer
        self.room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        axes.set_ylim(0.0, 3.0)
        self._title = Title(axes, theme, _HEADLINE)
        self._notes = Notes(axes, theme)
        self.lanes = [Lane(axes, theme, place) for place in range(3)]
        self._left = 0.9 * theme.font_size + max(
            text_width(name, theme, lane.size, "bold")
            for name, lane in zip(lane_names(), self.lanes, strict=True)
        )
        self._add_body()
        above = blended_transform_factory(axes.transData, corner(axes, 0, 1))
        profiles = len(points_of(answer))
        self.pointers = [Pointer(axes, theme, place, above) for place in range(profiles)]
        self.figures: FiguresBeside | FiguresBeneath
        if _is_narrow(theme, slot_size(axes)[0]):
            self.figures = FiguresBeneath(axes, theme, profiles, self._left)
        else:
            self.figures = FiguresBeside(axes, theme, profiles)
        self.move = Move(axes, theme, above) if answer.comparison is not None else None
        self.update(answer)

    def _add_body(self) -> None:
        axes, theme = self.axes, self._theme
        chances = Rectangle(
            (0, 2 / 3), 1, 1 / 3, transform=axes.transAxes, facecolor=theme.grid, alpha=0.45,
            linewidth=0, zorder=0.5,
        )  # fmt: skip
        body = Rectangle(
            (0, 0), 1, 1, transform=axes.transAxes, facecolor="none", edgecolor=theme.rule,
            linewidth=1.4 * theme.hairline, zorder=2,
        )  # fmt: skip
        for each in (chances, body):
            axes.add_artist(each)
            each.set_clip_on(False)

    @staticmethod
    def title(answer: ProfileAnswer) -> str:
        """The chance of the profile itself."""
        return headline(answer)

    @staticmethod
    def structure(answer: ProfileAnswer) -> Hashable:
        """Whether another profile is compared with."""
        return answer.comparison is not None

    @staticmethod
    def natural_height(answer: ProfileAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        lanes = 3 * _LANE * theme.font_size
        return _above(answer, theme, width) + lanes + _below(answer, theme, width)

    @staticmethod
    def least_height(answer: ProfileAnswer, theme: Theme, width: float) -> float:
        """Height in points below which scales and their names would meet."""
        spare = 3 * (_LANE - 2.2) * theme.font_size
        return RulerDrawing.natural_height(answer, theme, width) - spare

    def update(self, answer: ProfileAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme, em = self._theme, self._theme.font_size
        width, height = slot_size(self.axes)
        points = points_of(answer)
        right = self.figures.room(points)
        top, bottom = _above(answer, theme, width), _below(answer, theme, width)
        spare = height - top - bottom - self.beneath - 1.35 * 3 * _LANE * em
        below = bottom + self.beneath + max(0.0, spare)
        self.foot = bottom
        self.room.margins = Margins(self._left, right, below, top)

        length, depth = self.room.plot_size()
        lower, upper = window(answer, points)
        per_unit = length / (upper - lower)
        self.axes.set_xlim(lower, upper)
        places = [inside(point.linear_predictor.estimate, lower, upper) for point in points]
        for lane, scale in zip(self.lanes, _SCALES, strict=True):
            ticks = scale(lower, upper, length, theme, lane.size)
            lane.update(ticks, -self._left, depth / 3, places, per_unit)
        for pointer, point in zip(self.pointers, points, strict=True):
            pointer.update(point, lower, upper)
        if self.move is not None and answer.comparison is not None:
            self.move.update(places[1], places[0], answer.comparison.odds_ratio, per_unit)
            self._place_names([(place - lower) * per_unit for place in places], lower, per_unit)
        self.figures.place(points)
        self._title.place(self.title(answer), -self._left, top, width)
        self._notes.place(notes(answer), -self._left, -bottom, width)

    def _place_names(self, wanted: Sequence[float], lower: float, per_unit: float) -> None:
        theme, em = self._theme, self._theme.font_size
        length, _ = self.room.plot_size()
        margins = self.room.margins
        names = message("this profile"), message("compared with")
        sizes = [text_width(name, theme, theme.small) + em for name in names]
        middles = apart(wanted, sizes, -margins.left, length + margins.right)
        for pointer, name, middle in zip(self.pointers, names, middles, strict=True):
            pointer.name.set_text(name)
            pointer.name.set_position((lower + middle / per_unit, 1.5 * em))


def _is_narrow(theme: Theme, width: float) -> bool:
    return width < _NARROW * theme.font_size


def _above(answer: ProfileAnswer, theme: Theme, width: float) -> float:
    em = theme.font_size
    room = 1.6 * em if answer.comparison is None else 4.6 * em
    return Title.height(headline(answer), theme, width, _HEADLINE) + room


def _below(answer: ProfileAnswer, theme: Theme, width: float) -> float:
    profiles = len(points_of(answer))
    figures = FiguresBeneath.height(theme, profiles) if _is_narrow(theme, width) else 0.0
    return figures + Notes.height(notes(answer), theme, width) + 0.2 * line_height(theme.small)
