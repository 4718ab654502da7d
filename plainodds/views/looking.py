"""How a fit is looked at: which rows belong together, and how much of it is optimism."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

import ipywidgets as widgets

from plainodds.answers.groups import Groups
from plainodds.answers.soundness import SoundnessQuestion
from plainodds.model.fitted import FittedModel
from plainodds.views.controls import BoxControl, ChoiceControl
from plainodds.views.others import Bind
from plainodds.views.parts import block, fill

__all__ = ["GroupsPart", "OptimismPart"]

_WAYS = (
    ("not looked at", "none"),
    ("by bootstrap", "bootstrap"),
    ("by cross-validation", "cross-validation"),
)
# a repeat of cross-validation is ten fits; "none" has what the question has by default
_USUAL_REPEATS = {"none": 200, "bootstrap": 200, "cross-validation": 20}


class OptimismPart:
    """The drop-down of ways to find the fit's own optimism, and how often it is fitted.

    Whoever asks for it is shown the finding that tells of it.

    Parameters
    ----------
    bind : callable

    Attributes
    ----------
    widgets : list of Widget
    """

    def __init__(self, bind: Bind) -> None:
        way = ChoiceControl("The fit's own optimism", _WAYS, "none")
        bind("optimism", way, lambda question: question.optimism, _with_way)
        self._repeats = BoxControl("Repeats", _USUAL_REPEATS["bootstrap"])
        bind("repeats", self._repeats, lambda question: question.repeats, _with_repeats)
        self._way: str = "none"
        self._place = block(name="place")
        self.widgets: list[widgets.Widget] = [way.widget, self._place]

    def arrange(self, question: SoundnessQuestion) -> None:
        """Offer the number of repeats where there are any; another way has its own."""
        if question.optimism != self._way:
            self._way = question.optimism
            self._repeats.show(question.repeats)
        fill(self._place, [] if question.optimism == "none" else [self._repeats.widget])


def _with_way(question: SoundnessQuestion, way: Any) -> SoundnessQuestion:
    if way == question.optimism:
        return question
    changed = replace(question, optimism=way, repeats=_USUAL_REPEATS[way])
    return changed if way == "none" else replace(changed, show="calibration", predictor="")


def _with_repeats(question: SoundnessQuestion, repeats: Any) -> SoundnessQuestion:
    # what is no whole number is for the question to refuse
    return replace(question, repeats=int(repeats) if repeats.is_integer() else repeats)


class GroupsPart:
    """The drop-down of columns that may tell which rows belong together.

    Whoever names one is shown the finding that tells of it.

    Parameters
    ----------
    model : FittedModel
    bind : callable
    handed_over : Groups or None
        What the question holds of values that were handed over.

    Attributes
    ----------
    widgets : list of Widget
        None where there is nothing to choose from.
    """

    def __init__(self, model: FittedModel, bind: Bind, handed_over: Groups | None) -> None:
        names = () if model.data is None else model.data.names()
        outcome = model.subject.outcome.name
        self._options: list[tuple[str, Groups | None]] = [("nobody has said", None)]
        if handed_over is not None and handed_over.fingerprint:
            self._options.append(("as the values handed over say", handed_over))
        self._options += [(f"by {name}", Groups(name)) for name in names if name != outcome]
        self._choice = ChoiceControl("Rows that belong together", self._options, None)
        bind("groups", self._choice, lambda question: question.groups, _with_groups)
        self.widgets: list[widgets.Widget] = [self._choice.widget] * (len(self._options) > 1)

    def arrange(self, question: SoundnessQuestion) -> None:
        """Let a column that is not on offer join the others."""
        if question.groups not in [groups for _, groups in self._options]:
            label = f"by {question.groups.name}" if question.groups else ""
            self._choice.offer([*self._options, (label, question.groups)], question.groups)


def _with_groups(question: SoundnessQuestion, groups: Groups | None) -> SoundnessQuestion:
    if groups is None or groups == question.groups:
        return replace(question, groups=groups)
    return replace(question, groups=groups, show="dependence", predictor="")
