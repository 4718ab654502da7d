"""Whose shape, levels or influence is shown: the choice of a predictor, where there is one."""

from __future__ import annotations

from dataclasses import replace

from plainodds.answers.checks.amount import LevelsEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.influence import InfluenceEvidence
from plainodds.answers.soundness import SoundnessAnswer, SoundnessQuestion, shown_finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.headings import concern_label, concern_sign
from plainodds.phrases.labels import predictor_label
from plainodds.views.controls import ChoiceControl
from plainodds.views.others import Bind
from plainodds.views.parts import block, fill

__all__ = ["WhosePart", "predictors_of"]

Option = tuple[str, str]

_ALL, _EVERY = "all predictors", ""


class WhosePart:
    """The drop-down of predictors above the picture, while the topic has several.

    Parameters
    ----------
    bind : callable

    Attributes
    ----------
    place : Box
    """

    def __init__(self, bind: Bind) -> None:
        self._answer: SoundnessAnswer | None = None
        self._choice = ChoiceControl("Shown for", [(_EVERY, _EVERY)], _EVERY)
        bind("predictor", self._choice, self._name, self._with_name)
        self.place = block(name="place")

    def arrange(self, answer: SoundnessAnswer) -> None:
        """Offer the predictors that the shown finding's topic has."""
        self._answer = answer
        offered = predictors_of(answer, shown_finding(answer))
        self._choice.offer(offered or [(_EVERY, _EVERY)], self._name(answer.question))
        fill(self.place, [self._choice.widget] if len(offered) > 1 else [])

    def _name(self, question: SoundnessQuestion) -> str:
        """For which predictor something is shown; empty for all."""
        if self._answer is None:
            return _EVERY
        answer = replace(self._answer, question=question)
        shown = shown_finding(answer)
        if _has_one_each(shown):
            return shown.about[0]
        named = [name for _, name in predictors_of(answer, shown)]
        return question.predictor if question.predictor in named else _EVERY

    def _with_name(self, question: SoundnessQuestion, name: str) -> SoundnessQuestion:
        # the topic may be shown because it is the heaviest: it is stated with the predictor
        topic = question.show
        if self._answer is not None:
            topic = shown_finding(replace(self._answer, question=question)).topic
        return replace(question, show=topic, predictor=name)


def predictors_of(answer: SoundnessAnswer, shown: Finding) -> list[Option]:
    """The predictors that may be shown of a finding's topic, as (label, name).

    Where a predictor has a finding of its own, its sign and weight go with it. Elsewhere an
    empty name stands for all of them.
    """
    subject, evidence = answer.subject, shown.evidence
    if _has_one_each(shown):
        return [
            (_weighed(each, subject), each.about[0])
            for each in answer.findings
            if each.topic == shown.topic and each.about
        ]
    names: list[str] = []
    if isinstance(evidence, LevelsEvidence):
        names = [each.predictor for each in evidence.counts]
    if isinstance(evidence, InfluenceEvidence):
        names = [moved.predictor for each in evidence.standing_out for moved in each.moved]
    of_model = [facts for facts in subject.predictors if facts.name in names]
    if len(of_model) < 2:
        return []
    return [(_ALL, _EVERY), *((predictor_label(facts), facts.name) for facts in of_model)]


def _has_one_each(shown: Finding) -> bool:
    return shown.topic == "shape" and bool(shown.about)


def _weighed(finding: Finding, subject: Subject) -> str:
    label = predictor_label(subject.predictor(finding.about[0]))
    return f"{concern_sign(finding.concern)} {label}: {concern_label(finding.concern)}"
