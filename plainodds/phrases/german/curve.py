"""Curves in German."""

from __future__ import annotations

from collections.abc import Sequence

from plainodds.answers.curve import CurveAnswer, CurveLine, Scale
from plainodds.phrases.choices.concerns import curve_spoken_of
from plainodds.phrases.choices.curve import (
    LISTED_AT_MOST,
    as_chances,
    extreme_points,
    going,
    spoken_places,
)
from plainodds.phrases.german.concerns import level_cautions
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.parts import (
    EVERYTHING,
    ODDS_MEANING,
    association,
    chance,
    covariance,
    event,
    held_sentences,
    kept_sentence,
    level_intervals,
    model_cautions,
)
from plainodds.phrases.labels import from_to, listed, predictor_name, value_label, values_range
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import count, denominator, frequencies
from plainodds.phrases.parts import difference_with_interval, rows_words, say_level_once
from plainodds.phrases.reach import line_words, parts_without_data
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence
from plainodds.phrases.slope import slope_places
from plainodds.phrases.units import per_unit
from plainodds.phrases.ways import estimate_at, way_of

__all__ = ["averaged_in_curve", "beyond_data", "curve_title", "is_averaged"]

_MATCHING = "der mittleren Wahrscheinlichkeit entsprechende"


@GERMAN.words.register
def _(answer: CurveAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: CurveAnswer) -> Words:
    scale = answer.question.scale
    if scale == "slope":
        told = [_slope_told(answer, line) for line in answer.lines]
    else:
        told = _chances_told(answer)
    meaning = [ODDS_MEANING] if scale == "odds" else []
    if scale in ("odds", "linear_predictor"):
        told += [
            _line_told(answer, line, spoken_places(answer, line), scale) for line in answer.lines
        ]
    return _words(answer, [*told, *_others(answer)], meaning)


def _words(answer: CurveAnswer, told: Sequence[str], more: Sequence[str] = ()) -> Words:
    levels = level_cautions(answer.subject, curve_spoken_of(answer))
    cautions = map(sentence, (*more, *beyond_data(answer), *levels, association(answer.subject)))
    held = answer.question.others != "observed"
    return Words(
        tuple(map(sentence, told)),
        (*cautions, *model_cautions(answer.subject, offset_held=held)),
    )


def beyond_data(answer: CurveAnswer) -> list[str]:
    """Where the curve leaves the data; empty where it does not."""
    told = parts_without_data(answer)
    if not told:
        return []
    if answer.subject.predictor(answer.question.predictor).is_number:
        return [
            "Wo eine Linie gestrichelt ist, haben die Daten keine Zeilen in der Nähe, und das "
            f"Modell spricht für sich allein: {told}"
        ]
    return [f"Hier haben die Daten keine Zeilen, und das Modell spricht für sich allein: {told}"]


def is_averaged(answer: CurveAnswer) -> bool:
    """Whether the curve is an average over rows."""
    return answer.question.others == "observed"


@GERMAN.others_words.register
def _others(answer: CurveAnswer, at_most: int = 8) -> list[str]:
    subject, question = answer.subject, answer.question
    shown = {question.predictor, question.by}
    if all(facts.name in shown for facts in subject.predictors):
        return []
    if is_averaged(answer):
        return [kept_sentence(subject, averaged_in_curve(question.scale), rows_words(subject))]
    return held_sentences(subject, answer.held, question.others, at_most=at_most)


def averaged_in_curve(scale: Scale) -> str:
    """What is averaged, with its article."""
    if scale == "slope":
        return "die Änderungen der Wahrscheinlichkeit"
    return "die Wahrscheinlichkeiten"


def _chances_told(answer: CurveAnswer) -> list[str]:
    """One sentence per line in chances, with frequencies over one denominator for all."""
    lines = [as_chances(line, answer.question.scale) for line in answer.lines]
    places = [spoken_places(answer, line) for line in answer.lines]
    spoken = [
        [line.estimate[place] for place in here] for line, here in zip(lines, places, strict=True)
    ]
    over = denominator(each for chances in spoken for each in chances)
    return [
        lexicon().that_is.format(
            _line_told(answer, line, here, "probability"), frequencies(chances, over)
        )
        for line, here, chances in zip(lines, places, spoken, strict=True)
    ]


def _noun(answer: CurveAnswer, scale: Scale) -> str:
    what = event(answer.subject.outcome)
    averaged = is_averaged(answer)
    if scale == "odds":
        return f"die {_MATCHING + ' ' if averaged else ''}Chance (Odds) für {what}"
    if scale == "linear_predictor":
        return f"die {_MATCHING + 'n ' if averaged else ''}Log-Odds für {what}"
    return chance(answer.subject.outcome, averaged=averaged)


