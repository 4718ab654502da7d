"""Answers as tidy pandas tables."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import fields, is_dataclass
from functools import singledispatch
from typing import Any

import pandas as pd

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.checks.finding import Evidence
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.estimate import Estimate
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.answers.questions import Answer
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.values import Pairs

__all__ = ["ledger", "table"]


@singledispatch
def table(answer: Answer) -> pd.DataFrame:
    """The answer's numbers, tidy: one row per estimate.

    Parameters
    ----------
    answer : OddsAnswer, CurveAnswer, EffectsAnswer, ChangeAnswer, ProfileAnswer or SoundnessAnswer

    Returns
    -------
    DataFrame
        What each estimate is about, then `estimate, se, lower, upper` (and `p_value`
        where one is due). Where no interval can be had the columns hold NaN. Of soundness:
        one row per finding, with its main figures as text.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> pipes = po.demo.tessel_bay()
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit(disp=0))
    >>> list(po.table(fit.profile({"age_years": 80})).scale)
    ['linear_predictor', 'odds', 'probability']
    """
    raise TypeError(f"{type(answer).__name__} is not an answer of plainodds.")


@table.register
def _(answer: OddsAnswer) -> pd.DataFrame:
    several = bool(answer.question.models)
    rows: list[dict[str, Any]] = [
        ({"model": row.model} if several else {})
        | {
            "predictor": row.predictor,
            "from": row.start,
            "to": row.end,
            "per_step": row.per_step,
            "given": _written(row.given),
        }
        | _numbers(row.odds_ratio)
        | {"p_value": row.p_value}
        for row in answer.rows
    ]
    return pd.DataFrame(rows).astype({"p_value": float})


@table.register
def _(answer: CurveAnswer) -> pd.DataFrame:
    question = answer.question
    parts = []
    for line in answer.lines:
        part: dict[str, Any] = {question.predictor: list(line.at)}
        if question.by is not None:
            part[question.by] = [line.by] * len(line.at)
        part["estimate"] = list(line.estimate)
        for name, numbers in (("se", line.se), ("lower", line.lower), ("upper", line.upper)):
            part[name] = [float("nan")] * len(line.at) if numbers is None else list(numbers)
        part["supported"] = list(line.supported)
        parts.append(pd.DataFrame(part))
    return pd.concat(parts, ignore_index=True)


@table.register
def _(answer: ProfileAnswer) -> pd.DataFrame:
    profiles = [("profile", answer.point)]
    if answer.comparison is not None:
        profiles.append(("against", answer.start))
    rows = [
        {"profile": name, "scale": scale} | _numbers(getattr(point, scale))
        for name, point in profiles
        for scale in ("linear_predictor", "odds", "probability")
    ]
    if answer.comparison is not None:
        rows += [
            {"profile": "profile against", "scale": measure}
            | _numbers(getattr(answer.comparison, measure))
            for measure in ("odds_ratio", "risk_difference", "risk_ratio")
        ]
    return pd.DataFrame(rows)


@table.register
def _(answer: EffectsAnswer) -> pd.DataFrame:
    by = answer.question.by
    rows = [
        ({} if by is None else {by: row.by})
        | {"predictor": row.predictor, "from": row.start, "to": row.end, "step": row.step}
        | _numbers(row.effect)
        | {"p_value": row.p_value}
        for row in answer.rows
    ]
    return pd.DataFrame(rows).astype({"p_value": float})


@table.register
def _(answer: ChangeAnswer) -> pd.DataFrame:
    measures = {
        "from": answer.start,
        "to": answer.end,
        "risk_difference": answer.comparison.risk_difference,
        "risk_ratio": answer.comparison.risk_ratio,
        "odds_ratio": answer.comparison.odds_ratio,
    }
    rows = [{"measure": name} | _numbers(estimate) for name, estimate in measures.items()]
    for name, unit in (("per_100", 100.0), ("per_1000", 1000.0)):
        difference = _numbers(answer.comparison.risk_difference)
        rows.append({"measure": name} | {key: unit * held for key, held in difference.items()})
    needed = answer.number_needed
    # its interval has two pieces, which two columns cannot hold: see number_needed
    nothing = float("nan")
    rows.append(
        {"measure": "number_needed"}
        | {"estimate": needed.estimate, "se": nothing, "lower": nothing, "upper": nothing}
    )
    return pd.DataFrame(rows)


@table.register
def _(answer: SoundnessAnswer) -> pd.DataFrame:
    rows = [
        {
            "topic": found.topic,
            "concern": found.concern,
            "about": ", ".join(found.about),
            "reasons": ", ".join(found.reasons),
            "figures": _written(tuple(_figures(found.evidence))),
            "unknown": found.unknown,
        }
        for found in answer.findings
    ]
    return pd.DataFrame(rows)


def _figures(evidence: Evidence | None) -> Iterator[tuple[str, str]]:
    """Whatever of the evidence is a single figure; curves, bins and lists are left out."""
    if not is_dataclass(evidence):
        return
    for field in fields(evidence):
        held = getattr(evidence, field.name)
        if isinstance(held, Estimate):
            ends = "" if held.lower is None else f" ({held.lower:.4g} to {held.upper:.4g})"
            yield field.name, f"{held.estimate:.4g}{ends}"
        elif isinstance(held, float):
            yield field.name, f"{held:.4g}"
        elif isinstance(held, bool | int | str) and held != "":
            yield field.name, str(held)


def ledger(answer: ProfileAnswer) -> pd.DataFrame:
    """The profile's ledger: what each group of predictors adds to η.

    Parameters
    ----------
    answer : ProfileAnswer

    Returns
    -------
    DataFrame
        `predictors`, their values, what the group adds to η (`estimate, se, lower,
        upper`), by what it multiplies the odds, and η and π after the row. The first row
        is where the ledger starts.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> pipes = po.demo.tessel_bay()
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit(disp=0))
    >>> rows = po.ledger(fit.profile({"age_years": 80}))
    >>> total = fit.profile({"age_years": 80}).point.linear_predictor.estimate
    >>> bool(abs(rows.estimate.sum() - total) < 1e-12)
    True
    """
    values = dict(answer.point.values)
    start = answer.start
    rows: list[dict[str, Any]] = [
        {"predictors": "start", "values": _written(start.values)}
        | _numbers(start.linear_predictor)
        | {
            "multiplies_odds": start.odds.estimate,
            "running_linear_predictor": start.linear_predictor.estimate,
            "running_probability": start.probability.estimate,
        }
    ]
    rows += [
        {
            "predictors": ", ".join(row.predictors),
            "values": _written(tuple((name, values[name]) for name in row.predictors)),
        }
        | _numbers(row.adds)
        | {
            "multiplies_odds": row.multiplies.estimate,
            "running_linear_predictor": row.running_linear_predictor,
            "running_probability": row.running_probability,
        }
        for row in answer.ledger
    ]
    return pd.DataFrame(rows)


def _numbers(estimate: Estimate) -> dict[str, float]:
    def or_nan(number: float | None) -> float:
        return float("nan") if number is None else number

    return {
        "estimate": estimate.estimate,
        "se": or_nan(estimate.se),
        "lower": or_nan(estimate.lower),
        "upper": or_nan(estimate.upper),
    }


def _written(values: Pairs) -> str:
    return ", ".join(f"{name} = {held}" for name, held in values)
