"""Report tables as HTML that pastes into a word processor."""

from __future__ import annotations

from collections.abc import Sequence

from plainodds.elements import Markup, element, joined
from plainodds.phrases.reports.rows import ReportRow

__all__ = ["html_of"]

# what is pasted keeps the styles of its elements and loses every style sheet
_CELL = "padding:2pt 8pt 2pt 0;vertical-align:top;text-align:left;font-weight:normal"
_NUMBER = "padding:2pt 0 2pt 8pt;vertical-align:top;text-align:right;white-space:nowrap"
_RULE = "border-bottom:0.75pt solid #5c6a75"
_TABLE = (
    "border-collapse:collapse;font-family:sans-serif;font-size:10pt;"
    "border-top:1.5pt solid #14232e;border-bottom:1.5pt solid #14232e"
)


def html_of(
    title: str, columns: Sequence[str], rows: Sequence[ReportRow], notes: Sequence[str]
) -> str:
    """A table with its caption above and its footnotes in rows of their own beneath."""
    first, *others = columns
    heads = [element("th", first, scope="col", style=f"{_CELL};{_RULE};font-weight:bold")]
    heads += [
        element("th", each, scope="col", style=f"{_NUMBER};{_RULE};font-weight:bold")
        for each in others
    ]
    body = [_row(row, len(columns)) for row in rows]
    foot = [
        element("tr", element("td", each, colspan=len(columns), style=f"{_CELL};font-size:9pt"))
        for each in notes
    ]
    return element(
        "table",
        element("caption", title, style="text-align:left;font-weight:bold;padding:4pt 0"),
        element("thead", element("tr", *heads)),
        element("tbody", *body),
        element("tfoot", *foot) if foot else Markup(),
        style=_TABLE,
    )


def _row(row: ReportRow, width: int) -> Markup:
    if row.kind == "heading":
        style = f"{_CELL};padding-top:5pt;font-weight:bold"
        return element(
            "tr", element("th", row.cells[0], scope="rowgroup", colspan=width, style=style)
        )
    first, *others = row.cells
    indent = ";padding-left:12pt" if row.within else ""
    cells = [element("th", first, scope="row", style=f"{_CELL}{indent}")]
    cells += [element("td", each, style=_NUMBER) for each in others]
    return element("tr", joined(cells))
