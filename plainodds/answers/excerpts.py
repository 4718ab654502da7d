"""One part of an answer's picture, as a figure of its own."""

from __future__ import annotations

from typing import ClassVar, Literal, TypeAlias

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.answers.questions import Answer, Question
from plainodds.errors import QuestionRefused
from plainodds.model.predictors import Subject
from plainodds.values import value

__all__ = ["PARTS", "ExcerptAnswer", "ExcerptQuestion", "Part", "excerpt"]

Part: TypeAlias = Literal["ruler", "ledger", "marks"]
PARTS: dict[Part, type[Answer]] = {
    "ruler": ProfileAnswer,
    "ledger": ProfileAnswer,
    "marks": ChangeAnswer,
}
"""What can stand alone, and of which kind of answer."""


@value
class ExcerptQuestion(Question):
    """Which part of an answer's picture is wanted alone."""

    part: Part

    method: ClassVar[str] = "excerpt"


@value
class ExcerptAnswer(Answer):
    """An answer of whose picture one part is drawn.

    Attributes
    ----------
    question : ExcerptQuestion
    subject : Subject
    whole : Answer
    """

    question: ExcerptQuestion
    subject: Subject
    whole: Answer


def excerpt(answer: Answer, part: Part) -> ExcerptAnswer:
    """Take one part of an answer's picture as a figure of its own.

    What is returned is drawn, saved, captioned and put into words as any answer is.

    Parameters
    ----------
    answer : ProfileAnswer or ChangeAnswer
    part : {"ruler", "ledger", "marks"}
        The ruler or the ledger of a profile, or a change's marks to be counted.

    Raises
    ------
    QuestionRefused
        If the answer's picture has no such part.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay(rows=1_000)
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years + soil", mains).fit(disp=0))
    >>> excerpt(fit.change("soil", "low", "high"), "marks").question.part
    'marks'
    """
    if part not in PARTS:
        known = ", ".join(map(repr, PARTS))
        raise QuestionRefused(f"There is no part {part!r}; there are {known}.")
    if not isinstance(answer, PARTS[part]):
        asked = {"ruler": "profile", "ledger": "profile", "marks": "change"}[part]
        raise QuestionRefused(
            f"The {part} is a part of a {asked}'s picture, as fit.{asked}(…) gives it, and not of "
            f"a {type(answer).__name__}'s."
        )
    return ExcerptAnswer(ExcerptQuestion(part), answer.subject, answer)
