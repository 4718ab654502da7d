"""How changes were computed."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import interval_sentence, note, others_sentence

__all__: list[str] = []


@methods_note.register
def _(answer: ChangeAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    drawn = question.sample == "drawn" and not subject.no_interval
    return note(
        subject,
        (
            "The chance was computed before and after the change",
            others_sentence(subject, question.others, "chances", answer.counted, question.where),
            interval_sentence(
                subject,
                question.level,
                "by one joint delta method: of chances on the logit scale, of ratios on the log "
                "scale, of the difference on its own (Localio et al. 2007)",
            ),
            "The number needed is the inverse of the difference, its interval in two pieces where "
            "the difference's holds 0 (Altman 1998)",
            "The variance from drawing the rows was added to that of the coefficients "
            "(Dowd et al. 2014)"
            if drawn
            else "",
        ),
    )
