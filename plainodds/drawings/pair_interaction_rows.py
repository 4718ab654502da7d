"""How the interaction is told on both scales, before anything is drawn."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.answers.effects import EffectRow
from plainodds.answers.estimate import Estimate
from plainodds.answers.pair import PairAnswer
from plainodds.drawings.effects_axis import Limits, limits_of
from plainodds.drawings.effects_rows import effect_texts
from plainodds.drawings.lettering import line_height, text_width
from plainodds.drawings.odds_rows import Figures, Group, Layout, Slot, is_narrow, laid_out
from plainodds.drawings.theme import Theme
from plainodds.phrases.labels import cases_label, in_sentence
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import count, level_figures, ratio, ratio_interval, wording
from plainodds.phrases.pair_labels import has_others, interaction_label

__all__ = ["ScaleRows", "interaction_leaves", "scale_rows", "ticks_height"]

_LEAST_LOG, _MOST_LOG = math.log(1.25), math.log(100.0)
_WIDEST_FIGURES, _WIDEST_FIGURES_NARROW = 0.34, 0.55


@dataclass(frozen=True)
class ScaleRows:
    """The rows of one scale, set under those of the scale before; heights in points.

    `triples` are (estimate, lower, upper) along the axis, of log ratios on the odds scale.
    """

    scale: str
    group: Group
    figures: Figures
    layout: Layout
    limits: Limits
    triples: tuple[tuple[float, float, float], ...]
    top: float

    @property
    def bottom(self) -> float:
        """Where its rows end and its tick labels begin."""
        return self.top + self.layout.height

    @property
    def heights(self) -> list[float]:
        """Heights of its rows."""
        return [self.top + y for slot in self.layout.rows for y in slot]


def scale_rows(answer: PairAnswer, theme: Theme, width: float) -> tuple[ScaleRows, ScaleRows]:
    """The rows of both scales: probability, then odds."""
    told = _probability_rows(answer)
    odds = EffectRow("", None, None, None, None, answer.interaction.log_ratio, None)
    texts = _texts([row for _, row in told])
    columns = [texts, [_ratio_text(answer)]]
    share = _WIDEST_FIGURES_NARROW if is_narrow(theme, width) else _WIDEST_FIGURES
    em = theme.font_size
    widest = max(text_width(text, theme, em) for column in columns for text in column)
    if widest > share * width:
        columns = [[text.replace(" (", "\n(") for text in column] for column in columns]
        widest = max(text_width(text, theme, em) for column in columns for text in column)
    heading = _heading(answer)
    if text_width(heading, theme, theme.small) > widest:
        heading = heading.replace(" (", "\n(")
    widest = max(widest, text_width(heading, theme, theme.small))
    what = in_sentence(interaction_label(answer, "probability"))
    if told and is_narrow(theme, width):
        # beside the axis there is no room for its unit
        what = message("{}, in {}", what, lexicon().points)
    groups = (
        Group(message("On the probability scale"), what, tuple(
            Slot(label, (row,)) for label, row in told
        ) or (Slot(message("the sample tells no chances"), (None,)),)),
        Group(message("On the odds scale"), "", (
            Slot(in_sentence(interaction_label(answer, "odds")), (odds,)),
        )),
    )  # fmt: skip
    limits = _limits(answer)
    rows = ([_triple(row.effect) for _, row in told], [_triple(odds.effect)])
    placed, top = [], 0.0
    layouts = [
        laid_out((group,), Figures(tuple(texts), heading, widest), theme, width)
        for group, texts in zip(groups, columns, strict=True)
    ]
    for place, scale in enumerate(("probability", "odds")):
        figures = Figures(tuple(columns[place]), heading, widest)
        placed.append(
            ScaleRows(scale, groups[place], figures, layouts[place], limits[place],
                      tuple(rows[place]), top)
        )  # fmt: skip
        top += layouts[place].height + ticks_height(theme, width) + 0.7 * em
    return placed[0], placed[1]


def interaction_leaves(answer: PairAnswer) -> bool:
    """Whether something ends in an arrow, because the axis does not reach as far."""
    axes = _limits(answer)
    rows = ([row.effect for _, row in _probability_rows(answer)], [answer.interaction.log_ratio])
    return any(
        not limits.lower <= each <= limits.upper
        for limits, own in zip(axes, rows, strict=True)
        for estimate in own
        for each in _triple(estimate)
        if not math.isnan(each)
    )


def _limits(answer: PairAnswer) -> tuple[Limits, Limits]:
    told = [row for _, row in _probability_rows(answer)]
    held = answer.interaction.log_ratio
    middle, low, high = (min(max(each, -_MOST_LOG), _MOST_LOG) for each in _triple(held))
    odds = EffectRow("", None, None, None, None, Estimate(middle, None, low, high), None)
    probability, ratios = limits_of([told, [odds]])
    return probability, _wide_enough(ratios)


def ticks_height(theme: Theme, width: float) -> float:
    """Height in points of a row of tick labels, which name "none" where nothing else does."""
    lines = 2 if is_narrow(theme, width) else 1
    return 0.15 * theme.font_size + line_height(theme.small, lines)


def _probability_rows(answer: PairAnswer) -> list[tuple[str, EffectRow]]:
    found = answer.interaction
    others = answer.question.others
    if not has_others(answer):
        at = message("at any profile")
    elif others in ("typical", "observed"):
        at = message("at typical values")
    else:
        at = message("at the values held")
    average = message(
        "averaged over {} {}", count(answer.counted), cases_label(answer.subject.outcome)
    )
    return [
        (label, EffectRow("", None, None, None, None, estimate, None))
        for label, estimate in ((at, found.at_profile), (average, found.averaged))
        if estimate is not None
    ]


def _texts(rows: Sequence[EffectRow]) -> list[str]:
    known = [row for row in rows if not math.isnan(row.effect.estimate)]
    written = dict(zip(map(id, known), effect_texts(known), strict=True))
    return [written.get(id(row), wording().not_known) for row in rows] or [""]


def _ratio_text(answer: PairAnswer) -> str:
    held = answer.interaction.ratio
    if not answer.interaction.joined:
        return message("1 by the model")
    if math.isnan(held.estimate) or held.lower is None or held.upper is None:
        return ratio(held.estimate)
    if math.isnan(held.lower) or math.isnan(held.upper):
        return f"{ratio(held.estimate)} {message('(interval not known)')}"
    return f"{ratio(held.estimate)} ({ratio_interval(held.lower, held.upper)})"


def _heading(answer: PairAnswer) -> str:
    found = answer.interaction
    both: Sequence[Estimate | None] = (found.at_profile, found.averaged, found.ratio)
    if all(each is None or each.lower is None for each in both):
        return message("estimate")
    return message("estimate ({}% interval)", level_figures(answer.question.level))


def _triple(held: Estimate) -> tuple[float, float, float]:
    middle, low, high = held.estimate, held.lower, held.upper
    if low is None or high is None or math.isnan(low) or math.isnan(high):
        return middle, middle, middle
    return middle, low, high


def _wide_enough(limits: Limits) -> Limits:
    """Odds ratios near 1 are to be seen to be near 1."""
    factor = max(1.0, 1.1 * _LEAST_LOG / min(-limits.lower, limits.upper))
    # only the ticks nearest to 1 have to be there, on the wider side at least
    if max(-limits.lower, limits.upper) >= 1.1 * _LEAST_LOG:
        factor = 1.0
    return Limits(factor * limits.lower, factor * limits.upper, limits.leaves)
