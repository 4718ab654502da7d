"""How effects are set into panels, grouped and worded, before anything is drawn.

Effects in percentage points, of levels and of steps, stand in one panel. A slope is in
percentage points per unit of its own predictor, and has a panel of its own.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.answers.effects import EffectRow, EffectsAnswer
from plainodds.drawings.lettering import FIGURE_SPACE, align_decimals, text_width
from plainodds.drawings.odds_rows import Figures, Group, Slot, is_narrow
from plainodds.drawings.theme import Theme
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.labels import effect_label, predictor_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures, marks_now, signed, wording

__all__ = ["Panel", "effect_texts", "figures_of", "panels_of"]

_WIDEST_FIGURES, _WIDEST_FIGURES_NARROW = 0.36, 0.55  # of the slot's width
_MOST_DECIMALS = 8


@dataclass(frozen=True)
class Panel:
    """Effects in one unit, on one axis; `is_slope` where that is per unit of a predictor."""

    groups: tuple[Group, ...]
    is_slope: bool

    @property
    def rows(self) -> list[EffectRow]:
        """The rows in the order in which they are drawn."""
        return [row for group in self.groups for slot in group.slots for row in slot.rows]


def panels_of(answer: EffectsAnswer) -> tuple[Panel, ...]:
    """Levels and steps together, then each slope for itself, in the answer's order."""
    by_predictor: dict[str, list[EffectRow]] = {}
    for row in answer.rows:
        by_predictor.setdefault(row.predictor, []).append(row)
    together: list[Group] = []
    alone: list[Group] = []
    for name, rows in by_predictor.items():
        group = _group(answer.subject.predictor(name), rows)
        (alone if _is_slope(rows[0]) else together).append(group)
    panels = [Panel(tuple(together), False)] if together else []
    return (*panels, *(Panel((group,), True) for group in alone))


def _is_slope(row: EffectRow) -> bool:
    return row.start is None and row.step is None


def _group(facts: PredictorFacts, rows: Sequence[EffectRow]) -> Group:
    """One slot for each change, and in it a row for each value of `by`."""
    slots: dict[str, list[EffectRow]] = {}
    keys: dict[tuple[object, ...], str] = {}
    for row in rows:
        label = keys.setdefault((row.start, row.end, row.step), effect_label(facts, row))
        slots.setdefault(label, []).append(row)
    return Group(
        predictor_label(facts), "", tuple(Slot(label, tuple(own)) for label, own in slots.items())
    )


def figures_of(
    answer: EffectsAnswer, panels: Sequence[Panel], theme: Theme, width: float
) -> list[Figures]:
    """Each panel's column of figures, all of one width and under one heading."""
    em, small = theme.font_size, theme.small
    columns = [effect_texts(panel.rows) for panel in panels]
    whole = max((text_width(text, theme, em) for texts in columns for text in texts), default=0.0)
    share = _WIDEST_FIGURES_NARROW if is_narrow(theme, width) else _WIDEST_FIGURES
    if whole > share * width:
        columns = [[text.replace(" (", "\n(") for text in texts] for texts in columns]
    heading = message("change")
    if any(row.effect.lower is not None for row in answer.rows):
        heading = message("change ({}% interval)", level_figures(answer.question.level))
    widest = max((text_width(text, theme, em) for texts in columns for text in texts), default=0.0)
    if text_width(heading, theme, small) > widest:
        heading = heading.replace(" (", "\n(")
    widest = max(widest, text_width(heading, theme, small))
    return [Figures(tuple(texts), heading, widest) for texts in columns]


def effect_texts(rows: Sequence[EffectRow]) -> list[str]:
    """Each row's figures, "+3.4 (+1.2 to +5.6)", in percentage points.

    As many decimals as the middle one of the rows' intervals warrants, the same for all, so
    that decimal points stand in line; a figure that would round to 0 has more, so that it
    is seen on which side of 0 it lies.
    """
    places = _decimals(rows)
    middles = [_points(row.effect.estimate, places) for row in rows]
    whole = max((_before_point(text) for text in middles if text != wording().not_known), default=0)
    texts = []
    for row, middle, aligned in zip(rows, middles, align_decimals(middles), strict=True):
        lead = FIGURE_SPACE * (whole - _before_point(middle))
        low, high = row.effect.lower, row.effect.upper
        if low is None or high is None:
            texts.append(lead + middle)
        elif math.isnan(low) or math.isnan(high):
            texts.append(f"{lead}{aligned} {message('(interval not known)')}")
        else:
            ends = wording().to.format(_points(low, places), _points(high, places))
            texts.append(f"{lead}{aligned} ({ends})")
    return texts


def _points(effect: float, decimals: int) -> str:
    points = 100.0 * effect
    finer = decimals
    while points != 0 and float(f"{points:.{finer}f}") == 0 and finer < decimals + 3:
        finer += 1
    return signed(points, decimals=finer)


def _decimals(rows: Sequence[EffectRow]) -> int:
    """Two figures of the middle interval's half width while they are under 30, then one."""
    widths = [
        50.0 * (row.effect.upper - row.effect.lower)
        for row in rows
        if row.effect.lower is not None and row.effect.upper is not None
    ]
    sizes = [abs(100.0 * row.effect.estimate) for row in rows]
    usable = sorted(each for each in widths if math.isfinite(each) and each > 0)
    # without intervals: two figures of the middle effect
    wanted = usable or [0.1 * each for each in sorted(sizes) if math.isfinite(each) and each > 0]
    if not wanted:
        return 1
    middle = wanted[(len(wanted) - 1) // 2]
    power = math.floor(math.log10(middle))
    places = (1 if middle / 10.0**power < 3.0 else 0) - power
    least = 0 if min((each for each in sizes if each > 0), default=0.0) >= 10 else 1
    return min(_MOST_DECIMALS, max(places, least))


def _before_point(text: str) -> int:
    return len(text.partition(marks_now().decimal)[0])
