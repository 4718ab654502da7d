"""OddsView: by what the odds are multiplied."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from typing import Any

import ipywidgets as widgets

from plainodds.answers.odds import OddsAnswer, OddsQuestion, OddsRow, answer_odds
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases import words
from plainodds.phrases.labels import (
    change_label,
    given_label,
    odds_of_event,
    predictor_label,
    row_label,
    value_label,
)
from plainodds.phrases.numbers import NOT_KNOWN, confidence, p_value, ratio, ratio_interval
from plainodds.phrases.unbounded import has_finite_estimate, odds_ratio_figures
from plainodds.values import Pairs
from plainodds.views import markup
from plainodds.views.controls import BoxControl, ChoiceControl, Control, slug
from plainodds.views.likelihood import interval_controls
from plainodds.views.long_work import Work
from plainodds.views.markup import Column, Markup, Row
from plainodds.views.parts import block, html
from plainodds.views.patient import PatientView
from plainodds.views.several import TicksControl, values_control

__all__ = ["OddsView"]

_ORDERS = (("as in the model", "model"), ("largest first", "size"))
_LAYOUTS = (("a row for each change", "changes"), ("as journals print it", "table"))
_SAID_AT_ONCE = 8


class OddsView(PatientView):
    """By what are the odds multiplied when a predictor changes?

    Choose which predictors are shown, in which order, layout and with which intervals; and for
    one predictor at a time its step, its reference level or the two values compared, and
    the values of the predictors that it depends on.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : OddsQuestion, optional
        What is shown at the start; default: every predictor.

    Attributes
    ----------
    question : OddsQuestion
        May be set; ``view.question = fit.odds(steps={"age_years": 5}).question``.
    answer : OddsAnswer

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
    >>> view = po.OddsView(smf.logit("burst ~ age_years + material", mains).fit(disp=0))
    >>> [row.end for row in view.answer.rows if row.predictor == "material"]
    ['ductile iron', 'PVC']
    """

    kind = "odds"
    asks = OddsQuestion

    def __init__(self, result: Any, question: OddsQuestion | None = None) -> None:
        self._panels: dict[str, list[widgets.Widget]] = {}
        super().__init__(result, question)

    def _make_controls(self) -> list[widgets.Widget]:
        named = [(predictor_label(each), each.name) for each in self.subject.predictors]
        self._chosen = ChoiceControl("Settings for", named, self._names(self._question)[0])
        self._chosen.widget.add_class("plainodds-control-chosen")
        self._chosen.on_edit(lambda control, source: self._on_chosen())
        shown = self._bind(
            "predictors",
            TicksControl("Predictors shown", named, "Keep at least one predictor."),
            lambda question: question.predictors,
            self._with_predictors,
        )
        order = self._bind(
            "order",
            ChoiceControl("Order", _ORDERS, "model"),
            lambda question: question.order,
            lambda question, order: replace(question, order=order),
        )
        layout = self._bind(
            "layout",
            ChoiceControl("Picture", _LAYOUTS, "changes"),
            lambda question: question.layout,
            lambda question, layout: replace(question, layout=layout),
        )
        self._settings = block(name="set")
        self._unshown = html("unshown")
        self._unshown.value = markup.note("Not among the predictors shown.")
        return [
            self._chosen.widget,
            self._settings,
            shown.widget,
            order.widget,
            layout.widget,
            self._level_control().widget,
            *interval_controls(self.fit.model, self._bind),
        ]

    def _work_before(self, question: OddsQuestion) -> Work | None:
        if question.interval != "likelihood" or self._has(question):
            return None
        known = self._laid_out_otherwise(question)
        if known is not None:
            self._prepared = known
            return None
        return self._answering(
            question,
            "Refitting for likelihood intervals",
            lambda progress: answer_odds(self.fit.model, question, progress),
        )

    def _laid_out_otherwise(self, question: OddsQuestion) -> OddsAnswer | None:
        """The answer, where only its layout is another than what was answered before."""
        for each in (self._prepared, self.answer):
            if isinstance(each, OddsAnswer) and (
                replace(each.question, layout=question.layout) == question
            ):
                return replace(each, question=question)
        return None

    def _names(self, question: OddsQuestion) -> tuple[str, ...]:
        return question.predictors or tuple(each.name for each in self.subject.predictors)

    def _with_predictors(self, question: OddsQuestion, names: tuple[str, ...]) -> OddsQuestion:
        """Fewer predictors: values of what none of them depends on go."""
        changed = replace(question, predictors=names)
        shown = map(self.subject.predictor, self._names(changed))
        needed = {modifier for facts in shown for modifier in facts.modifiers}
        given = tuple(pair for pair in question.given if pair[0] in needed)
        return replace(changed, given=given)

    def _on_chosen(self) -> None:
        with self._guarded():
            if not self._quiet:
                self._arrange(self._question)
                self._words.value = self._words_of(self.answer)

    def _arrange(self, question: OddsQuestion) -> None:
        chosen = self._chosen.value
        shown = chosen in self._names(question)
        panel = tuple(self._panel(chosen)) if shown else (self._unshown,)
        if self._settings.children != panel:
            self._settings.children = panel

    def _panel(self, name: str) -> list[widgets.Widget]:
        """The settings of one predictor's rows, made when they are first needed."""
        if name not in self._panels:
            facts = self.subject.predictor(name)
            own = self._own_settings(facts)
            given = [self._given_control(facts, modifier) for modifier in facts.modifiers]
            self._panels[name] = [control.widget for control in (*own, *given)]
        return self._panels[name]

    def _own_settings(self, facts: PredictorFacts) -> list[Control]:
        usual = self._usual(facts)
        unit = f" ({facts.unit})" if facts.unit else ""
        if not facts.is_number:
            options = [(value_label(facts, level), level) for level in facts.levels]
            return [
                self._bind(
                    "reference",
                    ChoiceControl("Compared with", options, usual.start),
                    lambda question: dict(question.references).get(facts.name, usual.start),
                    lambda question, level: replace(
                        question, references=_put(question.references, facts.name, level)
                    ),
                )
            ]
        if usual.per_step:
            return [
                self._bind(
                    "step",
                    BoxControl(f"Step{unit}", facts.step),
                    lambda question: dict(question.steps).get(facts.name, facts.step),
                    lambda question, size: replace(
                        question, steps=_put(question.steps, facts.name, size)
                    ),
                )
            ]
        ends = (usual.start, usual.end)
        return [
            self._bind(
                field,
                BoxControl(f"{field.capitalize()}{unit}", float(ends[place])),
                _end_of(facts.name, ends, place),
                _with_end(facts.name, ends, place),
            )
            for place, field in enumerate(("from", "to"))
        ]

    def _usual(self, facts: PredictorFacts) -> OddsRow:
        """The change that is shown where none is asked for."""
        answer = self.fit.odds(facts.name)
        return answer.rows[0]

    def _given_control(self, facts: PredictorFacts, modifier: str) -> Control:
        held = self.subject.predictor(modifier)
        alone = len(facts.modifiers) == 1
        default = tuple(dict.fromkeys(held.quartiles)) if alone else (held.typical,)
        return self._bind(
            f"given-{slug(modifier)}",
            values_control(held, lambda named: f"Stated where {named} is", default),
            lambda question: dict(question.given).get(modifier, ()),
            lambda question, values: replace(
                question, given=_put(question.given, modifier, tuple(values))
            ),
        )

    def _words_of(self, answer: OddsAnswer) -> Markup:
        if len(answer.rows) <= _SAID_AT_ONCE:
            return markup.words_block(words(answer))
        # so many rows are a wall of words: those of the predictor that is being set
        names = self._names(answer.question)
        name = self._chosen.value if self._chosen.value in names else names[0]
        part = replace(answer, rows=tuple(row for row in answer.rows if row.predictor == name))
        facts = self.subject.predictor(name)
        return markup.words_block(words(part), title=f"{predictor_label(facts)}, in words")

    def _table_of(self, answer: OddsAnswer) -> Markup:
        return odds_table(answer)


