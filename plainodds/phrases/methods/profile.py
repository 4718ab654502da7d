"""How profiles were computed."""

from __future__ import annotations

from plainodds.answers.profile import ProfileAnswer
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import interval_sentence, note

__all__: list[str] = []


@methods_note.register
def _(answer: ProfileAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    compared = question.against is not None
    return note(
        subject,
        (
            "The linear predictor was computed at the stated profile, predictors not stated at "
            "typical values (medians of numbers, most frequent levels of categories)",
            interval_sentence(
                subject,
                question.level,
                "Wald intervals on the linear predictor, carried over to odds and chance "
                "(Agresti 2013)",
            ),
            "The two profiles were compared by one joint delta method, ratios on the log scale "
            "(Localio et al. 2007)"
            if compared
            else "",
            "How familiar a profile is to the data was judged by its leverage against those of the "
            "rows, and by rows alike (Montgomery et al. 2012, on hidden extrapolation)",
        ),
    )
