"""SoundnessView: is this fit fit to be explained?"""

from __future__ import annotations

from dataclasses import replace
from typing import Any

import ipywidgets as widgets
from IPython.display import display

from plainodds.answers.groups import Groups, grouping, stated_groups
from plainodds.answers.progress import Progress, silent
from plainodds.answers.questions import Answer
from plainodds.answers.soundness import (
    SoundnessAnswer,
    SoundnessQuestion,
    answer_soundness,
    shown_finding,
)
from plainodds.errors import QuestionRefused
from plainodds.fitted import FittedLogit
from plainodds.phrases import words
from plainodds.phrases.checks.finding_words import finding_figures, finding_words
from plainodds.phrases.numbers import count
from plainodds.views import markup
from plainodds.views.controls import Control, slug
from plainodds.views.findings import Entry, FindingsList
from plainodds.views.findings_style import FINDINGS_STYLE
from plainodds.views.lock import LOCK
from plainodds.views.long_work import Work
from plainodds.views.looking import GroupsPart, OptimismPart
from plainodds.views.markup import Column, Markup, Row
from plainodds.views.parts import block, fill, html, titled
from plainodds.views.patient import PatientView
from plainodds.views.sketched import MANY_ROWS
from plainodds.views.style import STYLE
from plainodds.views.whose import WhosePart

__all__ = ["SoundnessView", "figures_table"]

_KEPT = 6
# figures of more letters than these are opened by whoever wants them
_LONG = 1_000
_STILL_LOOKING = "The fit was still being looked at when this was written; run the cell again."


