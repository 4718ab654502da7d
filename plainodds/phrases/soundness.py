"""Whether a fit is fit to be explained, in words."""

from __future__ import annotations

from plainodds.answers.checks.finding import Finding
from plainodds.answers.soundness import SoundnessAnswer, shown_finding
from plainodds.phrases.alternative import alternative
from plainodds.phrases.checks import FindingWords, finding_words
from plainodds.phrases.checks.discrimination import C_LIMITS
from plainodds.phrases.checks.headings import concern_label
from plainodds.phrases.checks.overall import overall_limits
from plainodds.phrases.checks.pictures import picture_words
from plainodds.phrases.checks.plainly import plain_sentences
from plainodds.phrases.choices.checks import findings_told, how_many
from plainodds.phrases.labels import listed, sentence_case
from plainodds.phrases.numbers import count
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence

__all__ = ["summary"]

_LOOKED_AT = (
    "A check that finds nothing says only that these data do not show it; whether the predictors "
    "are the right ones, and how cases came to be in the data, no check can tell."
)


@words.register
def _(answer: SoundnessAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def summary(answer: SoundnessAnswer) -> str:
    """Whether to explain the fit, in one sentence.

    Returns
    -------
    str
        "Of 13 checks, 1 needs keeping in mind and 1 could not be made; nothing that was
        looked at speaks against explaining this fit."
    """
    every, heavy = len(answer.findings), how_many(answer, "don't explain yet")
    mind, unknown = how_many(answer, "keep in mind"), how_many(answer, "not known")
    if every == unknown:
        return "None of the checks could be made, so whether to explain this fit is not known."
    others = []
    if mind:
        others.append(f"{count(mind)} {'needs' if mind == 1 else 'need'} keeping in mind")
    if unknown:
        others.append(f"{count(unknown)} could not be told")
    of = f"of {count(every)} {'check' if every == 1 else 'checks'}"
    if heavy:
        against = f"{count(heavy)} {'speaks' if heavy == 1 else 'speak'} against it"
        return sentence(f"this fit should not be explained yet: {of}, {listed([against, *others])}")
    nothing = "nothing that was looked at speaks against explaining this fit"
    if others:
        return sentence(f"{of}, {listed(others)}; {nothing}")
    return sentence(f"{of}, all found nothing to keep in mind; {nothing}")


def _plain(answer: SoundnessAnswer) -> Words:
    shown, left = findings_told(answer)
    told = [summary(answer)]
    for each in shown:
        told += plain_sentences(each, answer.subject, answer.question.level)
    if left > 0:
        more = "1 more finding is" if left == 1 else f"{count(left)} more findings are"
        told.append(f"{more} told in the words for analysts.")
    return Words(tuple(told), (_LOOKED_AT, *_notices(answer)))


def _technical(answer: SoundnessAnswer) -> Words:
    told = [summary(answer)]
    for each in answer.findings:
        said = _said(answer, each)
        lead = f"{said.heading} ({concern_label(each.concern)})"
        told.append(f"{sentence_case(lead)}: {said.what}")
        if each.weight:
            told += [said.why, said.next_step]
    reported = {each.topic for each in answer.findings if each.evidence is not None}
    limits: tuple[str, ...] = overall_limits() if "overall" in reported else ()
    limits += (C_LIMITS,) if "discrimination" in reported else ()
    return Words(tuple(told), (*limits, _LOOKED_AT, *_notices(answer)))


def _said(answer: SoundnessAnswer, finding: Finding) -> FindingWords:
    return finding_words(finding, answer.subject, answer.question.level)


def _notices(answer: SoundnessAnswer) -> tuple[str, ...]:
    return tuple(sentence(notice) for notice in answer.subject.notices)


@alternative.register
def _(answer: SoundnessAnswer) -> str:
    return picture_words(shown_finding(answer), answer.subject, answer.question.level)
