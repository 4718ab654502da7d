"""How the rows of odds ratios are grouped, worded and laid out, before anything is drawn."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.odds_figures import estimate_texts
from plainodds.drawings.theme import Theme
from plainodds.phrases.concerns import counted_rows, sparse_row
from plainodds.phrases.labels import change_label, given_clause, given_label, predictor_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures

__all__ = [
    "GAP",
    "Figures",
    "Group",
    "Layout",
    "Slot",
    "figures_of",
    "groups_of",
    "is_narrow",
    "laid_out",
    "rows_of",
]

_WIDEST_LABELS = 0.42
_WIDEST_FIGURES = 0.34
_WIDEST_FIGURES_NARROW = 0.5
_NARROW = 37.0  # letters
_INDENT = 0.9  # letters
_LABEL_LINES = 3
GAP = 1.1
"""Between labels, plot and figures, in letters."""
_LEAST_PLOT = 0.24


@dataclass(frozen=True)
class Slot:
    """One change, with one row of the answer for each series that has it.

    `mark` is a caution under the label: few cases are behind it.
    """

    label: str
    rows: tuple[Any, ...]
    mark: str = ""


@dataclass(frozen=True)
class Group:
    """The changes of one predictor; `rest` is what all of them share."""

    name: str
    rest: str
    slots: tuple[Slot, ...]


@dataclass(frozen=True)
class Figures:
    """The column of figures: its texts in the order of the rows, heading, width in points."""

    texts: tuple[str, ...]
    heading: str
    width: float


@dataclass(frozen=True)
class Layout:
    """Texts and heights in points, measured downwards from the top of the plot.

    `heads`, `slots` and `rules` run over groups, slots of all groups and gaps between
    groups; `rows` holds a height for each slot's rows, `spans` the heights between which
    the plot is free of labels; `left` is how much room the labels take beside it. `marks`
    stand under the slots' labels: each with the height of what it stands under, and how far
    beneath that.
    """

    left: float
    heads: tuple[tuple[str, str, bool, float], ...]  # name, rest, on one line?, height
    slots: tuple[tuple[str, float], ...]  # label, height
    rows: tuple[tuple[float, ...], ...]
    rules: tuple[float, ...]
    spans: tuple[tuple[float, float], ...]
    height: float
    marks: tuple[tuple[str, float, float], ...]


def groups_of(answer: OddsAnswer) -> tuple[Group, ...]:
    """Rows of one change as slots, and slots of one predictor that follow each other as groups."""
    slots: dict[tuple[object, ...], list[OddsRow]] = {}
    for row in answer.rows:
        slots.setdefault(_change(row), []).append(row)
    runs: list[list[list[OddsRow]]] = []
    for slot in slots.values():
        if runs and runs[-1][0][0].predictor == slot[0].predictor:
            runs[-1].append(slot)
        else:
            runs.append([slot])
    return tuple(_group(answer, run) for run in runs)


def rows_of(groups: Sequence[Group]) -> list[OddsRow]:
    """The rows in the order in which they are drawn."""
    return [row for group in groups for slot in group.slots for row in slot.rows]


def _change(row: OddsRow) -> tuple[object, ...]:
    return row.predictor, row.start, row.end, row.per_step, row.given


def _group(answer: OddsAnswer, run: list[list[OddsRow]]) -> Group:
    """Word a group: what its slots share stands in its heading, the rest beside each."""
    subject = answer.subject
    facts = subject.predictor(run[0][0].predictor)
    changes = [change_label(facts, slot[0]) for slot in run]
    givens = [slot[0].given for slot in run]
    shared = tuple(pair for pair in givens[0] if all(pair in given for given in givens))
    own = [tuple(pair for pair in given if pair not in shared) for given in givens]
    one_change = len(run) > 1 and len(set(changes)) == 1
    rest = [changes[0]] if one_change else []
    if shared:
        rest.append(given_clause(subject, shared))
    labels = []
    for change, given in zip(changes, own, strict=True):
        parts = [] if one_change else [change]
        if given:
            parts.append(given_label(subject, given))
        labels.append(", ".join(parts))
    slots = tuple(
        Slot(label, tuple(slot), _mark(answer, slot))
        for label, slot in zip(labels, run, strict=True)
    )
    return Group(predictor_label(facts), ", ".join(rest), slots)


def _mark(answer: OddsAnswer, slot: list[OddsRow]) -> str:
    counted = counted_rows(answer)
    return next((sparse_row(answer.subject, row) for row in slot if row in counted), "")


def laid_out(groups: Sequence[Group], figures: Figures, theme: Theme, width: float) -> Layout:
    """Lay the rows out for a slot of a width in points.

    Labels stand beside the plot; in a narrow slot above their rows, so that plot and
    figures have the width for themselves.
    """
    if is_narrow(theme, width):
        return _stacked(groups, figures, theme, width)
    return _side_by_side(groups, figures, theme, width)


def is_narrow(theme: Theme, width: float) -> bool:
    """Whether a slot is too narrow for labels, plot and figures beside each other."""
    return width < _NARROW * theme.font_size


def _side_by_side(groups: Sequence[Group], figures: Figures, theme: Theme, width: float) -> Layout:
    em, indent, line = theme.font_size, _INDENT * theme.font_size, line_height(theme.font_size)
    most = min(_WIDEST_LABELS * width, width * (1.0 - _LEAST_PLOT) - figures.width - 2.2 * em)
    most = max(most, 6.0 * em)
    alone = [_on_one_line(group, theme) <= most for group in groups]
    wanted = [_on_one_line(group, theme) for group in groups]
    wanted += [
        indent + text_width(slot.label, theme, em)
        for group, inline in zip(groups, alone, strict=True)
        for slot in group.slots
        if not (inline and _is_single(group))
    ]
    wanted += [
        indent + text_width(slot.mark, theme, theme.small)
        for group in groups
        for slot in group.slots
        if slot.mark
    ]
    room = min(max(wanted, default=0.0), most)
    y = 0.35 * em
    heads, slots, rows, rules, marks = [], [], [], [], []
    texts = iter(figures.texts)
    for place, group in enumerate(groups):
        if place:
            rules.append(y + 0.3 * em)
            y += 0.6 * em
        inline = alone[place] and _is_single(group)
        head = _head(group, _rest(group) if alone[place] else group.rest, alone[place], theme, room)
        top = y
        y += 0.0 if inline else _head_height(head, theme)
        for slot in group.slots:
            label = "" if inline else wrapped(slot.label, room - indent, theme, em, _LABEL_LINES)
            needs = [line * (next(texts).count("\n") + 1) for _ in slot.rows]
            mark, under = _under(slot, room - indent, theme)
            lines = line_height(em, label.count("\n") + 1)
            height = max(lines + under, sum(needs))
            middle = y + (height - under) / 2
            slots.append((label, middle))
            marks.append((mark, middle, lines / 2))
            rows.append(_middles(y + (height - sum(needs)) / 2, needs))
            top = middle - line / 2 if inline else top
            y += height + 0.12 * em
        heads.append((*head, top))
    height = y + 0.35 * em
    return Layout(
        room + GAP * em, tuple(heads), tuple(slots), tuple(rows), tuple(rules),
        ((0.0, height),), height, tuple(marks),
    )  # fmt: skip


def _stacked(groups: Sequence[Group], figures: Figures, theme: Theme, width: float) -> Layout:
    em, indent = theme.font_size, _INDENT * theme.font_size
    y = 0.0
    heads, slots, rows, rules, spans, marks = [], [], [], [], [], []
    texts = iter(figures.texts)
    for place, group in enumerate(groups):
        if place:
            rules.append(y + 0.25 * em)
            y += 0.5 * em
        fits = _on_one_line(group, theme) <= width
        head = _head(group, _rest(group), fits, theme, width)
        heads.append((*head, y))
        y += _head_height(head, theme)
        for slot in group.slots:
            label = (
                ""
                if _is_single(group)
                else wrapped(slot.label, width - indent, theme, em, _LABEL_LINES)
            )
            lines = line_height(em, label.count("\n") + 1) if label else 0.0
            mark, under = _under(slot, width - indent, theme)
            slots.append((label, y + lines / 2))
            marks.append((mark, y + lines / 2, lines / 2))
            y += lines + under
            needs = [1.1 * line_height(em, next(texts).count("\n") + 1) for _ in slot.rows]
            rows.append(_middles(y, needs))
            spans.append((y, y + sum(needs)))
            y += sum(needs) + 0.15 * em
    return Layout(
        0.5 * em, tuple(heads), tuple(slots), tuple(rows), tuple(rules), tuple(spans), y,
        tuple(marks),
    )  # fmt: skip


def _under(slot: Slot, room: float, theme: Theme) -> tuple[str, float]:
    """A slot's mark in lines, and the height that it needs."""
    if not slot.mark:
        return "", 0.0
    mark = wrapped(slot.mark, room, theme, theme.small, 2)
    return mark, line_height(theme.small, mark.count("\n") + 1)


