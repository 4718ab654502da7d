"""Report tables as Markdown."""

from __future__ import annotations

import re
from collections.abc import Sequence

from plainodds.phrases.reports.rows import ReportRow

__all__ = ["markdown_of"]

_SPECIAL = re.compile(r"([\\`*_{}\[\]<>#|~$^!&])")
_INDENT = "\u2003"


def markdown_of(
    title: str, columns: Sequence[str], rows: Sequence[ReportRow], notes: Sequence[str]
) -> str:
    """A pipe table between its title and its footnotes."""
    lines = [f"**{_text(title)}**", "", _line(columns)]
    lines.append(_line([":---", *["---:"] * (len(columns) - 1)], raw=True))
    for row in rows:
        if row.kind == "heading":
            cells = [f"**{_text(row.cells[0])}**", *[""] * (len(columns) - 1)]
        else:
            indent = _INDENT if row.within else ""
            cells = [indent + _text(row.cells[0]), *map(_text, row.cells[1:])]
        lines.append(_line(cells, raw=True))
    if notes:
        lines += ["", *(part for each in notes for part in (_text(each), ""))]
    return "\n".join(lines).rstrip() + "\n"


def _line(cells: Sequence[str], *, raw: bool = False) -> str:
    return f"| {' | '.join(cells if raw else map(_text, cells))} |"


def _text(text: str) -> str:
    """Text on one line, with every letter that means something to Markdown escaped."""
    return _SPECIAL.sub(r"\\\1", " ".join(text.split()))
