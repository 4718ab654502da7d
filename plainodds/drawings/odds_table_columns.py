"""The columns of a printed table of odds ratios: their texts, and how many of them fit."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from plainodds.answers.odds import OddsAnswer
from plainodds.drawings.geometry import LEAST_SHARE
from plainodds.drawings.lettering import FIGURE_SPACE, text_width, wrapped
from plainodds.drawings.odds_figures import estimate_texts
from plainodds.drawings.odds_rows import GAP
from plainodds.drawings.theme import Theme
from plainodds.phrases.labels import cases_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, count_mark, level_figures, marks_now, p_mark
from plainodds.phrases.odds_lines import Counts, OddsLine
from plainodds.phrases.units import tidy

__all__ = ["DASH", "INDENT", "Columns", "Form", "columns_of", "models_of"]

DASH = "\u2013"
"""For what is withheld, and for a row that a model doesn't have."""
INDENT = 0.9
"""Of each depth of the table, in letters."""

_LEAST_PLOT = 11.0  # letters
_LEAST_LABELS, _MOST_LABELS = 8.5, 24.0  # letters
_NARROWEST = 6.0  # letters, of labels and plot where all is narrow
_WIDEST_BROKEN = 0.36
_POINT_SPACE = "\u2008"


@dataclass(frozen=True)
class Form:
    """Which columns there are.

    Attributes
    ----------
    apart : bool
        Whether each model has a column of figures; else they stand beneath each other.
    counts : bool
        Whether counts have a column; else they stand beneath the labels.
    tests : bool
        Whether p-values have a column.
    broken : bool
        Whether intervals stand beneath their estimates.
    """

    apart: bool
    counts: bool
    tests: bool
    broken: bool


@dataclass(frozen=True)
class Columns:
    """Texts and widths in points.

    Attributes
    ----------
    form : Form
    counts : tuple of str
        Parallel to the lines.
    figures, tests : tuple of tuples of str
        For each line one for each model, which are empty where there is nothing to say.
    counts_heading, tests_heading : str
    figures_heading : str
    names : tuple of str
        The models' names as headings of their columns; empty unless these are apart.
    models : tuple of str
        All models' names; empty for one without a name.
    labels_width, counts_width, tests_width : float
    figures_widths : tuple of float
        For each column of figures.
    plot_width : float
    """

    form: Form
    counts: tuple[str, ...]
    figures: tuple[tuple[str, ...], ...]
    tests: tuple[tuple[str, ...], ...]
    counts_heading: str
    figures_heading: str
    tests_heading: str
    names: tuple[str, ...]
    models: tuple[str, ...]
    labels_width: float
    counts_width: float
    figures_widths: tuple[float, ...]
    tests_width: float
    plot_width: float

    def left(self, theme: Theme) -> float:
        """Room in points on the left of the plot."""
        gap = GAP * theme.font_size
        return self.labels_width + gap + (self.counts_width + gap if self.counts_width else 0.0)

    def right(self, theme: Theme) -> float:
        """Room in points on the right of the plot."""
        gap = GAP * theme.font_size
        widths = [*self.figures_widths]
        if self.form.tests:
            widths += [self.tests_width] * len(self.figures_widths)
        return sum(each + gap for each in widths)


def models_of(answer: OddsAnswer) -> tuple[str, ...]:
    """The models' names in the order of the rows; one empty name for a model alone."""
    named = answer.question.models
    found = dict.fromkeys(row.model for row in answer.rows)
    return tuple([each for each in named if each in found] or found)


def columns_of(
    answer: OddsAnswer, lines: Sequence[OddsLine], theme: Theme, width: float
) -> Columns:
    """The richest columns that leave room enough for the plot and for the labels."""
    made = None
    for form in _forms(answer, lines):
        made = _columns(answer, lines, form, theme, width)
        if made.plot_width >= _least_plot(theme, width):
            break
    assert made is not None
    return made


