"""Captions of curves."""

from __future__ import annotations

from plainodds.answers.curve import CurveAnswer
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words, rest_words
from plainodds.phrases.labels import predictor_name, scale_title
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy

__all__: list[str] = []


@caption.register
def _(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    by = ""
    if question.by is not None:
        by = f", by {predictor_name(subject.predictor(question.by))}"
    marks = "Lines are estimates, bands" if facts.is_number else "Points are estimates, lines"
    averaged = "changes of the chance" if question.scale == "slope" else "chances"
    return joined(
        f"{scale_title(answer)}, along {predictor_name(facts)}{by}",
        interval_words(subject, question.level, marks),
        _rest(answer, averaged),
        _unsupported(answer),
        _beneath(answer) if facts.is_number else "",
        fitted_words(subject),
    )


def _rest(answer: CurveAnswer, averaged: str) -> str:
    shown = {answer.question.predictor, answer.question.by}
    if all(facts.name in shown for facts in answer.subject.predictors):
        return ""
    return rest_words(
        answer.subject, answer.question.others, answer.held, averaged, answer.subject.rows
    )


def _unsupported(answer: CurveAnswer) -> str:
    if all(all(line.supported) for line in answer.lines):
        return ""
    cases = tidy(answer.subject.outcome.cases)
    along = answer.subject.predictor(answer.question.predictor)
    if along.is_number:
        return f"Where a line is broken the data have few {cases} or none"
    return f"Open points stand for levels that no {cases} in the data have"


def _beneath(answer: CurveAnswer) -> str:
    return f"Beneath: where the {tidy(answer.subject.outcome.cases)} of the data are"
