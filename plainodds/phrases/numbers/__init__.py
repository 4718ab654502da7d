"""How numbers are written: the one place for percent, ratios, ranges and units of chance.

Nothing here rounds a chance to 0% or 100%, a ratio to 0, or two ends of an interval
to the same figure where a finer one tells them apart. Negative numbers carry a true
minus sign (U+2212).
"""

from plainodds.phrases.numbers.chances import (
    cases,
    chance,
    denominator,
    denominator_of_change,
    frequencies,
    frequency,
    frequency_span,
    told_apart,
)
from plainodds.phrases.numbers.counts import cases_apart, cases_apart_in, cases_on_sides, needed
from plainodds.phrases.numbers.marks import Marks, marking, marks_now
from plainodds.phrases.numbers.quantities import (
    confidence,
    count,
    count_mark,
    guarded_count,
    level_figures,
    quantity,
    signed,
    summing,
)
from plainodds.phrases.numbers.ratios import p_mark, p_value, ratio, ratio_interval, simple_fraction
from plainodds.phrases.numbers.signs import MINUS, NOT_KNOWN
from plainodds.phrases.numbers.spans import (
    bare_points,
    bare_points_span,
    percentage_points,
    points_on_sides,
    points_span,
    span,
)
from plainodds.phrases.numbers.wording import ENGLISH_WORDING, Wording, worded, wording

__all__ = [
    "ENGLISH_WORDING",
    "MINUS",
    "NOT_KNOWN",
    "Marks",
    "Wording",
    "bare_points",
    "bare_points_span",
    "cases",
    "cases_apart",
    "cases_apart_in",
    "cases_on_sides",
    "chance",
    "confidence",
    "count",
    "count_mark",
    "denominator",
    "denominator_of_change",
    "frequencies",
    "frequency",
    "frequency_span",
    "guarded_count",
    "level_figures",
    "marking",
    "marks_now",
    "needed",
    "p_mark",
    "p_value",
    "percentage_points",
    "points_on_sides",
    "points_span",
    "quantity",
    "ratio",
    "ratio_interval",
    "signed",
    "simple_fraction",
    "span",
    "summing",
    "told_apart",
    "worded",
    "wording",
]