def _forms(answer: OddsAnswer, lines: Sequence[OddsLine]) -> Iterator[Form]:
    """From the richest to the one for the narrowest slot."""
    counted = any(line.counts is not None for line in lines)
    tested = any(row.p_value is not None for row in answer.rows)
    ways = [(counts, tests) for counts in (True, False) for tests in (True, False)]
    ways = [way for way in ways if (counted or way[0]) and (tested or not way[1])]
    if len(models_of(answer)) > 1:
        for counts, tests in ways:
            yield Form(True, counts and counted, tests, False)
    for counts, tests in ways:
        yield Form(False, counts and counted, tests, False)
    yield Form(False, False, False, True)


def _columns(
    answer: OddsAnswer, lines: Sequence[OddsLine], form: Form, theme: Theme, width: float
) -> Columns:
    em, small, gap = theme.font_size, theme.small, GAP * theme.font_size
    models = models_of(answer)
    figures, tests = _figures(answer, lines, models, form), _tests(lines, models)
    if form.broken:
        most = _WIDEST_BROKEN * width
        figures = tuple(tuple(_broken(text, most, theme) for text in each) for each in figures)
    heading, own = _figures_heading(answer), len(models) if form.apart else 1
    widths = [
        _widest([each[place] for each in figures], theme, em)
        if form.apart
        else _widest([text for each in figures for text in each], theme, em)
        for place in range(own)
    ]
    if max(widths) < text_width(heading, theme, small):
        heading = heading.replace(" (", "\n(")
    # room for a marker before the name of a model
    names = tuple(
        wrapped(tidy(name), max(each, 7.0 * em) - 1.1 * em, theme, small, 2)
        for name, each in zip(models, widths, strict=False)
        if form.apart
    )
    least = text_width(heading, theme, small)
    widths = [max(each, least) for each in widths]
    for place, name in enumerate(names):
        widths[place] = max(widths[place], text_width(name, theme, small) + 1.1 * em)
    counts = _count_texts(answer, lines)
    counts_heading, counts_width = "", 0.0
    if any(counts):
        cases = wrapped(cases_label(answer.subject.outcome), 7.0 * em, theme, small, 1)
        known = any(line.counts and line.counts.events is not None for line in lines)
        between = "\n" if form.counts else " "
        counts_heading = message("events /{}{}", between, cases) if known else cases
    if form.counts:
        counts_width = max(_widest(counts, theme, em), text_width(counts_heading, theme, small))
    tests_width = max(
        _widest([text for each in tests for text in each], theme, em),
        text_width(message("p-value"), theme, small),
    )
    fixed = sum(widths) + gap * len(widths) + (counts_width + gap if counts_width else 0.0)
    fixed += len(widths) * (tests_width + gap) if form.tests else 0.0
    over = counts_width + gap if counts_width else 0.0
    wanted = max(
        # where a line has no counts, their column is free for its label
        (_label_width(line, theme) - (over if line.counts is None else 0.0) for line in lines),
        default=0.0,
    )
    wanted = min(max(wanted, 0.0), _MOST_LABELS * em)
    if counts and not form.counts:
        wanted = max(wanted, _widest(counts, theme, small) + INDENT * em)
    spare = width - fixed - gap - _least_plot(theme, width)
    labels = min(wanted, max(spare, _LEAST_LABELS * em))
    if form.broken:
        # nothing is left to leave out: labels and plot share what there is
        least_plot = max(_NARROWEST * em, LEAST_SHARE * width)
        labels = min(labels, max(_NARROWEST * em, width - fixed - gap - least_plot))
    return Columns(
        form, counts, figures, tests, counts_heading, heading,
        message("p-value") if form.tests else "", names, tuple(filter(None, models)), labels,
        counts_width, tuple(widths),
        tests_width if form.tests else 0.0, width - fixed - gap - labels,
    )  # fmt: skip


def _least_plot(theme: Theme, width: float) -> float:
    return max(_LEAST_PLOT * theme.font_size, LEAST_SHARE * width)


def _widest(texts: Sequence[str], theme: Theme, size: float) -> float:
    return max((text_width(text, theme, size) for text in texts), default=0.0)


