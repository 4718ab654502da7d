"""What every note on methods needs: the model, its covariance, and the works cited."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.answers.curve import Others
from plainodds.answers.where import Where
from plainodds.model.predictors import Subject
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.methods.note import MethodsNote, noted
from plainodds.phrases.numbers import confidence, count, quantity
from plainodds.phrases.parts import covariance_words
from plainodds.phrases.units import tidy
from plainodds.phrases.versions import versions

__all__ = ["interval_sentence", "note", "others_sentence"]


_MADE = f"Computed with {versions('plainodds', 'statsmodels', 'numpy')}"


def note(subject: Subject, sentences: Iterable[str]) -> MethodsNote:
    """A note that opens with the model and ends with the works that its sentences cite."""
    return noted(*_model(subject), *sentences, _MADE)


def _model(subject: Subject) -> list[str]:
    outcome = subject.outcome
    names = listed([predictor_name(facts) for facts in subject.predictors])
    told = [
        f"A logistic regression of {tidy(outcome.event)} on {names} was fitted to "
        f"{count(subject.rows)} {tidy(outcome.cases)} (Hosmer et al. 2013)"
    ]
    if subject.offset is not None:
        told.append("The model has an offset, whose coefficient is fixed at 1")
    if subject.prevalence is not None:
        told.append(
            "The sample was chosen by its outcome; the intercept was shifted to a share of "
            f"events of {quantity(100 * subject.prevalence, '%')} in the population, and averages "
            "were weighed to it (King & Zeng 2001)"
        )
    elif subject.sampling == "case-control":
        told.append("The sample was chosen by its outcome, so that only odds ratios are estimated")
    return told


def interval_sentence(subject: Subject, level: float, made: str) -> str:
    """How intervals were made, or why there are none.

    Parameters
    ----------
    subject : Subject
    level : float
    made : str
        As in "Wald intervals on the log scale".
    """
    if subject.no_interval:
        return f"No intervals are given: {subject.no_interval}"
    cited = " (Liang & Zeger 1986)" if subject.covariance_kind in ("cluster", "robust") else ""
    return (
        f"{confidence(level)} confidence intervals are {made}, with "
        f"{covariance_words(subject)}{cited}"
    )


def others_sentence(
    subject: Subject, others: Others, averaged: str, counted: int, where: Where = None
) -> str:
    """What was done with the remaining predictors."""
    if others == "observed":
        rows = rows_chosen(subject, where, counted)
        return (
            f"The {averaged} were averaged over the {rows}, each with its own values of the "
            "remaining predictors (marginal standardisation; Muller & MacLehose 2014; Hanmer & "
            "Kalkan 2013)"
        )
    if others == "typical":
        return (
            "The remaining predictors were held at typical values: medians of numbers, most "
            "frequent levels of categories, unless stated otherwise"
        )
    return "The remaining predictors were held at stated values, and at typical ones where not"
