"""How well fitted chances rank events above non-events.

c and DeLong's variance (DeLong, DeLong & Clarke-Pearson 1988, Biometrics 44:837) by
mid-ranks of the sorted chances (Sun & Xu 2014, IEEE Signal Process Lett 21:1389), with
counted cases in place of rows written out.
"""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray
from scipy.stats import norm

from plainodds.answers.checks.finding import Evidence, Finding, Topic
from plainodds.answers.checks.fitted_rows import (
    FEWEST,
    fitted_rows,
    ranked,
    rows_are_strangers,
    unknown_rows,
)
from plainodds.answers.estimate import Estimate
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = ["REASONS", "DiscriminationEvidence", "concordance", "discrimination_of"]

Floats = NDArray[np.float64]

REASONS = ("no better than chance",)

_BINS = 20


@value
class DiscriminationEvidence(Evidence):
    """c, and where events and non-events lie along the fitted chance.

    Attributes
    ----------
    c : Estimate
        With DeLong's variance; interval on the logit scale.
    edges : tuple of float
        Bin edges of the fitted chance, one more than counts.
    events, others : tuple of float
        Cases in each bin.
    """

    topic: ClassVar[Topic] = "discrimination"

    c: Estimate
    edges: tuple[float, ...]
    events: tuple[float, ...]
    others: tuple[float, ...]


def discrimination_of(model: FittedModel, level: float) -> Finding:
    """c with its interval, and where events and non-events lie."""
    unknown = unknown_rows(model, FEWEST)
    if unknown:
        return Finding("discrimination", "not known", unknown=unknown)
    rows = fitted_rows(model)
    events = rows.events
    others = rows.cases - events
    c, variance = concordance(rows.linear_predictor, events, others, rows.ranked)
    strangers = rows_are_strangers(model)
    estimate = _with_interval(c, variance, level) if strangers else Estimate(c, None, None, None)
    low, high = float(rows.probability.min()), float(rows.probability.max())
    edges = np.linspace(low, high, _BINS + 1) if high > low else np.array([0.0, 1.0])
    evidence = DiscriminationEvidence(
        c=estimate,
        edges=tuple(edges.tolist()),
        events=tuple(np.histogram(rows.probability, edges, weights=events)[0].tolist()),
        others=tuple(np.histogram(rows.probability, edges, weights=others)[0].tolist()),
    )
    if not strangers:
        return Finding("discrimination", "not known", evidence=evidence, unknown="no likelihood")
    if (c if estimate.lower is None else estimate.lower) > 0.5:
        return Finding("discrimination", "nothing found", evidence=evidence)
    return Finding("discrimination", "keep in mind", ("no better than chance",), evidence=evidence)


def concordance(
    linear_predictor: Floats,
    events: Floats,
    others: Floats,
    order: tuple[NDArray[np.intp], NDArray[np.intp]] | None = None,
) -> tuple[float, float]:
    """c and DeLong's variance of it, in n log n.

    Parameters
    ----------
    linear_predictor : array (n,)
    events, others : array (n,)
        Cases of each row; rows of equal η are ties, and a tie counts one half.
    order : optional
        What `ranked` found of the linear predictor.
    """
    places, starts = ranked(linear_predictor) if order is None else order
    e = np.add.reduceat(events[places], starts)
    d = np.add.reduceat(others[places], starts)
    all_events, all_others = float(e.sum()), float(d.sum())
    if not (all_events > 0 and all_others > 0):
        return math.nan, math.nan
    # each event's share of non-events below it, and each non-event's share of events above it
    below = (np.cumsum(d) - d / 2) / all_others
    above = 1 - (np.cumsum(e) - e / 2) / all_events
    c = float(e @ below) / all_events
    among_events = float(e @ (below - c) ** 2) / max(all_events - 1, 1.0)
    among_others = float(d @ (above - c) ** 2) / max(all_others - 1, 1.0)
    return c, among_events / all_events + among_others / all_others


def _with_interval(c: float, variance: float, level: float) -> Estimate:
    """On the logit scale, so that it stays within 0 and 1."""
    se = math.sqrt(variance)
    if not 0 < c < 1:
        # every event above every non-event: DeLong's variance is 0, which no one should believe
        return Estimate(c, None, None, None)
    eta = math.log(c / (1 - c))
    reach = float(norm.ppf((1 + level) / 2)) * se / (c * (1 - c))
    return Estimate(c, se, 1 / (1 + math.exp(reach - eta)), 1 / (1 + math.exp(-reach - eta)))
