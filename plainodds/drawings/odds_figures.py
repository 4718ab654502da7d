"""Odds ratios with their intervals as a column of figures, in line."""

from __future__ import annotations

from collections.abc import Sequence

from plainodds.answers.odds import OddsRow
from plainodds.drawings.lettering import FIGURE_SPACE, align_decimals
from plainodds.phrases.numbers import marks_now, ratio, ratio_interval
from plainodds.phrases.unbounded import has_finite_estimate, odds_ratio_figures

__all__ = ["estimate_texts"]


def estimate_texts(rows: Sequence[OddsRow]) -> list[str]:
    """Each row's figures, "2.02 (1.08 to 3.78)", the estimates' decimal points in line."""
    middles = [ratio(row.odds_ratio.estimate) for row in rows]
    written = [
        text
        for row, text in zip(rows, middles, strict=True)
        if text[:1].isdigit() and has_finite_estimate(row)
    ]
    whole = max((_before_point(text) for text in written), default=0)
    after = dict(zip(written, align_decimals(written), strict=True))
    texts = []
    for row, middle in zip(rows, middles, strict=True):
        if not has_finite_estimate(row):
            figure, interval = odds_ratio_figures(row)
            texts.append(f"{figure} ({interval})" if interval else figure)
            continue
        text = middle
        if middle in after:
            text = FIGURE_SPACE * (whole - _before_point(middle)) + after[middle]
        lower, upper = row.odds_ratio.lower, row.odds_ratio.upper
        if lower is not None and upper is not None:
            text = f"{text} ({ratio_interval(lower, upper)})"
        texts.append(text if lower is not None else text.rstrip(f"{FIGURE_SPACE}\u2008"))
    return texts


def _before_point(text: str) -> int:
    return len(text.partition(marks_now().decimal)[0])
