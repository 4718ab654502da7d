"""The joint table of two factors: each combination, the effects within strata, both scales.

Rows are the levels of one factor, columns those of the other, each combination with its
cases, its chance and its odds ratio against one reference; in the margins stand the
effects of each factor within the levels of the other, and beneath them the measures of
interaction. Source of the layout: Knol & VanderWeele 2012 (Int J Epidemiol 41:514).
"""

from __future__ import annotations

from collections.abc import Callable

from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import AdditiveInteraction, JointCell, JointTable, StratumEffect
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.labels import (
    listed,
    predictor_label,
    predictor_name,
    sentence_case,
    value_label,
)
from plainodds.phrases.numbers import (
    NOT_KNOWN,
    bare_points,
    bare_points_span,
    chance,
    confidence,
    count,
    quantity,
    ratio,
    ratio_interval,
    signed,
    span,
)
from plainodds.phrases.units import tidy
from plainodds.values import Scalar
from plainodds.views import markup
from plainodds.views.markup import Column, Markup, Row

__all__ = ["joint_markup"]

_NO_ROWS = "none *"

_Cell = str | tuple[str, ...]
_Say = Callable[[float], str]
_SpanOf = Callable[[float, float], str]


def joint_markup(answer: PairAnswer, joint: JointTable) -> Markup:
    """The joint table, and the measures of interaction beneath it."""
    return markup.joined([_combinations(answer, joint), _measures(answer, joint)])


def _combinations(answer: PairAnswer, joint: JointTable) -> Markup:
    """Levels of `a` down, levels of `b` across, and the effects within them in the margins."""
    subject, question = answer.subject, answer.question
    a, b = (subject.predictor(name) for name in (question.a, question.b))
    reference, a_alone, b_alone, both = joint.cells
    of_a = [_within(joint, a.name, cell.b) for cell in (reference, both)]
    of_b = [_within(joint, b.name, cell.a) for cell in (reference, both)]
    columns = [
        Column(""),
        Column(_at(answer, b.name, reference.b), is_number=True),
        Column(_at(answer, b.name, both.b), is_number=True),
        Column(f"Effect of {predictor_name(b)}", is_number=True),
    ]
    rows = [
        *_of_level(answer, a.name, (reference, b_alone), of_b[0]),
        *_of_level(answer, a.name, (a_alone, both), of_b[1]),
        *_of_column(answer, of_a),
    ]
    both_names = f"{predictor_name(a)} and {predictor_name(b)} together"
    title = f"{sentence_case(subject.outcome.event)}: {both_names}"
    if not subject.no_interval:
        title += f" ({confidence(question.level)} intervals in brackets)"
    style = "plainodds-stacked plainodds-joint"
    return markup.table(title, columns, rows, _remarks(answer, joint), style)


def _of_level(
    answer: PairAnswer, name: str, cells: tuple[JointCell, ...], effect: StratumEffect
) -> list[Row]:
    """The rows of one level of `a`: cases, chance, odds ratio, and the effect of `b` within it."""
    rows: list[tuple[_Cell, ...]] = []
    cases = answer.subject.outcome.cases
    if any(cell.rows is not None for cell in cells):
        rows.append((f"{sentence_case(cases)} with / without it", *map(_counted, cells), ""))
    if effect.risk_difference is not None:
        chances = (_with_interval(cell.chance, chance, span) for cell in cells)
        difference = _with_interval(
            effect.risk_difference, bare_points, bare_points_span, " points"
        )
        rows.append(("Chance", *chances, difference))
    odds = (
        ("1", "(reference)") if cell.is_reference else _of_ratio(cell.odds_ratio) for cell in cells
    )
    rows.append(("Odds ratio", *odds, _times(effect.odds_ratio)))
    heading = _at(answer, name, cells[0].a)
    return [
        Row(each, heading if place == 0 else "", "plainodds-within")
        for place, each in enumerate(rows)
    ]


def _within(joint: JointTable, predictor: str, level: Scalar) -> StratumEffect:
    """The effect of one factor among those with one level of the other."""
    return next(
        each for each in joint.strata if each.predictor == predictor and each.within == level
    )


def _of_column(answer: PairAnswer, effects: list[StratumEffect]) -> list[Row]:
    """The margin beneath: the effect of `a` within each level of `b`, and how they compare."""
    rows: list[tuple[_Cell, ...]] = []
    if all(each.risk_difference is not None for each in effects):
        differences = (
            _with_interval(each.risk_difference, bare_points, bare_points_span, " points")
            for each in effects
        )
        rows.append(("Chance", *differences, ""))
    rows.append(("Odds ratio", *(_times(each.odds_ratio) for each in effects), ""))
    name = predictor_name(answer.subject.predictor(effects[0].predictor))
    return [
        Row(each, f"Effect of {name}" if place == 0 else "", "plainodds-within")
        for place, each in enumerate(rows)
    ]


