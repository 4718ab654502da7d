"""What the remaining predictors do while one is looked at."""

from __future__ import annotations

from plainodds.answers.curve import CurveAnswer
from plainodds.phrases.parts import profile_words, rows_words
from plainodds.phrases.units import tidy

__all__ = ["others_words"]


def others_words(answer: CurveAnswer, *, at_most: int = 8) -> list[str]:
    """Say what the other predictors do; empty where the model has no others."""
    subject, question = answer.subject, answer.question
    shown = {question.predictor, question.by}
    if all(facts.name in shown for facts in subject.predictors):
        return []
    if question.others == "observed":
        averaged = "changes in the chance" if question.scale == "slope" else "chances"
        return [
            f"Each {tidy(subject.outcome.case)} keeps its own values of the other predictors, and "
            f"the {averaged} are averaged over the {rows_words(subject)}"
        ]
    if not answer.held:
        return []
    chosen = {name for name, _ in question.others} if question.others != "typical" else set()
    stated = tuple(pair for pair in answer.held if pair[0] in chosen)
    typical = tuple(pair for pair in answer.held if pair[0] not in chosen)
    told = []
    if stated:
        told.append(f"Held as stated: {profile_words(subject, stated, at_most=at_most)}")
    if typical:
        one = len(typical) == 1
        opening = "The remaining predictor is" if one else "The other predictors are"
        if stated and not one:
            opening = "The remaining predictors are"
        value = "its typical value" if one else "their typical values"
        held = profile_words(subject, typical, at_most=at_most)
        told.append(f"{opening} held at {value}: {held}")
    return told
