"""Short words that stand inside a picture of two predictors together."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import Stretch
from plainodds.drawings.among import averaged_over, held_at
from plainodds.phrases.labels import chance_of, odds_of_event, scale_title, value_label
from plainodds.phrases.numbers import confidence
from plainodds.phrases.pair_labels import left_out, pair_noun, share_label
from plainodds.phrases.units import per_unit

__all__ = [
    "NO_EFFECT",
    "SIGN_TURNS",
    "effect_subtitle",
    "pair_notes",
    "stretch_names",
    "surface_title",
    "turn_name",
]

NO_EFFECT = "no\neffect"
SIGN_TURNS = ("interaction\nchanges sign", "sign changes")
"""Beside the line on which the interaction changes its sign, the longest first."""

_TOLD = {"above": ("higher", "+"), "below": ("lower", "−"), "open": ("left open", "±")}


def stretch_names(answer: PairAnswer, stretch: Stretch) -> tuple[str, ...]:
    """What a stretch is called, the longest name first, the last one a sign."""
    told, sign = _TOLD[stretch.sign]
    share = share_label(answer, stretch.share)
    return (f"{told}: {share}", told, sign) if share else (told, sign)


def turn_name(answer: PairAnswer, at: float) -> str:
    """Where an effect turns from growing to shrinking or back: "turns at 47 m"."""
    facts = answer.subject.predictor(answer.question.b)
    rounded = float(f"{at:.3g}")
    return f"turns at {value_label(facts, rounded)}"


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
    cases = answer.subject.outcome.cases
    notes = [_interval_note(answer, cut)]
    loose = not all(answer.effect.supported)
    is_line = answer.subject.predictor(answer.question.b).is_number
    if answer.surface is not None:
        notes.append(f"Hatched: no {cases} near.")
        if not answer.sloped:
            notes.append("Frame: the combinations compared.")
    elif answer.lines is not None:
        along = answer.lines.question.predictor
        loose = loose or not all(all(line.supported) for line in answer.lines.lines)
        if answer.subject.predictor(along).is_number:
            is_line = True
            notes.append(f"Beneath the lines: where the {cases} are.")
    notes += left_out(answer)
    if loose:
        what = "Broken line" if is_line else "Hollow point"
        # a map has a broken line of its own, which is named
        of = " of the effect" if answer.surface is not None else ""
        notes.append(f"{what}{of}: few {cases} or none there.")
    if leaves:
        notes.append("Arrow: it goes on beyond the axis.")
    notes.append(_profile_note(answer))
    return [note for note in notes if note]


def effect_subtitle(answer: PairAnswer) -> str:
    """What the axis of an effect is in; the event stands in the picture's heading."""
    question = answer.question
    if question.scale == "odds":
        return "Odds ratio"
    per = ""
    if question.a in answer.sloped:
        per = f" per {per_unit(answer.subject.predictor(question.a).unit)} more"
    return f"Change of the {pair_noun(answer)} (percentage points{per})"


def _interval_note(answer: PairAnswer, cut: bool) -> str:
    """Say what the intervals are, or why there are none."""
    if answer.effect.lower is None:
        return answer.subject.no_interval or "No intervals can be given."
    beyond = ", cut off where they leave the axis" if cut else ""
    return f"Bands and lines: {confidence(answer.question.level)} intervals{beyond}."


def _profile_note(answer: PairAnswer) -> str:
    """Say over whom, or at which profile, all but the interaction's own rows holds."""
    question, subject = answer.question, answer.subject
    if question.others == "observed":
        averaged = averaged_over(subject, [answer.counted], None) if answer.counted else ""
        return f"{averaged} {held_at(subject, answer.held, 'typical')}".strip()
    return held_at(subject, answer.held, question.others)
