"""How far model and data are apart, and whether chance alone may explain it, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.parts import because, gap
from plainodds.phrases.choices.checks import verdict_of
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import p_value, quantity

__all__ = ["IN_SAMPLE", "apart", "judged", "middle_gap"]

IN_SAMPLE = "shares here are those of the sample, whose rows were chosen by their outcome"


def apart(size: float) -> str:
    """Up to how far model and data are apart: "by up to 3.4 percentage points …"."""
    return f"by up to {gap(size)} in the middle 90% of rows"


def middle_gap() -> str:
    """What the largest gap is called among figures."""
    return message("Largest gap in the middle {} of rows", quantity(90, "%"))


def judged(size: float, p: float, finding: Finding, subject: Subject, bends: bool) -> str:
    """Whether a gap is more than chance explains, as far as a test can tell; follows `apart`.

    Parameters
    ----------
    size : float
    p : float
        nan where there is no test.
    finding : Finding
    subject : Subject
    bends : bool
        Whether the gap raised a concern.
    """
    test = "" if math.isnan(p) else f" (p-value {p_value(p)})"
    return {
        "more than chance": f", more than chance would explain{test}",
        "too little": f", too little to change an explanation{test}",
        "maybe chance": f", which chance alone may explain{test}",
        "not known": f"; whether that is more than chance is not known{because(finding.unknown)}",
        "nothing to test": "; the model leaves no other shape to test against",
    }[verdict_of(size, p, finding, subject, bends)]
