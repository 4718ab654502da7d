"""How familiar a profile is to the data, in words."""

from __future__ import annotations

import math

from plainodds.answers.profile import ProfileAnswer, ProfilePoint
from plainodds.phrases.labels import data_range, listed, named_value
from plainodds.phrases.numbers import guarded_count
from plainodds.phrases.parts import rows_words

__all__ = ["familiarity_cautions", "familiarity_words", "values_outside"]


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
    outside = values_outside(answer, point)
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


def values_outside(answer: ProfileAnswer, point: ProfilePoint) -> list[str]:
    """Values of a profile that lie outside the data's range, each with that range."""
    values = dict(point.values)
    outside = []
    for facts in map(answer.subject.predictor, point.familiarity.beyond):
        told = named_value(facts, values[facts.name])
        outside.append(f"{told} {data_range(facts)}" if facts.is_number else told)
    return outside
