"""The tables of two predictors together: the effect of one along the other, and how they act."""

from __future__ import annotations

from collections.abc import Callable

from plainodds.answers.estimate import Estimate
from plainodds.answers.pair import PairAnswer
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.choices.curve import tabled_places
from plainodds.phrases.labels import axis_title, predictor_name, sentence_case, value_label
from plainodds.phrases.numbers import (
    NOT_KNOWN,
    bare_points,
    bare_points_span,
    confidence,
    count,
    p_value,
    quantity,
    ratio,
    ratio_interval,
    signed,
    span,
)
from plainodds.phrases.pair_labels import (
    effect_axis_title,
    followed_label,
    has_others,
    interaction_label,
)
from plainodds.phrases.units import tidy
from plainodds.values import Scalar
from plainodds.views import markup
from plainodds.views.joint_markup import joint_markup
from plainodds.views.markup import Column, Markup, Row

__all__ = ["pair_table"]

_Cell = str | tuple[str, ...]


def pair_table(answer: PairAnswer) -> Markup:
    """The effect of `a` along `b`, the interaction, and the joint table where there is one."""
    tables = [effect_table(answer), interaction_table(answer)]
    if answer.joint is not None:
        tables.insert(0, joint_markup(answer, answer.joint))
    return markup.joined(markup.element("div", each, class_="plainodds-part") for each in tables)


def effect_table(answer: PairAnswer) -> Markup:
    """The effect of `a` at a few values of `b`, with its interval."""
    effect, subject = answer.effect, answer.subject
    b = subject.predictor(answer.question.b)
    in_odds = answer.question.scale == "odds"
    say, span_of = (ratio, ratio_interval) if in_odds else (bare_points, bare_points_span)
    places = tabled_places(len(effect.at)) if b.is_number else list(range(len(effect.at)))
    columns = [Column(axis_title(b)), Column("Odds ratio" if in_odds else "Effect", True)]
    if not subject.no_interval:
        columns.append(Column(f"{confidence(answer.question.level)} interval", True))
    rows = []
    for place in places:
        star = "" if effect.supported[place] else " *"
        cells: list[_Cell] = [_at(b, effect.at[place]), f"{say(effect.estimate[place])}{star}"]
        if not subject.no_interval:
            cells.append(
                span_of(effect.lower[place], effect.upper[place])
                if effect.lower is not None and effect.upper is not None
                else NOT_KNOWN
            )
        rows.append(Row(tuple(cells)))
    remarks = []
    if not all(effect.supported[place] for place in places):
        remarks.append(f"* no {tidy(subject.outcome.cases)} in the data near by.")
    if len(places) < len(effect.at):
        remarks.append(f"{len(places)} of {count(len(effect.at))} points.")
    return markup.table(_effect_title(answer), columns, rows, " ".join(remarks))


def interaction_table(answer: PairAnswer) -> Markup:
    """By how much the effect of `a` differs along `b`, on both scales."""
    found, subject = answer.interaction, answer.subject
    has_interval = not subject.no_interval
    columns = [Column("Measure"), Column("Estimate", True)]
    if has_interval:
        interval = f"{confidence(answer.question.level)} interval"
        columns += [Column(interval, True), Column("p-value", True)]
    rows = []
    opens = f"In chances: {_lowered(interaction_label(answer, 'probability'))}, percentage points"
    averaged = f"averaged over {count(answer.counted)} {tidy(subject.outcome.cases)}"
    for where, estimate, p in (
        (_profile(answer), found.at_profile, found.at_profile_p_value),
        (averaged, found.averaged, found.averaged_p_value),
    ):
        if estimate is not None:
            # by slopes it is far smaller than what points are made for
            say, span_of = (
                (_fine, _fine_between) if answer.sloped else (bare_points, bare_points_span)
            )
            cells = [sentence_case(where), say(estimate.estimate)]
            if has_interval:
                cells += [_interval(estimate, span_of), NOT_KNOWN if p is None else p_value(p)]
            rows.append(Row(tuple(cells), opens, "plainodds-within"))
            opens = ""
    cells = [interaction_label(answer, "odds"), ratio(found.ratio.estimate)]
    if not found.joined:
        cells[1] = "1"
    if has_interval:
        told = _interval(found.ratio, ratio_interval) if found.joined else "by the model"
        cells += [told, ""]
    rows.append(Row(tuple(cells), "In odds", "plainodds-within"))
    return markup.table(_interaction_title(answer), columns, rows, _tested(answer))


def _effect_title(answer: PairAnswer) -> str:
    return f"{followed_label(answer)}: {_lowered(effect_axis_title(answer))}"


def _interaction_title(answer: PairAnswer) -> str:
    a, b = (answer.subject.predictor(name) for name in (answer.question.a, answer.question.b))
    return f"How the effect of {predictor_name(a)} differs with {predictor_name(b)}"


def _profile(answer: PairAnswer) -> str:
    """At which profile the interaction is stated beside its average."""
    if not has_others(answer):
        return "as the model has it"
    stated = not isinstance(answer.question.others, str) and answer.question.others
    return "at the values held" if stated else "at typical values"


def _tested(answer: PairAnswer) -> str:
    found = answer.interaction
    if not found.joined:
        return "No term of the model joins the two, so on the odds scale nothing is tested."
    if found.test is None:
        return ""
    kind = {"wald": "Wald test", "likelihood_ratio": "Likelihood-ratio test"}[found.test.kind]
    degrees = found.test.degrees_of_freedom
    terms = (
        "the one coefficient that joins"
        if degrees == 1
        else f"all {degrees} coefficients that join"
    )
    freedom = f"{degrees} degree{'' if degrees == 1 else 's'} of freedom"
    name = "χ²"
    if found.test.denominator is not None:
        name = "F"
        freedom = f"{degrees} and {count(round(found.test.denominator))} degrees of freedom"
    return (
        f"{kind} of {terms} the two: {name} = {quantity(found.test.statistic)} on {freedom}, "
        f"p {_p(found.test.p_value)}."
    )


def _p(p: float) -> str:
    written = p_value(p)
    return written if written[:1] in "<>" else f"= {written}"


def _interval(estimate: Estimate, span_of: Callable[[float, float], str]) -> str:
    if estimate.lower is None or estimate.upper is None:
        return NOT_KNOWN
    return span_of(estimate.lower, estimate.upper)


def _at(facts: PredictorFacts, value: Scalar) -> str:
    return quantity(float(value)) if facts.is_number else value_label(facts, value)


def _fine(slope: float) -> str:
    return signed(100 * slope)


def _fine_between(lower: float, upper: float) -> str:
    return span(100 * lower, 100 * upper, signed)


def _lowered(title: str) -> str:
    return f"{title[:1].lower()}{title[1:]}"
