"""How effects were computed."""

from __future__ import annotations

from plainodds.answers.effects import EffectsAnswer
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import interval_sentence, note, others_sentence

__all__: list[str] = []


@methods_note.register
def _(answer: EffectsAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    slope = question.number == "slope"
    of_number = "the derivative of the chance" if slope else "the change of the chance by one step"
    counted = answer.counted[0] if len(answer.counted) == 1 else sum(answer.counted)
    drawn = question.sample == "drawn" and not subject.no_interval
    return note(
        subject,
        (
            f"The effect of a number is {of_number}, that of a category the difference of the "
            "chances of two levels, through every term in which the predictor stands",
            others_sentence(subject, question.others, "effects", counted, question.where),
            interval_sentence(
                subject, question.level, "delta-method intervals with exact gradients (Greene 2012)"
            ),
            "The variance from drawing the rows was added to that of the coefficients "
            "(Dowd et al. 2014)"
            if drawn
            else "",
        ),
    )
