"""EffectsView: how much does the chance change with each predictor?"""

from __future__ import annotations

from dataclasses import replace
from typing import Any

import ipywidgets as widgets

from plainodds.answers.effects import EffectRow, EffectsAnswer, EffectsQuestion
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.labels import (
    effect_label,
    effects_title,
    predictor_label,
    value_label,
)
from plainodds.phrases.numbers import (
    NOT_KNOWN,
    bare_points,
    bare_points_span,
    confidence,
    count,
    p_value,
)
from plainodds.views import markup
from plainodds.views.among import AmongPart
from plainodds.views.controls import ChoiceControl
from plainodds.views.long_work import Work
from plainodds.views.markup import Column, Markup, Row
from plainodds.views.others import OthersPart, with_others, without
from plainodds.views.parts import block, fill
from plainodds.views.patient import PatientView
from plainodds.views.several import TicksControl
from plainodds.views.sketched import MANY_ROWS

__all__ = ["EffectsView"]

_NUMBERS = (("its slope, per unit", "slope"), ("of one step more", "step"))
_SAMPLES = (("as they are", "fixed"), ("as drawn from many more", "drawn"))


class EffectsView(PatientView):
    """How much does the chance change with each predictor, for people like ours?

    Choose which predictors are shown; whether the effects are averaged over the rows or
    stated at a profile; for a number the slope or the change of a step; and a category
    within whose levels they are found one by one.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : EffectsQuestion, optional
        What is shown at the start; default: every predictor, averaged over all rows.

    Attributes
    ----------
    question : EffectsQuestion
        May be set; ``view.question = fit.effects(others="typical").question``.
    answer : EffectsAnswer

    Raises
    ------
    FitRefused
        If the result cannot be taken in.
    QuestionRefused
        If the question cannot be answered.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay()
    >>> view = po.EffectsView(smf.logit("burst ~ age_years * material", mains).fit(disp=0))
    >>> [row.predictor for row in view.answer.rows]
    ['material', 'material', 'age_years']
    """

    kind = "effects"
    asks = EffectsQuestion

    def _make_controls(self) -> list[widgets.Widget]:
        subject = self.subject
        named = [(predictor_label(each), each.name) for each in subject.predictors]
        shown = self._bind(
            "predictors",
            TicksControl("Predictors shown", named, "Keep at least one predictor."),
            lambda question: question.predictors,
            lambda question, names: replace(question, predictors=names),
        )
        self._others = OthersPart(subject, self._bind, _with_others)
        self._among = AmongPart(subject, self._bind)
        levelled = [each for each in subject.predictors if not each.is_number]
        groups = [(predictor_label(each), each.name) for each in levelled]
        by = self._bind(
            "by",
            ChoiceControl(
                "Effects for each value of", [("no predictor, all together", None), *groups], None
            ),
            lambda question: question.by,
            lambda question, name: replace(question, by=name, others=without(question, name)),
        )
        number = self._bind(
            "number",
            ChoiceControl("The effect of a number", _NUMBERS, "slope"),
            lambda question: question.number,
            lambda question, number: replace(question, number=number),
        )
        self._sample = self._bind(
            "sample",
            ChoiceControl("The rows are taken", _SAMPLES, "fixed"),
            lambda question: question.sample,
            lambda question, sample: replace(question, sample=sample),
        )
        self._sample_place = block(name="place")
        has_numbers = any(each.is_number for each in subject.predictors)
        return [
            shown.widget,
            *self._others.widgets,
            self._among.place,
            *([by.widget] if groups else []),
            *([number.widget] if has_numbers else []),
            self._sample_place,
            self._level_control().widget,
        ]

    def _arrange(self, question: EffectsQuestion) -> None:
        self._others.arrange(question, (question.by,))
        self._among.arrange(question)
        averaged = question.others == "observed" and not self.subject.no_interval
        fill(self._sample_place, [self._sample.widget] if averaged else [])

    def _work_before(self, question: EffectsQuestion) -> Work | None:
        rows = self.subject.rows
        if rows <= MANY_ROWS or question.others != "observed" or self._has(question):
            return None
        return self._answering(
            question,
            f"Averaging over {count(rows)} rows",
            lambda progress: self.fit.ask(question),
        )

    def _table_of(self, answer: EffectsAnswer) -> Markup:
        return effects_table(answer)


def _with_others(question: EffectsQuestion, kind: Any) -> Any:
    """Others of another kind; where there is no average there are no rows to choose."""
    changed = with_others(question, kind)
    return changed if kind == "observed" else replace(changed, where=None, sample="fixed")


def effects_table(answer: EffectsAnswer) -> Markup:
    """The effects with their intervals, levels under their predictor, groups one by one."""
    subject, question = answer.subject, answer.question
    has_interval = not subject.no_interval
    columns = [Column("Change"), Column("Effect", is_number=True)]
    if has_interval:
        interval = f"{confidence(question.level)} interval"
        columns += [Column(interval, is_number=True), Column("p-value", is_number=True)]
    rows, heading = [], ""
    for row in answer.rows:
        facts = subject.predictor(row.predictor)
        cells = [_label(facts, row), bare_points(row.effect.estimate)]
        if has_interval:
            cells += _interval_and_p(row)
        own = _group(answer, row)
        opens, heading = "" if own == heading else own, own
        rows.append(Row(tuple(cells), opens, "plainodds-within" if own else None))
    return markup.table(effects_title(answer), columns, rows)


def _label(facts: PredictorFacts, row: EffectRow) -> str:
    return f"{predictor_label(facts)}, {effect_label(facts, row)}"


def _group(answer: EffectsAnswer, row: EffectRow) -> str:
    if answer.question.by is None or row.by is None:
        return ""
    by = answer.subject.predictor(answer.question.by)
    return f"{predictor_label(by)} {value_label(by, row.by)}"


def _interval_and_p(row: EffectRow) -> list[str]:
    lower, upper = row.effect.lower, row.effect.upper
    interval = NOT_KNOWN
    if lower is not None and upper is not None:
        interval = bare_points_span(lower, upper)
    return [interval, NOT_KNOWN if row.p_value is None else p_value(row.p_value)]
