"""Whether a fit is fit to be explained, in German."""

from __future__ import annotations

from plainodds.answers.soundness import SoundnessAnswer, shown_finding
from plainodds.phrases.checks.headings import concern_label, finding_heading
from plainodds.phrases.checks.overall import overall_limits
from plainodds.phrases.choices.checks import findings_told, how_many
from plainodds.phrases.german.checks.finding_words import finding_words
from plainodds.phrases.german.checks.pictures import picture_words
from plainodds.phrases.german.checks.plainly import plain_sentences
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.parts import handed_on
from plainodds.phrases.german.texts import fitted
from plainodds.phrases.labels import listed
from plainodds.phrases.numbers import count
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence

__all__: list[str] = []

_LOOKED_AT = (
    "Eine Prüfung, die nichts findet, sagt nur, dass diese Daten es nicht zeigen; ob die Merkmale "
    "die richtigen sind und wie Fälle in die Daten kamen, kann keine Prüfung sagen."
)
_C_LIMITS = (
    "Das Maß c sagt, wie oft ein Fall mit dem Ereignis höher eingestuft wird als einer ohne es; es "
    "sagt nichts darüber, ob die Wahrscheinlichkeiten zutreffen, und ein richtiges Modell für "
    "etwas schwer Vorhersagbares hat ein niedriges."
)


@GERMAN.words.register
def _(answer: SoundnessAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _summary(answer: SoundnessAnswer) -> str:
    """Whether to explain the fit, in one sentence."""
    every, heavy = len(answer.findings), how_many(answer, "don't explain yet")
    mind, unknown = how_many(answer, "keep in mind"), how_many(answer, "not known")
    if every == unknown:
        return (
            "Keine der Prüfungen war möglich, daher ist nicht bekannt, ob diese Anpassung erklärt "
            "werden sollte."
        )
    others = []
    if mind:
        others.append(f"{count(mind)} {'ist' if mind == 1 else 'sind'} zu bedenken")
    if unknown:
        others.append(f"{count(unknown)} {'blieb' if unknown == 1 else 'blieben'} offen")
    of = f"von {count(every)} {'Prüfung' if every == 1 else 'Prüfungen'}"
    if heavy:
        against = f"{count(heavy)} {'spricht' if heavy == 1 else 'sprechen'} dagegen"
        told = "diese Anpassung sollte noch nicht erklärt werden"
        return sentence(f"{told}; {of}: {listed([against, *others])}")
    nothing = "nichts, was geprüft wurde, spricht dagegen, diese Anpassung zu erklären"
    if others:
        return sentence(f"{of}: {listed(others)}; {nothing}")
    return sentence(f"{of}: bei allen nichts zu bedenken; {nothing}")


def _plain(answer: SoundnessAnswer) -> Words:
    shown, left = findings_told(answer)
    told = [_summary(answer)]
    for each in shown:
        told += plain_sentences(each, answer.subject, answer.question.level)
    if left > 0:
        more = "1 weiterer Befund steht"
        if left > 1:
            more = f"{count(left)} weitere Befunde stehen"
        told.append(f"{more} in den Worten für Auswertende.")
    return Words(tuple(told), (_LOOKED_AT, *_notices(answer)))


def _technical(answer: SoundnessAnswer) -> Words:
    told = [_summary(answer)]
    for each in answer.findings:
        said = finding_words(each, answer.subject, answer.question.level)
        told.append(f"{said.heading} ({concern_label(each.concern)}): {said.what}")
        if each.weight:
            told += [said.why, said.next_step]
    reported = {each.topic for each in answer.findings if each.evidence is not None}
    limits = overall_limits() if "overall" in reported else ()
    c_limits = (_C_LIMITS,) if "discrimination" in reported else ()
    return Words(tuple(told), (*limits, *c_limits, _LOOKED_AT, *_notices(answer)))


def _notices(answer: SoundnessAnswer) -> tuple[str, ...]:
    return tuple(map(handed_on, answer.subject.notices))


@GERMAN.alternative.register
def _(answer: SoundnessAnswer) -> str:
    return picture_words(shown_finding(answer), answer.subject, answer.question.level)


@GERMAN.caption.register
def _(answer: SoundnessAnswer) -> str:
    finding = shown_finding(answer)
    level = answer.question.level
    return joined(
        f"{finding_heading(finding, answer.subject)} ({concern_label(finding.concern)})",
        picture_words(finding, answer.subject, level),
        fitted(answer.subject),
    )
