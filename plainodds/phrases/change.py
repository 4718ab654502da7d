"""Changes in words: both chances, what lies between them, and for whom."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.estimate import Estimate
from plainodds.phrases.alternative import alternative
from plainodds.phrases.averaged import cases_chosen, drawn_method, drawn_words, rows_chosen
from plainodds.phrases.choices.change import (
    both_intervals,
    change_averaged,
    has_others,
    is_open,
    marks_told,
    misses_one,
)
from plainodds.phrases.concerns import level_cautions
from plainodds.phrases.held import held_case, held_words, kept_words
from plainodds.phrases.labels import sentence_case
from plainodds.phrases.moves import (
    beyond_cautions,
    end_label,
    levels_moved,
    moves_label,
    moves_words,
    settled_moves,
    start_label,
)
from plainodds.phrases.needed import needed_technical, needed_words
from plainodds.phrases.numbers import (
    confidence,
    denominator_of_change,
    percentage_points,
)
from plainodds.phrases.parts import (
    association,
    beyond_saying,
    cases_with_interval,
    chance_with_interval,
    covariance_words,
    difference_with_interval,
    is_beyond_saying,
    model_cautions,
    odds_ratio_cautions,
    points_with_interval,
    rather,
    ratio_with_interval,
    rows_words,
    say_level_once,
    standard_error,
)
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import tidy

__all__: list[str] = []

_EVERYTHING = 1_000_000


@words.register
def _(answer: ChangeAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: ChangeAnswer) -> Words:
    level = answer.question.level
    over = denominator_of_change(answer.start.estimate, answer.end.estimate)
    told = [
        _chances(answer, over),
        *_intervals(answer),
        _difference(answer, over),
        _framed(answer, over),
        _ratios(answer),
        *needed_words(answer.subject, answer.number_needed, level),
        *_others(answer),
        *drawn_words(answer.subject, answer.question.sample, answer.comparison.risk_difference),
    ]
    return _words(answer, told, _rounding(answer, over))


def _words(answer: ChangeAnswer, told: list[str], more: list[str]) -> Words:
    odds_ratio = answer.comparison.odds_ratio
    cautions = [
        *beyond_cautions(answer),
        *level_cautions(answer.subject, levels_moved(answer)),
        *odds_ratio_cautions((answer.start.estimate, answer.end.estimate)),
        *_of_averages(answer),
        association(answer.subject),
        *more,
        *([beyond_saying("this change")] if is_beyond_saying(odds_ratio) else []),
    ]
    held = answer.question.others != "observed"
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(answer.subject, offset_held=held)),
    )


def _noun(answer: ChangeAnswer) -> str:
    return "average chance" if change_averaged(answer) else "chance"


def _chances(answer: ChangeAnswer, over: int) -> str:
    subject, question = answer.subject, answer.question
    change = f"with {moves_words(subject, settled_moves(answer))}"
    noun = f"the {_noun(answer)} of {tidy(subject.outcome.event)}"
    if change_averaged(answer):
        if has_others(answer):
            comma = "," if len(question.moves) > 1 else ""
            change += f"{comma} and everything else as it is"
        noun += f" among {cases_chosen(subject, question.where, answer.counted)}"
    elif answer.held:
        change = f"for {held_case(answer.subject, answer.held, answer.question.others)}, {change}"
    return f"{change}, {noun} is {rather(answer.end.estimate, answer.start.estimate, over)}"


def _intervals(answer: ChangeAnswer) -> list[str]:
    """The intervals of both chances, in the order in which the chances are told."""
    level = confidence(answer.question.level)
    ends = both_intervals(answer)
    if not ends:
        return []
    return [f"The {level} intervals of the two are {ends[0]} and {ends[1]}"]


def _difference(answer: ChangeAnswer, over: int) -> str:
    level, difference = answer.question.level, answer.comparison.risk_difference
    cases, points = say_level_once(
        [cases_with_interval(difference, over, level), difference_with_interval(difference, level)],
        level,
    )
    told = f"That is {cases}, or {points}"
    return f"{told}, which leaves open whether there are more or fewer" if is_open(answer) else told


def _framed(answer: ChangeAnswer, over: int) -> str:
    """The same chances from their other side, since either side alone can mislead."""
    here, there = answer.end.estimate, answer.start.estimate
    return f"The chance that this does not happen is {rather(1 - here, 1 - there, over)}"


def _ratios(answer: ChangeAnswer) -> str:
    level, compared = answer.question.level, answer.comparison
    return (
        f"Put as ratios, the {_noun(answer)} is multiplied by "
        f"{ratio_with_interval(compared.risk_ratio, level)} and the odds by "
        f"{ratio_with_interval(compared.odds_ratio, level)}"
    )


def _others(answer: ChangeAnswer, at_most: int = 8) -> list[str]:
    question, subject = answer.question, answer.subject
    if question.others != "observed":
        return held_words(subject, answer.held, question.others, at_most=at_most)
    if not change_averaged(answer):
        return []
    rows = rows_chosen(subject, question.where, answer.counted)
    if not has_others(answer):
        return [f"The chances are averaged over the {rows}"]
    return [kept_words(subject, "chances", rows)]


def _of_averages(answer: ChangeAnswer) -> list[str]:
    if not change_averaged(answer):
        return []
    return [
        "The odds ratio compares the odds of two averages; the odds ratio at given values of the "
        "other predictors is another figure, mostly further from 1"
    ]


def _rounding(answer: ChangeAnswer, over: int) -> list[str]:
    if not misses_one(answer, over):
        return []
    return ["Each figure is rounded on its own, so counts may differ by one from their difference"]


def _technical(answer: ChangeAnswer) -> Words:
    subject, question, level = answer.subject, answer.question, answer.question.level
    compared, moves = answer.comparison, settled_moves(answer)
    kind = "marginal odds ratio (of the averages)" if change_averaged(answer) else "odds ratio"
    told = [
        f"{moves_label(subject, moves)}: {_noun(answer)} of {tidy(subject.outcome.event)} "
        f"at the start {_with_error(answer.start, level)}; at the end "
        f"{_with_error(answer.end, level)}",
        f"Risk difference {points_with_interval(compared.risk_difference, level)}"
        f"{_points_error(compared.risk_difference)}; that is "
        f"{cases_with_interval(compared.risk_difference, 100, level)} and "
        f"{cases_with_interval(compared.risk_difference, 1_000, level)}",
        f"Risk ratio {ratio_with_interval(compared.risk_ratio, level)}"
        f"{standard_error(compared.risk_ratio)}; {kind} "
        f"{ratio_with_interval(compared.odds_ratio, level)}{standard_error(compared.odds_ratio)}",
        *needed_technical(answer.number_needed, level),
        *_others(answer, _EVERYTHING),
    ]
    method = f"From {rows_words(subject)}"
    if compared.risk_difference.lower is not None:
        method += (
            f"; {confidence(level)} intervals by one joint delta method, of chances on the logit "
            "scale, of ratios on the log scale, of the difference on its own, with "
            f"{covariance_words(subject)}"
        )
        if question.others == "observed":
            method += f"; rows weighted as fitted{drawn_method(question.sample)}"
    return _words(answer, [*told, method], [])


def _with_error(estimate: Estimate, level: float) -> str:
    return f"{chance_with_interval(estimate, level)}{_points_error(estimate)}"


def _points_error(estimate: Estimate) -> str:
    if estimate.se is None:
        return ""
    return f", standard error {percentage_points(estimate.se)}"


@alternative.register
def _(answer: ChangeAnswer) -> str:
    subject, level, moves = answer.subject, answer.question.level, settled_moves(answer)
    start, end = say_level_once(
        [chance_with_interval(each, level) for each in (answer.start, answer.end)], level
    )
    opening = f"{sentence_case(_noun(answer))} of {tidy(subject.outcome.event)}"
    if change_averaged(answer):
        opening += f" among {cases_chosen(subject, answer.question.where, answer.counted)}"
    elif answer.held:
        opening += f" for {held_case(answer.subject, answer.held, answer.question.others)}"
    told = (
        f"{opening}: {start} with {start_label(subject, moves)} and {end} with "
        f"{end_label(subject, moves)}",
        f"Beneath, the same as marks, {marks_told(answer)}, those that differ set apart by their "
        "shape",
    )
    return " ".join(map(sentence, told))