def _label_width(line: OddsLine, theme: Theme) -> float:
    em = theme.font_size
    if line.kind == "test":
        return 0.0
    if line.depth:
        return line.depth * INDENT * em + text_width(line.name, theme, em)
    rest = 0.5 * em + text_width(line.rest, theme, theme.small) if line.rest else 0.0
    return text_width(line.name, theme, em, "bold") + rest


def _figures_heading(answer: OddsAnswer) -> str:
    if all(row.odds_ratio.lower is None for row in answer.rows):
        return message("odds ratio")
    return message("odds ratio ({}% interval)", level_figures(answer.question.level))


def _figures(
    answer: OddsAnswer, lines: Sequence[OddsLine], models: Sequence[str], form: Form
) -> tuple[tuple[str, ...], ...]:
    """Figures of each line and model, decimal points in line within a column."""
    rows = [row for line in lines for row in line.rows]
    written: dict[int, str] = {}
    # models beneath each other share a column and its decimal points
    for column in [[name] for name in models] if form.apart else [list(models)]:
        own = [row for row in rows if row.model in column]
        written |= dict(zip(map(id, own), estimate_texts(own), strict=True))
    told = []
    for line in lines:
        texts = []
        for name in models:
            texts.append(_figure(line, name, written, form.apart))
        told.append(tuple(texts))
    return tuple(told)


def _broken(text: str, width: float, theme: Theme) -> str:
    """The interval beneath the estimate; in two lines where it is wider than a width."""
    pieces = text.replace(" (", "\n(").split("\n")
    return "\n".join(wrapped(each, width, theme, theme.font_size, 3) for each in pieces)


def _figure(line: OddsLine, model: str, written: dict[int, str], apart: bool) -> str:
    if line.kind == "reference":
        # beneath each other, one reference stands for all models
        has = model in line.models if apart else model == line.models[0]
        return _reference(list(written.values())) if has else ""
    if line.kind != "entry":
        return ""
    found = [written[id(row)] for row in line.rows if row.model == model]
    return found[0] if found else DASH if apart else ""


def _reference(written: Sequence[str]) -> str:
    """A 1 in line with the other figures' units, and what it is."""
    point = marks_now().decimal
    heads = [text.partition(" (")[0] for text in written if point in text.partition(" (")[0]]
    heads = [head for head in heads if head.strip(f"{FIGURE_SPACE}{_POINT_SPACE}")[:1].isdigit()]
    if not heads:
        return f"1 {message('(reference)')}"
    before, _, after = heads[0].partition(point)
    padding = _POINT_SPACE + FIGURE_SPACE * len(after)
    return f"{FIGURE_SPACE * (len(before) - 1)}1{padding} {message('(reference)')}"


def _tests(lines: Sequence[OddsLine], models: Sequence[str]) -> tuple[tuple[str, ...], ...]:
    told = [
        [
            next((p_mark(row.p_value) for row in line.rows
                  if row.model == name and row.p_value is not None), "")
            for name in models
        ]
        for line in lines
    ]  # fmt: skip
    # "<0.001" has three decimals too
    point = marks_now().decimal
    after = max((len(text.partition(point)[2]) for each in told for text in each), default=0)
    return tuple(
        tuple(
            text + FIGURE_SPACE * (after - len(text.partition(point)[2])) if text else ""
            for text in each
        )
        for each in told
    )


def _count_texts(answer: OddsAnswer, lines: Sequence[OddsLine]) -> tuple[str, ...]:
    """Events of cases, so that the strokes between them stand in line set flush right."""
    smallest = answer.subject.smallest_cell
    cases = [
        "" if line.counts is None else count_mark(round(line.counts.cases), smallest)
        for line in lines
    ]
    longest = max(cases, key=len, default="")
    told = []
    for line, text in zip(lines, cases, strict=True):
        if line.counts is None:
            told.append("")
            continue
        missing = longest[: len(longest) - len(text)]
        padding = "".join(FIGURE_SPACE if each.isdigit() else _POINT_SPACE for each in missing)
        told.append(f"{_events(line.counts)}{padding}{text}")
    return tuple(told)


def _events(counts: Counts) -> str:
    if counts.events is None:
        return ""
    return f"{DASH if math.isnan(counts.events) else count(round(counts.events))} / "
