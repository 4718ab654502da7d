"""One row of a report table."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

__all__ = ["ReportRow", "entry", "heading", "reference"]


@dataclass(frozen=True)
class ReportRow:
    """One row.

    Attributes
    ----------
    cells : tuple of str
        A heading has one cell, which names the rows beneath it; else one for each column.
    kind : {"heading", "entry", "reference"}
        A reference row is what the rows beside it are compared with.
    within : bool
        Whether it stands beneath a heading.
    """

    cells: tuple[str, ...]
    kind: Literal["heading", "entry", "reference"] = "entry"
    within: bool = False


def heading(text: str) -> ReportRow:
    """The name of the rows beneath it."""
    return ReportRow((text,), "heading")


def entry(*cells: str, within: bool = False) -> ReportRow:
    """A row of figures."""
    return ReportRow(cells, "entry", within)


def reference(*cells: str) -> ReportRow:
    """A row that the others are compared with."""
    return ReportRow(cells, "reference", within=True)
