"""The effect of one predictor as another one varies, and where it differs from nothing."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.averaging import Averager, averaged_own_slope
from plainodds.answers.crossing import held_slopes
from plainodds.answers.delta import Intervals, interval_factor, mapped, wald
from plainodds.answers.pair_levels import MOST_LEVELS, levels_told
from plainodds.answers.pair_settled import Settled
from plainodds.answers.points import POINTS, grid_along
from plainodds.answers.population import Averages, everyone
from plainodds.answers.stretches import (
    EffectAlong,
    Measured,
    Stretch,
    bounds_along,
    signs,
    turns_along,
)
from plainodds.answers.support import is_supported, support_of
from plainodds.model.design.design import Coded, Floats
from plainodds.model.fitted import FittedModel, checked
from plainodds.model.predictors import PredictorFacts
from plainodds.scales import linear_predictor_from_probability, probability_slope
from plainodds.values import Scalar

__all__ = ["effect_along"]

Codes = NDArray[Any]

# an average over many rows is dear, and smoother than what a single profile gives
_AVERAGED_POINTS = 61


def effect_along(
    model: FittedModel, pair: Settled, scale: str, averager: Averager | None
) -> EffectAlong:
    """The effect of `a` along `b` with its interval, the stretches and the turns.

    Where `b` is a number the stretches' bounds are the values at which an end of the
    interval is 0: for log odds that are straight in `b` the roots of (c'β)² = z² c'Vc
    (Johnson & Neyman 1936; Bauer & Curran 2005), else found by root-finding in a grid.

    Parameters
    ----------
    model : FittedModel
    pair : Settled
    scale : {"probability", "odds"}
    averager : Averager or None
        What averages over the rows; None at the held profile.
    """
    measured = _measure(model, pair, scale, averager)
    if pair.b.is_number:
        at = grid_along(pair.b, POINTS if averager is None else _AVERAGED_POINTS)
        found = measured(at)
        exact = _exact_bounds(model, pair, at) if scale == "odds" and averager is None else None
        bounds = bounds_along(measured, at, found) if exact is None else exact
        stretches = _stretches(model, pair.b, measured, at, bounds)
        turns = turns_along(measured, at, found.estimate) if exact is None else ()
        values = tuple(checked(pair.b, x) for x in at.tolist())
    else:
        values = levels_told(pair.b, pair.b_change, MOST_LEVELS)
        found = measured(model.coded_values(pair.b, values))
        stretches = tuple(
            Stretch(level, level, sign, share)
            for level, sign, share in zip(
                values, signs(found), _shares_of_levels(model, pair.b, values), strict=False
            )
            if sign is not None
        )
        turns = ()
    (support,) = support_of(model, pair.b, None, (None,))
    shown = _shown(found, scale, pair)
    return EffectAlong(
        at=values,
        estimate=tuple(shown.estimate.tolist()),
        se=_tuple(shown.se),
        lower=_tuple(shown.lower),
        upper=_tuple(shown.upper),
        supported=tuple(is_supported(pair.b, support, x) for x in values),
        stretches=stretches,
        turns=turns,
    )


def _measure(model: FittedModel, pair: Settled, scale: str, averager: Averager | None) -> Measured:
    """The effect at values of `b`: a risk difference, a slope or a log odds ratio.

    What the rows leave open is nan.
    """
    if scale == "odds":
        effects = _log_odds_ratios(model, pair, averager)
    else:
        effects = _effects(model, pair, averager)

    def measured(b: Codes) -> Intervals:
        found = effects(b)
        determined = model.estimable.determined(found.gradient)
        gradient = np.where(determined[:, None], found.gradient, np.nan)
        return wald(model, np.where(determined, found.value, np.nan), gradient, pair.level)

    return measured


def _effects(
    model: FittedModel, pair: Settled, averager: Averager | None
) -> Callable[[Codes], Averages]:
    if pair.a.name in pair.sloped:
        name = pair.a.name
        if averager is None:
            return lambda b: held_slopes(pair.around, name, {pair.b.name: b})
        population = averager.population
        return lambda b: averaged_own_slope(model, name, {pair.b.name: b}, population)

    def differences(b: Codes) -> Averages:
        ends = _chances(model, pair, averager, b)
        n = len(b)
        return Averages(ends.value[n:] - ends.value[:n], ends.gradient[n:] - ends.gradient[:n])

    return differences


def _log_odds_ratios(
    model: FittedModel, pair: Settled, averager: Averager | None
) -> Callable[[Codes], Averages]:
    def held(b: Codes) -> Averages:
        contrasts = _contrasts(model, pair, b)
        return Averages(contrasts @ model.coefficients, contrasts)

    def averaged(b: Codes) -> Averages:
        ends, n = _chances(model, pair, averager, b), len(b)
        eta = linear_predictor_from_probability(ends.value)
        with np.errstate(divide="ignore", invalid="ignore"):
            gradient = ends.gradient / probability_slope(ends.value)[:, None]
        return Averages(eta[n:] - eta[:n], gradient[n:] - gradient[:n])

    return held if averager is None else averaged


def _moved(model: FittedModel, pair: Settled, b: Codes) -> dict[str, Codes]:
    """Every value of `b`, first with `a` where its change starts, then where it ends."""
    ends = model.coded_values(pair.a, pair.a_change)
    return {pair.a.name: np.repeat(ends, len(b)), pair.b.name: np.tile(b, 2)}


def _chances(model: FittedModel, pair: Settled, averager: Averager | None, b: Codes) -> Averages:
    moved: Coded = _moved(model, pair, b)
    return pair.around.chances(moved) if averager is None else averager.probability(moved)


def _contrasts(model: FittedModel, pair: Settled, b: Codes) -> Floats:
    rows = pair.around.rows(_moved(model, pair, b))
    return np.asarray(rows[len(b) :] - rows[: len(b)])


def _exact_bounds(model: FittedModel, pair: Settled, at: Floats) -> Floats | None:
    """The roots of (c'β)² = z² c'Vc where c is straight in `b`; None where it is not."""
    contrasts = _contrasts(model, pair, at)
    low, high = at[0], at[-1]
    # from −1 to 1, so that the quadratic's coefficients are of one size
    t = 2 * (at - low) / (high - low) - 1 if high > low else np.zeros(1)
    still, along = (contrasts[-1] + contrasts[0]) / 2, (contrasts[-1] - contrasts[0]) / 2
    bend = np.abs(contrasts - still - t[:, None] * along)
    if (bend > 1e-10 * np.abs(contrasts).max(axis=0)).any():
        return None
    if model.covariance is None:
        return np.empty(0)
    V, z2 = model.covariance, interval_factor(model, pair.level) ** 2
    values = [
        float((one @ model.coefficients) * (other @ model.coefficients) - z2 * one @ V @ other)
        for one, other in ((still, still), (still, along), (along, along))
    ]
    roots = _quadratic_roots(values[2], 2 * values[1], values[0])
    return np.sort(low + (roots[np.abs(roots) < 1] + 1) / 2 * (high - low))


def _quadratic_roots(square: float, linear: float, constant: float) -> Floats:
    """Real roots of a quadratic, without cancellation."""
    size = max(abs(square), abs(linear), abs(constant))
    if max(abs(square), abs(linear)) <= 1e-14 * size:
        return np.empty(0)
    inner = linear**2 - 4 * square * constant
    if inner < 0:
        return np.empty(0)
    larger = -(linear + np.copysign(np.sqrt(inner), linear)) / 2
    with np.errstate(divide="ignore", invalid="ignore"):
        roots = np.array([np.divide(larger, square), np.divide(constant, larger)])
    return np.asarray(roots[np.isfinite(roots)])


def _stretches(
    model: FittedModel, b: PredictorFacts, measured: Measured, at: Floats, bounds: Floats
) -> tuple[Stretch, ...]:
    """Between one bound and the next an interval stays on one side, which its middle tells."""
    edges = np.concatenate([at[:1], bounds[(bounds > at[0]) & (bounds < at[-1])], at[-1:]])
    middle = (edges[1:] + edges[:-1]) / 2
    pieces = zip(edges[:-1].tolist(), edges[1:].tolist(), signs(measured(middle)), strict=False)
    merged: list[Stretch] = []
    for start, end, sign in pieces:
        if merged and (merged[-1].end, merged[-1].sign) == (start, sign):
            merged[-1] = replace(merged[-1], end=end)
        elif sign is not None:
            merged.append(Stretch(start, end, sign, 0.0))
    shares = _shares_between(model, b, merged)
    return tuple(
        replace(stretch, start=checked(b, stretch.start), end=checked(b, stretch.end), share=share)
        for stretch, share in zip(merged, shares, strict=True)
    )


def _shares_between(model: FittedModel, b: PredictorFacts, stretches: list[Stretch]) -> list[float]:
    """Shares of the rows; a row at a bound counts for the stretch that starts there."""
    if not model.sample.rows:
        return [float("nan")] * len(stretches)
    column, weights = model.sample.columns[b.name], everyone(model).weights
    inside = [
        (column >= stretch.start) & (column < stretch.end)
        if place < len(stretches) - 1
        else (column >= stretch.start) & (column <= stretch.end)
        for place, stretch in enumerate(stretches)
    ]
    return [float(weights[each].sum()) for each in inside]


def _shares_of_levels(
    model: FittedModel, b: PredictorFacts, levels: tuple[Scalar, ...]
) -> list[float]:
    if not model.sample.rows:
        return [float("nan")] * len(levels)
    codes = model.coded_values(b, levels)
    counted = np.bincount(
        model.sample.columns[b.name], everyone(model).weights, minlength=len(b.levels)
    )
    return [float(share) for share in counted[codes]]


def _shown(found: Intervals, scale: str, pair: Settled) -> Intervals:
    """On the scale asked for; a risk difference's interval where a difference can be."""
    if scale == "odds":
        return mapped(found, np.exp, np.exp)
    if pair.a.name in pair.sloped or found.lower is None or found.upper is None:
        return found
    return replace(found, lower=np.maximum(found.lower, -1.0), upper=np.minimum(found.upper, 1.0))


def _tuple(numbers: Floats | None) -> tuple[float, ...] | None:
    return None if numbers is None else tuple(numbers.tolist())
