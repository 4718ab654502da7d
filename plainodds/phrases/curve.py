"""Curves in words."""

from __future__ import annotations

from collections.abc import Sequence

from plainodds.answers.curve import CurveAnswer, CurveLine
from plainodds.phrases.alternative import alternative
from plainodds.phrases.choices.concerns import curve_spoken_of
from plainodds.phrases.choices.curve import (
    LISTED_AT_MOST,
    as_chances,
    extreme_points,
    going,
    spoken_places,
)
from plainodds.phrases.concerns import level_cautions
from plainodds.phrases.held import others_words
from plainodds.phrases.labels import (
    from_to,
    listed,
    predictor_name,
    scale_title,
    sentence_case,
    value_label,
)
from plainodds.phrases.numbers import confidence, count, denominator, frequencies
from plainodds.phrases.parts import (
    association,
    covariance_words,
    model_cautions,
    rows_words,
    say_level_once,
)
from plainodds.phrases.reach import beyond_words, line_words
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.slope import slope_line
from plainodds.phrases.units import tidy
from plainodds.phrases.ways import Way, estimate_at, way_of

__all__: list[str] = []

_EVERYTHING = 1_000_000


@words.register
def _(answer: CurveAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: CurveAnswer) -> Words:
    scale = answer.question.scale
    if scale == "slope":
        told = [slope_line(answer, line) for line in answer.lines]
    else:
        told = _chances_told(answer)
    if scale in ("odds", "linear_predictor"):
        told += [
            _line_told(answer, line, spoken_places(answer, line), way_of(scale))
            for line in answer.lines
        ]
    return _words(answer, [*told, *others_words(answer)])


def _words(answer: CurveAnswer, told: Sequence[str]) -> Words:
    levels = level_cautions(answer.subject, curve_spoken_of(answer))
    cautions = map(sentence, (*beyond_words(answer), *levels, association(answer.subject)))
    return Words(
        tuple(map(sentence, told)),
        (
            *cautions,
            *model_cautions(answer.subject, offset_held=answer.question.others != "observed"),
        ),
    )


def _chances_told(answer: CurveAnswer) -> list[str]:
    """One sentence per line in chances, with frequencies over one denominator for all."""
    lines = [as_chances(line, answer.question.scale) for line in answer.lines]
    places = [spoken_places(answer, line) for line in answer.lines]
    spoken = [
        [line.estimate[place] for place in here] for line, here in zip(lines, places, strict=True)
    ]
    over = denominator(each for chances in spoken for each in chances)
    return [
        f"{_line_told(answer, line, here, way_of('probability'))}, "
        f"that is {frequencies(chances, over)}"
        for line, here, chances in zip(lines, places, spoken, strict=True)
    ]


def _line_told(answer: CurveAnswer, line: CurveLine, places: Sequence[int], way: Way) -> str:
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    name = predictor_name(facts)
    lead = f"for {line_words(answer, line)}, " if line_words(answer, line) else ""
    noun = f"the {way.noun} of {tidy(subject.outcome.event)}"
    if question.others == "observed":
        noun = f"the average chance of {tidy(subject.outcome.event)}"
        if way is not way_of("probability"):
            noun = f"the {way.noun} matching {noun}"
    told = say_level_once(
        [way.told(estimate_at(line, place), question.level) for place in places], question.level
    )
    values = [value_label(facts, line.at[place]) for place in places]
    verb = "are" if way.plural else "is"
    if len(line.at) <= LISTED_AT_MOST:
        joint = "at" if facts.is_number else "for"
        items = [f"{text} {joint} {at}" for text, at in zip(told, values, strict=True)]
        return f"{lead}by {name}, {noun} {verb} {listed(items)}"
    if not facts.is_number:
        return (
            f"{lead}over {count(len(line.at))} values of {name}, {noun} {verb} lowest for "
            f"{values[0]}, {told[0]}, and highest for {values[1]}, {told[1]}"
        )
    start, end, *turns = places
    moves = _moves(line, start, end, way)
    text = (
        f"{lead}with {name} going {from_to(facts, line.at[start], line.at[end])}, {noun} "
        f"{moves[0]} {told[0]} {moves[1]} {told[1]}"
    )
    it = "they are" if way.plural else "it is"
    for place, at, turn in zip(turns, values[2:], told[2:], strict=True):
        extreme = "highest" if line.estimate[place] > line.estimate[start] else "lowest"
        text += f"; {it} {extreme} at {at}, {turn}"
    return text


def _moves(line: CurveLine, start: int, end: int, way: Way) -> tuple[str, str]:
    s = "" if way.plural else "s"
    goes = going(line, start, end, way)
    if goes == "level":
        return f"start{s} at", f"and end{s} at"
    return (f"rise{s} from" if goes == "rising" else f"fall{s} from"), "to"


def _technical(answer: CurveAnswer) -> Words:
    told = [_drawn(answer)]
    told += [_technical_line(answer, line) for line in answer.lines]
    told += [*others_words(answer, at_most=_EVERYTHING), _method(answer)]
    return _words(answer, told)


def _drawn(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    text = f"{scale_title(answer)}, along {predictor_name(facts)}"
    first, last = answer.lines[0].at[0], answer.lines[0].at[-1]
    if facts.is_number and first != last:
        text += f" {from_to(facts, first, last)}"
    if question.by is None:
        return text
    return f"{text}, one line for each value of {predictor_name(subject.predictor(question.by))}"


def _technical_line(answer: CurveAnswer, line: CurveLine) -> str:
    question = answer.question
    facts, way = answer.subject.predictor(question.predictor), way_of(question.scale)
    joint = "at" if facts.is_number else "for"
    items = []
    for place in sorted(spoken_places(answer, line)):
        point = estimate_at(line, place)
        se = "" if point.se is None else f", standard error {way.se(point.se)}"
        at = value_label(facts, line.at[place])
        items.append(f"{joint} {at} {way.told(point, question.level)}{se}")
    lead = line_words(answer, line) or "estimates"
    return f"{sentence_case(lead)}: {'; '.join(items)}"


def _method(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    if all(line.lower is None for line in answer.lines):
        return f"From {rows_words(subject)}"
    if question.scale == "slope":
        way = "delta-method intervals of dπ/dx"
    elif question.others == "observed":
        way = "delta-method intervals on the logit of the averaged chance (rows weighted as fitted)"
    else:
        way = "Wald intervals on the linear predictor"
    if question.scale in ("probability", "odds"):
        way += ", carried over to the scale shown"
    return (
        f"{confidence(question.level)} intervals from {rows_words(subject)}: {way}, with "
        f"{covariance_words(subject)}"
    )


@alternative.register
def _(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    shape = "as a curve with its interval band" if facts.is_number else "as points with intervals"
    if all(line.lower is None for line in answer.lines):
        shape = "as a curve" if facts.is_number else "as points"
    by = ""
    if question.by is not None:
        lines = listed([line_words(answer, line) for line in answer.lines])
        by = f", one for {lines}"
    start = f"{scale_title(answer)}, along {predictor_name(facts)}, {shape}{by}"
    way = way_of(question.scale)
    joint = "at" if facts.is_number else "for"
    told = []
    for line, place in extreme_points(answer):
        number = line.estimate[place]
        of = f", {line_words(answer, line)}" if line_words(answer, line) else ""
        told.append(f"{way.bare(number)} {joint} {value_label(facts, line.at[place])}{of}")
    return f"{sentence(start)} {sentence(f'The lowest is {told[0]}; the highest is {told[1]}')}"
