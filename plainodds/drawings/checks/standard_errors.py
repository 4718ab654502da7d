"""Standard errors too wide to mean something, or the widest of those that do."""

from __future__ import annotations

import math

from plainodds.answers.checks.standard_errors import StandardErrorsEvidence
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.gauge import Gauge, draw_gauge, gauge_height
from plainodds.drawings.checks.lanes import Lane, draw_lanes, lanes_height
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, quantity, ratio
from plainodds.phrases.units import tidy

__all__ = ["STANDARD_ERRORS"]

_MARKS = (4.0, 10.0)
_MOST = 12
_TIMES = 3_000


def _note() -> str:
    return message(
        "At 4, an interval goes from a {times}th to {times} times the odds for one standard "
        "deviation more; at 10 there are no words for it. Both marks are custom.",
        times=count(_TIMES),
    )


def _gauge(found: Found) -> Gauge:
    largest = found.evidence(StandardErrorsEvidence).largest_per_spread
    return Gauge(
        value=largest, figure=message("the widest: {}", ratio(largest)), lower=0.1, upper=60.0,
        marks=_MARKS, zones=(message("as usual"), message("wide"), message("absurd")),
        ticks=tuple((tick, quantity(tick)) for tick in (0.1, 1.0, 4.0, 10.0)),
        title=picture_axes(found.finding, found.subject)[0],
    )  # fmt: skip


def _lanes(found: Found) -> list[Lane]:
    return [
        Lane("", tidy(each.column), ratio(each.se_per_spread), ((each.se_per_spread, 0),))
        for each in found.evidence(StandardErrorsEvidence).wide[:_MOST]
    ]


def _ends(found: Found) -> tuple[float, float]:
    finite = [each.se_per_spread for each in found.evidence(StandardErrorsEvidence).wide
              if math.isfinite(each.se_per_spread)]  # fmt: skip
    return 1.0, min(max([40.0, *(2 * each for each in finite)]), 100.0)


def _has_picture(found: Found) -> bool:
    evidence = found.evidence(StandardErrorsEvidence)
    missing = any(math.isnan(each.se_per_spread) for each in evidence.wide)
    return not missing and evidence.largest_per_spread > 0


def _height(found: Found, theme: Theme, width: float) -> float:
    lanes, (title, _) = _lanes(found), picture_axes(found.finding, found.subject)
    if lanes:
        return lanes_height(lanes, (), message("standard error"), title, theme, width)
    return gauge_height(_gauge(found), theme, width)


def _notes(found: Found) -> list[str]:
    left = len(found.evidence(StandardErrorsEvidence).wide) - _MOST
    more = [message("Not shown: {} more coefficients.", count(left))] if left > 0 else []
    return [_note(), *more]


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    lanes, (title, _) = _lanes(found), picture_axes(found.finding, found.subject)
    if not lanes:
        return draw_gauge(board, _gauge(found), width, height)
    low, high = _ends(found)
    return draw_lanes(
        board, lanes, (), message("standard error"), title, (low, high), _MARKS, low, width, height
    )


STANDARD_ERRORS = Plate(
    "standard errors", _height, _height, _notes, _paint, across="log", has_picture=_has_picture,
    variant=lambda found: "lanes" if _lanes(found) else "gauge",
)  # fmt: skip
