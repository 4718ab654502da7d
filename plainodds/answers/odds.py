"""Odds ratios for changes that mean something."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.bounded import (
    as_ratio,
    ends_are_quick,
    limits_of,
    unbounded_estimate,
    unbounded_p_value,
)
from plainodds.answers.changes import OddsQuestion, OddsRow, changes_asked, contrasts_of
from plainodds.answers.delta import Intervals, checked_level, mapped, p_values, wald
from plainodds.answers.estimate import Estimate
from plainodds.answers.likelihood import likelihood_of
from plainodds.answers.odds_interactions import InteractionTest, interaction_tests
from plainodds.answers.progress import Progress, silent
from plainodds.answers.questions import Answer
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.scales import odds_from_linear_predictor, probability_from_linear_predictor
from plainodds.values import Pairs, pairs, value

__all__ = ["OddsAnswer", "OddsQuestion", "OddsRow", "answer_odds", "answer_odds_of"]

Floats = NDArray[np.float64]


@value
class OddsAnswer(Answer):
    """Odds ratios, one row per change.

    Attributes
    ----------
    question : OddsQuestion
    subject : Subject
        Of the first model where there are several.
    rows : tuple of OddsRow
    typical_probability : float
        The chance at the typical profile: tells whether an odds ratio may be taken
        for a risk ratio (it may not above about 10 %); nan where the sample is
        case-control and no prevalence is stated.
    interactions : tuple of InteractionTest
        One for each pair of predictors of which one's rows are stated at values of the
        other; empty where there are none, or no test.
    """

    question: OddsQuestion
    subject: Subject
    rows: tuple[OddsRow, ...]
    typical_probability: float
    interactions: tuple[InteractionTest, ...] = ()


def answer_odds(
    model: FittedModel, question: OddsQuestion, progress: Progress = silent
) -> OddsAnswer:
    """Odds ratios of stated changes, with Wald intervals on the log scale.

    The odds ratio of a change from x₀ to x₁ is exp((x₁ − x₀)'β), and its log has the
    variance (x₁ − x₀)'V(x₁ − x₀): so any step, any reference level and any value of a
    modifier needs no new fit. Source: Hosmer, Lemeshow & Sturdivant, Applied Logistic
    Regression, ch. 3.

    With `interval="likelihood"` the interval holds the values that the likelihood allows
    (Venzon & Moolgavkar 1988) and the test is the likelihood-ratio test.

    Where the data are separated along a change its odds ratio has no finite estimate
    (Albert & Anderson 1984): then it is infinite, or 0, its standard error is None, and one
    end of its interval and its test come from the likelihood, whatever interval was asked.
    Where the data leave it undetermined it is nan.

    Parameters
    ----------
    model : FittedModel
    question : OddsQuestion
    progress : callable, optional
        Told after each row how many of how many are done; may raise to stop.

    Raises
    ------
    QuestionRefused
        For an unknown predictor, level, value or setting, or a likelihood interval of a
        fit that has none.
    """
    level = checked_level(question.level)
    changes = list(changes_asked(model, question))
    contrasts = contrasts_of(model, changes)
    logs = wald(model, contrasts @ model.coefficients, contrasts, level)
    tests = p_values(model, logs)
    limits = limits_of(model, contrasts)
    if question.interval == "likelihood":
        logs, tests = _by_likelihood(model, logs, contrasts, limits, level, progress)
    elif question.interval != "wald":
        raise QuestionRefused(f"interval={question.interval!r}: choose 'wald' or 'likelihood'.")
    unasked = question.interval == "wald" and not ends_are_quick(model, int((limits != 0).sum()))
    ratios = mapped(logs, odds_from_linear_predictor, odds_from_linear_predictor)
    rows = tuple(
        replace(row, odds_ratio=ratios.at(i), log_odds_ratio=logs.at(i), p_value=p)
        if limits[i] == 0
        else _unbounded(model, row, contrasts[i], float(limits[i]), None if unasked else level)
        for i, (row, p) in enumerate(zip(changes, tests, strict=True))
    )
    interactions = interaction_tests(model, rows, question.interval)
    if question.order == "size":
        rows = tuple(sorted(rows, key=_size))
    return OddsAnswer(question, model.subject, rows, _typical_probability(model), interactions)


def _typical_probability(model: FittedModel) -> float:
    if model.subject.sampling == "case-control" and model.subject.prevalence is None:
        return math.nan
    eta = model.rows([model.typical]) @ model.coefficients + model.offset
    return float(probability_from_linear_predictor(eta)[0])


def _size(row: OddsRow) -> tuple[bool, float]:
    size = abs(row.log_odds_ratio.estimate)
    return math.isnan(size), -size


def _unbounded(
    model: FittedModel, row: OddsRow, contrast: Floats, limit: float, level: float | None
) -> OddsRow:
    """A row whose odds ratio has no finite estimate; without a level its interval is left out."""
    if level is None:
        log = Estimate(limit, None, None, None)
        return replace(row, odds_ratio=as_ratio(log), log_odds_ratio=log, p_value=None)
    log = unbounded_estimate(model, contrast, limit, level)
    return replace(
        row,
        odds_ratio=as_ratio(log),
        log_odds_ratio=log,
        p_value=unbounded_p_value(model, contrast, limit),
    )


def _by_likelihood(
    model: FittedModel,
    logs: Intervals,
    contrasts: Floats,
    limits: Floats,
    level: float,
    progress: Progress,
) -> tuple[Intervals, tuple[float | None, ...]]:
    likelihood = likelihood_of(model)
    ends = np.full((2, len(contrasts)), math.nan)
    tests: list[float | None] = [None] * len(contrasts)
    for i, contrast in enumerate(contrasts):
        if limits[i] == 0:
            ends[:, i] = likelihood.interval(contrast, level)
            tests[i] = likelihood.p_value(contrast)
        progress(i + 1, len(contrasts))
    return Intervals(logs.estimate, logs.se, ends[0], ends[1]), tuple(tests)


def answer_odds_of(models: Mapping[str, FittedModel], question: OddsQuestion) -> OddsAnswer:
    """The same changes in several fitted models, for example crude and adjusted.

    Steps, values compared and references are those of the first model that has the
    predictor, so that rows set side by side speak of the same change.

    Raises
    ------
    QuestionRefused
        If there are no models, or a predictor is in none of them.
    """
    if not models:
        raise QuestionRefused("odds_of needs at least one fitted model, as {'adjusted': result}.")
    known = {facts.name for model in models.values() for facts in model.subject.predictors}
    for name in question.predictors:
        if name not in known:
            raise QuestionRefused(f"None of the models has a predictor {name!r}.")
    shared = question
    answers, interactions = [], []
    for name, model in models.items():
        own = {facts.name for facts in model.subject.predictors}
        answer = answer_odds(model, _limited_to(shared, own))
        answers.append(tuple(replace(row, model=name) for row in answer.rows))
        interactions += [replace(each, model=name) for each in answer.interactions]
        shared = _with_the_same_changes(shared, answer)
    order = dict.fromkeys((r.predictor, r.end, r.given) for rows in answers for r in rows)
    positions = {key: place for place, key in enumerate(order)}
    first_place: dict[str, int] = {}
    for predictor, *_ in order:
        first_place.setdefault(predictor, len(first_place))
    rows = sorted(
        (row for rows in answers for row in rows),
        key=lambda r: (first_place[r.predictor], positions[r.predictor, r.end, r.given]),
    )
    first = next(iter(models.values()))
    question = replace(question, models=tuple(models))
    chance = _typical_probability(first)
    return OddsAnswer(question, _joined(models), tuple(rows), chance, tuple(interactions))


def _joined(models: Mapping[str, FittedModel]) -> Subject:
    """The first model's subject, with the predictors and notices of all."""
    subjects = [model.subject for model in models.values()]
    predictors: dict[str, PredictorFacts] = {}
    for facts in (facts for subject in subjects for facts in subject.predictors):
        predictors.setdefault(facts.name, facts)
    return replace(
        subjects[0],
        predictors=tuple(predictors.values()),
        notices=tuple(dict.fromkeys(n for subject in subjects for n in subject.notices)),
        no_interval=next((s.no_interval for s in subjects if s.no_interval), ""),
    )


def _limited_to(question: OddsQuestion, own: set[str]) -> OddsQuestion:
    def kept(stated: Pairs) -> Pairs:
        return tuple((name, held) for name, held in stated if name in own)

    asked = tuple(name for name in question.predictors if name in own)
    return replace(
        question,
        predictors=asked if question.predictors else (),
        steps=kept(question.steps),
        between=kept(question.between),
        references=kept(question.references),
        given=kept(question.given),
    )


def _with_the_same_changes(question: OddsQuestion, answer: OddsAnswer) -> OddsQuestion:
    steps, between = dict(question.steps), dict(question.between)
    references = dict(question.references)
    for row in answer.rows:
        facts = answer.subject.predictor(row.predictor)
        if not facts.is_number:
            references.setdefault(row.predictor, row.start)
        elif row.predictor not in between and row.per_step:
            steps.setdefault(row.predictor, float(row.end) - float(row.start))
        elif row.predictor not in steps:
            between.setdefault(row.predictor, (row.start, row.end))
    return replace(
        question, steps=pairs(steps), between=pairs(between), references=pairs(references)
    )
