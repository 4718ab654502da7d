"""The joint table of two factors with two levels each, on both scales of interaction."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.additive import AdditiveInteraction, additive_interaction
from plainodds.answers.averaging import Averager
from plainodds.answers.chances import chances
from plainodds.answers.comparing import compared
from plainodds.answers.delta import Intervals, mapped, wald
from plainodds.answers.estimate import UNKNOWN, Estimate
from plainodds.answers.points import Around
from plainodds.answers.population import Averages
from plainodds.model.design.design import Coded, Floats
from plainodds.model.fitted import FittedModel
from plainodds.scales import odds_from_linear_predictor
from plainodds.values import Pairs, Scalar, value

__all__ = ["AdditiveInteraction", "JointCell", "JointTable", "StratumEffect", "joint_table_of"]


@value
class JointCell:
    """One combination of the two factors.

    Attributes
    ----------
    a, b : scalar
    rows, events : float or None
        Cases in the data with this combination, and events among them; None where the
        model carries no rows (no outcome), or one of the two is a number, whose very
        value need be nobody's.
    chance : Estimate or None
        None where the sample tells no chances (case-control without a prevalence); nan
        without an interval where the rows leave it open.
    odds_ratio : Estimate
        Against the reference combination; exactly 1 without an interval for itself. nan
        without an interval where the rows leave it open, as without any row of this
        combination in a model with a product term.
    is_reference : bool
    """

    a: Scalar
    b: Scalar
    rows: float | None
    events: float | None
    chance: Estimate | None
    odds_ratio: Estimate
    is_reference: bool


@value
class StratumEffect:
    """The effect of one factor among those with one level of the other.

    Attributes
    ----------
    predictor : str
    start, end : scalar
        The change of the predictor.
    within : scalar
        The other factor's level.
    odds_ratio : Estimate
    risk_difference : Estimate or None
    """

    predictor: str
    start: Scalar
    end: Scalar
    within: Scalar
    odds_ratio: Estimate
    risk_difference: Estimate | None


@value
class JointTable:
    """Each combination against one reference, the effects within strata, and the interaction.

    Attributes
    ----------
    cells : tuple of four JointCell
        Reference; `a` alone changed; `b` alone changed; both changed.
    recoded : tuple of str
        Predictors whose two levels were exchanged so that the reference combination has
        the lowest odds (Knol et al. 2011); empty where the stated ones were kept.
    strata : tuple of four StratumEffect
        Of `a` within each level of `b`, then of `b` within each level of `a`.
    multiplicative : Estimate
        The ratio of odds ratios, in terms of the recoded levels: where one of the two is
        recoded, the inverse of the stated levels' ratio.
    additive_by_odds : AdditiveInteraction
        From odds ratios, which stand for risk ratios only where the event is rare.
    additive_by_chances : AdditiveInteraction or None
        From the chances themselves; None where the sample tells none.

    Notes
    -----
    What the rows leave open is nan without an interval, and a synergy index is then None.
    """

    cells: tuple[JointCell, ...]
    recoded: tuple[str, ...]
    strata: tuple[StratumEffect, ...]
    multiplicative: Estimate
    additive_by_odds: AdditiveInteraction
    additive_by_chances: AdditiveInteraction | None


# Combinations are numbered 0 to 3: bit 1 is set where `a` is changed, bit 2 where `b` is.
# Exchanging a predictor's levels flips its bit.
_A, _B = 1, 2
_STRATA = ((0, 1), (2, 3), (0, 2), (1, 3))
# an odds ratio of exactly 1 is known up to where the fit stopped
_NO_EFFECT = 1e-6

Corners = list[tuple[Scalar, Scalar]]


def joint_table_of(
    model: FittedModel,
    a: str,
    b: str,
    a_change: tuple[Scalar, Scalar],
    b_change: tuple[Scalar, Scalar],
    base: Pairs,
    averager: Averager | None,
    level: float,
) -> JointTable:
    """The joint table of two factors, after Knol & VanderWeele 2012 (Int J Epidemiol 41:514).

    Odds ratios are those at the held profile, with intervals on the log scale. Chances are
    held there too, or averaged. Additive measures come by the delta method (Hosmer &
    Lemeshow 1992, Epidemiology 3:452). They mean little where a factor is protective, so
    where one alone lowers the odds the combination with the lowest odds becomes the
    reference (Knol, VanderWeele et al. 2011, Eur J Epidemiol 26:433).

    Parameters
    ----------
    model : FittedModel
    a, b : str
    a_change, b_change : (from, to)
    base : pairs of (predictor, value)
        The whole held profile; what it says of `a` and `b` is not used.
    averager : Averager or None
        What averages the chances over a population; None where they are held at `base`.
    level : float

    Raises
    ------
    QuestionRefused
        For an unknown predictor, level or value.
    """
    corners = [(x, y) for y in b_change for x in a_change]
    around = Around(model, base)
    rows = around.rows(_moved(model, a, b, corners))
    lowest = _reference(model, rows)
    order = [corner ^ lowest for corner in range(4)]
    corners, rows = [corners[place] for place in order], rows[order]
    contrasts = rows[1:] - rows[0]
    # in this order a column that does not join the two cancels exactly
    joining = (rows[3] - rows[1]) - (rows[2] - rows[0])
    averages = _averages(around, _moved(model, a, b, corners), averager)
    return JointTable(
        cells=_cells(model, (a, b), corners, contrasts, averages, level),
        recoded=tuple(name for name, bit in ((a, _A), (b, _B)) if lowest & bit),
        strata=_strata(model, (a, b), corners, rows, averages, level),
        multiplicative=_odds_ratios(model, joining[None], level)[0],
        additive_by_odds=_additive(model, contrasts @ model.coefficients, contrasts, level),
        additive_by_chances=None if averages is None else _by_chances(model, averages, level),
    )


def _reference(model: FittedModel, rows: Floats) -> int:
    """The combination to compare with: the first, or the one with the lowest odds."""
    contrasts = rows - rows[0]
    logs = contrasts @ model.coefficients
    if min(logs[_A], logs[_B]) >= -_NO_EFFECT or not model.estimable.determined(contrasts).all():
        return 0
    return int(np.argmin(logs))


def _moved(model: FittedModel, a: str, b: str, corners: Corners) -> dict[str, NDArray[Any]]:
    """The combinations as coded columns."""
    stated = {a: [x for x, _ in corners], b: [y for _, y in corners]}
    return {
        name: model.coded_values(model.subject.predictor(name), values)
        for name, values in stated.items()
    }


def _averages(around: Around, moved: Coded, averager: Averager | None) -> Averages | None:
    """The chance of each combination, averaged or held; None where the sample tells none."""
    subject = around.model.subject
    if subject.sampling == "case-control" and subject.prevalence is None:
        return None
    return around.chances(moved) if averager is None else averager.probability(moved)


def _known(intervals: Intervals, determined: NDArray[np.bool_]) -> tuple[Estimate, ...]:
    return tuple(intervals.at(place) if told else UNKNOWN for place, told in enumerate(determined))


def _odds_ratios(model: FittedModel, contrasts: Floats, level: float) -> tuple[Estimate, ...]:
    logs = wald(model, contrasts @ model.coefficients, contrasts, level)
    ratios = mapped(logs, odds_from_linear_predictor, odds_from_linear_predictor)
    return _known(ratios, model.estimable.determined(contrasts))


def _cells(
    model: FittedModel,
    names: tuple[str, str],
    corners: Corners,
    contrasts: Floats,
    averages: Averages | None,
    level: float,
) -> tuple[JointCell, ...]:
    ratios = (Estimate(1.0, None, None, None), *_odds_ratios(model, contrasts, level))
    told: tuple[Estimate | None, ...] = (None,) * 4
    if averages is not None:
        determined = model.estimable.determined(averages.gradient)
        told = _known(chances(model, averages, level), determined)
    counted = _counted(model, names, corners)
    return tuple(
        JointCell(*corner, *counted[place], told[place], ratios[place], place == 0)
        for place, corner in enumerate(corners)
    )


def _counted(
    model: FittedModel, names: tuple[str, str], corners: Corners
) -> list[tuple[float | None, float | None]]:
    """Cases with each combination, and events among them."""
    sample = model.sample
    one, other = (model.subject.predictor(name) for name in names)
    if one.is_number or other.is_number or sample.outcome is None:
        return [(None, None)] * 4
    shape = (len(one.levels), len(other.levels))
    # levels are kept in as few bytes as hold them, of which a product needs more
    where = sample.columns[one.name].astype(np.intp) * shape[1] + sample.columns[other.name]
    frequencies = np.ones(sample.rows) if sample.frequencies is None else sample.frequencies
    cases, events = (
        np.bincount(where, counts, minlength=shape[0] * shape[1]).reshape(shape)
        for counts in (frequencies, frequencies * sample.outcome)
    )
    places = [(one.levels.index(x), other.levels.index(y)) for x, y in corners]
    return [(float(cases[place]), float(events[place])) for place in places]


def _strata(
    model: FittedModel,
    names: tuple[str, str],
    corners: Corners,
    rows: Floats,
    averages: Averages | None,
    level: float,
) -> tuple[StratumEffect, ...]:
    ratios = _odds_ratios(
        model, np.array([rows[end] - rows[start] for start, end in _STRATA]), level
    )
    effects = []
    for (start, end), ratio in zip(_STRATA, ratios, strict=True):
        moved = 0 if end - start == _A else 1
        effects.append(
            StratumEffect(
                predictor=names[moved],
                start=corners[start][moved],
                end=corners[end][moved],
                within=corners[start][1 - moved],
                odds_ratio=ratio,
                risk_difference=_difference(model, averages, [start, end], level),
            )
        )
    return tuple(effects)


def _difference(
    model: FittedModel, averages: Averages | None, ends: list[int], level: float
) -> Estimate | None:
    if averages is None:
        return None
    probability, gradient = averages.value[ends], averages.gradient[ends]
    if not model.estimable.determined(gradient).all():
        return UNKNOWN
    return compared(model, probability, gradient, level).risk_difference


def _by_chances(model: FittedModel, averages: Averages, level: float) -> AdditiveInteraction:
    with np.errstate(divide="ignore", invalid="ignore"):
        logs, slopes = np.log(averages.value), averages.gradient / averages.value[:, None]
        return _additive(model, logs[1:] - logs[0], slopes[1:] - slopes[0], level)


def _additive(
    model: FittedModel, log_ratios: Floats, gradients: Floats, level: float
) -> AdditiveInteraction:
    if not model.estimable.determined(gradients).all():
        return AdditiveInteraction(UNKNOWN, UNKNOWN, None)
    return additive_interaction(model, log_ratios, gradients, level)
