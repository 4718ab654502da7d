"""What each check finds, in words: one module for each topic."""

# each topic registers its words when it is imported
from plainodds.phrases.checks import (  # noqa: F401
    amount,
    calibration,
    collinearity,
    convergence,
    dependence,
    discrimination,
    influence,
    levels,
    missing,
    overall,
    separation,
    shape,
    standard_errors,
)
from plainodds.phrases.checks.finding_words import FindingWords, finding_figures, finding_words

__all__ = ["FindingWords", "finding_figures", "finding_words"]
