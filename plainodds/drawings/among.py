"""Small print: over whom a chance is averaged, or at which profile it is held."""

from __future__ import annotations

from collections.abc import Sequence

from plainodds.answers.curve import Others
from plainodds.answers.where import Where
from plainodds.model.predictors import Subject
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.labels import listed
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count
from plainodds.phrases.parts import profile_words
from plainodds.values import Pairs

__all__ = ["averaged_over", "held_at"]


def averaged_over(subject: Subject, counted: Sequence[int], where: Where) -> str:
    """Say over how many rows an average is taken, and which.

    Parameters
    ----------
    subject : Subject
    counted : sequence of int
        Numbers of rows; several where each series has its own.
    where : pairs of (predictor, value), Mask or None
    """
    rows = rows_chosen(subject, where, counted[-1])
    before = [count(each) for each in counted[:-1]]
    return message("Averaged over {}, each with its own values otherwise.", listed([*before, rows]))


def held_at(subject: Subject, held: Pairs, others: Others) -> str:
    """Say at which profile a chance is held; empty where nothing is left to hold."""
    if not held:
        return ""
    profile = profile_words(subject, held)
    if others == "typical":
        return message("At typical values: {}.", profile)
    return message("Held: {}.", profile)
