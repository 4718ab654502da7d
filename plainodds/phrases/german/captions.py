"""What stands beneath figures, in German, for each kind of answer."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.pair import PairAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.phrases.german.curve import averaged_in_curve, curve_title
from plainodds.phrases.german.effects import effects_title
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.pair_labels import followed, left_out, title
from plainodds.phrases.german.parts import EVERYTHING, cases, chance, event, whom
from plainodds.phrases.german.texts import fitted, intervals_shown, rest
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.moves import moves_words, settled_moves
from plainodds.phrases.odds_lines import odds_lines
from plainodds.phrases.pair_labels import has_others
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__: list[str] = []


@GERMAN.caption.register
def _(answer: ChangeAnswer) -> str:
    question, subject = answer.question, answer.subject
    noun = chance(subject.outcome, averaged=question.others == "observed")
    return joined(
        f"{noun} mit {moves_words(subject, settled_moves(answer))}",
        intervals_shown(
            subject, question.level, "Punkte sind Schätzungen; Linien, Band und Klammer sind"
        ),
        rest(
            subject,
            question.others,
            answer.held,
            "die Wahrscheinlichkeiten",
            answer.counted,
            question.where,
        ),
        "Darunter: dieselben Wahrscheinlichkeiten als Zeichen; die sich unterscheiden, sind durch "
        "ihre Form abgesetzt",
        fitted(subject),
    )


@GERMAN.caption.register
def _(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    by = ""
    if question.by is not None:
        by = f", je nach {predictor_name(subject.predictor(question.by))}"
    marks = "Linien sind Schätzungen, Bänder" if facts.is_number else "Punkte sind Schätzungen, "
    marks += "" if facts.is_number else "Linien"
    many = cases(subject.outcome)
    unsupported = beneath = ""
    if facts.is_number:
        beneath = f"Darunter: wo die {many} der Daten liegen"
    if not all(all(line.supported) for line in answer.lines):
        unsupported = f"Offene Punkte stehen für Stufen, die keine {many} der Daten haben"
        if facts.is_number:
            unsupported = f"Wo eine Linie gestrichelt ist, haben die Daten wenige {many} oder keine"
    return joined(
        f"{curve_title(answer)}, entlang {predictor_name(facts)}{by}",
        intervals_shown(subject, question.level, marks),
        _rest(answer),
        unsupported,
        beneath,
        fitted(subject),
    )


def _rest(answer: CurveAnswer) -> str:
    question, subject = answer.question, answer.subject
    shown = {question.predictor, question.by}
    if all(facts.name in shown for facts in subject.predictors):
        return ""
    return rest(
        subject, question.others, answer.held, averaged_in_curve(question.scale), subject.rows
    )


@GERMAN.caption.register
def _(answer: EffectsAnswer) -> str:
    question, subject = answer.question, answer.subject
    by = ""
    if question.by is not None:
        by = f", je nach {predictor_name(subject.predictor(question.by))}"
    drawn = question.sample == "drawn" and not subject.no_interval
    return joined(
        f"Änderung {effects_title(answer)} in Prozentpunkten, die mit jedem Merkmal einhergeht{by}",
        intervals_shown(subject, question.level, "Punkte sind Schätzungen, Linien ihre"),
        "Bei 0 ändert sich die Wahrscheinlichkeit nicht",
        rest(
            subject,
            question.others,
            answer.held,
            "die Änderungen",
            sum(answer.counted),
            question.where,
        ),
        "Intervalle berücksichtigen auch, dass die Zeilen aus einer größeren Grundgesamtheit "
        "gezogen sind"
        if drawn
        else "",
        fitted(subject),
    )


def _printed(answer: OddsAnswer) -> tuple[str, ...]:
    """What stands in the printed table and in no other layout."""
    if answer.question.layout != "table":
        return ()
    counts = [line.counts for line in odds_lines(answer) if line.counts is not None]
    events = "Ereignisse und " if any(each.events is not None for each in counts) else ""
    cases = tidy(answer.subject.outcome.cases)
    return (
        f"Neben jeder Stufe gezählt: {events}{cases}" if counts else "",
        "Wechselwirkungen sind mit allen Termen geprüft, die zwei Merkmale teilen"
        if answer.interactions
        else "",
    )


@GERMAN.caption.register
def _(answer: OddsAnswer) -> str:
    question, subject = answer.question, answer.subject
    models = ""
    if question.models:
        names = listed([f"„{tidy(name)}“" for name in question.models])
        models = f"Modelle nebeneinander: {names}, unterschieden durch ihre Zeichen"
    kind = "aus der Profil-Likelihood" if question.interval == "likelihood" else "(Wald)"
    intervals = intervals_shown(subject, question.level, "Punkte sind Schätzungen, Linien ihre")
    given = ""
    if any(row.given for row in answer.rows):
        given = (
            "Hängt ein Chancenverhältnis von einem anderen Merkmal ab, so gilt es für die "
            "genannten Werte"
        )
    return joined(
        f"Chancenverhältnisse (Odds Ratios) für {event(subject.outcome)}, jedes für die Änderung, "
        "die daneben steht",
        intervals if subject.no_interval else f"{intervals} {kind}",
        "Die Achse ist logarithmisch; bei 1 ist die Chance (Odds) vor und nach der Änderung gleich",
        *_printed(answer),
        given,
        models,
        fitted(subject),
    )


@GERMAN.caption.register
def _(answer: ProfileAnswer) -> str:
    question, subject = answer.question, answer.subject
    told = _stated(answer, question.values)
    if question.against is not None:
        told = f"{told}, verglichen mit {_stated(answer, question.against, 'einem')}"
    return joined(
        f"{chance(subject.outcome)} für {told}",
        "Oben: linearer Prädiktor, Chance (Odds) und Wahrscheinlichkeit auf drei aneinander "
        "ausgerichteten Skalen, sodass sich jede aus den anderen ablesen lässt",
        intervals_shown(subject, question.level, "Zeiger sind Schätzungen, Bänder"),
        "Unten: was jedes Merkmal zum linearen Prädiktor beiträgt, und die bis dahin erreichte "
        "Wahrscheinlichkeit",
        fitted(subject),
    )


def _stated(answer: ProfileAnswer, values: Pairs, article: str = "einen") -> str:
    whole = len(values) == len(answer.subject.predictors)
    return whom(answer.subject, values, whole=whole, article=article, at_most=EVERYTHING)


@GERMAN.caption.register
def _(answer: PairAnswer) -> str:
    question, subject = answer.question, answer.subject
    a, b = (predictor_name(subject.predictor(name)) for name in (question.a, question.b))
    held = ""
    if has_others(answer):
        averaged = "die Wahrscheinlichkeiten"
        held = rest(subject, question.others, answer.held, averaged, answer.counted)
    intervals = intervals_shown(
        subject, question.level, "Linien und Punkte sind Schätzungen, Bänder und Balken"
    )
    if answer.lines is None and answer.surface is None:
        shown = (f"Das Odds Ratio von {a} entlang {b}", "Darunter: das Verhältnis der Odds Ratios")
    else:
        both = "beide zusammen"
        if answer.surface is not None:
            both = "eine Karte beider, mit Linien gleicher Wahrscheinlichkeit"
        measure = "das Odds Ratio" if question.scale == "odds" else "die Änderung"
        shown = (
            f"Zuerst {both}; dann, entlang {b}, {measure} zu: {followed(answer)}",
            "Zuletzt die Wechselwirkung selbst: auf der Skala der Wahrscheinlichkeit als Differenz "
            "von Differenzen, auf der Skala der Odds als Verhältnis der Odds Ratios",
        )
    return joined(
        title(answer), *shown, intervals, held, *left_out(answer), _nobody(answer), fitted(subject)
    )


def _nobody(answer: PairAnswer) -> str:
    """How the picture marks where there are no data."""
    many = cases(answer.subject.outcome)
    if answer.surface is not None:
        return f"Wo die Karte schraffiert ist, haben die Daten keine {many} in der Nähe"
    lines = () if answer.lines is None else answer.lines.lines
    if all(all(line.supported) for line in lines) and all(answer.effect.supported):
        return ""
    return (
        f"Wo eine Linie unterbrochen oder ein Punkt offen ist, haben die Daten wenige {many} oder "
        "keine"
    )