class SoundnessView(PatientView):
    """Is this fit fit to be explained?

    What was looked at stands in a list, the heaviest finding first, each with a sign and a
    word for its weight. Choose one to see its picture, why it matters, what to do about it,
    and its figures. A column that tells which rows belong together can be named, and the
    fit's own optimism found by fitting it many times.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : SoundnessQuestion, optional
        What is shown at the start; default: the heaviest finding.
    groups : str, array or Series, optional
        Which rows belong together: a column of the data, or one value for each row that the
        fit used.

    Attributes
    ----------
    question : SoundnessQuestion
        May be set; ``view.question = fit.soundness(show="calibration").question``.
    answer : SoundnessAnswer or None
        None while a fit of many rows is looked at for the first time: that happens beside
        the page, and `answer` can be observed.

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
    >>> view = po.SoundnessView(smf.logit("burst ~ age_years * material", mains).fit(disp=0))
    >>> view.question = view.fit.soundness(show="shape", predictor="age_years").question
    >>> len(view.answer.findings)
    13
    """

    kind = "soundness"
    asks = SoundnessQuestion
    looks = STYLE + FINDINGS_STYLE

    def __init__(
        self, result: Any, question: SoundnessQuestion | None = None, groups: Any | None = None
    ) -> None:
        fit = result if isinstance(result, FittedLogit) else FittedLogit(result)
        stated, self._values = stated_groups(fit.model, groups)
        question = self._checked(question or SoundnessQuestion())
        if stated is not None:
            grouping(fit.model, stated, self._values)
            question = replace(question, groups=stated)
        self._handed_over = question.groups
        self._looked_at: dict[SoundnessQuestion, SoundnessAnswer] = {}
        super().__init__(fit, question)

    # what stands in the page

    def _make_controls(self) -> list[widgets.Widget]:
        model = self.fit.model
        self._list = FindingsList(self._choose)
        self._whose = WhosePart(self._bind)
        self._optimism = OptimismPart(self._bind)
        self._groups = GroupsPart(model, self._bind, self._handed_over)
        level = self._level_control()
        self._beside, self._ahead = block(name="beside"), block(name="ahead")
        settings = titled(
            "How it is looked at",
            *self._groups.widgets,
            *self._optimism.widgets,
            level.widget,
            self._beside,
            name="settings",
        )
        self._begin = self._button("Look at the fit", "begin", lambda question: question)
        return [self._list.widget, settings]

    def _on_stage(self) -> list[widgets.Widget]:
        return [self._begin, self._ahead, self._whose.place, self._stage.widget]

    def _beneath(self) -> list[widgets.Widget]:
        self._for_analysts = html("analysts")
        *answer, extras = super()._beneath()
        return [*answer, self._for_analysts, extras]

    def _in_order(
        self, stage: widgets.Widget, panel: widgets.Widget, rest: widgets.Widget
    ) -> list[widgets.Widget]:
        self._summary = html("summary")
        self._has_answer(False)
        return [self._summary, panel, stage, rest]

    def _has_answer(self, there_is_one: bool) -> None:
        """Show nothing that speaks of an answer until there is one."""
        display = None if there_is_one else "none"
        for each in (self._stage.widget, self._extras.widget, self._list.widget):
            each.layout.display = display
        # a first look is all there is to see; later the bar stands by what started the work
        fill(self._ahead, [] if there_is_one else [self._work.widget])
        fill(self._beside, [self._work.widget] if there_is_one else [])

    # the question

    def _choose(self, entry: Entry) -> None:
        with self._guarded():
            finding = entry.first
            # a shape is its predictor's own; other topics show all of theirs
            predictor = finding.about[0] if finding.topic == "shape" and finding.about else ""
            if not self._shows(entry):
                self._show(replace(self._wanted, show=finding.topic, predictor=predictor))

    def _shows(self, entry: Entry) -> bool:
        return any(each is shown_finding(self.answer) for each in entry.findings)

    def _show(
        self, question: SoundnessQuestion, remark: str = "", edited: Control | None = None
    ) -> None:
        work = self._work_before(question)
        if work is None:
            super()._show(question, remark, edited)
        elif not self._is_open:
            # a first look that takes its time: the page comes first
            self._start(question, work)
        elif self.answer is not None and work.key == self._work.key:
            # what is wanted is under way already, and what there is can be shown meanwhile
            self._waiting = question
            shown = replace(self._question, show=question.show, predictor=question.predictor)
            self._redraw(shown, edited, before=self._question)
        else:
            super()._show(question, remark, edited)
        with self._quietly():
            self._optimism.arrange(self._wanted)
        self._offer_to_begin()

    def _offer_to_begin(self) -> None:
        """Where a first look was stopped or failed there is nothing else to be pressed."""
        is_idle = self.answer is None and self._waiting is None
        self._begin.layout.display = None if is_idle else "none"

    def _start(self, question: SoundnessQuestion, work: Work) -> None:
        self._waiting = question
        self._work.start(work, lambda outcome: self._take_up(work, outcome))

    def _arrange(self, question: SoundnessQuestion) -> None:
        self._optimism.arrange(self._wanted)
        self._groups.arrange(question)
        if _looked(question) in self._looked_at:
            self._whose.arrange(self._kept_answer(question))

    def _stem(self) -> str:
        shown = shown_finding(self.answer)
        return "-".join(["soundness", slug(shown.topic), *map(slug, shown.about[:1])])

    # the answer: looked at once, and shown in many ways

    def _has(self, question: SoundnessQuestion) -> bool:
        return _looked(question) in self._looked_at

    def _work_before(self, question: SoundnessQuestion) -> Work | None:
        rows, looked = self.subject.rows, _looked(question)
        if self._has(question) or (question.optimism == "none" and rows <= MANY_ROWS):
            return None
        return Work(
            looked,
            _said(looked, rows),
            lambda progress: self._look(looked, _counting(looked, progress)),
            lambda answer: self._keep(looked, answer),
        )

    def _look(self, looked: SoundnessQuestion, progress: Progress = silent) -> SoundnessAnswer:
        return answer_soundness(self.fit.model, looked, self._values_of(looked.groups), progress)

    def _values_of(self, groups: Groups | None) -> Any:
        return None if groups is None or not groups.fingerprint else self._values

    def _keep(self, looked: SoundnessQuestion, answer: SoundnessAnswer) -> None:
        while len(self._looked_at) >= _KEPT:
            self._looked_at.pop(next(iter(self._looked_at)))
        self._looked_at[looked] = answer

    def _kept_answer(self, question: SoundnessQuestion) -> SoundnessAnswer:
        return replace(self._looked_at[_looked(question)], question=question)

    def _ask(self, question: SoundnessQuestion) -> Answer:
        if question.predictor:
            self.subject.predictor(question.predictor)
        if not self._has(question):
            looked = _looked(question)
            self._keep(looked, self._look(looked))
        answer = self._kept_answer(question)
        shown_finding(answer)
        return answer

    # what it looks like

    def _words_of(self, answer: SoundnessAnswer) -> Markup:
        finding = shown_finding(answer)
        said = finding_words(finding, answer.subject, answer.question.level)
        return markup.joined(
            [
                markup.element("p", said.what, class_="plainodds-lead", role="status"),
                _titled("Why it matters", said.why),
                _titled("What to do", said.next_step),
            ]
        )

    def _table_of(self, answer: SoundnessAnswer) -> Markup:
        return figures_table(answer)

    def _shown(self, answer: SoundnessAnswer) -> None:
        lead = words(answer).sentences[0]
        self._summary.value = markup.element("p", lead, class_="plainodds-lead", role="status")
        said = markup.words_block(words(answer, "technical"))
        self._for_analysts.value = markup.folded("All findings in words, for analysts", said)
        self._list.show(answer)
        self._has_answer(True)

    def _on_stop(self) -> None:
        super()._on_stop()
        if self.answer is None:
            with LOCK:
                stopped = "Stopped. The fit has not been looked at yet."
                self._messages.value = markup.notice(stopped, is_problem=False)

    def _forget(self) -> None:
        super()._forget()
        self._offer_to_begin()

    def _repr_mimebundle_(self, **kwargs: Any) -> dict[str, Any]:
        """The live view, and its picture and words for whatever cannot show it."""
        with LOCK:
            if self.answer is not None:
                return super()._repr_mimebundle_(**kwargs)
            live = widgets.VBox._repr_mimebundle_(self, **kwargs)
            return {**live, "text/html": markup.note(_STILL_LOOKING)}

    def _ipython_display_(self) -> None:
        if self.answer is not None:
            super()._ipython_display_()
            return
        shown = [display(each, raw=True, display_id=True) for each in self._left_in_notebook()]

        def update(_: Any) -> None:
            """Leave the picture to a saved notebook, once there is one."""
            self.unobserve(update, "answer")
            for place, each in zip(shown, self._left_in_notebook(), strict=True):
                if place is not None:
                    place.update(each, raw=True)

        self.observe(update, "answer")

    def _exactly(self, then: Any) -> None:
        if self.answer is None:
            raise QuestionRefused("The fit is still being looked at; wait until it is done.")
        super()._exactly(then)


