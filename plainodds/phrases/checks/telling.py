"""A finding by itself, in the language of now, for pictures and tables."""

from __future__ import annotations

from typing import cast

from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import FindingWords, finding_words
from plainodds.phrases.languages import language_now
from plainodds.phrases.lexicon import lexicon

__all__ = ["told_finding"]


def told_finding(finding: Finding, subject: Subject, level: float) -> FindingWords:
    """Say a finding in the language spoken now; in English where that has no words for it.

    Parameters
    ----------
    finding : Finding
    subject : Subject
    level : float
        Of the intervals that the finding's evidence holds.
    """
    language = language_now()
    way = language.finding_words.of(finding)
    # where a language is asked for but not spoken, all around these words is English
    if way is None or lexicon() is not language.lexicon:
        return finding_words(finding, subject, level)
    return cast(FindingWords, way(finding, subject, level))
