"""What is known of each predictor: from the analyst where she said so, else from the data."""

from __future__ import annotations

import math
from collections.abc import Mapping

import numpy as np

from plainodds.errors import FitRefused, QuestionRefused
from plainodds.model.design.design import Design, Floats
from plainodds.model.predictors import Kind, Predictor, PredictorFacts
from plainodds.model.quantiles import weighted_quantiles
from plainodds.model.raw import RawColumn
from plainodds.values import Scalar

__all__ = ["allowed_range", "number_facts", "level_facts", "sensible_step", "shares_terms_with"]

_NAN = math.nan
_POINTS = 33


def number_facts(
    name: str,
    column: RawColumn,
    weights: Floats | None,
    stated: Predictor,
    allowed: tuple[float, float],
    linear: bool,
    modifiers: tuple[str, ...],
) -> PredictorFacts:
    """The facts of a predictor that takes numbers.

    Raises
    ------
    FitRefused
        If the stated range, typical value or step is impossible.
    """
    values = column.values
    low, q1, median, q3, high = weighted_quantiles(values, weights, (0.0, 0.25, 0.5, 0.75, 1.0))
    if column.kind == "whole number":
        median = float(math.floor(median))
    p05, p95 = weighted_quantiles(values, weights, (0.05, 0.95))
    step = (
        stated.step
        if stated.step is not None
        else sensible_step((p95 - p05) or (high - low), column.kind)
    )
    offered = stated.range if stated.range is not None else (low, high)
    typical = stated.typical if stated.typical is not None else median
    _refuse_impossible(name, step, offered, typical, allowed)
    return PredictorFacts(
        name=name,
        label=stated.label or _spoken(name),
        unit=stated.unit or "",
        kind=column.kind,
        levels=(),
        level_labels=(),
        level_counts=(),
        minimum=low,
        maximum=high,
        quartiles=(q1, median, q3),
        offered=(float(offered[0]), float(offered[1])),
        allowed=allowed,
        typical=_whole(float(typical)) if column.kind == "whole number" else float(typical),
        step=float(step),
        linear=linear,
        modifiers=modifiers,
    )


def level_facts(
    name: str,
    column: RawColumn,
    weights: Floats | None,
    stated: Predictor,
    modifiers: tuple[str, ...],
) -> PredictorFacts:
    """The facts of a category or a yes/no.

    Raises
    ------
    FitRefused
        If the stated typical level or a labelled level does not exist.
    """
    levels = column.levels
    counts = np.bincount(column.values, minlength=len(levels))
    weighted = (
        counts
        if weights is None
        else np.bincount(column.values, weights=weights, minlength=len(levels))
    )
    typical = levels[int(np.argmax(weighted))] if stated.typical is None else stated.typical
    labels = dict(stated.level_labels or ())
    for level in (typical, *labels):
        if level not in levels:
            raise FitRefused(f"Predictor {name!r} has no level {level!r}. It has {list(levels)!r}.")
    return PredictorFacts(
        name=name,
        label=stated.label or _spoken(name),
        unit=stated.unit or "",
        kind=column.kind,
        levels=levels,
        level_labels=tuple(labels.get(level, _level_label(level, column.kind)) for level in levels),
        level_counts=tuple(int(count) for count in counts),
        minimum=_NAN,
        maximum=_NAN,
        quartiles=(_NAN, _NAN, _NAN),
        offered=(_NAN, _NAN),
        allowed=(_NAN, _NAN),
        typical=typical,
        step=_NAN,
        linear=True,
        modifiers=modifiers,
    )


def _whole(number: float) -> float:
    return int(number) if number.is_integer() else number


