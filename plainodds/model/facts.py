"""What is known of each predictor: from the analyst where she said so, else from the data."""

from __future__ import annotations

import math

import numpy as np

from plainodds.errors import FitRefused
from plainodds.model.design.design import Floats
from plainodds.model.fitted import Sample
from plainodds.model.predictors import Kind, Predictor, PredictorFacts
from plainodds.model.quantiles import weighted_quantiles
from plainodds.model.raw import RawColumn
from plainodds.values import Scalar

__all__ = ["level_facts", "number_facts", "sensible_step"]

_NAN = math.nan
_SHARES = (0.0, 0.05, 0.25, 0.5, 0.75, 0.95, 1.0)


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
    low, p05, q1, median, q3, p95, high = weighted_quantiles(column.values, weights, _SHARES)
    if column.kind == "whole number":
        median = float(math.floor(median))
    step = sensible_step((p95 - p05) or (high - low), column.kind)
    if stated.step is not None:
        step = float(stated.step)
    typical = _typical_number(name, stated, median)
    offered = _offered(stated, low, high, typical, step)
    _refuse_out_of_place(name, stated, typical, offered, allowed)
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
        offered=offered,
        allowed=allowed,
        typical=_whole(typical) if column.kind == "whole number" else typical,
        step=step,
        linear=linear,
        modifiers=modifiers,
    )


def level_facts(
    name: str,
    column: RawColumn,
    sample: Sample,
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
    cases = sample.cases
    events = sample.outcome
    if events is not None and cases is not None:
        events = events * cases

    def by_level(each: Floats | None) -> tuple[float, ...]:
        summed = np.bincount(column.values, weights=each, minlength=len(levels))
        return tuple(map(float, summed))

    for field in ("range", "step"):
        if getattr(stated, field) is not None:
            raise FitRefused(
                f"Predictor {name!r} has levels, so {field}= has no meaning for it. Leave it out."
            )
    typical = levels[int(np.argmax(by_level(sample.weights)))]
    if stated.typical is not None:
        typical = _level(name, levels, stated.typical)
    labels = {_level(name, levels, level): text for level, text in stated.level_labels or ()}
    return PredictorFacts(
        name=name,
        label=stated.label or _spoken(name),
        unit=stated.unit or "",
        kind=column.kind,
        levels=levels,
        level_labels=tuple(labels.get(level, _level_label(level, column.kind)) for level in levels),
        level_counts=tuple(int(count) for count in by_level(None)),
        minimum=_NAN,
        maximum=_NAN,
        quartiles=(_NAN, _NAN, _NAN),
        offered=(_NAN, _NAN),
        allowed=(_NAN, _NAN),
        typical=typical,
        step=_NAN,
        linear=True,
        modifiers=modifiers,
        level_cases=by_level(cases),
        level_events=() if events is None else by_level(events),
    )


def _whole(number: float) -> float:
    return int(number) if number.is_integer() else number


def _typical_number(name: str, stated: Predictor, median: float) -> float:
    if stated.typical is None:
        # where the stated range leaves the median out, its nearer end stands for it
        low, high = stated.range or (median, median)
        return min(max(median, low), high)
    if isinstance(stated.typical, str | bool) or not math.isfinite(stated.typical):
        raise FitRefused(
            f"Predictor {name!r}: typical={stated.typical!r} is not a number. Leave it out for the "
            f"median, {median:g}."
        )
    return float(stated.typical)


def _offered(
    stated: Predictor, low: float, high: float, typical: float, step: float
) -> tuple[float, float]:
    if stated.range is not None:
        return float(stated.range[0]), float(stated.range[1])
    low, high = min(low, typical), max(high, typical)
    # a number that never varies still needs a control with two ends
    return (low, high) if low < high else (low, low + step)


def _refuse_out_of_place(
    name: str,
    stated: Predictor,
    typical: float,
    offered: tuple[float, float],
    allowed: tuple[float, float],
) -> None:
    if stated.level_labels is not None:
        raise FitRefused(
            f"Predictor {name!r} is a number and has no levels to label. Leave level_labels= out, "
            "or state kind='category'."
        )
    if not offered[0] <= typical <= offered[1]:
        raise FitRefused(
            f"Predictor {name!r}: typical={typical:g} lies outside range={offered!r}. State a "
            "range that holds it, or leave one of the two out."
        )
    if offered[0] < allowed[0] or offered[1] > allowed[1]:
        raise FitRefused(
            f"Predictor {name!r}: {offered[0]:g} to {offered[1]:g} goes beyond {allowed[0]:g} to "
            f"{allowed[1]:g}, where the formula can be computed. State a range= and a typical= "
            "within."
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


def _level(name: str, levels: tuple[Scalar, ...], stated: Scalar) -> Scalar:
    if stated not in levels:
        raise FitRefused(f"Predictor {name!r} has no level {stated!r}. It has {list(levels)!r}.")
    return levels[levels.index(stated)]


def _level_label(level: Scalar, kind: Kind) -> str:
    if kind == "yes/no":
        return "yes" if level else "no"
    return str(level)
