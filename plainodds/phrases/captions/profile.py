"""Captions of profiles."""

from __future__ import annotations

from plainodds.answers.profile import ProfileAnswer
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words
from plainodds.phrases.parts import case_words
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__: list[str] = []

_EVERYTHING = 1_000_000


@caption.register
def _(answer: ProfileAnswer) -> str:
    question, subject = answer.question, answer.subject
    whom = _case(answer, question.values)
    if question.against is not None:
        whom = f"{whom}, against {_case(answer, question.against)}"
    return joined(
        f"The chance of {tidy(subject.outcome.event)} for {whom}",
        "Above: the linear predictor, the odds and the chance on three scales set against each "
        "other, so that each can be read from the others",
        interval_words(subject, question.level, "Pointers are estimates, bands"),
        "Below: what each predictor adds to the linear predictor, and the chance reached so far",
        fitted_words(subject),
    )


def _case(answer: ProfileAnswer, values: Pairs) -> str:
    whole = len(values) == len(answer.subject.predictors)
    return case_words(answer.subject, values, whole=whole, at_most=_EVERYTHING)
