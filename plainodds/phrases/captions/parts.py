"""What every caption needs: whose intervals, held or averaged, from which rows."""

from __future__ import annotations

from plainodds.answers.curve import Others
from plainodds.answers.where import Where
from plainodds.model.predictors import Subject
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.held import held_words, kept_words
from plainodds.phrases.languages import in_language
from plainodds.phrases.numbers import chance, confidence, count
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__ = ["fitted_words", "interval_words", "rest_words"]

_EVERYTHING = 1_000_000


def interval_words(subject: Subject, level: float, marks: str) -> str:
    """What the marks of uncertainty are: "Bands are 95% confidence intervals"."""
    if subject.no_interval:
        return f"No intervals can be given: {subject.no_interval}"
    return f"{marks} {confidence(level)} confidence intervals"


@in_language
def rest_words(
    subject: Subject, others: Others, held: Pairs, averaged: str, counted: int, where: Where = None
) -> str:
    """What the remaining predictors do; empty where none is left.

    Parameters
    ----------
    subject : Subject
    others : "typical", "observed" or pairs
    held : pairs
    averaged : str
        What is averaged: "chances".
    counted : int
        Rows averaged over.
    where : pairs, Mask or None
    """
    if others == "observed":
        return kept_words(subject, averaged, rows_chosen(subject, where, counted))
    return " ".join(map(sentence, held_words(subject, held, others, at_most=_EVERYTHING)))


@in_language
def fitted_words(subject: Subject) -> str:
    """Which model, and how many rows and events it was fitted to."""
    outcome = subject.outcome
    rows = count(subject.rows)
    told = f"From a logistic regression fitted to {rows} {tidy(outcome.cases)}"
    if subject.sampling == "case-control":
        return f"{told} chosen by their outcome (case-control)"
    return f"{told}, {chance(outcome.share)} of them with {tidy(outcome.event)}"
