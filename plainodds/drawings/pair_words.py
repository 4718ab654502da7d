"""Short words that stand inside a picture of two predictors together."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import Stretch
from plainodds.drawings.among import averaged_over, held_at
from plainodds.phrases.labels import (
    cases_label,
    chance_of,
    odds_of_event,
    scale_title,
    value_label,
    why_no_interval,
)
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures
from plainodds.phrases.pair_labels import is_averaged, left_out, share_label
from plainodds.phrases.units import per_unit

__all__ = [
    "effect_subtitle",
    "no_effect",
    "pair_notes",
    "sign_turns",
    "stretch_names",
    "surface_title",
    "turn_name",
]

_SIGNS = {"above": "+", "below": "−", "open": "±"}


def no_effect() -> str:
    """Beside the line of no effect."""
    return message("no\neffect")


def sign_turns() -> tuple[str, str]:
    """Beside the line on which the interaction changes its sign, the longest first."""
    return message("interaction\nchanges sign"), message("sign changes")


def stretch_names(answer: PairAnswer, stretch: Stretch) -> tuple[str, ...]:
    """What a stretch is called, the longest name first, the last one a sign."""
    told, sign = _told(stretch), _SIGNS[stretch.sign]
    share = share_label(answer, stretch.share)
    return (f"{told}: {share}", told, sign) if share else (told, sign)


def _told(stretch: Stretch) -> str:
    if stretch.sign == "open":
        return message("left open")
    return message("higher") if stretch.sign == "above" else message("lower")


def turn_name(answer: PairAnswer, at: float) -> str:
    """Where an effect turns from growing to shrinking or back: "turns at 47 m"."""
    facts = answer.subject.predictor(answer.question.b)
    rounded = float(f"{at:.3g}")
    return message("turns at {}", value_label(facts, rounded))


def surface_title(answer: PairAnswer) -> str:
    """What a map shows."""
    if answer.lines is not None:
        return scale_title(answer.lines)
    outcome = answer.subject.outcome
    return odds_of_event(outcome) if answer.question.scale == "odds" else chance_of(outcome)


def pair_notes(answer: PairAnswer, cut: bool, leaves: bool) -> list[str]:
    """Notes in the order of their weight.

    Parameters
    ----------
    answer : PairAnswer
    cut : bool
        Whether the axis of the effect cuts off an interval.
    leaves : bool
        Whether something ends in an arrow.
    """
    cases = cases_label(answer.subject.outcome)
    notes = [_interval_note(answer, cut)]
    loose = not all(answer.effect.supported)
    is_line = answer.subject.predictor(answer.question.b).is_number
    if answer.surface is not None:
        notes.append(message("Hatched: no {} near.", cases))
        if not answer.sloped:
            notes.append(message("Frame: the combinations compared."))
    elif answer.lines is not None:
        along = answer.lines.question.predictor
        loose = loose or not all(all(line.supported) for line in answer.lines.lines)
        if answer.subject.predictor(along).is_number:
            is_line = True
            notes.append(message("Beneath the lines: where the {} are.", cases))
    notes += left_out(answer)
    if loose:
        notes.append(_loose_note(cases, is_line, answer.surface is not None))
    if leaves:
        notes.append(message("Arrow: it goes on beyond the axis."))
    notes.append(_profile_note(answer))
    return [note for note in notes if note]


def _loose_note(cases: str, is_line: bool, of_map: bool) -> str:
    """Say what is broken or hollow; a map has a broken line of its own, which is named."""
    if is_line:
        if of_map:
            return message("Broken line of the effect: few {} or none there.", cases)
        return message("Broken line: few {} or none there.", cases)
    if of_map:
        return message("Hollow point of the effect: few {} or none there.", cases)
    return message("Hollow point: few {} or none there.", cases)


def effect_subtitle(answer: PairAnswer) -> str:
    """What the axis of an effect is in; the event stands in the picture's heading."""
    question = answer.question
    if question.scale == "odds":
        return message("Odds ratio")
    averaged = is_averaged(answer)
    if question.a in answer.sloped:
        unit = per_unit(answer.subject.predictor(question.a).unit)
        if averaged:
            return message("Change of the average chance (percentage points per {} more)", unit)
        return message("Change of the chance (percentage points per {} more)", unit)
    if averaged:
        return message("Change of the average chance (percentage points)")
    return message("Change of the chance (percentage points)")


def _interval_note(answer: PairAnswer, cut: bool) -> str:
    """Say what the intervals are, or why there are none."""
    if answer.effect.lower is None:
        return why_no_interval(answer.subject)
    level = level_figures(answer.question.level)
    if cut:
        return message("Bands and lines: {}% intervals, cut off where they leave the axis.", level)
    return message("Bands and lines: {}% intervals.", level)


def _profile_note(answer: PairAnswer) -> str:
    """Say over whom, or at which profile, all but the interaction's own rows holds."""
    question, subject = answer.question, answer.subject
    if question.others == "observed":
        averaged = averaged_over(subject, [answer.counted], None) if answer.counted else ""
        return f"{averaged} {held_at(subject, answer.held, 'typical')}".strip()
    return held_at(subject, answer.held, question.others)
