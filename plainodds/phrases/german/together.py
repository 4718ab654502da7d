"""Several answers, and parts of them, in German; words and methods are those of the answers."""

from __future__ import annotations

from plainodds.answers.excerpts import ExcerptAnswer, Part
from plainodds.answers.panels import PanelsAnswer, panel_letter
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.texts import fitted, intervals_shown
from plainodds.phrases.sentences import joined

__all__: list[str] = []

_SHOWN: dict[Part, str] = {
    "ruler": "Linearer Prädiktor, Chance (Odds) und Wahrscheinlichkeit stehen auf drei aneinander "
    "ausgerichteten Skalen, sodass sich jede aus den anderen ablesen lässt",
    "ledger": "Jede Zeile sagt, was ein Merkmal zum linearen Prädiktor beiträgt, womit das die "
    "Chance (Odds) multipliziert, und die bis dahin erreichte Wahrscheinlichkeit",
    "marks": "Jedes Zeichen ist ein Fall; die sich nach der Änderung unterscheiden, sind durch "
    "ihre Form abgesetzt",
}


@GERMAN.alternative.register
def _(answer: PanelsAnswer) -> str:
    told = [
        f"Teilbild {panel_letter(number)}: {alternative(each)}"
        for number, each in enumerate(answer.answers)
    ]
    return " ".join(told)


@GERMAN.caption.register
def _(answer: ExcerptAnswer) -> str:
    subject, part = answer.subject, answer.question.part
    level = answer.whole.question.level  # type: ignore[attr-defined]
    marked = part == "ruler"
    return joined(
        caption(answer.whole).split(". ", 1)[0],
        _SHOWN[part],
        intervals_shown(subject, level, "Zeiger sind Schätzungen, Bänder") if marked else "",
        fitted(subject),
    )
