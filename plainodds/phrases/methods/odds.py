"""How odds ratios were computed."""

from __future__ import annotations

from plainodds.answers.odds import OddsAnswer
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import interval_sentence, note

__all__: list[str] = []


@methods_note.register
def _(answer: OddsAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    likelihood = question.interval == "likelihood"
    made = "Wald intervals on the log scale"
    if likelihood:
        made = (
            "profile-likelihood intervals, found by refitting (Venzon & Moolgavkar 1988), and "
            "standard errors are Wald's"
        )
    given = any(row.given for row in answer.rows)
    return note(
        subject,
        (
            "The odds ratio of a change is the exponent of the change in the linear predictor that "
            "goes with it, through every term in which the predictor stands",
            "Where a predictor shares a term with others, its odds ratios were computed at stated "
            "values of these"
            if given
            else "",
            interval_sentence(subject, question.level, made),
            ""
            if subject.no_interval
            else f"Tests are {'likelihood-ratio' if likelihood else 'Wald'} tests of an odds "
            "ratio of 1",
            ""
            if not answer.interactions
            else f"Interactions were tested by {'likelihood-ratio' if likelihood else 'Wald'} "
            "tests of all terms that two predictors share",
        ),
    )