def _looked(question: SoundnessQuestion) -> SoundnessQuestion:
    """The question without what is merely shown."""
    return replace(question, show="", predictor="")


def _said(looked: SoundnessQuestion, rows: int) -> str:
    return {
        "bootstrap": "Fitting bootstrap samples",
        "cross-validation": "Repeating the cross-validation",
    }.get(looked.optimism, f"Looking at all {count(rows)} rows")


def _counting(looked: SoundnessQuestion, progress: Progress) -> Progress:
    """Count repeats where there are any: the checks after them are quick."""
    if looked.optimism == "none":
        return progress
    return lambda done, parts: progress(min(done, looked.repeats), looked.repeats)


def _titled(title: str, text: str) -> Markup:
    return markup.element("p", markup.element("strong", f"{title}. "), text)


def figures_table(answer: SoundnessAnswer) -> Markup:
    """The figures behind the finding that is shown; empty where nothing is known."""
    finding = shown_finding(answer)
    figures = finding_figures(finding, answer.subject, answer.question.level)
    if not figures:
        return Markup()
    rows = [Row(each) for each in figures]
    table = markup.table("Figures behind it", [Column("What"), Column("Figure")], rows)
    if sum(len(written) for _, written in figures) <= _LONG:
        return table
    return markup.folded(f"Figures behind it: {count(len(figures))}", table)
