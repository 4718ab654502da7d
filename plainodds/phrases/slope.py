"""Slopes of the chance, the marginal effects along a predictor, in words."""

from __future__ import annotations

import math

from plainodds.answers.curve import CurveAnswer, CurveLine
from plainodds.phrases.labels import listed, predictor_name, value_label
from plainodds.phrases.parts import difference_with_interval, say_level_once
from plainodds.phrases.reach import line_words, supported_places
from plainodds.phrases.units import per_unit, tidy
from plainodds.phrases.ways import estimate_at

__all__ = ["slope_line", "slope_opening", "slope_places"]

_LISTED_AT_MOST = 6


def slope_line(answer: CurveAnswer, line: CurveLine) -> str:
    """Say the slope at a few points: "per additional year of pipe age, the chance is …"."""
    facts, level = answer.subject.predictor(answer.question.predictor), answer.question.level
    places = slope_places(answer, line)
    told = say_level_once(
        [difference_with_interval(estimate_at(line, place), level) for place in places], level
    )
    items = [
        f"about {text} at {value_label(facts, line.at[place])}"
        for text, place in zip(told, places, strict=True)
    ]
    return f"{slope_opening(answer, line)} is {listed(items)}"


def slope_opening(answer: CurveAnswer, line: CurveLine) -> str:
    """What the slope is a slope of, up to the verb."""
    subject, question = answer.subject, answer.question
    facts = subject.predictor(question.predictor)
    lead = f"for {line_words(answer, line)}, " if line_words(answer, line) else ""
    kind = "average chance" if question.others == "observed" else "chance"
    of = f"the {kind} of {tidy(subject.outcome.event)}"
    return f"{lead}per additional {per_unit(facts.unit)} of {predictor_name(facts)}, {of}"


def slope_places(answer: CurveAnswer, line: CurveLine) -> list[int]:
    """The points to speak of: those nearest to the predictor's quartiles, or all of a few."""
    facts = answer.subject.predictor(answer.question.predictor)
    if len(line.at) <= _LISTED_AT_MOST:
        return list(range(len(line.at)))
    places = supported_places(line)
    if any(map(math.isnan, facts.quartiles)):
        return sorted({places[0], places[len(places) // 2], places[-1]})
    return sorted(
        {min(places, key=lambda place: abs(float(line.at[place]) - q)) for q in facts.quartiles}
    )
