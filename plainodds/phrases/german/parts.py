"""Parts of German sentences that every answer needs: who is spoken of, and cautions."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.answers.curve import Others
from plainodds.answers.drawn import Sampling
from plainodds.answers.estimate import Estimate
from plainodds.answers.where import Mask, Where
from plainodds.model.predictors import OutcomeFacts, Stakes, Subject
from plainodds.phrases.averaged import values_chosen
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.held import stated_and_typical
from plainodds.phrases.numbers import count, guarded_count, level_figures, quantity
from plainodds.phrases.parts import BEYOND_SAYING, RARE, counted_rows, profile_words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__ = [
    "EVERYTHING",
    "ODDS_MEANING",
    "ROUNDED_APART",
    "among",
    "association",
    "beyond_saying",
    "case",
    "cases",
    "chance",
    "covariance",
    "drawn_method",
    "drawn_sentences",
    "event",
    "handed_on",
    "held_sentences",
    "held_whom",
    "kept_sentence",
    "level_intervals",
    "model_cautions",
    "odds_ratio_cautions",
    "odds_ratio_reading",
    "whom",
]

EVERYTHING = 1_000_000
ODDS_MEANING = (
    "Chance (Odds) heißt hier: die Wahrscheinlichkeit des Ereignisses geteilt durch die seines "
    "Ausbleibens; das ist nicht die Wahrscheinlichkeit selbst"
)
ROUNDED_APART = (
    "Jede Zahl ist für sich gerundet, sodass Anzahlen um eins von ihrer Differenz abweichen können"
)
_COVARIANCE = {
    "nonrobust": "der modellbasierten Kovarianzmatrix",
    "cluster": "einer clusterrobusten Kovarianzmatrix",
    "robust": "einer robusten Kovarianzmatrix (Sandwich)",
    "naive": "der modellbasierten (naiven) Kovarianzmatrix",
    "bias_reduced": "einer robusten Kovarianzmatrix mit verringerter Verzerrung",
    "fixed scale": "der modellbasierten Kovarianzmatrix mit festgehaltener Skala",
    "hac-groupsum": "einer gegen Autokorrelation zwischen Gruppen robusten Kovarianzmatrix (HAC)",
    "hac-panel": "einer gegen Autokorrelation innerhalb von Panels robusten Kovarianzmatrix (HAC)",
    "HAC": "einer gegen Heteroskedastizität und Autokorrelation robusten Kovarianzmatrix (HAC)",
}
_DECISIONS: dict[Stakes, str] = {
    "health": (
        "Über die Behandlung eines Menschen entscheiden zugelassene Fachleute gemeinsam mit der "
        "betroffenen Person und nach den Regeln, die vor Ort gelten; diese Zahlen können dabei "
        "helfen, aber nichts davon ersetzen."
    ),
    "safety": (
        "Was geprüft, instand gesetzt oder stillgelegt werden muss, bestimmen die Normen und die "
        "verantwortlichen zugelassenen Fachleute vor Ort; eine niedrige Wahrscheinlichkeit ist "
        "keine Freigabe."
    ),
    "money": (
        "Entscheidungen über Kredite, Versicherungen oder Preise sind an das Recht gebunden, das "
        "vor Ort gilt, auch darin, welche Merkmale überhaupt verwendet werden dürfen; diese Zahlen "
        "sind keine Beratung."
    ),
    "rights": (
        "Entscheidungen über Freiheit, Arbeit, Bildung oder Sozialleistungen eines Menschen sind "
        "an das Recht gebunden, das vor Ort gilt, und die betroffene Person muss gehört werden; "
        "diese Zahlen können nicht entscheiden."
    ),
}


def event(outcome: OutcomeFacts) -> str:
    """The event in quotation marks, so that it need not be inflected."""
    return f"„{tidy(outcome.event)}“"


def chance(outcome: OutcomeFacts, *, averaged: bool = False) -> str:
    """What is spoken of: "die mittlere Wahrscheinlichkeit für „burst this winter“"."""
    return f"die {'mittlere ' if averaged else ''}Wahrscheinlichkeit für {event(outcome)}"


def case(outcome: OutcomeFacts, noun: str = "Fall") -> str:
    """One row, with what the analyst calls it in brackets: "Fall (pipe)"."""
    told = tidy(outcome.case)
    return noun if told == "case" else f"{noun} ({told})"


def cases(outcome: OutcomeFacts, noun: str = "Fälle") -> str:
    """Many rows, with what the analyst calls them in brackets: "Fälle (pipes)"."""
    told = tidy(outcome.cases)
    return noun if told == "cases" else f"{noun} ({told})"


def whom(
    subject: Subject, chosen: Pairs, *, whole: bool, article: str = "einen", at_most: int = 8
) -> str:
    """Whom stated values describe: "einen Fall (pipe) mit age = 40 und sonst typischen Werten".

    `whole` where no other predictor is left; the article says the case.
    """
    outcome = subject.outcome
    if not chosen:
        return f"{article} typischen {case(outcome)}"
    text = f"{article} {case(outcome)} mit {profile_words(subject, chosen, at_most=at_most)}"
    return text if whole else f"{text} und sonst typischen Werten"


def held_whom(subject: Subject, held: Pairs, others: Others, article: str = "einen") -> str:
    """Whom a held profile describes."""
    stated, _ = stated_and_typical(held, others)
    return whom(subject, stated, whole=len(stated) == len(held), article=article)


def held_sentences(subject: Subject, held: Pairs, others: Others, *, at_most: int = 8) -> list[str]:
    """At which values predictors are held, those stated before those typical."""
    stated, typical = stated_and_typical(held, others)
    told = []
    if stated:
        values = profile_words(subject, stated, at_most=at_most)
        told.append(f"Wie angegeben festgehalten: {values}")
    if typical:
        values = profile_words(subject, typical, at_most=at_most)
        if len(typical) == 1:
            told.append(f"Das übrige Merkmal steht auf seinem typischen Wert: {values}")
        else:
            told.append(f"Die übrigen Merkmale stehen auf ihren typischen Werten: {values}")
    return told


def kept_sentence(subject: Subject, averaged: str, rows: str) -> str:
    """That nothing else is held, and over which rows what is averaged."""
    return (
        f"Jeder {case(subject.outcome)} behält seine eigenen Werte der übrigen Merkmale; "
        f"gemittelt werden {averaged} über {rows}"
    )


def among(subject: Subject, where: Where, counted: int) -> str:
    """Whom an average is about, in the dative: "Fällen (pipes) wie denen in den Daten"."""
    many = cases(subject.outcome, "Fällen")
    if isinstance(where, Mask):
        rows = counted_rows(counted, guarded_count(counted, subject.smallest_cell))
        return f"den ausgewählten {many}, {rows},"
    if not where:
        return f"{many} wie denen in den Daten"
    return f"{many} mit {values_chosen(subject, where)}"


def drawn_sentences(subject: Subject, sample: Sampling, estimate: Estimate) -> list[str]:
    """That an interval counts the rows' having been drawn; empty where it does not."""
    if sample == "fixed" or estimate.lower is None:
        return []
    return [
        "Die Intervalle berücksichtigen auch, dass diese Zeilen aus einer größeren Zahl von "
        f"{cases(subject.outcome, 'Fällen')} gezogen sind"
    ]


