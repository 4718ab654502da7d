"""How answers were computed, in German, for each kind of answer."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.pair import PairAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.phrases.german.curve import is_averaged
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.texts import drawn_note, intervals_made, note, others_made
from plainodds.phrases.methods.note import MethodsNote
from plainodds.phrases.numbers import count

__all__: list[str] = []


@GERMAN.methods_note.register
def _(answer: ChangeAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    return note(
        subject,
        (
            "Die Wahrscheinlichkeit wurde vor und nach der Änderung berechnet",
            others_made(
                subject,
                question.others,
                "die Wahrscheinlichkeiten",
                answer.counted,
                question.where,
            ),
            intervals_made(
                subject,
                question.level,
                "nach einer gemeinsamen Delta-Methode berechnet: der Wahrscheinlichkeiten auf der "
                "Logit-Skala, der Verhältnisse auf der Log-Skala, der Differenz für sich (Localio "
                "et al. 2007)",
            ),
            "Die nötige Zahl (number needed) ist der Kehrwert der Differenz, ihr Intervall in zwei "
            "Stücken, wo das der Differenz die 0 enthält (Altman 1998)",
            drawn_note(question.sample == "drawn" and not subject.no_interval),
        ),
    )


@GERMAN.methods_note.register
def _(answer: CurveAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    slope = question.scale == "slope"
    what = "Die Wahrscheinlichkeit"
    if slope:
        what = "Die Steigung der Wahrscheinlichkeit (der marginale Effekt)"
        made = "Intervalle der Delta-Methode mit exakten Gradienten (Greene 2012)"
    elif is_averaged(answer):
        made = "Intervalle der Delta-Methode auf dem Logit der gemittelten Wahrscheinlichkeit"
    else:
        made = "Wald-Intervalle auf dem linearen Prädiktor, auf die gezeigte Skala übertragen"
    return note(
        subject,
        (
            f"{what} wurde aus dem angepassten Modell entlang des Merkmals berechnet, wobei jeder "
            "Term mitbewegt wurde, in dem es steht",
            others_made(
                subject,
                question.others,
                "die Steigungen" if slope else "die Wahrscheinlichkeiten",
                subject.rows,
            ),
            intervals_made(subject, question.level, made),
        ),
    )


@GERMAN.methods_note.register
def _(answer: EffectsAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    of_number = "die Ableitung der Wahrscheinlichkeit"
    if question.number != "slope":
        of_number = "die Änderung der Wahrscheinlichkeit um einen Schritt"
    return note(
        subject,
        (
            f"Der Effekt einer Zahl ist {of_number}, der einer Kategorie die Differenz der "
            "Wahrscheinlichkeiten zweier Stufen, durch jeden Term, in dem das Merkmal steht",
            others_made(
                subject, question.others, "die Effekte", sum(answer.counted), question.where
            ),
            intervals_made(
                subject,
                question.level,
                "Intervalle der Delta-Methode mit exakten Gradienten (Greene 2012)",
            ),
            drawn_note(question.sample == "drawn" and not subject.no_interval),
        ),
    )


@GERMAN.methods_note.register
def _(answer: OddsAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    likelihood = question.interval == "likelihood"
    made = "Wald-Intervalle auf der Log-Skala"
    if likelihood:
        made = (
            "Profil-Likelihood-Intervalle, durch erneutes Anpassen gefunden (Venzon & Moolgavkar "
            "1988), bei Standardfehlern nach Wald"
        )
    kind = "Likelihood-Quotienten" if likelihood else "Wald"
    tests = f"Tests eines Odds Ratio von 1 sind {kind}"
    return note(
        subject,
        (
            "Das Odds Ratio einer Änderung ist der Exponent der Änderung des linearen Prädiktors, "
            "die mit ihr einhergeht, durch jeden Term, in dem das Merkmal steht",
            "Wo ein Merkmal einen Term mit anderen teilt, wurden seine Odds Ratios an angegebenen "
            "Werten dieser anderen berechnet"
            if any(row.given for row in answer.rows)
            else "",
            intervals_made(subject, question.level, made),
            "" if subject.no_interval else f"{tests}-Tests",
            f"Wechselwirkungen wurden mit {kind}-Tests aller Terme geprüft, die zwei Merkmale "
            "gemeinsam haben"
            if answer.interactions
            else "",
        ),
    )


@GERMAN.methods_note.register
def _(answer: ProfileAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    compared = question.against is not None
    return note(
        subject,
        (
            "Der lineare Prädiktor wurde am angegebenen Profil berechnet, nicht angegebene "
            "Merkmale auf typischen Werten (Zahlen auf ihrem Median, Kategorien auf ihrer "
            "häufigsten Stufe)",
            intervals_made(
                subject,
                question.level,
                "Wald-Intervalle auf dem linearen Prädiktor, auf Odds und Wahrscheinlichkeit "
                "übertragen (Agresti 2013)",
            ),
            "Die beiden Profile wurden nach einer gemeinsamen Delta-Methode verglichen, "
            "Verhältnisse auf der Log-Skala (Localio et al. 2007)"
            if compared
            else "",
            "Wie vertraut ein Profil den Daten ist, wurde an seinem Hebelwert gegen die der Zeilen "
            "und an ähnlichen Zeilen beurteilt (Montgomery et al. 2012, zu verdeckter "
            "Extrapolation)",
        ),
    )


@GERMAN.methods_note.register
def _(answer: PairAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    found = answer.interaction
    kinds = {0: "die Kreuzdifferenz", 1: "die Differenz der Steigungen"}
    kind = kinds.get(len(answer.sloped), "die gemischte Ableitung")
    on_chances = (
        f"Auf der Skala der Wahrscheinlichkeit ist die Wechselwirkung {kind} der "
        "Wahrscheinlichkeit, nicht der Koeffizient eines Produkts (Ai & Norton 2003)"
    )
    stretches = (
        "Wo ein Effekt sich von keinem unterscheidet, wurde an den Enden seines punktweisen "
        "Intervalls abgelesen (Johnson & Neyman 1936; Bauer & Curran 2005)"
    )
    return note(
        subject,
        (
            on_chances if found.at_profile is not None or found.averaged is not None else "",
            "Auf der Skala der Odds ist die Wechselwirkung das Verhältnis der Odds Ratios",
            others_made(subject, question.others, "die Wahrscheinlichkeiten", answer.counted),
            intervals_made(
                subject,
                question.level,
                "nach der Delta-Methode mit exakten Gradienten berechnet: der Differenzen auf "
                "ihrer eigenen Skala, der Verhältnisse auf der Log-Skala",
            ),
            "" if answer.effect.lower is None else stretches,
            _test(answer),
            *_joint(answer),
        ),
    )


def _test(answer: PairAnswer) -> str:
    test = answer.interaction.test
    if test is None:
        return ""
    kind = {"wald": "Wald", "likelihood_ratio": "Likelihood-Quotienten"}[test.kind]
    number = test.degrees_of_freedom
    terms = "des einen Terms, der" if number == 1 else f"aller {count(number)} Terme, die"
    verb = "verbindet" if number == 1 else "verbinden"
    return (
        f"Die Wechselwirkung wurde mit dem {kind}-Test {terms} die beiden Merkmale {verb}, geprüft"
    )


def _joint(answer: PairAnswer) -> list[str]:
    if answer.joint is None:
        return []
    told = [
        "Die gemeinsame Tafel folgt Knol & VanderWeele 2012; relatives Exzessrisiko, "
        "zuschreibbarer Anteil und Synergie-Index haben Intervalle der Delta-Methode (Hosmer & "
        "Lemeshow 1992)"
    ]
    if answer.joint.recoded:
        told.append(
            "Stufen wurden vertauscht, sodass die Verbindung mit den niedrigsten Odds die Referenz "
            "ist (Knol et al. 2011)"
        )
    return told
