"""Several answers in one figure."""

from __future__ import annotations

from typing import ClassVar

from plainodds.answers.questions import Answer, Question
from plainodds.errors import QuestionRefused
from plainodds.model.predictors import Subject
from plainodds.values import value

__all__ = ["PanelsAnswer", "PanelsQuestion", "panel_letter", "panels"]

_MOST = 12


@value
class PanelsQuestion(Question):
    """How several answers are set side by side.

    Attributes
    ----------
    columns : int
        Panels beside each other; fewer where the figure is too narrow.
    shared : bool
        Whether panels that show the same quantity have one scale.
    """

    columns: int = 2
    shared: bool = True

    method: ClassVar[str] = "panels"


@value
class PanelsAnswer(Answer):
    """Several answers, to be drawn as the panels of one figure.

    Attributes
    ----------
    question : PanelsQuestion
    subject : Subject
        Of the first.
    answers : tuple of Answer
    """

    question: PanelsQuestion
    subject: Subject
    answers: tuple[Answer, ...]


def panel_letter(place: int) -> str:
    """What a panel is called, from 0: "A", "B", "C"."""
    return chr(ord("A") + place)


def panels(*answers: Answer, columns: int = 2, shared: bool = True) -> PanelsAnswer:
    """Set several answers into one figure, each a panel with a letter.

    What is returned is drawn, saved, captioned and put into words as any answer is.

    Parameters
    ----------
    *answers : Answer
        From two to twelve, of one fitted model or of several.
    columns : int
        Panels beside each other; fewer where the figure is too narrow for them.
    shared : bool
        Whether panels that show the same quantity (chances of one event, say, or odds
        ratios) have one scale, so that they can be compared by eye.

    Raises
    ------
    QuestionRefused
        If there are fewer than two answers or more than twelve, one is no answer, or
        `columns` is no whole number of at least 1.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay(rows=1_000)
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years + soil", mains).fit(disp=0))
    >>> figure = panels(fit.curve("age_years"), fit.change("soil", "low", "high"))
    >>> len(figure.answers)
    2
    """
    for answer in answers:
        if not isinstance(answer, Answer) or isinstance(answer, PanelsAnswer):
            raise QuestionRefused(
                f"A panel shows an answer, as fit.odds() gives it, not a {type(answer).__name__}."
            )
    if not 2 <= len(answers) <= _MOST:
        raise QuestionRefused(
            f"A figure of panels has from 2 to {_MOST} answers, not {len(answers)}: "
            "panels(fit.odds(), fit.curve('age_years'))."
        )
    if isinstance(columns, bool) or not isinstance(columns, int) or columns < 1:
        raise QuestionRefused(f"columns={columns!r} is no whole number of at least 1.")
    return PanelsAnswer(PanelsQuestion(columns, bool(shared)), answers[0].subject, answers)