def _refuse_impossible(
    name: str,
    step: float,
    offered: tuple[float, float],
    typical: Scalar,
    allowed: tuple[float, float],
) -> None:
    if not (math.isfinite(step) and step > 0):
        raise FitRefused(f"Predictor {name!r}: step={step!r} is not a number above 0.")
    if isinstance(typical, str) or not math.isfinite(typical):
        raise FitRefused(f"Predictor {name!r}: typical={typical!r} is not a number.")
    if len(offered) != 2 or not offered[0] < offered[1]:
        raise FitRefused(
            f"Predictor {name!r}: range={offered!r} is not (lowest, highest) with lowest below."
        )
    if offered[0] < allowed[0] or offered[1] > allowed[1]:
        raise FitRefused(
            f"Predictor {name!r}: range={offered!r} goes beyond {allowed[0]:g} to {allowed[1]:g}, "
            "where the formula can be computed."
        )


def sensible_step(spread: float, kind: Kind) -> float:
    """A round step, 1, 2 or 5 times a power of ten, about a tenth of the spread.

    Examples
    --------
    >>> sensible_step(95.0, "number")
    10.0
    """
    if not spread > 0:
        return 1.0
    target = spread / 10.0
    power = 10.0 ** math.floor(math.log10(target))
    rounds = [m * power for m in (1.0, 2.0, 5.0, 10.0)]
    step = min(rounds, key=lambda r: abs(math.log(r / target)))
    step = float(f"{step:.12g}")
    return max(1.0, step) if kind == "whole number" else step


def _spoken(name: str) -> str:
    return name.replace("_", " ").strip() or name


def _level_label(level: Scalar, kind: Kind) -> str:
    if kind == "yes/no":
        return "yes" if level else "no"
    return str(level)


def shares_terms_with(design: Design) -> Mapping[str, tuple[str, ...]]:
    """For each raw predictor, the others that stand in a column together with it."""
    order = design.variables
    together: dict[str, set[str]] = {name: set() for name in order}
    for column in design.columns:
        names = design.variables_of(column)
        for name in names:
            together[name] |= names - {name}
    return {name: tuple(n for n in order if n in together[name]) for name in order}


def is_linear(design: Design, name: str, low: float, high: float, at: Mapping[str, Floats]) -> bool:
    """Whether every column is a straight line in a number, everything else held.

    Parameters
    ----------
    design : Design
    name : str
    low, high : float
        The data's range.
    at : coded row
        Values, each of shape (1,), at which the other predictors are held.
    """
    x = np.linspace(low, high, _POINTS)
    coded = {other: np.repeat(values, _POINTS) for other, values in at.items()} | {name: x}
    for i in design.touched([name]):
        column = design.columns[i]
        moving = [atom for atom in column.atoms if name in design.factors[atom[0]].variables]
        if len(moving) > 1:
            return False
        position, k = moving[0]
        if design.factors[position].name == name:
            continue
        values = design.factor_values(position, coded)[:, k]
        if np.abs(np.diff(values, 2)).max() > 1e-9 * max(np.ptp(values), 1e-300):
            return False
    return True


def allowed_range(
    design: Design, name: str, low: float, high: float, at: Mapping[str, Floats]
) -> tuple[float, float]:
    """The range over which the formula can be computed, found by trying.

    A spline's basis ends at its boundary knots, a logarithm at zero.
    """
    positions = [
        p
        for p, factor in enumerate(design.factors)
        if name in factor.variables and factor.name != name
    ]
    if not positions:
        return -math.inf, math.inf
    spread = (high - low) or 1.0

    def works(x: float) -> bool:
        coded = {**at, name: np.array([x])}
        try:
            for position in positions:
                design.factor_values(position, coded)
        except QuestionRefused:
            return False
        return True

    return _edge(works, low, low - 10 * spread, spread), _edge(
        works, high, high + 10 * spread, spread
    )


def _edge(works, inside: float, outside: float, spread: float) -> float:  # type: ignore[no-untyped-def]
    if works(outside):
        return math.copysign(math.inf, outside - inside)
    if not works(inside + math.copysign(1e-9 * spread, outside - inside)):
        return inside
    for _ in range(60):
        middle = (inside + outside) / 2
        if works(middle):
            inside = middle
        else:
            outside = middle
    return inside
