"""How curves were computed."""

from __future__ import annotations

from plainodds.answers.curve import CurveAnswer
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import interval_sentence, note, others_sentence

__all__: list[str] = []


@methods_note.register
def _(answer: CurveAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    slope = question.scale == "slope"
    observed = question.others == "observed"
    what = "The slope of the chance (the marginal effect)" if slope else "The chance"
    if slope:
        made = "delta-method intervals with exact gradients (Greene 2012)"
    elif observed:
        made = "delta-method intervals on the logit of the averaged chance"
    else:
        made = "Wald intervals on the linear predictor, carried over to the scale shown"
    return note(
        subject,
        (
            f"{what} was computed from the fitted model along the predictor, moving every term in "
            "which it stands",
            others_sentence(
                subject, question.others, "slopes" if slope else "chances", subject.rows
            ),
            interval_sentence(subject, question.level, made),
        ),
    )
