"""Standard errors that take rows as strangers, beside those that count groups together."""

from __future__ import annotations

import math

from plainodds.answers.checks.dependence import DependenceEvidence, StandardErrorPair
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.lanes import Lane, draw_lanes, lanes_height
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes, picture_legend
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, ratio
from plainodds.phrases.units import tidy

__all__ = ["DEPENDENCE"]

_MOST = 12


def _usable(found: Found) -> list[StandardErrorPair]:
    return [
        pair
        for pair in found.evidence(DependenceEvidence).standard_errors
        if pair.model_based > 0 and pair.by_groups > 0
        and math.isfinite(pair.model_based) and math.isfinite(pair.by_groups)
    ]  # fmt: skip


def _shown(found: Found) -> list[StandardErrorPair]:
    """All of a few coefficients, of many those whose standard errors differ most."""
    pairs = _usable(found)
    far = sorted(pairs, key=lambda pair: -abs(math.log(pair.by_groups / pair.model_based)))
    kept = {id(pair) for pair in far[:_MOST]}
    return [pair for pair in pairs if id(pair) in kept]


def _lanes(found: Found) -> list[Lane]:
    return [
        Lane("", tidy(pair.column), f"× {ratio(pair.by_groups / pair.model_based)}",
             ((pair.by_groups, 0), (pair.model_based, 1)))
        for pair in _shown(found)
    ]  # fmt: skip


def _has_picture(found: Found) -> bool:
    return bool(_usable(found))


def _frame(found: Found) -> tuple[tuple[str, str], str, str]:
    legend, (title, _) = (
        picture_legend(found.finding, found.subject), picture_axes(found.finding, found.subject)
    )  # fmt: skip
    return legend, message("times as large by groups"), title


def _height(found: Found, theme: Theme, width: float) -> float:
    return lanes_height(_lanes(found), *_frame(found), theme, width)


def _notes(found: Found) -> list[str]:
    evidence, notes = found.evidence(DependenceEvidence), []
    if evidence.groups:
        by = tidy(evidence.name)
        rows, groups, largest = map(count, (evidence.rows, evidence.groups, evidence.largest))
        if by and by != "groups":
            note = message(
                "{} rows in {} groups by {}, at most {} to a group.", rows, groups, by, largest
            )
        else:
            note = message("{} rows in {} groups, at most {} to a group.", rows, groups, largest)
        notes.append(note)
    if evidence.already:
        notes.append(message("The fit's own intervals count groups together already."))
    left = len(_usable(found)) - _MOST
    if left > 0:
        notes.append(message("Not shown: {} more coefficients, which differ less.", count(left)))
    return notes


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    both = [each for pair in _shown(found) for each in (pair.model_based, pair.by_groups)]
    middle, reach = math.sqrt(min(both) * max(both)), math.sqrt(max(both) / min(both))
    reach = max(1.15 * reach, 1.6)
    return draw_lanes(
        board, _lanes(found), *_frame(found), (middle / reach, middle * reach), (),
        middle / reach, width, height,
    )  # fmt: skip


DEPENDENCE = Plate(
    "dependence", _height, _height, _notes, _paint, across="log", has_picture=_has_picture
)
