"""Captions of changes."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words, rest_words
from plainodds.phrases.moves import moves_words, settled_moves
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy

__all__: list[str] = []


@caption.register
def _(answer: ChangeAnswer) -> str:
    question, subject = answer.question, answer.subject
    average = "average chance" if question.others == "observed" else "chance"
    return joined(
        f"The {average} of {tidy(subject.outcome.event)} with "
        f"{moves_words(subject, settled_moves(answer))}",
        interval_words(
            subject, question.level, "Points are estimates; lines, band and bracket are"
        ),
        rest_words(
            subject, question.others, answer.held, "chances", answer.counted, question.where
        ),
        "Beneath: the same chances as marks, those that differ set apart by their shape",
        fitted_words(subject),
    )
