"""What every German caption and every German note on methods needs."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.answers.curve import Others
from plainodds.answers.where import Where
from plainodds.model.predictors import Subject
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.parts import (
    EVERYTHING,
    cases,
    covariance,
    event,
    handed_on,
    held_sentences,
    kept_sentence,
    level_intervals,
)
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.methods.note import MethodsNote, noted
from plainodds.phrases.numbers import chance, count, level_figures, quantity
from plainodds.phrases.sentences import sentence
from plainodds.phrases.versions import versions
from plainodds.values import Pairs

__all__ = [
    "drawn_note",
    "fitted",
    "intervals_made",
    "intervals_shown",
    "note",
    "others_made",
    "rest",
]


_AVERAGED = {"chances": "die Wahrscheinlichkeiten", "changes": "die Änderungen"}


def intervals_shown(subject: Subject, level: float, marks: str) -> str:
    """What the marks of uncertainty are: "Bänder sind 95-%-Konfidenzintervalle"."""
    if subject.no_interval:
        reason = handed_on(subject.no_interval)
        return f"Es lassen sich keine Intervalle angeben. {reason}"
    return f"{marks} {level_figures(level)}-%-Konfidenzintervalle"


def rest(
    subject: Subject, others: Others, held: Pairs, averaged: str, counted: int, where: Where = None
) -> str:
    """What the remaining predictors do; empty where none is left.

    Parameters
    ----------
    subject : Subject
    others : "typical", "observed" or pairs
    held : pairs
    averaged : str
        What is averaged, with its article: "die Wahrscheinlichkeiten".
    counted : int
        Rows averaged over.
    where : pairs, Mask or None
    """
    if others == "observed":
        return kept_sentence(subject, averaged, rows_chosen(subject, where, counted))
    return " ".join(map(sentence, held_sentences(subject, held, others, at_most=EVERYTHING)))


@GERMAN.rest_words.register
def _(
    subject: Subject, others: Others, held: Pairs, averaged: str, counted: int, where: Where = None
) -> str:
    """The same, with what is averaged as English tables call it."""
    return rest(subject, others, held, _AVERAGED[averaged], counted, where)


@GERMAN.fitted_words.register
def fitted(subject: Subject) -> str:
    """Which model, and how many rows and events it was fitted to."""
    outcome = subject.outcome
    many = f"{count(subject.rows)} {cases(outcome)}"
    told = f"Grundlage: logistische Regression, angepasst an {many}"
    if subject.sampling == "case-control":
        return f"{told}, nach dem Ergebnis ausgewählt (Fall-Kontroll-Stichprobe)"
    return f"{told}, davon {chance(outcome.share)} mit {event(outcome)}"


def note(subject: Subject, sentences: Iterable[str]) -> MethodsNote:
    """A note that opens with the model and ends with the works that its sentences cite."""
    made = f"Berechnet mit {versions('plainodds', 'statsmodels', 'numpy')}"
    return noted(*_model(subject), *sentences, made)


def _model(subject: Subject) -> list[str]:
    outcome = subject.outcome
    names = listed([predictor_name(facts) for facts in subject.predictors])
    told = [
        f"Angepasst wurde eine logistische Regression für {event(outcome)} mit den Merkmalen "
        f"{names} an {count(subject.rows)} {cases(outcome)} (Hosmer et al. 2013)"
    ]
    if subject.offset is not None:
        told.append("Das Modell hat einen Offset, dessen Koeffizient auf 1 festgelegt ist")
    if subject.prevalence is not None:
        share = quantity(100 * subject.prevalence, "%")
        told.append(
            "Die Stichprobe wurde nach dem Ergebnis gezogen; die Konstante wurde auf einen Anteil "
            f"der Ereignisse von {share} in der Grundgesamtheit verschoben, und Mittelwerte wurden "
            "danach gewichtet (King & Zeng 2001)"
        )
    elif subject.sampling == "case-control":
        told.append(
            "Die Stichprobe wurde nach dem Ergebnis gezogen, sodass nur Chancenverhältnisse (Odds "
            "Ratios) geschätzt werden"
        )
    return told


def intervals_made(subject: Subject, level: float, made: str) -> str:
    """How intervals were made, or why there are none.

    Parameters
    ----------
    subject : Subject
    level : float
    made : str
        As in "Wald-Intervalle auf der Log-Skala".
    """
    if subject.no_interval:
        return f"Es werden keine Intervalle angegeben. {handed_on(subject.no_interval)}"
    cited = " (Liang & Zeger 1986)" if subject.covariance_kind in ("cluster", "robust") else ""
    kind = level_intervals(level).replace("Intervalle", "Konfidenzintervalle")
    return f"Die {kind} sind {made}, mit {covariance(subject)}{cited}"


def others_made(
    subject: Subject, others: Others, averaged: str, counted: int, where: Where = None
) -> str:
    """What was done with the remaining predictors; `averaged` has its article."""
    if others == "observed":
        rows = rows_chosen(subject, where, counted)
        return (
            f"Gemittelt wurden {averaged} über {rows}, jede mit ihren eigenen Werten der übrigen "
            "Merkmale (marginale Standardisierung; Muller & MacLehose 2014; Hanmer & Kalkan 2013)"
        )
    if others == "typical":
        return (
            "Die übrigen Merkmale wurden auf typischen Werten festgehalten: Zahlen auf ihrem "
            "Median, Kategorien auf ihrer häufigsten Stufe, sofern nicht anders angegeben"
        )
    return (
        "Die übrigen Merkmale wurden auf angegebenen Werten festgehalten, und wo keine angegeben "
        "waren, auf typischen"
    )


def drawn_note(drawn: bool) -> str:
    """That the rows' having been drawn was counted; empty where it was not."""
    if not drawn:
        return ""
    return (
        "Zur Varianz der Koeffizienten kam die Varianz hinzu, die aus dem Ziehen der Zeilen folgt "
        "(Dowd et al. 2014)"
    )