def _middles(top: float, heights: Sequence[float]) -> tuple[float, ...]:
    middles = []
    for height in heights:
        middles.append(top + height / 2)
        top += height
    return tuple(middles)


def _head(
    group: Group, rest: str, on_one_line: bool, theme: Theme, room: float
) -> tuple[str, str, bool]:
    name = wrapped(group.name, room, theme, theme.font_size, 2, "bold")
    if not on_one_line and rest:
        rest = wrapped(rest, room, theme, theme.small, 2)
    return name, rest, on_one_line


def _head_height(head: tuple[str, str, bool], theme: Theme) -> float:
    name, rest, on_one_line = head
    height = line_height(theme.font_size, name.count("\n") + 1)
    if rest and not on_one_line:
        height += line_height(theme.small, rest.count("\n") + 1)
    return height


def _is_single(group: Group) -> bool:
    return len(group.slots) == 1 and not group.rest


def _rest(group: Group) -> str:
    return group.slots[0].label if _is_single(group) else group.rest


def _on_one_line(group: Group, theme: Theme) -> float:
    rest = _rest(group)
    name = text_width(group.name, theme, theme.font_size, "bold")
    return name + (0.5 * theme.font_size + text_width(rest, theme, theme.small) if rest else 0.0)


def figures_of(answer: OddsAnswer, theme: Theme, width: float) -> Figures:
    """The column of figures with its heading, broken where it would crowd out the plot."""
    texts = estimate_texts(rows_of(groups_of(answer)))
    whole = max((text_width(text, theme, theme.font_size) for text in texts), default=0.0)
    most = width * (_WIDEST_FIGURES_NARROW if is_narrow(theme, width) else _WIDEST_FIGURES)
    if whole > most:
        texts = [text.replace(" (", "\n(") for text in texts]
    heading = message("odds ratio")
    if any(row.odds_ratio.lower is not None for row in answer.rows):
        heading = message("odds ratio ({}% interval)", level_figures(answer.question.level))
        if whole > most:
            heading = heading.replace(" (", "\n(")
    widest = max((text_width(text, theme, theme.font_size) for text in texts), default=0.0)
    if text_width(heading, theme, theme.small) > widest:
        heading = heading.replace(" (", "\n(")
    widest = max(widest, text_width(heading, theme, theme.small))
    return Figures(tuple(texts), heading, widest)
