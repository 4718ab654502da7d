"""Captions of what was looked at in a fit."""

from __future__ import annotations

from plainodds.answers.soundness import SoundnessAnswer, shown_finding
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words
from plainodds.phrases.checks.headings import concern_label, finding_heading
from plainodds.phrases.sentences import joined

__all__: list[str] = []


@caption.register
def _(answer: SoundnessAnswer) -> str:
    finding = shown_finding(answer)
    return joined(
        f"{finding_heading(finding, answer.subject)} ({concern_label(finding.concern)})",
        alternative(answer),
        fitted_words(answer.subject),
    )
