"""Whether a fit is fit to be explained: what was looked at, and what was found."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Any, ClassVar, Literal

from plainodds.answers.checks.amount import amount_of, levels_of, missing_of
from plainodds.answers.checks.calibration import calibration_of
from plainodds.answers.checks.collinearity import collinearity_of
from plainodds.answers.checks.convergence import convergence_of
from plainodds.answers.checks.dependence import dependence_of
from plainodds.answers.checks.discrimination import discrimination_of
from plainodds.answers.checks.finding import CONCERNS, TOPICS, Finding, Topic
from plainodds.answers.checks.influence import influence_of
from plainodds.answers.checks.optimism import optimism_of
from plainodds.answers.checks.overall import overall_of
from plainodds.answers.checks.separation import separation_of
from plainodds.answers.checks.shape import shape_of
from plainodds.answers.checks.standard_errors import standard_errors_of
from plainodds.answers.delta import checked_level
from plainodds.answers.groups import Grouping, Groups, grouping
from plainodds.answers.progress import Progress, silent
from plainodds.answers.questions import Answer, Question
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import Subject
from plainodds.values import value

__all__ = ["Groups", "SoundnessAnswer", "SoundnessQuestion", "answer_soundness", "shown_finding"]


@value
class SoundnessQuestion(Question):
    """Is this fit fit to be explained?

    Attributes
    ----------
    show : Topic, or ""
        Which finding the picture shows; empty for the heaviest, or calibration where
        nothing weighs.
    predictor : str
        Whose shape, level or influence is shown, where the topic has a predictor; empty
        for the heaviest.
    groups : Groups or None
        Which rows belong together.
    optimism : {"none", "bootstrap", "cross-validation"}
        How much of calibration and discrimination is the fit's own optimism.
    repeats : int
        Bootstrap samples, or repeats of tenfold cross-validation.
    seed : int
        Of the resampling, so that the same question gives the same answer.
    level : float
    """

    show: Topic | Literal[""] = ""
    predictor: str = ""
    groups: Groups | None = None
    optimism: Literal["none", "bootstrap", "cross-validation"] = "none"
    repeats: int = 200
    seed: int = 0
    level: float = 0.95

    method: ClassVar[str] = "soundness"


@value
class SoundnessAnswer(Answer):
    """What was looked at, and what was found.

    Attributes
    ----------
    question : SoundnessQuestion
    subject : Subject
    findings : tuple of Finding
        The heaviest first, those of one weight in the order of TOPICS.
    """

    question: SoundnessQuestion
    subject: Subject
    findings: tuple[Finding, ...]


def shown_finding(answer: SoundnessAnswer) -> Finding:
    """The finding that the question wants shown.

    By default the heaviest that weighs and has evidence; where none does, calibration:
    it says most of what can be said of a fit that nothing speaks against.

    Raises
    ------
    QuestionRefused
        If there is no such finding.
    """
    wanted = answer.question
    if not wanted.show:
        return _first_shown([each for each in answer.findings if each.evidence], answer.findings)
    of_topic = [each for each in answer.findings if each.topic == wanted.show]
    for each in of_topic:
        if not wanted.predictor or wanted.predictor in each.about:
            return each
    if of_topic and of_topic[0].topic != "shape":
        return of_topic[0]
    raise QuestionRefused(
        f"show={wanted.show!r}, predictor={wanted.predictor!r}: there is no such finding."
    )


def _first_shown(told: list[Finding], findings: tuple[Finding, ...]) -> Finding:
    first = told[0] if told else findings[0]
    if CONCERNS.index(first.concern) > CONCERNS.index("not known"):
        return first
    return next((each for each in told if each.topic == "calibration"), first)


def answer_soundness(
    model: FittedModel,
    question: SoundnessQuestion,
    groups: Any = None,
    progress: Progress = silent,
) -> SoundnessAnswer:
    """Look at everything that can make an explanation of this fit wrong.

    Parameters
    ----------
    model : FittedModel
    question : SoundnessQuestion
    groups : array or Series (n,), optional
        Which rows belong together, where the question holds only their fingerprint.
    progress : callable, optional
        Told after each check, and each resample of optimism, how many of how many are
        done; may raise to stop.

    Raises
    ------
    QuestionRefused
        For an unknown topic, predictor or setting, groups that cannot be read, or an
        optimism that cannot be had.
    """
    _refuse_unknown(model, question)
    together = None if question.groups is None else grouping(model, question.groups, groups)
    resamples = 0 if question.optimism == "none" else question.repeats
    parts = resamples + _CHECKS
    findings: list[Finding] = []
    told = _checks(model, question, together, lambda done, _: progress(done, parts))
    for done, found in enumerate(told, start=1 + resamples):
        findings += found
        progress(done, parts)
    findings.sort(key=lambda each: (-each.weight, TOPICS.index(each.topic)))
    return SoundnessAnswer(question, model.subject, tuple(findings))


_CHECKS = len(TOPICS)


def _checks(
    model: FittedModel,
    question: SoundnessQuestion,
    together: Grouping | None,
    progress: Progress,
) -> Iterator[tuple[Finding, ...]]:
    """Each topic's findings, one topic after the other; resampling, the longest, comes first."""
    optimism = None
    if question.optimism != "none":
        way, repeats = question.optimism, question.repeats
        optimism = optimism_of(model, way, repeats, question.seed, progress)
    level = question.level
    one_each: tuple[Callable[[], Finding], ...] = (
        lambda: convergence_of(model),
        lambda: separation_of(model),
        lambda: collinearity_of(model),
        lambda: standard_errors_of(model),
        lambda: amount_of(model),
        lambda: levels_of(model),
        lambda: missing_of(model, level),
        lambda: calibration_of(model, level, optimism),
        lambda: influence_of(model),
        lambda: dependence_of(model, together),
        lambda: discrimination_of(model, level),
        lambda: overall_of(model),
    )
    for check in one_each:
        yield (check(),)
    yield shape_of(model, level)


def _refuse_unknown(model: FittedModel, question: SoundnessQuestion) -> None:
    checked_level(question.level)
    if question.show and question.show not in TOPICS:
        known = ", ".join(map(repr, TOPICS))
        raise QuestionRefused(f"show={question.show!r} is no topic. Choose one of {known}.")
    if question.predictor:
        model.subject.predictor(question.predictor)
    if question.optimism not in ("none", "bootstrap", "cross-validation"):
        raise QuestionRefused(
            f"optimism={question.optimism!r}: choose 'none', 'bootstrap' or 'cross-validation'."
        )
    for name, lowest in (("repeats", 1), ("seed", 0)):
        held = getattr(question, name)
        if isinstance(held, bool) or not isinstance(held, int) or held < lowest:
            raise QuestionRefused(f"{name}={held!r} is not a whole number from {lowest} on.")
