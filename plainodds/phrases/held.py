"""What the remaining predictors do while one is looked at."""

from __future__ import annotations

from plainodds.answers.curve import CurveAnswer, Others
from plainodds.model.predictors import Subject
from plainodds.phrases.languages import in_language
from plainodds.phrases.parts import case_words, profile_words, rows_words
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__ = ["held_case", "held_words", "kept_words", "others_words", "stated_and_typical"]


@in_language
def others_words(answer: CurveAnswer, *, at_most: int = 8) -> list[str]:
    """Say what the other predictors do; empty where the model has no others."""
    subject, question = answer.subject, answer.question
    shown = {question.predictor, question.by}
    if all(facts.name in shown for facts in subject.predictors):
        return []
    if question.others == "observed":
        averaged = "changes in the chance" if question.scale == "slope" else "chances"
        return [kept_words(subject, averaged, rows_words(subject))]
    return held_words(subject, answer.held, question.others, at_most=at_most)


def held_words(subject: Subject, held: Pairs, others: Others, *, at_most: int = 8) -> list[str]:
    """Say at which values predictors are held, those stated before those typical."""
    stated, typical = stated_and_typical(held, others)
    told = []
    if stated:
        told.append(f"Held as stated: {profile_words(subject, stated, at_most=at_most)}")
    if typical:
        one = len(typical) == 1
        opening = "The remaining predictor is" if one else "The other predictors are"
        if stated and not one:
            opening = "The remaining predictors are"
        value = "its typical value" if one else "their typical values"
        values = profile_words(subject, typical, at_most=at_most)
        told.append(f"{opening} held at {value}: {values}")
    return told


def stated_and_typical(held: Pairs, others: Others) -> tuple[Pairs, Pairs]:
    """Which of the held values were stated, and which are typical ones."""
    chosen = set() if isinstance(others, str) else {name for name, _ in others}
    stated = tuple(pair for pair in held if pair[0] in chosen)
    return stated, tuple(pair for pair in held if pair[0] not in chosen)


def held_case(subject: Subject, held: Pairs, others: Others) -> str:
    """Whom a held profile describes: "a pipe with lined yes, otherwise typical"."""
    stated, _ = stated_and_typical(held, others)
    return case_words(subject, stated, whole=len(stated) == len(held))


def kept_words(subject: Subject, averaged: str, rows: str) -> str:
    """Say that nothing else is held, and over which rows what is averaged."""
    return (
        f"Each {tidy(subject.outcome.case)} keeps its own values of the other predictors, and the "
        f"{averaged} are averaged over the {rows}"
    )
