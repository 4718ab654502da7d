"""How figures stand in a report table: estimate (interval), one way for each kind of figure."""

from __future__ import annotations

from collections.abc import Callable

from plainodds.answers.estimate import Estimate
from plainodds.model.predictors import Subject
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import (
    bare_points,
    bare_points_span,
    chance,
    level_figures,
    p_value,
    ratio,
    ratio_interval,
    signed,
    span,
    wording,
)

__all__ = [
    "chance_cell",
    "interval_title",
    "p_cell",
    "points_cell",
    "ratio_cell",
    "signed_cell",
]


def interval_title(subject: Subject, name: str, level: float) -> str:
    """As in "Odds ratio (95% interval)"; without the interval where there is none."""
    if subject.no_interval:
        return name
    return message("{} ({}% interval)", name, level_figures(level))


def ratio_cell(estimate: Estimate) -> str:
    """As in "2.02 (1.08 to 3.78)"."""
    return _cell(estimate, ratio, ratio_interval)


def chance_cell(estimate: Estimate) -> str:
    """As in "23% (18% to 29%)"."""
    return _cell(estimate, chance, span)


def points_cell(estimate: Estimate) -> str:
    """As in "+3.4 (1.2 to 5.6)", in percentage points that the heading names."""
    return _cell(estimate, bare_points, bare_points_span)


def signed_cell(estimate: Estimate) -> str:
    """As in "+0.42 (+0.10 to +0.74)"."""
    return _cell(estimate, signed, lambda low, high: wording().to.format(signed(low), signed(high)))


def p_cell(p: float | None) -> str:
    """The p-value, or that there is none."""
    return wording().not_known if p is None else p_value(p)


def _cell(
    estimate: Estimate, say: Callable[[float], str], say_span: Callable[[float, float], str]
) -> str:
    told = say(estimate.estimate)
    # what is fixed, as at a start, has an interval without width
    if estimate.lower is None or estimate.upper is None or estimate.lower == estimate.upper:
        return told
    return f"{told} ({say_span(estimate.lower, estimate.upper)})"
