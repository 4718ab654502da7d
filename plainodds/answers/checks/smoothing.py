"""Shares of events along a number: bins, and a smooth curve through them with a band.

The curve is local-linear with tricube weights on the nearest cases (Cleveland 1979, JASA
74:829), computed on up to 200 bins. It is linear in the shares, so that model and data are
smoothed by the very same weights. The band is Wilson's interval (1927, JASA 22:209) at the
number of cases that the local average is worth: it stays within 0 and 1, also where no case
nearby has the event.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.stats import norm

from plainodds.answers.checks.fitted_rows import FittedRows

__all__ = ["Binned", "Smoother", "binned", "smoother_of", "wilson"]

Floats = NDArray[np.float64]

_FINEST = 200
_SAMPLED = 20_000
_POINTS = 31
# Neighbours taken in: three quarters of the cases at 100 of the rarer outcome, shrinking with
# the fifth root as local-linear bandwidths do (Fan & Gijbels 1996, ch. 4). The three quarters
# are as in Austin & Steyerberg 2014 (Stat Med 33:517).
_SPAN_AT_100 = 0.75
_SPANS = (0.15, 0.9)


@dataclass(frozen=True, eq=False)
class Binned:
    """Sums over bins of neighbouring values; arrays of one length.

    Attributes
    ----------
    low, high, centre : array (B,)
        Ends, and the weighted mean of the number.
    cases, events : array (B,)
    observed, expected : array (B,)
        Weighted shares of events in the data and by the model.
    weights : array (B,)
    """

    low: Floats
    high: Floats
    centre: Floats
    cases: Floats
    events: Floats
    observed: Floats
    expected: Floats
    weights: Floats

    def coarser(self, groups: int) -> Binned:
        """Neighbouring bins put together to groups of about equally many cases.

        A group reaches up to its quantile, and takes in all of the bin that holds it.
        """
        cumulated = np.cumsum(self.cases)
        before = groups * (cumulated - self.cases) / cumulated[-1]
        group = np.minimum(np.floor(before + 1e-9).astype(int), groups - 1)
        starts = np.nonzero(np.diff(group, prepend=-1))[0]
        lasts = np.append(starts[1:], len(group)) - 1

        def total(each: Floats) -> Floats:
            return np.asarray(np.add.reduceat(each, starts))

        weights = total(self.weights)
        return Binned(
            self.low[starts],
            self.high[lasts],
            total(self.weights * self.centre) / weights,
            total(self.cases),
            total(self.events),
            total(self.weights * self.observed) / weights,
            total(self.weights * self.expected) / weights,
            weights,
        )

    @property
    def middle(self) -> tuple[float, float]:
        """Ends of the middle 90 % of cases."""
        share = np.cumsum(self.cases) / self.cases.sum()
        # a bin counts as within if more than half of it is
        places = np.searchsorted(share - self.cases / self.cases.sum() / 2, (0.05, 0.95))
        first, last = int(places[0]), int(places[1]) - 1
        return float(self.centre[first]), float(self.centre[max(first, last)])


def binned(values: Floats, rows: FittedRows) -> Binned:
    """Bins of a number: one for each value where they are few, else of about equal cases."""
    ends = _ends(values)
    place = np.searchsorted(ends, values, side="right") - 1
    size = len(ends)

    def total(each: Floats) -> Floats:
        return np.asarray(np.bincount(place, each, minlength=size), dtype=float)

    w = rows.weights
    weights, expected = total(w), total(w * rows.probability)
    observed, centre = total(w * rows.outcome), total(w * values)
    if rows.cases is rows.weights:
        cases, events = weights, observed
    else:
        cases, events = total(rows.cases), total(rows.events)
    high = np.append(ends[1:], values.max())
    if bool(np.all(ends[place] == values)):
        high, centre = ends, ends * weights
    kept = (weights > 0) & (cases > 0)
    weights, cases, events = weights[kept], cases[kept], events[kept]
    return Binned(
        ends[kept],
        high[kept],
        centre[kept] / weights,
        cases,
        events,
        observed[kept] / weights,
        expected[kept] / weights,
        weights,
    )


def _ends(values: Floats) -> Floats:
    """Lower ends of the bins, by every so-manieth row: which bins exactly is of no weight."""
    ordered = np.sort(values[:: max(1, len(values) // _SAMPLED)])
    distinct = ordered[np.diff(ordered, prepend=-np.inf) > 0]
    if len(distinct) > _FINEST:
        distinct = np.unique(ordered[np.linspace(0, len(ordered), _FINEST, False).astype(int)])
    distinct[0] = values.min()
    return distinct


@dataclass(frozen=True, eq=False)
class Smoother:
    """Weights that make a curve of the bins' shares.

    Attributes
    ----------
    at : array (G,)
        Where the curve is known.
    weights : array (G, B)
        Each row sums to 1.
    worth : array (G,)
        As how many cases the local average is worth.
    """

    at: Floats
    weights: Floats
    worth: Floats

    def curve(self, shares: Floats) -> Floats:
        """The smooth curve of the bins' shares, within 0 and 1."""
        return np.clip(self.weights @ shares, 0.0, 1.0)


