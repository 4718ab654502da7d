"""Where the parts of a picture of two predictors stand, before anything is drawn."""

from __future__ import annotations

from dataclasses import dataclass, replace

from plainodds.answers.pair import PairAnswer
from plainodds.drawings.curve import CurveDrawing, curve_notes
from plainodds.drawings.curve_levels import LevelsDrawing, levels_notes
from plainodds.drawings.furniture import Notes, Title
from plainodds.drawings.pair_axis import effect_is_cut
from plainodds.drawings.pair_effect import EffectPanel
from plainodds.drawings.pair_interaction import InteractionPanel
from plainodds.drawings.pair_interaction_rows import interaction_leaves
from plainodds.drawings.pair_map import MapPanel
from plainodds.drawings.pair_words import pair_notes
from plainodds.drawings.parts import Place
from plainodds.drawings.theme import Theme
from plainodds.phrases.pair_labels import pair_title

__all__ = [
    "TITLE_SIZE",
    "PairLayout",
    "least_height",
    "natural_height",
    "notes_of",
    "pair_layout",
]

TITLE_SIZE = 1.15
"""Of the heading, in letters."""
_SIDE_BY_SIDE, _SIDE_BY_SIDE_LEVELS = 41.0, 54.0  # letters
_BETWEEN = 2.2  # letters between parts side by side
_BENEATH = 1.3  # letters between parts beneath each other
_MORE_PLOT = 8.0  # letters that a plot would like to be higher than it has to be
_TALL_MAP = 0.72  # height of a map in its width
_HIGHEST_MAP = 24.0  # letters


@dataclass(frozen=True)
class PairLayout:
    """The places of the parts; `together` is None where the sample tells no chances."""

    together: Place | None
    effect: Place
    interaction: Place
    beside: bool


def pair_layout(answer: PairAnswer, theme: Theme, width: float, height: float) -> PairLayout:
    """Set the parts into a slot of a size in points."""
    em = theme.font_size
    beside = _is_beside(answer, theme, width)
    top = _heading(answer, theme, width)
    last = InteractionPanel.height(answer, theme, width)
    notes = notes_height(answer, theme, width)
    room = height - top - _BENEATH * em - last - notes
    interaction = Place(0.0, height - notes - last, width, last)
    if answer.lines is None and answer.surface is None:
        return PairLayout(None, Place(0.0, top, width, room), interaction, False)
    if beside:
        half = (width - _BETWEEN * em) / 2
        return PairLayout(
            Place(0.0, top, half, room), Place(width - half, top, half, room), interaction, True
        )
    least = together_least(answer, theme, width), effect_least(answer, theme, width)
    wanted = [_wanted(answer, theme, width), _MORE_PLOT * em]
    spare = room - _BENEATH * em - sum(least)
    first = least[0] + spare * wanted[0] / sum(wanted)
    second = room - _BENEATH * em - first
    return PairLayout(
        Place(0.0, top, width, first),
        Place(0.0, top + first + _BENEATH * em, width, second),
        interaction, False,
    )  # fmt: skip


def natural_height(answer: PairAnswer, theme: Theme, width: float) -> float:
    """Height in points at which the answer looks best; the same on both scales."""
    return max(_height(each, theme, width, True) for each in _on_both_scales(answer))


def least_height(answer: PairAnswer, theme: Theme, width: float) -> float:
    """Height in points below which texts would meet; the same on both scales."""
    return max(_height(each, theme, width, False) for each in _on_both_scales(answer))


def _on_both_scales(answer: PairAnswer) -> tuple[PairAnswer, ...]:
    """The answer with either scale's titles, so that a switch leaves parts where they are."""
    question = answer.question
    asked = replace(question, scale="probability"), replace(question, scale="odds")
    return tuple(replace(answer, question=each) for each in asked)


def _height(answer: PairAnswer, theme: Theme, width: float, best: bool) -> float:
    em = theme.font_size
    more = _MORE_PLOT * em if best else 0.0
    # on one scale an interval may be cut off and on the other not: room for saying so is kept
    notes = pair_notes(answer, True, interaction_leaves(answer))
    around = _heading(answer, theme, width) + Notes.height(notes, theme, width)
    around += InteractionPanel.height(answer, theme, width) + _BENEATH * em
    if answer.lines is None and answer.surface is None:
        return around + effect_least(answer, theme, width) + more
    if _is_beside(answer, theme, width):
        half = (width - _BETWEEN * em) / 2
        wanted = _wanted(answer, theme, half) if best else 0.0
        return around + max(
            together_least(answer, theme, half) + wanted, effect_least(answer, theme, half) + more
        )
    wanted = _wanted(answer, theme, width) if best else 0.0
    both = together_least(answer, theme, width) + effect_least(answer, theme, width)
    return around + both + wanted + more + _BENEATH * em


def _wanted(answer: PairAnswer, theme: Theme, width: float) -> float:
    """By how much the first part would like to be higher than it has to be."""
    em = theme.font_size
    if answer.surface is None:
        return _MORE_PLOT * em
    tall = min(_TALL_MAP * width, _HIGHEST_MAP * em)
    around = sum(MapPanel.around(answer, theme, width))
    return max(0.0, around + tall - MapPanel.least_height(answer, theme, width))


def _is_beside(answer: PairAnswer, theme: Theme, width: float) -> bool:
    needed = _SIDE_BY_SIDE
    if answer.surface is None and answer.lines is not None:
        along = answer.subject.predictor(answer.lines.question.predictor)
        # names of levels need more room than numbers
        needed = _SIDE_BY_SIDE if along.is_number else _SIDE_BY_SIDE_LEVELS
    return width >= needed * theme.font_size


def _heading(answer: PairAnswer, theme: Theme, width: float) -> float:
    return Title.height(pair_title(answer), theme, width, TITLE_SIZE) + 0.8 * theme.font_size


def notes_of(answer: PairAnswer) -> list[str]:
    """The small print of the whole picture."""
    return pair_notes(answer, effect_is_cut(answer), interaction_leaves(answer))


def notes_height(answer: PairAnswer, theme: Theme, width: float) -> float:
    """Height in points of the small print."""
    return Notes.height(notes_of(answer), theme, width)


def together_least(answer: PairAnswer, theme: Theme, width: float) -> float:
    """Least height in points of the part that shows both together."""
    if answer.surface is not None:
        return MapPanel.least_height(answer, theme, width)
    lines = answer.lines
    assert lines is not None
    # their notes are among the whole picture's
    if answer.subject.predictor(lines.question.predictor).is_number:
        notes = Notes.height(curve_notes(lines), theme, width)
        return CurveDrawing.least_height(lines, theme, width) - notes
    notes = Notes.height(levels_notes(lines), theme, width)
    return LevelsDrawing.least_height(lines, theme, width) - notes


def effect_least(answer: PairAnswer, theme: Theme, width: float) -> float:
    """Least height in points of the part that shows the effect."""
    return EffectPanel.least_height(answer, theme, width)
