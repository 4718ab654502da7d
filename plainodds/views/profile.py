"""ProfileView: what if it were 20 instead of 40?"""

from __future__ import annotations

from dataclasses import replace
from typing import Any

import ipywidgets as widgets

from plainodds.answers.profile import ProfileAnswer, ProfileQuestion
from plainodds.phrases import words
from plainodds.phrases.familiarity import familiarity_cautions
from plainodds.phrases.labels import predictor_label, value_label
from plainodds.phrases.numbers import chance, ratio, signed, summing
from plainodds.phrases.parts import profile_words, typical_case
from plainodds.phrases.sentences import sentence
from plainodds.values import Pairs, Scalar
from plainodds.views import markup
from plainodds.views.base import AnswerView
from plainodds.views.controls import Control, predictor_control, slug
from plainodds.views.markup import Column, Markup, Row
from plainodds.views.parts import block, html

__all__ = ["ProfileView"]

_NOTHING = 1e-9


class ProfileView(AnswerView):
    """What is the chance for this profile, and what makes it so?

    Every predictor has a control. The picture reads the profile on three aligned scales,
    the ledger beneath tells what each predictor adds. Pin a profile to compare the next
    one with it. Where a profile leaves the data, the view says so.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : ProfileQuestion, optional
        What is shown at the start; default: the typical profile.

    Attributes
    ----------
    controls : dict of str to control
        By predictor; set ``view.controls["age_years"].slider.value`` to move one.
    question : ProfileQuestion
        May be set; ``view.question = fit.profile({"age_years": 80}).question``.
    answer : ProfileAnswer

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
    >>> view = po.ProfileView(smf.logit("burst ~ age_years * material", mains).fit(disp=0))
    >>> view.controls["age_years"].box.value = 80
    >>> view.question.values
    (('age_years', 80),)
    """

    kind = "profile"
    asks = ProfileQuestion

    def __init__(self, result: Any, question: ProfileQuestion | None = None) -> None:
        self.controls: dict[str, Control] = {}
        super().__init__(result, question)

    def _make_controls(self) -> list[widgets.Widget]:
        taken = {"level"}
        for facts in self.subject.predictors:
            field = slug(facts.name, taken)
            taken.add(field)
            self.controls[facts.name] = self._bind(
                field, predictor_control(facts), self._value_of(facts.name), self._with(facts.name)
            )
        self._pin = self._button(
            "Pin this profile", "pin", lambda asked: replace(asked, against=asked.values)
        )
        self._unpin = self._button(
            "Remove the pin", "unpin", lambda asked: replace(asked, against=None)
        )
        self._typical = self._button(
            "Back to typical", "typical", lambda asked: replace(asked, values=())
        )
        self._pinned = html("pinned")
        buttons = widgets.HBox([self._pin, self._unpin, self._typical])
        buttons.add_class("plainodds-buttons")
        level = self._level_control()
        return [
            *(control.widget for control in self.controls.values()),
            block(buttons, self._pinned),
            level.widget,
        ]

    def _on_stage(self) -> list[widgets.Widget]:
        self._warning = html("warning")
        return [*super()._on_stage(), self._warning]

    def _value_of(self, name: str) -> Any:
        typical = self.subject.predictor(name).typical
        return lambda question: dict(question.values).get(name, typical)

    def _with(self, name: str) -> Any:
        facts = self.subject.predictor(name)

        def write(question: ProfileQuestion, value: Scalar) -> ProfileQuestion:
            stated = dict(question.values) | {name: value}
            if value == facts.typical:
                del stated[name]
            order = [each.name for each in self.subject.predictors]
            return replace(question, values=tuple((n, stated[n]) for n in order if n in stated))

        return write

    def _arrange(self, question: ProfileQuestion) -> None:
        self._unpin.layout.display = "none" if question.against is None else None
        self._typical.disabled = not question.values

    def _shown(self, answer: ProfileAnswer) -> None:
        self._warning.value = _warning(answer)
        self._pinned.value = _pinned(answer)

    def _words_of(self, answer: ProfileAnswer) -> Markup:
        said = words(answer)
        # what the warning says already is not said twice
        told = set(_familiarity(answer))
        return markup.words_block(
            replace(said, cautions=tuple(each for each in said.cautions if each not in told))
        )

    def _table_of(self, answer: ProfileAnswer) -> Markup:
        return ledger_table(answer)


def _familiarity(answer: ProfileAnswer) -> list[str]:
    return [sentence(each) for each in familiarity_cautions(answer)]


def _warning(answer: ProfileAnswer) -> Markup:
    told = _familiarity(answer)
    if not told:
        return Markup()
    verdicts = {answer.point.familiarity.verdict}
    if answer.comparison is not None:
        verdicts.add(answer.start.familiarity.verdict)
    heading = "▲ Beyond the data" if "beyond" in verdicts else "△ Rare in the data"
    return markup.banner(heading, " ".join(told))


def _pinned(answer: ProfileAnswer) -> Markup:
    against = answer.question.against
    if against is None:
        return Markup()
    who = (
        profile_words(answer.subject, _in_order(answer, against))
        if against
        else typical_case(answer.subject.outcome)
    )
    return markup.note(f"Pinned: {who}; {chance(answer.start.probability.estimate)}.")


def _in_order(answer: ProfileAnswer, stated: Pairs) -> Pairs:
    names = {name for name, _ in stated}
    return tuple(pair for pair in answer.start.values if pair[0] in names)


def ledger_table(answer: ProfileAnswer) -> Markup:
    """The ledger: from the start, row by row, to the profile.

    The figures added to the log odds are rounded so that, as shown, they sum to the total.
    """
    subject, point, start = answer.subject, answer.point, answer.start
    parts = [start.linear_predictor.estimate, *(row.adds.estimate for row in answer.ledger)]
    first, *adds = summing(parts, point.linear_predictor.estimate)
    values = dict(point.values)
    opening = "Pinned profile" if answer.comparison is not None else "Typical profile"
    rows = [
        Row(
            (
                f"{opening} (start)",
                "",
                signed(first, decimals=2),
                ratio(start.odds.estimate),
                chance(start.probability.estimate),
            )
        )
    ]
    for row, add in zip(answer.ledger, adds, strict=True):
        facts = [subject.predictor(name) for name in row.predictors]
        moved = abs(row.adds.estimate) > _NOTHING
        rows.append(
            Row(
                (
                    ", ".join(map(predictor_label, facts)),
                    _in_pieces([value_label(each, values[each.name]) for each in facts]),
                    signed(add, decimals=2),
                    f"× {ratio(row.multiplies.estimate)}",
                    chance(row.running_probability),
                ),
                class_=None if moved else "plainodds-unmoved",
            )
        )
    rows.append(
        Row(
            (
                "This profile",
                "",
                signed(point.linear_predictor.estimate, decimals=2),
                ratio(point.odds.estimate),
                chance(point.probability.estimate),
            ),
            class_="plainodds-total",
        )
    )
    columns = [
        Column("Predictor"),
        Column("Value"),
        Column("Adds to log odds", is_number=True),
        Column("Multiplies odds", is_number=True),
        Column("Chance so far", is_number=True),
    ]
    return markup.table("Ledger: how the chance comes about", columns, rows)


def _in_pieces(values: list[str]) -> tuple[str, ...]:
    """Values in a row, to be broken after a comma only."""
    *first, last = values
    return (*(f"{each}," for each in first), last)
