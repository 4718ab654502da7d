"""How numbers are written: the one place for percent, ratios, ranges and units of chance.

Nothing here rounds a chance to 0% or 100%, a ratio to 0, or two ends of an interval
to the same figure where a finer one tells them apart. Negative numbers carry a true
minus sign (U+2212).
"""

from plainodds.phrases.numbers.chances import (
    chance,
    denominator,
    denominator_of_change,
    frequencies,
    frequency,
    frequency_span,
    told_apart,
)
from plainodds.phrases.numbers.counts import cases_apart, cases_on_sides, needed
from plainodds.phrases.numbers.quantities import (
    confidence,
    count,
    count_mark,
    guarded_count,
    quantity,
    signed,
    summing,
)
from plainodds.phrases.numbers.ratios import p_value, ratio, ratio_interval, simple_fraction
from plainodds.phrases.numbers.signs import MINUS, NOT_KNOWN
from plainodds.phrases.numbers.spans import percentage_points, points_on_sides, points_span, span

__all__ = [
    "MINUS",
    "NOT_KNOWN",
    "cases_apart",
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
    "needed",
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
]
