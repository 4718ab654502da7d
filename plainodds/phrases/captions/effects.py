"""Captions of effects."""

from __future__ import annotations

from plainodds.answers.effects import EffectsAnswer
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words, rest_words
from plainodds.phrases.labels import effects_title, predictor_name
from plainodds.phrases.sentences import joined

__all__: list[str] = []


@caption.register
def _(answer: EffectsAnswer) -> str:
    question, subject = answer.question, answer.subject
    by = ""
    if question.by is not None:
        by = f", by {predictor_name(subject.predictor(question.by))}"
    counted = answer.counted[0] if len(answer.counted) == 1 else sum(answer.counted)
    return joined(
        f"{effects_title(answer)} that goes with each predictor{by}",
        interval_words(subject, question.level, "Points are estimates, lines their"),
        "At 0 the chance does not change",
        rest_words(subject, question.others, answer.held, "changes", counted, question.where),
        _drawn(answer),
        fitted_words(subject),
    )


def _drawn(answer: EffectsAnswer) -> str:
    if answer.question.sample == "fixed" or answer.subject.no_interval:
        return ""
    return "Intervals also allow for the rows having been drawn from a larger population"
