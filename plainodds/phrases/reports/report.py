"""The formatted table of an answer, before it is written in any language of documents."""

from __future__ import annotations

from dataclasses import dataclass, field
from functools import singledispatch
from typing import Literal

from plainodds.answers.disclosure import SMALLEST_CELL, guarded
from plainodds.answers.questions import Answer
from plainodds.phrases.languages import spoken_now
from plainodds.phrases.lexicon import message
from plainodds.phrases.reports.as_csv import csv_of
from plainodds.phrases.reports.as_html import html_of
from plainodds.phrases.reports.as_latex import latex_of
from plainodds.phrases.reports.as_markdown import markdown_of
from plainodds.phrases.reports.rows import ReportRow

__all__ = ["ReportTable", "report_of", "report_table"]


@dataclass(frozen=True)
class ReportTable:
    """A table as a report prints it.

    Attributes
    ----------
    title : str
    columns : tuple of str
        Headings; the first column names the rows, the others hold figures.
    rows : tuple of ReportRow
    notes : tuple of str
        Footnotes, in whole sentences.
    above : str
        What CSV calls the column that repeats the headings above rows.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> result = sm.Logit(y, sm.add_constant(x)).fit(disp=False)
    >>> made = po.report_table(po.FittedLogit(result).odds())
    >>> made.csv().splitlines()[0] == made.title
    True
    """

    title: str
    columns: tuple[str, ...]
    rows: tuple[ReportRow, ...]
    notes: tuple[str, ...]
    # said when the table is made, since it may be written where another language is spoken
    above: str = field(default_factory=lambda: message("Group"))

    def html(self) -> str:
        """As HTML that pastes into a word processor: its looks are in the elements."""
        return html_of(self.title, self.columns, self.rows, self.notes)

    def markdown(self) -> str:
        """As a pipe table of Markdown."""
        return markdown_of(self.title, self.columns, self.rows, self.notes)

    def latex(self) -> str:
        """As a LaTeX table that needs the package booktabs."""
        return latex_of(self.title, self.columns, self.rows, self.notes)

    def csv(self) -> str:
        """As CSV (RFC 4180); text that a spreadsheet would take for a formula is disarmed."""
        return csv_of(self.title, self.columns, self.rows, self.notes, self.above)

    def written(self, form: Literal["html", "markdown", "latex", "csv"]) -> str:
        """In one of the four, by name.

        Raises
        ------
        ValueError
            If it is none of them.
        """
        if form not in ("html", "markdown", "latex", "csv"):
            raise ValueError(f"{form!r}: choose 'html', 'markdown', 'latex' or 'csv'.")
        return str(getattr(self, form)())

    def _repr_html_(self) -> str:
        return self.html()

    def __str__(self) -> str:
        return self.markdown()


@singledispatch
def report_of(answer: Answer) -> ReportTable:
    """Format one kind of answer; each kind registers its own."""
    raise TypeError(f"There is no report table of {type(answer).__name__}.")


@spoken_now()
def report_table(answer: Answer, smallest_cell: int = SMALLEST_CELL) -> ReportTable:
    """Format an answer's figures for a report: estimate (interval), references, footnotes.

    `plainodds.table` gives the same figures unrounded, one row per estimate.

    Parameters
    ----------
    answer : Answer
    smallest_cell : int
        Counts of fewer rows are withheld.

    Returns
    -------
    ReportTable
        Write it by its methods `html`, `markdown`, `latex` and `csv`.

    Raises
    ------
    TypeError
        If there is no such table of this kind of answer.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> result = sm.Logit(y, sm.add_constant(x)).fit(disp=False)
    >>> report_table(po.FittedLogit(result).odds()).columns
    ('Predictor', 'Odds ratio (95% interval)', 'p-value')
    """
    return report_of(guarded(answer, smallest_cell) if isinstance(answer, Answer) else answer)
