"""How familiar a profile is to the data, in German."""

from __future__ import annotations

import math

from plainodds.answers.profile import ProfileAnswer, ProfilePoint
from plainodds.phrases.familiarity import values_outside
from plainodds.phrases.labels import listed
from plainodds.phrases.numbers import guarded_count, quantity
from plainodds.phrases.parts import rows_words

__all__ = ["familiarity_cautions", "familiarity_sentences"]

_ALONE = "dort spricht das Modell für sich allein"


def familiarity_sentences(answer: ProfileAnswer) -> list[str]:
    """How many rows are like a familiar profile."""
    found = answer.point.familiarity
    if found.verdict != "familiar" or found.rows_alike == 0:
        return []
    alike = guarded_count(found.rows_alike, answer.subject.smallest_cell)
    rows = f"{alike} Zeile" if alike == "1" else f"{alike} Zeilen"
    return [f"Unter {rows_words(answer.subject)} gibt es {rows}, die diesem Profil sehr ähneln"]


def familiarity_cautions(answer: ProfileAnswer) -> list[str]:
    """Why a profile, or the one compared with, leaves the data or lies at their edge."""
    told = _cautions(answer, answer.point, "dieses Profil", "diesem Profil")
    if answer.comparison is not None:
        told += _cautions(answer, answer.start, "das verglichene Profil", "dem verglichenen Profil")
    return told


def _cautions(answer: ProfileAnswer, point: ProfilePoint, which: str, dative: str) -> list[str]:
    found, subject = point.familiarity, answer.subject
    if found.verdict == "familiar":
        return []
    if math.isnan(found.largest_leverage):
        return [
            "Das Modell enthält keine Zeilen mehr, sodass niemand sagen kann, wie vertraut "
            f"{which} den Daten ist"
        ]
    outside = values_outside(answer, point)
    if outside:
        return [f"{which} liegt außerhalb der Daten: {listed(outside)}; {_ALONE}"]
    if found.verdict == "beyond":
        return [
            f"{which} liegt außerhalb der Daten: jeder Wert kommt vor, aber keine Zeile verbindet "
            f"Werte so ungewöhnlich; {_ALONE}"
        ]
    if found.rows_alike == 0:
        return [
            f"unter {rows_words(subject)} ähnelt keine {dative} sehr; seine Wahrscheinlichkeit ist "
            "daher mit Vorsicht zu nehmen"
        ]
    told = guarded_count(found.rows_alike, subject.smallest_cell)
    alike = "ähnelt nur 1 Zeile" if told == "1" else f"ähneln nur {told} Zeilen"
    return [
        f"{dative} {alike} sehr, und seine Werte sind ungewöhnlicher verbunden als in "
        f"{quantity(99, '%')} der Zeilen"
    ]