def _line_told(answer: CurveAnswer, line: CurveLine, places: Sequence[int], scale: Scale) -> str:
    question = answer.question
    facts, way = answer.subject.predictor(question.predictor), way_of(scale)
    name, noun = predictor_name(facts), _noun(answer, scale)
    lead = f"bei {line_words(answer, line)} " if line_words(answer, line) else ""
    told = say_level_once(
        [way.told(estimate_at(line, place), question.level) for place in places], question.level
    )
    values = [value_label(facts, line.at[place]) for place in places]
    plural = scale == "linear_predictor"
    if len(line.at) <= LISTED_AT_MOST:
        items = [f"{text} bei {at}" for text, at in zip(told, values, strict=True)]
        verb = "betragen" if plural else "beträgt"
        return f"{lead or f'je nach {name} '}{verb} {noun}{_by(name, lead)} {listed(items)}"
    if not facts.is_number:
        verb = "sind" if plural else "ist"
        return (
            f"{lead or f'je nach {name} '}{verb} {noun}{_by(name, lead)} unter "
            f"{count(len(line.at))} Werten am niedrigsten bei {values[0]}, {told[0]}, und am "
            f"höchsten bei {values[1]}, {told[1]}"
        )
    start, end, *turns = places
    goes = going(line, start, end, way)
    verbs = ("liegen", "steigen", "fallen") if plural else ("liegt", "steigt", "fällt")
    verb = dict(zip(("level", "rising", "falling"), verbs, strict=True))[goes]
    path = f"von {told[0]} auf {told[1]}"
    if goes == "level":
        path = f"am Anfang bei {told[0]} und am Ende bei {told[1]}"
    along = f"{name} ({values_range(facts, line.at[start], line.at[end])})"
    opening = f"{lead}{verb} {noun} entlang {along}" if lead else f"entlang {along} {verb} {noun}"
    text = f"{opening} {path}"
    for place, at, turn in zip(turns, values[2:], told[2:], strict=True):
        extreme = "höchsten" if line.estimate[place] > line.estimate[start] else "niedrigsten"
        text += f"; am {extreme} {'sind' if plural else 'ist'} sie bei {at}, {turn}"
    return text


def _by(name: str, lead: str) -> str:
    """Along what, where the sentence does not open with it."""
    return f", je nach {name}," if lead else ""


def _slope_told(answer: CurveAnswer, line: CurveLine) -> str:
    """The slope at a few points: "je year mehr (pipe age) ist die Wahrscheinlichkeit …"."""
    facts, level = answer.subject.predictor(answer.question.predictor), answer.question.level
    places = slope_places(answer, line)
    told = say_level_once(
        [difference_with_interval(estimate_at(line, place), level) for place in places], level
    )
    items = [
        f"etwa {text} bei {value_label(facts, line.at[place])}"
        for text, place in zip(told, places, strict=True)
    ]
    step = lexicon().per_additional.format(per_unit(facts.unit))
    lead = f"bei {line_words(answer, line)} liegt" if line_words(answer, line) else ""
    noun = chance(answer.subject.outcome, averaged=is_averaged(answer))
    along = f"{step} ({predictor_name(facts)})"
    opening = f"{lead} {along} {noun}" if lead else f"{along} liegt {noun}"
    return f"{opening} {listed(items)}"


def _technical(answer: CurveAnswer) -> Words:
    told = [_drawn(answer)]
    told += [_technical_line(answer, line) for line in answer.lines]
    return _words(answer, [*told, *_others(answer, EVERYTHING), _method(answer)])


def curve_title(answer: CurveAnswer) -> str:
    """What the curve is a curve of."""
    scale, averaged = answer.question.scale, is_averaged(answer)
    if scale != "slope":
        return _noun(answer, scale).removeprefix("die ")
    unit = per_unit(answer.subject.predictor(answer.question.predictor).unit)
    kind = "mittleren " if averaged else ""
    step = lexicon().per_additional.format(unit)
    return (
        f"Änderung der {kind}Wahrscheinlichkeit für {event(answer.subject.outcome)} in "
        f"Prozentpunkten {step}"
    )


def _drawn(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    text = f"{curve_title(answer)}, entlang {predictor_name(facts)}"
    first, last = answer.lines[0].at[0], answer.lines[0].at[-1]
    if facts.is_number and first != last:
        text += f" {from_to(facts, first, last)}"
    if question.by is None:
        return text
    return f"{text}, eine Linie je Wert von {predictor_name(subject.predictor(question.by))}"


def _technical_line(answer: CurveAnswer, line: CurveLine) -> str:
    question = answer.question
    facts, way = answer.subject.predictor(question.predictor), way_of(question.scale)
    items = []
    for place in sorted(spoken_places(answer, line)):
        point = estimate_at(line, place)
        se = "" if point.se is None else lexicon().standard_error.format(way.se(point.se))
        at = value_label(facts, line.at[place])
        items.append(f"bei {at} {way.told(point, question.level)}{se}")
    return f"{line_words(answer, line) or 'Schätzungen'}: {'; '.join(items)}"


def _method(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    if all(line.lower is None for line in answer.lines):
        return f"Aus {rows_words(subject)}"
    if question.scale == "slope":
        way = "Intervalle von dπ/dx nach der Delta-Methode"
    elif is_averaged(answer):
        way = (
            "Delta-Methode auf dem Logit der gemittelten Wahrscheinlichkeit (Zeilen gewichtet wie "
            "bei der Anpassung)"
        )
    else:
        way = "Wald-Intervalle auf dem linearen Prädiktor"
    if question.scale in ("probability", "odds"):
        way += ", auf die gezeigte Skala übertragen"
    return (
        f"{level_intervals(question.level)} aus {rows_words(subject)}: {way}, mit "
        f"{covariance(subject)}"
    )


@GERMAN.alternative.register
def _(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    facts, way = subject.predictor(question.predictor), way_of(question.scale)
    shape = "als Kurve" if facts.is_number else "als Punkte"
    if any(line.lower is not None for line in answer.lines):
        shape += " mit Intervallband" if facts.is_number else " mit Intervallen"
    by = ""
    if question.by is not None:
        by = f", je für {listed([line_words(answer, line) for line in answer.lines])}"
    told = []
    for line, place in extreme_points(answer):
        of = f", {line_words(answer, line)}" if line_words(answer, line) else ""
        at = value_label(facts, line.at[place])
        told.append(f"{way.bare(line.estimate[place])} bei {at}{of}")
    return joined(
        f"{curve_title(answer)}, entlang {predictor_name(facts)}, {shape}{by}",
        f"Der niedrigste Wert ist {told[0]}; der höchste ist {told[1]}",
    )
