"""The ruler's figures: what each profile reads on the three scales, in words and numbers."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence

from matplotlib.axes import Axes
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.estimate import Estimate
from plainodds.answers.profile import ProfileAnswer, ProfilePoint
from plainodds.drawings.furniture import marker_line
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height, text_width
from plainodds.drawings.theme import Theme
from plainodds.phrases.labels import cases_label, chance_of, in_sentence, why_no_interval
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import (
    chance,
    frequency,
    level_figures,
    ratio,
    ratio_interval,
    signed,
    span,
)

__all__ = ["FiguresBeneath", "FiguresBeside", "headline", "notes", "points_of"]

_BETWEEN = 3.0  # points between one profile's figures and the next's
_USUAL = "−2.51 (−2.65 to −2.37)"


def points_of(answer: ProfileAnswer) -> tuple[ProfilePoint, ...]:
    """The profiles to show: this one and, where one is compared with, that one."""
    return (answer.point,) if answer.comparison is None else (answer.point, answer.start)


def headline(answer: ProfileAnswer) -> str:
    """The chance of the profile itself, the figures first: an event may take many words."""
    held = answer.point.probability.estimate
    event = in_sentence(chance_of(answer.subject.outcome))
    return message("{}, or {}: {}", chance(held), frequency(held), event)


def notes(answer: ProfileAnswer) -> list[str]:
    """What the bands are, or why there are none, and what a broken pointer means."""
    cases = cases_label(answer.subject.outcome)
    if answer.point.linear_predictor.lower is None:
        told = [why_no_interval(answer.subject)]
    else:
        level = level_figures(answer.question.level)
        told = [message("Band and figures in brackets: {}% interval.", level)]
    verdicts = {point.familiarity.verdict for point in points_of(answer)}
    if "beyond" in verdicts:
        told.append(message("Broken pointer: beyond the data."))
    elif "rare" in verdicts:
        told.append(message("Broken pointer: few {} or none are like it.", cases))
    return told


def _figures(point: ProfilePoint) -> tuple[str, str, str]:
    return (
        _with_interval(point.probability, chance, span),
        _with_interval(point.odds, ratio, ratio_interval),
        _with_interval(point.linear_predictor, signed, lambda a, b: span(a, b, signed)),
    )


def _with_interval(
    held: Estimate, say: Callable[[float], str], between: Callable[[float, float], str]
) -> str:
    if held.lower is None or held.upper is None:
        return say(held.estimate)
    return f"{say(held.estimate)} ({between(held.lower, held.upper)})"


def _size(theme: Theme, own: int, lane: int) -> float:
    """The chance of the profile itself is written largest."""
    return theme.font_size if own == 0 and lane == 0 else theme.small


def _colour(theme: Theme, own: int) -> str:
    return theme.ink if own == 0 else theme.faint


class FiguresBeside:
    """Figures at the right of the lanes that they belong to."""

    def __init__(self, axes: Axes, theme: Theme, profiles: int) -> None:
        self._theme = theme
        beside = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        self.texts = [
            [
                letter(axes, theme, beside, size=_size(theme, own, lane),
                       colour=_colour(theme, own))
                for lane in range(3)
            ]
            for own in range(profiles)
        ]  # fmt: skip
        self.marks = [
            [marker_line(theme, theme.series(own), transform=beside) for _ in range(3)]
            for own in range(profiles if profiles > 1 else 0)
        ]
        _add_small_marks(axes, self.marks)

    def room(self, points: Sequence[ProfilePoint]) -> float:
        """Width at the right in points.

        The width goes in whole letters from a usual one on, so that the ruler doesn't
        tremble while a profile is changed.
        """
        em = self._theme.font_size
        usual = text_width(_USUAL, self._theme, self._theme.small)
        widest = max(
            text_width(text, self._theme, _size(self._theme, own, lane))
            for own, point in enumerate(points)
            for lane, text in enumerate(_figures(point))
        )
        if all(point.linear_predictor.lower is None for point in points):
            usual = 4.0 * em
        steps = math.ceil(max(0.0, widest - usual) / em)
        return usual + steps * em + (2.0 if self.marks else 0.9) * em

    def place(self, points: Sequence[ProfilePoint]) -> None:
        """Write the figures."""
        em = self._theme.font_size
        start = (2.0 if self.marks else 0.9) * em
        for own, point in enumerate(points):
            shift = (0.25 - 0.5 * own) if self.marks else 0.0
            for lane, text in enumerate(_figures(point)):
                self.texts[own][lane].set_text(text)
                self.texts[own][lane].set_position((start, 2.5 - lane + shift))
                if self.marks:
                    self.marks[own][lane].set_data([1.3 * em], [2.5 - lane + shift])


class FiguresBeneath:
    """Figures beneath the ruler, where there is no room at its right."""

    def __init__(self, axes: Axes, theme: Theme, profiles: int, left: float) -> None:
        self._theme, self._left = theme, left
        beneath = corner(axes, 0, 0)
        self.texts = [
            [
                letter(axes, theme, beneath, size=_size(theme, own, lane),
                       colour=_colour(theme, own))
                for lane in range(3)
            ]
            for own in range(profiles)
        ]  # fmt: skip
        self.marks = [
            [marker_line(theme, theme.series(own), transform=beneath)]
            for own in range(profiles if profiles > 1 else 0)
        ]
        _add_small_marks(axes, self.marks)

    @staticmethod
    def height(theme: Theme, profiles: int) -> float:
        """Height in points beneath the ruler."""
        return 0.7 * theme.font_size + profiles * (3 * line_height(theme.small) + _BETWEEN)

    def room(self, points: Sequence[ProfilePoint]) -> float:
        """Width at the right in points."""
        return 0.6 * self._theme.font_size

    def place(self, points: Sequence[ProfilePoint]) -> None:
        """Write the figures, one profile after the other."""
        em, step = self._theme.font_size, line_height(self._theme.small)
        x, y = -self._left, -0.7 * em - 0.5 * step
        for own, point in enumerate(points):
            told = _figures(point)
            named = told[0], message("odds {}", told[1]), message("log odds {}", told[2])
            for lane, text in enumerate(named):
                self.texts[own][lane].set_text(text)
                self.texts[own][lane].set_position((x + (1.1 * em if self.marks else 0.0), y))
                if self.marks and lane == 0:
                    self.marks[own][0].set_data([x + 0.4 * em], [y])
                y -= step
            y -= _BETWEEN


def _add_small_marks(axes: Axes, marks: Sequence[Sequence[object]]) -> None:
    for mark in (each for column in marks for each in column):
        axes.add_artist(mark)  # type: ignore[arg-type]
        mark.set(clip_on=False, markersize=0.85 * mark.get_markersize())  # type: ignore[attr-defined]