def smoother_of(bins: Binned, by_level: bool = False) -> Smoother:
    """The smoother for some bins.

    Parameters
    ----------
    bins : Binned
    by_level : bool
        Whether each bin stands for itself, as where a number has a handful of values.
    """
    if by_level:
        return Smoother(bins.centre, np.eye(len(bins.centre)), bins.cases)
    at = _points(bins)
    away = bins.centre - at[:, None]
    local = _tricube(np.abs(away), bins) * bins.weights
    s0, s1, s2 = local.sum(axis=1), (local * away).sum(axis=1), (local * away**2).sum(axis=1)
    determinant = s0 * s2 - s1**2
    linear = determinant > 1e-9 * s0 * s2
    with np.errstate(divide="ignore", invalid="ignore"):
        tilted = local * (s2[:, None] - s1[:, None] * away) / determinant[:, None]
    weights = np.where(linear[:, None], tilted, local / s0[:, None])
    return Smoother(at, weights, 1 / (weights**2 @ (1 / bins.cases)))


def _points(bins: Binned) -> Floats:
    """Evenly along the number and evenly among the cases, for the middle 98 %."""
    share = (np.cumsum(bins.cases) - bins.cases / 2) / bins.cases.sum()
    among = np.interp(np.linspace(0.01, 0.99, _POINTS), share, bins.centre)
    return np.unique(np.concatenate([among, np.linspace(among[0], among[-1], _POINTS)]))


def _tricube(away: Floats, bins: Binned) -> Floats:
    events = float(bins.events.sum())
    rarer = max(min(events, float(bins.cases.sum()) - events), 1.0)
    span = float(np.clip(_SPAN_AT_100 * (100 / rarer) ** 0.2, *_SPANS))
    order = np.argsort(away, axis=1)
    reached = np.cumsum(bins.cases[order], axis=1) >= span * bins.cases.sum()
    # a line takes two bins beside the nearest, however many cases those hold
    nearest = np.maximum(reached.argmax(axis=1), min(3, away.shape[1] - 1))
    reach = np.take_along_axis(away, order, axis=1)[np.arange(len(away)), nearest]
    # where all cases share one value, the curve is a point
    reach[reach == 0] = 1.0
    left = np.maximum(1 - (away / (reach * (1 + 1e-9))[:, None]) ** 3, 0.0)
    return np.asarray(left**3)


def wilson(shares: Floats, cases: Floats, level: float) -> tuple[Floats, Floats]:
    """Wilson's interval of shares, for any number of cases above 0."""
    z = float(norm.ppf((1 + level) / 2))
    shrunk = 1 + z**2 / cases
    middle = (shares + z**2 / (2 * cases)) / shrunk
    reach = z / shrunk * np.sqrt(shares * (1 - shares) / cases + z**2 / (4 * cases**2))
    return np.maximum(middle - reach, 0.0), np.minimum(middle + reach, 1.0)
