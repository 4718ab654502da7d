"""What a picture of effects says beneath its rows: averaged over whom, or held where."""

from __future__ import annotations

from plainodds.answers.effects import EffectsAnswer
from plainodds.drawings.among import averaged_over, held_at
from plainodds.drawings.effects_rows import panels_of
from plainodds.phrases.labels import predictor_name, why_no_interval
from plainodds.phrases.lexicon import message

__all__ = ["effects_notes"]


def effects_notes(answer: EffectsAnswer, leaves: bool) -> list[str]:
    """Notes in the order of their weight; `leaves` is whether anything ends in an arrow."""
    notes = []
    if all(row.effect.lower is None for row in answer.rows):
        notes.append(why_no_interval(answer.subject))
    if leaves:
        notes.append(message("Arrow: it goes on beyond the axis; its figures stand at the right."))
    notes.append(_among(answer))
    panels = panels_of(answer)
    if any(panel.is_slope for panel in panels) and len(panels) > 1:
        notes.append(
            message(
                "Each change per additional unit has an axis of its own: units cannot be compared."
            )
        )
    return [note for note in notes if note]


def _among(answer: EffectsAnswer) -> str:
    question, subject = answer.question, answer.subject
    if question.others == "observed":
        return averaged_over(subject, answer.counted, question.where)
    held = held_at(subject, answer.held, question.others)
    if question.by is None:
        return held
    by = predictor_name(subject.predictor(question.by))
    if held:
        return message("{}; {} as marked.", held.removesuffix("."), by)
    return message("With {} as marked.", by)
