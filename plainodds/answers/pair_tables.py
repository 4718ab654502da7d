"""Tables of two predictors together: the effect and the interaction, and the joint table."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Any

import pandas as pd

from plainodds.answers.columns import numbers
from plainodds.answers.joint import AdditiveInteraction, JointTable
from plainodds.answers.pair import PairAnswer
from plainodds.errors import QuestionRefused

__all__ = ["joint_table", "pair_table"]


def pair_table(answer: PairAnswer) -> pd.DataFrame:
    """The effect of one predictor along the other, then the interaction on both scales.

    Parameters
    ----------
    answer : PairAnswer

    Returns
    -------
    DataFrame
        `measure`, the value of the second predictor where there is one, `estimate, se,
        lower, upper, p_value` and whether rows lie near by (`supported`). A test's row
        holds its statistic.
    """
    rows = pd.DataFrame([*_effect_rows(answer), *_interaction_rows(answer)])
    return rows.astype({"p_value": float})


def _effect_rows(answer: PairAnswer) -> Iterator[dict[str, Any]]:
    question, effect = answer.question, answer.effect
    measure = "risk_difference"
    if question.scale == "odds":
        measure = "odds_ratio"
    elif question.a in answer.sloped:
        measure = "slope"
    nothing = (float("nan"),) * len(effect.at)
    columns = zip(
        effect.at,
        effect.estimate,
        effect.se or nothing,
        effect.lower or nothing,
        effect.upper or nothing,
        effect.supported,
        strict=True,
    )
    for at, estimate, se, lower, upper, supported in columns:
        yield {
            "measure": measure,
            question.b: at,
            "estimate": estimate,
            "se": se,
            "lower": lower,
            "upper": upper,
            "p_value": None,
            "supported": supported,
        }


def _interaction_rows(answer: PairAnswer) -> Iterator[dict[str, Any]]:
    found, b = answer.interaction, answer.question.b
    for measure, estimate, p in (
        ("interaction_at_profile", found.at_profile, found.at_profile_p_value),
        ("interaction_averaged", found.averaged, found.averaged_p_value),
        ("ratio_of_odds_ratios", found.ratio, None),
    ):
        if estimate is not None:
            yield (
                {"measure": measure, b: None}
                | numbers(estimate)
                | {"p_value": p, "supported": None}
            )
    test = found.test
    if test is not None:
        nothing = float("nan")
        yield {
            "measure": f"{test.kind}_test",
            b: None,
            "estimate": test.statistic,
            "se": nothing,
            "lower": nothing,
            "upper": nothing,
            "p_value": test.p_value,
            "supported": None,
        }


def joint_table(answer: PairAnswer) -> pd.DataFrame:
    """The joint table of two levels, or two stated values, of each of two predictors.

    Parameters
    ----------
    answer : PairAnswer

    Returns
    -------
    DataFrame
        One row per estimate: what `part` of the table it belongs to (combination, effect,
        interaction), its `measure`, the two predictors' values, `rows` and `events` of a
        combination, and `estimate, se, lower, upper`. An effect's own predictor holds
        its change, as ``"low to high"``.

    Raises
    ------
    QuestionRefused
        If a number was asked about without two values of it.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay()
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * soil", mains).fit(disp=0))
    >>> table = po.joint_table(fit.pair("soil", "age_years", b_values=(20, 60)))
    >>> list(table.part.unique())
    ['combination', 'effect', 'interaction']
    """
    if answer.joint is None:
        raise QuestionRefused(_without_two_values(answer))
    rows = [
        *_combination_rows(answer, answer.joint),
        *_stratum_rows(answer, answer.joint),
        *_measure_rows(answer, answer.joint),
    ]
    return pd.DataFrame(rows)


def _without_two_values(answer: PairAnswer) -> str:
    question = answer.question
    wanting, stated = [], []
    for name, argument, values in (
        (question.a, "a_values", question.a_values),
        (question.b, "b_values", question.b_values),
    ):
        facts = answer.subject.predictor(name)
        if values:
            stated.append(f"{argument}={values!r}")
        elif facts.is_number:
            wanting.append(name)
            stated.append(f"{argument}=({facts.quartiles[0]:g}, {facts.quartiles[2]:g})")
    is_or_are = "is a number" if len(wanting) == 1 else "are numbers"
    return (
        f"A joint table compares two values of each predictor, and {' and '.join(wanting)} "
        f"{is_or_are} without two stated ones. State them: "
        f"pair({question.a!r}, {question.b!r}, {', '.join(stated)})."
    )


def _combination_rows(answer: PairAnswer, joint: JointTable) -> Iterator[dict[str, Any]]:
    a, b = answer.question.a, answer.question.b
    for measure in ("odds_ratio", "chance"):
        for cell in joint.cells:
            estimate = getattr(cell, measure)
            if estimate is not None:
                yield {
                    "part": "combination",
                    "measure": measure,
                    a: cell.a,
                    b: cell.b,
                    "rows": cell.rows,
                    "events": cell.events,
                } | numbers(estimate)


def _stratum_rows(answer: PairAnswer, joint: JointTable) -> Iterator[dict[str, Any]]:
    a, b = answer.question.a, answer.question.b
    for measure in ("odds_ratio", "risk_difference"):
        for stratum in joint.strata:
            estimate = getattr(stratum, measure)
            if estimate is not None:
                other = b if stratum.predictor == a else a
                change = f"{stratum.start} to {stratum.end}"
                values = {stratum.predictor: change, other: stratum.within}
                yield {
                    "part": "effect",
                    "measure": measure,
                    a: values[a],
                    b: values[b],
                    "rows": None,
                    "events": None,
                } | numbers(estimate)


def _measure_rows(answer: PairAnswer, joint: JointTable) -> Iterator[dict[str, Any]]:
    nobody = {answer.question.a: None, answer.question.b: None, "rows": None, "events": None}
    yield (
        {"part": "interaction", "measure": "ratio_of_odds_ratios"}
        | nobody
        | numbers(joint.multiplicative)
    )
    additive: tuple[tuple[str, AdditiveInteraction | None], ...] = (
        ("odds", joint.additive_by_odds),
        ("chances", joint.additive_by_chances),
    )
    for by, measures in additive:
        if measures is None:
            continue
        for measure in ("relative_excess_risk", "attributable_proportion", "synergy_index"):
            estimate = getattr(measures, measure)
            if estimate is not None:
                yield (
                    {"part": "interaction", "measure": f"{measure}_by_{by}"}
                    | nobody
                    | numbers(estimate)
                )