def drawn_method(sample: Sampling) -> str:
    """How the rows' having been drawn comes into the variance, to end a sentence on method."""
    if sample == "fixed":
        return "; die Zeilen gelten als fest (das Intervall spricht von genau diesen Zeilen)"
    return (
        "; die Zeilen gelten als gezogen aus einer größeren Grundgesamtheit: zur Varianz aus den "
        "Koeffizienten kommt die Summe, über die Zeilen, der quadrierten Anteile einer Zeile am "
        "Mittel (geteilt durch die Zahl der Fälle, für die sie steht) mal dem quadrierten Abstand "
        "ihres eigenen Werts vom Mittel"
    )


def level_intervals(level: float) -> str:
    """As in "95-%-Intervalle"."""
    return f"{level_figures(level)}-%-Intervalle"


def covariance(subject: Subject) -> str:
    """The covariance that the intervals rest on, in the dative."""
    kind = tidy(subject.covariance_kind)
    if kind.upper().startswith("HC") and kind[2:].isdigit():
        return f"einer gegen Heteroskedastizität robusten Kovarianzmatrix ({kind.upper()})"
    return _COVARIANCE.get(kind, f"der Kovarianzmatrix der Art „{kind}“")


def association(subject: Subject) -> str:
    """Whether the figures speak of what goes together, or of what follows from what."""
    if subject.setting.causal:
        return (
            "Auf Wort der auswertenden Person werden die Zahlen als Wirkungen gelesen; ihre "
            f"Begründung: „{subject.setting.reason.rstrip('.')}“. Das Modell selbst kann eine "
            "Wirkung nicht von einem Zusammenhang unterscheiden."
        )
    return (
        "Diese Zahlen sagen, was in den Daten miteinander einhergeht; sie sagen nicht, was folgen "
        "würde, wenn ein Wert mit Absicht geändert würde."
    )


