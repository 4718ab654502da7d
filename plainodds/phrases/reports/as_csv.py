"""Report tables as CSV that a spreadsheet can be trusted with."""

from __future__ import annotations

import csv
import io
from collections.abc import Sequence

from plainodds.phrases.reports.rows import ReportRow

__all__ = ["csv_of"]

# a cell that begins with one of these is a formula to a spreadsheet
_FORMULA = ("=", "+", "-", "@", "\t", "\r", "\n", "\uff1d", "\uff0b", "\uff0d", "\uff20")


def csv_of(
    title: str,
    columns: Sequence[str],
    rows: Sequence[ReportRow],
    notes: Sequence[str],
    above: str = "Group",
) -> str:
    """A title line, headings, rows and footnotes; rows beneath a heading repeat it."""
    buffer = io.StringIO()
    writer = csv.writer(buffer, lineterminator="\r\n")
    writer.writerow([_disarmed(title)])
    first, *others = columns
    writer.writerow([_disarmed(each) for each in (above, first, *others)])
    group = ""
    for row in rows:
        if row.kind == "heading":
            group = row.cells[0]
            continue
        within = group if row.within else ""
        writer.writerow([_disarmed(each) for each in (within, *row.cells)])
    for each in notes:
        writer.writerow([_disarmed(each)])
    return buffer.getvalue()


def _disarmed(text: str) -> str:
    """Text that no spreadsheet takes for a formula: such text gets an apostrophe before it."""
    return f"'{text}" if text.lstrip(" ").startswith(_FORMULA) else text
