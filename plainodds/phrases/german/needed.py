"""The number needed in German, its interval in one piece or two."""

from __future__ import annotations

import math

from plainodds.answers.comparing import NumberNeeded
from plainodds.model.predictors import Subject
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.parts import case, cases, level_intervals
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.needed import needed_range, pieces
from plainodds.phrases.numbers import level_figures, needed

__all__ = ["needed_sentences", "needed_technical"]


def needed_sentences(subject: Subject, number: NumberNeeded, level: float) -> list[str]:
    """Among how many cases there is one event more, or fewer; empty where that is not known."""
    if math.isnan(number.estimate):
        return []
    outcome = subject.outcome
    many = f"je {needed(number.estimate)} verglichene {cases(outcome)}"
    if needed(number.estimate) == "1":
        many = f"jeden verglichenen {case(outcome)}"
    told = f"Auf {many} kommt ein Ereignis {_side(number.more)}"
    if math.isinf(number.estimate):
        told = (
            f"Ohne Unterschied gibt es keine Zahl verglichener {cases(outcome)}, auf die ein "
            "Ereignis mehr oder weniger kommt"
        )
    found = pieces(number)
    if not found:
        return [told]
    (more, (least, most)) = found[0]
    if len(found) == 1 and not math.isinf(most):
        return [told + lexicon().interval.format(level_figures(level), needed_range(least, most))]
    one = level_intervals(level).removesuffix("e")
    start = f"{needed(least)} für eines {_side(more)}"
    if len(found) == 1:
        return [f"{told}; das {one} reicht von {start} bis unendlich, was keinen Unterschied heißt"]
    _, (fewest, _) = found[1]
    return [
        f"{told}; das {one} schließt ein, dass es keinen Unterschied gibt, und reicht deshalb von "
        f"{start} über unendlich (kein Unterschied) bis {needed(fewest)} für eines "
        f"{_side(not more)}"
    ]


@GERMAN.needed_technical.register
def needed_technical(number: NumberNeeded, level: float) -> list[str]:
    """The number needed with its interval's pieces; empty where it is not known."""
    if math.isnan(number.estimate):
        return []
    told = f"Nötige Zahl (number needed) {needed(number.estimate)}"
    if not math.isinf(number.estimate):
        told += f" für ein Ereignis {_side(number.more)}"
    found = pieces(number)
    if not found:
        return [told]
    written = [f"{needed_range(*ends)} für eines {_side(more)}" for more, ends in found]
    how = written[0] if len(written) == 1 else f"in zwei Stücken, {written[0]} und {written[1]}"
    return [told + lexicon().interval.format(level_figures(level), how)]


def _side(more: bool) -> str:
    return "mehr" if more else "weniger"
