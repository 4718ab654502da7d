"""Answers as tidy pandas tables."""

from __future__ import annotations

from functools import singledispatch
from typing import Any

import pandas as pd

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.columns import numbers, written
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.pair import PairAnswer
from plainodds.answers.pair_tables import joint_table, pair_table
from plainodds.answers.profile import ProfileAnswer
from plainodds.answers.questions import Answer
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.answers.soundness_tables import findings_table

__all__ = ["joint_table", "ledger", "table"]


@singledispatch
def table(answer: Answer) -> pd.DataFrame:
    """The answer's numbers, tidy: one row per estimate.

    Parameters
    ----------
    answer : Answer

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
            "given": written(row.given),
        }
        | numbers(row.odds_ratio)
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
        for name, held in (("se", line.se), ("lower", line.lower), ("upper", line.upper)):
            part[name] = [float("nan")] * len(line.at) if held is None else list(held)
        part["supported"] = list(line.supported)
        parts.append(pd.DataFrame(part))
    return pd.concat(parts, ignore_index=True)


@table.register
def _(answer: ProfileAnswer) -> pd.DataFrame:
    profiles = [("profile", answer.point)]
    if answer.comparison is not None:
        profiles.append(("against", answer.start))
    rows = [
        {"profile": name, "scale": scale} | numbers(getattr(point, scale))
        for name, point in profiles
        for scale in ("linear_predictor", "odds", "probability")
    ]
    if answer.comparison is not None:
        rows += [
            {"profile": "profile against", "scale": measure}
            | numbers(getattr(answer.comparison, measure))
            for measure in ("odds_ratio", "risk_difference", "risk_ratio")
        ]
    return pd.DataFrame(rows)


@table.register
def _(answer: EffectsAnswer) -> pd.DataFrame:
    by = answer.question.by
    rows = [
        ({} if by is None else {by: row.by})
        | {"predictor": row.predictor, "from": row.start, "to": row.end, "step": row.step}
        | numbers(row.effect)
        | {"p_value": row.p_value}
        for row in answer.rows
    ]
    return pd.DataFrame(rows).astype({"p_value": float})


@table.register
def _(answer: ExcerptAnswer) -> pd.DataFrame:
    return table(answer.whole)


@table.register
def _(answer: ChangeAnswer) -> pd.DataFrame:
    measures = {
        "from": answer.start,
        "to": answer.end,
        "risk_difference": answer.comparison.risk_difference,
        "risk_ratio": answer.comparison.risk_ratio,
        "odds_ratio": answer.comparison.odds_ratio,
    }
    rows = [{"measure": name} | numbers(estimate) for name, estimate in measures.items()]
    for name, unit in (("per_100", 100.0), ("per_1000", 1000.0)):
        difference = numbers(answer.comparison.risk_difference)
        rows.append({"measure": name} | {key: unit * held for key, held in difference.items()})
    needed = answer.number_needed
    # its interval has two pieces, which two columns cannot hold: see number_needed
    nothing = float("nan")
    rows.append(
        {"measure": "number_needed"}
        | {"estimate": needed.estimate, "se": nothing, "lower": nothing, "upper": nothing}
    )
    return pd.DataFrame(rows)


table.register(PairAnswer, pair_table)
table.register(SoundnessAnswer, findings_table)


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
        {"predictors": "start", "values": written(start.values)}
        | numbers(start.linear_predictor)
        | {
            "multiplies_odds": start.odds.estimate,
            "running_linear_predictor": start.linear_predictor.estimate,
            "running_probability": start.probability.estimate,
        }
    ]
    rows += [
        {
            "predictors": ", ".join(row.predictors),
            "values": written(tuple((name, values[name]) for name in row.predictors)),
        }
        | numbers(row.adds)
        | {
            "multiplies_odds": row.multiplies.estimate,
            "running_linear_predictor": row.running_linear_predictor,
            "running_probability": row.running_probability,
        }
        for row in answer.ledger
    ]
    return pd.DataFrame(rows)
