"""How familiar a profile is to the data, in words."""

from __future__ import annotations

import math

from plainodds.answers.profile import ProfileAnswer, ProfilePoint
from plainodds.phrases.labels import listed, predictor_name, value_label
from plainodds.phrases.numbers import guarded_count, quantity
from plainodds.phrases.parts import rows_words
from plainodds.phrases.units import with_unit

__all__ = ["familiarity_cautions", "familiarity_words"]


def familiarity_words(answer: ProfileAnswer) -> list[str]:
    """How many rows are like a familiar profile."""
    found = answer.point.familiarity
    if found.verdict != "familiar" or found.rows_alike == 0:
        return []
    alike = guarded_count(found.rows_alike, answer.subject.smallest_cell)
    are = "is 1 row" if alike == "1" else f"are {alike} rows"
    return [f"There {are} much like this profile among the {rows_words(answer.subject)}"]


def familiarity_cautions(answer: ProfileAnswer) -> list[str]:
    """Why a profile, or the one compared with, leaves the data or lies at their edge."""
    told = _cautions(answer, answer.point, "this profile")
    if answer.comparison is not None:
        told += _cautions(answer, answer.start, "the profile compared with")
    return told


def _cautions(answer: ProfileAnswer, point: ProfilePoint, which: str) -> list[str]:
    found, subject = point.familiarity, answer.subject
    if found.verdict == "familiar":
        return []
    if math.isnan(found.largest_leverage):
        return ["The model carries no rows any more, so nobody can tell how familiar it is"]
    values = dict(point.values)
    outside = []
    for facts in map(subject.predictor, found.beyond):
        told = f"{predictor_name(facts)} {value_label(facts, values[facts.name])}"
        if facts.is_number:
            low, high = quantity(facts.minimum), with_unit(facts.maximum, facts.unit)
            told += f" (the data have {low} to {high})"
        outside.append(told)
    if outside:
        return [
            f"{which} lies beyond the data: {listed(outside)}; there the model speaks on its own"
        ]
    if found.verdict == "beyond":
        return [
            f"{which} lies beyond the data: each value has been seen, but no row combines values "
            "as unusually; there the model speaks on its own"
        ]
    if found.rows_alike == 0:
        return [
            f"None of the {rows_words(subject)} is much like {which}, so take its chance with care"
        ]
    told = guarded_count(found.rows_alike, subject.smallest_cell)
    alike = "1 row is" if told == "1" else f"{told} rows are"
    return [
        f"Only {alike} much like {which}, and its values are combined more unusually than in 99% "
        "of rows"
    ]