def _put(stated: Pairs, name: str, held: Any) -> Pairs:
    """State a value; an empty one is not stated any more."""
    kept = dict(stated)
    if held == ():
        kept.pop(name, None)
    else:
        kept[name] = held
    return tuple(kept.items())


def _end_of(name: str, usual: tuple[Any, Any], place: int) -> Callable[[OddsQuestion], Any]:
    return lambda question: dict(question.between).get(name, usual)[place]


def _with_end(
    name: str, usual: tuple[Any, Any], place: int
) -> Callable[[OddsQuestion, float], OddsQuestion]:
    def write(question: OddsQuestion, end: float) -> OddsQuestion:
        ends = list(dict(question.between).get(name, usual))
        ends[place] = end
        return replace(question, between=_put(question.between, name, tuple(ends)))

    return write


def odds_table(answer: OddsAnswer) -> Markup:
    """The odds ratios with their intervals, rows of one change under one heading."""
    has_interval = not answer.subject.no_interval
    columns = [Column("Change"), Column("Odds ratio", is_number=True)]
    if answer.question.models:
        columns.insert(1, Column("Model"))
    if has_interval:
        interval = f"{confidence(answer.question.level)} interval"
        columns += [Column(interval, is_number=True), Column("p-value", is_number=True)]
    rows = []
    for heading, run in _runs(answer):
        for place, row in enumerate(run):
            figure = ratio(row.odds_ratio.estimate)
            if not has_finite_estimate(row):
                figure = odds_ratio_figures(row)[0]
            cells = [_label(answer, heading, row), figure]
            if answer.question.models:
                cells.insert(1, row.model)
            if has_interval:
                cells += _interval_and_p(row)
            within = "plainodds-within" if heading else None
            rows.append(Row(tuple(cells), "" if place else heading, within))
    title = odds_of_event(answer.subject.outcome)
    return markup.table(f"{title}: multiplied by", columns, rows)


def _runs(answer: OddsAnswer) -> list[tuple[str, list[OddsRow]]]:
    """Rows that follow each other and share a heading; a row alone needs none."""
    found: list[tuple[str, list[OddsRow]]] = []
    for row in answer.rows:
        heading = _heading(answer, row)
        if found and found[-1][0] == heading:
            found[-1][1].append(row)
        else:
            found.append((heading, [row]))
    return [(heading if len(run) > 1 else "", run) for heading, run in found]


def _heading(answer: OddsAnswer, row: OddsRow) -> str:
    facts = answer.subject.predictor(row.predictor)
    label = predictor_label(facts)
    return f"{label}, {change_label(facts, row)}" if row.given else label


def _label(answer: OddsAnswer, heading: str, row: OddsRow) -> str:
    if not heading:
        return row_label(answer.subject, row)
    if row.given:
        return given_label(answer.subject, row.given)
    return change_label(answer.subject.predictor(row.predictor), row)


def _interval_and_p(row: OddsRow) -> list[str]:
    lower, upper = row.odds_ratio.lower, row.odds_ratio.upper
    interval = NOT_KNOWN
    if not has_finite_estimate(row):
        interval = odds_ratio_figures(row)[1] or NOT_KNOWN
    elif lower is not None and upper is not None:
        interval = ratio_interval(lower, upper)
    return [interval, NOT_KNOWN if row.p_value is None else p_value(row.p_value)]
