"""Report tables as LaTeX."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from plainodds.phrases.reports.rows import ReportRow

__all__ = ["latex_of"]

_SPECIAL = {
    "\\": r"\textbackslash{}",
    "{": r"\{",
    "}": r"\}",
    "$": r"\$",
    "&": r"\&",
    "%": r"\%",
    "#": r"\#",
    "_": r"\_",
    "~": r"\textasciitilde{}",
    "^": r"\textasciicircum{}",
    "<": r"\textless{}",
    ">": r"\textgreater{}",
    "|": r"\textbar{}",
    '"': r"{\char34}",
    "'": r"\textquotesingle{}",
    "`": r"\textasciigrave{}",
    "[": "{[}",
    "]": "{]}",
    "\u2212": r"\ensuremath{-}",
    "\u00d7": r"\ensuremath{\times}",
    "\u2264": r"\ensuremath{\le}",
    "\u2265": r"\ensuremath{\ge}",
    "\u221e": r"\ensuremath{\infty}",
    "\u03b7": r"\ensuremath{\eta}",
    "\u03c0": r"\ensuremath{\pi}",
    "\u03c7": r"\ensuremath{\chi}",
    "\u0394": r"\ensuremath{\Delta}",
    "\u03b2": r"\ensuremath{\beta}",
    "\u2026": r"\ldots{}",
    "\u201c": "``",
    "\u201e": ",,",
    "\u201d": "''",
}


def latex_of(
    title: str, columns: Sequence[str], rows: Sequence[ReportRow], notes: Sequence[str]
) -> str:
    r"""A table environment; it needs ``\usepackage{booktabs}`` and ``\usepackage{textcomp}``."""
    width = len(columns)
    lines = [
        r"\begin{table}",
        r"\centering",
        rf"\caption{{{_text(title)}}}",
        rf"\begin{{tabular}}{{l{'r' * (width - 1)}}}",
        r"\toprule",
        _line(map(_text, columns)),
        r"\midrule",
    ]
    for row in rows:
        if row.kind == "heading":
            lines.append(rf"\multicolumn{{{width}}}{{l}}{{\textbf{{{_text(row.cells[0])}}}}} \\")
        else:
            indent = r"\quad " if row.within else ""
            first, *others = map(_text, row.cells)
            lines.append(_line([indent + first, *others]))
    lines.append(r"\bottomrule")
    lines.append(r"\end{tabular}")
    lines += [rf"\par\footnotesize {_text(each)}" for each in notes]
    lines.append(r"\end{table}")
    return "\n".join(lines) + "\n"


def _line(cells: Iterable[str]) -> str:
    return " & ".join(cells) + r" \\"


def _text(text: str) -> str:
    """Text on one line, with every letter that means something to LaTeX escaped."""
    return "".join(_SPECIAL.get(each, each) for each in " ".join(text.split()))