def _remarks(answer: PairAnswer, joint: JointTable) -> str:
    """What is meant by effects, why levels were exchanged, and which combination has no rows."""
    subject = answer.subject
    changes = [
        f"{predictor_name(subject.predictor(each.predictor))} "
        f"{value_label(subject.predictor(each.predictor), each.end)} against "
        f"{value_label(subject.predictor(each.predictor), each.start)}"
        for each in (joint.strata[0], joint.strata[2])
    ]
    told = [f"Effects: {listed(changes)}."]
    if joint.recoded:
        names = [predictor_name(subject.predictor(name)) for name in joint.recoded]
        told.append(
            f"The levels of {listed(names)} are exchanged here: the reference has the lowest "
            "odds, since only then do the additive measures say what they are read as."
        )
    if len(joint.recoded) == 1 and answer.interaction.joined:
        told.append("That turns the ratio of odds ratios into its inverse.")
    if any(cell.rows == 0 for cell in joint.cells):
        cases = tidy(subject.outcome.cases)
        told.append(f"* No {cases} in the data have this combination: the model alone speaks.")
    return " ".join(told)


def _measures(answer: PairAnswer, joint: JointTable) -> Markup:
    """The multiplicative and the additive measures, with what each is when there is nothing."""
    has_interval = not answer.subject.no_interval
    columns = [Column("Interaction"), Column("Estimate", is_number=True)]
    if has_interval:
        columns.append(Column(f"{confidence(answer.question.level)} interval", is_number=True))
    rows = [_measure("Ratio of odds ratios (1: none)", joint.multiplicative, has_interval)]
    if not answer.interaction.joined:
        by_assumption = ("Ratio of odds ratios (1: none)", "1", "by the model")
        rows = [Row(by_assumption[: 2 + has_interval])]
    rows += _additive("odds ratios", joint.additive_by_odds, has_interval)
    if joint.additive_by_chances is not None:
        rows += _additive("chances", joint.additive_by_chances, has_interval)
    return markup.table("Multiplicative, and additive", columns, rows)


def _additive(of: str, measures: AdditiveInteraction, has_interval: bool) -> list[Row]:
    opens = f"Additive, from {of}"
    found = [
        _measure(
            "Relative excess risk (0: none)",
            measures.relative_excess_risk,
            has_interval,
            signed,
            _signed_between,
            opens,
        ),
        _measure(
            "Attributable proportion (0: none)",
            measures.attributable_proportion,
            has_interval,
            signed,
            _signed_between,
        ),
    ]
    if measures.synergy_index is None:
        nothing = ("Synergy index (1: none)", NOT_KNOWN, NOT_KNOWN)
        found.append(Row(nothing[: 2 + has_interval], class_="plainodds-within"))
    else:
        found.append(_measure("Synergy index (1: none)", measures.synergy_index, has_interval))
    return found


def _measure(
    title: str,
    estimate: Estimate,
    has_interval: bool,
    say: _Say = ratio,
    span_of: _SpanOf = ratio_interval,
    opens: str = "",
) -> Row:
    cells = [title, say(estimate.estimate)]
    if has_interval:
        lower, upper = estimate.lower, estimate.upper
        cells.append(NOT_KNOWN if lower is None or upper is None else span_of(lower, upper))
    return Row(tuple(cells), opens, None if title.startswith("Ratio") else "plainodds-within")


def _at(answer: PairAnswer, name: str, value: Scalar) -> str:
    facts = answer.subject.predictor(name)
    return f"{predictor_label(facts)} {value_label(facts, value)}"


def _counted(cell: JointCell) -> str:
    """Cases with the event and without it."""
    if cell.rows is None:
        return NOT_KNOWN
    if cell.rows == 0:
        return _NO_ROWS
    if cell.events is None:
        return _cases(cell.rows)
    return f"{_cases(cell.events)} / {_cases(cell.rows - cell.events)}"


def _cases(number: float) -> str:
    return count(int(number)) if float(number).is_integer() else quantity(number)


def _with_interval(
    estimate: Estimate | None, say: _Say, span_of: _SpanOf, unit: str = ""
) -> tuple[str, ...]:
    if estimate is None:
        return (NOT_KNOWN,)
    told = f"{say(estimate.estimate)}{unit}"
    if estimate.lower is None or estimate.upper is None:
        return (told,)
    return told, f"({span_of(estimate.lower, estimate.upper)})"


def _of_ratio(estimate: Estimate) -> tuple[str, ...]:
    return _with_interval(estimate, ratio, ratio_interval)


def _times(estimate: Estimate) -> tuple[str, ...]:
    told, *interval = _of_ratio(estimate)
    return f"× {told}", *interval


def _signed_between(lower: float, upper: float) -> str:
    return span(lower, upper, signed)