def beyond_saying(found: str) -> str:
    """What an odds ratio that is so far from 1 mostly means; `found` says where it is."""
    return (
        f"Ein Chancenverhältnis (Odds Ratio) unter {quantity(1 / BEYOND_SAYING)} oder über "
        f"{count(BEYOND_SAYING)}, wie {found}, heißt meist, dass die Merkmale in diesen Daten das "
        "Ergebnis ausnahmslos festlegen oder dass die gemeinte Änderung viel zu groß ist."
    )


def odds_ratio_reading(where: str) -> str:
    """That an odds ratio is no ratio of chances; `where` says when the two differ."""
    return (
        "Ein Chancenverhältnis (Odds Ratio) ist kein Verhältnis von Wahrscheinlichkeiten: "
        f"{where} liegt es weiter von 1 entfernt als das Verhältnis der Wahrscheinlichkeiten"
    )


def odds_ratio_cautions(chances: Iterable[float]) -> tuple[str, ...]:
    """The same, where these chances are common."""
    if not any(each > RARE for each in chances):
        return ()
    percent = quantity(100 * RARE, "%")
    return (odds_ratio_reading(f"wo Wahrscheinlichkeiten, wie hier, über etwa {percent} liegen,"),)


def handed_on(text: str) -> str:
    """A text about the fit, which is English."""
    return f"Hinweis (englisch): {sentence(text)}"


@GERMAN.model_cautions.register
def model_cautions(subject: Subject, *, offset_held: bool = True) -> tuple[str, ...]:
    """What holds for every answer of this fitted model.

    `offset_held` is false where each row keeps its own offset.
    """
    cautions = []
    if subject.no_interval:
        cautions.append("Hier lassen sich keine Intervalle angeben.")
        cautions.append(handed_on(subject.no_interval))
    if subject.offset is not None:
        held = f"hier ist er festgehalten auf {quantity(subject.offset)}"
        if not offset_held:
            held = "hier behält jede Zeile ihren eigenen"
        cautions.append(f"Das Modell hat einen Offset, einen als bekannt gesetzten Betrag; {held}.")
    cautions += _sampling(subject)
    cautions += map(handed_on, subject.notices)
    return (*cautions, *_stakes(subject.outcome))


def _sampling(subject: Subject) -> list[str]:
    chosen = "Die Stichprobe wurde nach dem Ergebnis gezogen (Fall-Kontroll-Stichprobe)"
    if subject.prevalence is not None:
        share = quantity(100 * subject.prevalence, "%")
        return [
            f"{chosen}; deshalb ist jede Wahrscheinlichkeit auf einen angegebenen Anteil mit "
            f"{event(subject.outcome)} in der Grundgesamtheit von {share} umgerechnet, und "
            "Mittelwerte sind danach gewichtet; Chancenverhältnisse (Odds Ratios) an gegebenen "
            "Werten brauchen keine Umrechnung."
        ]
    if subject.sampling == "case-control":
        return [
            f"{chosen}; sie gibt daher Chancenverhältnisse (Odds Ratios) her, aber keine "
            "Wahrscheinlichkeiten."
        ]
    return []


def _stakes(outcome: OutcomeFacts) -> tuple[str, ...]:
    """What must be said of groups and individuals, and of who decides; empty without stakes."""
    if outcome.stakes is None:
        return ()
    return (
        f"Eine Wahrscheinlichkeit spricht von vielen gleichartigen {cases(outcome, 'Fällen')}: wie "
        f"viele von ihnen, nie welche. Für einen einzelnen {case(outcome)} kann vieles zählen, was "
        "das Modell nicht kennt.",
        _DECISIONS[outcome.stakes],
    )
