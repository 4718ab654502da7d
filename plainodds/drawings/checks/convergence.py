"""How far the fit stands from where the likelihood is highest."""

from __future__ import annotations

import math

from plainodds.answers.checks.convergence import ConvergenceEvidence
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.gauge import Gauge, draw_gauge, gauge_height
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tables import draw_paragraph, paragraph_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import quantity, ratio

__all__ = ["CONVERGENCE"]

_MARKS = (0.01, 0.2)
_GAP = 1.0


def _gauge(found: Found) -> Gauge:
    step = found.evidence(ConvergenceEvidence).remaining_step
    return Gauge(
        value=step, figure=message("without an end") if math.isinf(step) else ratio(step),
        lower=1e-4, upper=100.0, marks=_MARKS,
        zones=(message("cannot be seen"), message("can be seen"), message("changes figures")),
        ticks=tuple((tick, quantity(tick)) for tick in (0.001, 0.01, 0.2, 1.0, 10.0)),
        title=message("Largest remaining step of a coefficient, in its standard errors"),
    )  # fmt: skip


def _words(found: Found) -> str:
    return finding_words(found.finding, found.subject, found.level).what


def _has_picture(found: Found) -> bool:
    return not math.isnan(found.evidence(ConvergenceEvidence).remaining_step)


def _height(found: Found, theme: Theme, width: float) -> float:
    words = paragraph_height(_words(found), theme, width) + _GAP * theme.font_size
    return words + gauge_height(_gauge(found), theme, width)


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    words = paragraph_height(_words(found), board.theme, width) + _GAP * board.theme.font_size
    margins = draw_gauge(board, _gauge(found), width, height - words)
    top = margins.top + words
    draw_paragraph(board, _words(found), -margins.left, top, width, (0, 1))
    return Margins(margins.left, margins.right, margins.bottom, top)


CONVERGENCE = Plate(
    "convergence", _height, _height, lambda found: [], _paint, across="log",
    has_picture=_has_picture,
)  # fmt: skip
