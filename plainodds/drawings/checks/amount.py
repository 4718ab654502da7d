"""How many cases had the event, and how many of the rarer kind there are for each coefficient."""

from __future__ import annotations

from plainodds.answers.checks.amount import AmountEvidence
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.gauge import Gauge, draw_gauge, gauge_height, gauge_margins
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import by_event
from plainodds.phrases.checks.parts import cases, cases_called, coefficients
from plainodds.phrases.labels import sentence_case
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, quantity, ratio

__all__ = ["AMOUNT"]

_BAR = 1.3
_MARKS = (5.0, 10.0)
_TICKS = (0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 10_000, 100_000, 1_000_000)


def _tick(number: float) -> str:
    return count(number) if isinstance(number, int) else quantity(number)


def _gauge(found: Found, narrow: bool) -> Gauge:
    evidence = found.evidence(AmountEvidence)
    each = evidence.events_per_parameter
    lower, upper = min(1.0, max(each / 2, 0.1)), max(100.0, 3 * each)
    kept = [tick for tick in _TICKS if lower <= tick <= upper]
    if narrow or len(kept) > 9:
        kept = [tick for tick in kept if tick >= 5 or tick == lower]
        kept = [tick for tick in kept if str(tick)[0] == "1" or tick == 5]
    side = by_event(found.subject)[evidence.events > evidence.others]
    title = message(
        "{cases} {side} for each of {coefficients}", cases=cases_called(found.subject), side=side,
        coefficients=coefficients(evidence.parameters),
    )  # fmt: skip
    return Gauge(
        value=each, figure=ratio(each), lower=lower, upper=upper, marks=_MARKS,
        zones=(message("too few"), message("few"), message("no longer few")),
        ticks=tuple((float(tick), _tick(tick)) for tick in kept),
        title=sentence_case(title),
    )  # fmt: skip


def _narrow(theme: Theme, width: float) -> bool:
    return width < 40 * theme.font_size


def _sides(found: Found) -> list[tuple[str, float]]:
    evidence = found.evidence(AmountEvidence)
    numbers = evidence.events, evidence.others
    return [
        (f"{cases(found.subject, number)} {side}", number)
        for number, side in zip(numbers, by_event(found.subject), strict=True)
    ]


def _bar_height(found: Found, theme: Theme, width: float) -> float:
    em = theme.font_size
    lines = 1 if _fits(found, theme, width) else 2
    return _BAR * em + line_height(em, lines) + 1.7 * em


def _fits(found: Found, theme: Theme, width: float) -> bool:
    """Whether what both parts are called stands on one line."""
    texts = [text_width(words, theme, theme.font_size) + 1.2 * theme.font_size
             for words, _ in _sides(found)]  # fmt: skip
    return sum(texts) + 1.5 * theme.font_size < width


def _height(found: Found, theme: Theme, width: float) -> float:
    gauge = _gauge(found, _narrow(theme, width))
    return _bar_height(found, theme, width) + gauge_height(gauge, theme, width)


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme = board.theme
    bar = _bar_height(found, theme, width)
    margins = draw_gauge(board, _gauge(found, _narrow(theme, width)), width, height - bar)
    _draw_bar(board, found, width, margins.top + bar)
    return Margins(margins.left, margins.right, margins.bottom, margins.top + bar)


def _draw_bar(board: Board, found: Found, width: float, top: float) -> None:
    """Two parts of a bar, in proportion to cases, with their names beneath."""
    theme, em = board.theme, board.theme.font_size
    points, left = board.at(0, 1), -gauge_margins(theme)
    sides = _sides(found)
    total = sum(number for _, number in sides) or 1.0
    edge = left + width * sides[0][1] / total
    low, high = top - _BAR * em, top
    gap = 0.12 * em
    parts = (
        (left, max(edge - gap, left + gap)),
        (min(edge + gap, left + width - gap), left + width),
    )
    for place, (first, last) in enumerate(parts):
        board.area(
            ("events", "others")[place], [[(first, low), (last, low), (last, high), (first, high)]],
            transform=points, facecolor=theme.series(place).colour, zorder=2,
        )  # fmt: skip
    one_line = _fits(found, theme, width)
    for place, (words, _) in enumerate(sides):
        y = low - 0.25 * em - (0.0 if one_line else place * line_height(em)) - line_height(em) / 2
        told = wrapped(words, width - 1.2 * em, theme, em, 1)
        at_right = one_line and place == 1
        x = left + width - text_width(told, theme, em) - 1.2 * em if at_right else left
        board.marks(f"side {place}", [(x + 0.4 * em, y)], place, transform=points)
        board.write(told, x + 1.2 * em, y, points, size=em)


def _notes(found: Found) -> list[str]:
    return [
        message(
            "The marks at 5 and 10 are what simulations have found; what they weigh is a custom."
        )
    ]


AMOUNT = Plate("amount", _height, _height, _notes, _paint, across="log")
