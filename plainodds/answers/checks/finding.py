"""What a check finds: how much it weighs, and its evidence."""

from __future__ import annotations

from typing import ClassVar, Literal, TypeAlias

from plainodds.values import value

__all__ = ["CONCERNS", "TOPICS", "Concern", "Evidence", "Finding", "Topic", "Unknown"]

Concern: TypeAlias = Literal["nothing found", "not known", "keep in mind", "don't explain yet"]
"""How much a finding weighs, for whoever is about to explain the fit."""

CONCERNS: tuple[Concern, ...] = ("nothing found", "not known", "keep in mind", "don't explain yet")
"""From the lightest to the heaviest."""

Topic: TypeAlias = Literal[
    "convergence",
    "collinearity",
    "standard errors",
    "separation",
    "amount",
    "levels",
    "missing",
    "shape",
    "calibration",
    "discrimination",
    "influence",
    "dependence",
    "overall",
]

TOPICS: tuple[Topic, ...] = (
    "convergence",
    "separation",
    "collinearity",
    "standard errors",
    "amount",
    "levels",
    "missing",
    "shape",
    "calibration",
    "influence",
    "dependence",
    "discrimination",
    "overall",
)
"""In the order in which findings of the same weight are told."""

Unknown: TypeAlias = Literal[
    "",
    "no rows",
    "no outcome",
    "no covariance",
    "no likelihood",
    "no groups named",
    "not said by the fit",
    "rows chosen by outcome",
    "too few rows",
    "single rows",
]
"""Why nothing can be known; empty where something is."""


class Evidence:
    """The figures behind a finding: an immutable value, one class for each topic."""

    topic: ClassVar[Topic]


@value
class Finding:
    """What one check found.

    Attributes
    ----------
    topic : Topic
    concern : Concern
    reasons : tuple of str
        What raised the concern, as words of the topic's own (listed in the topic's
        module as `REASONS`); empty where nothing was found.
    about : tuple of str
        The predictors that it names.
    evidence : Evidence or None
        None where nothing can be known.
    unknown : Unknown
        Why nothing, or not everything, can be known.
    """

    topic: Topic
    concern: Concern
    reasons: tuple[str, ...] = ()
    about: tuple[str, ...] = ()
    evidence: Evidence | None = None
    unknown: Unknown = ""

    @property
    def weight(self) -> int:
        """Larger is heavier."""
        return CONCERNS.index(self.concern)
