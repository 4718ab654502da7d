"""The cautions that are due where a wrong reading can hurt somebody."""

from __future__ import annotations

from plainodds.model.predictors import OutcomeFacts, Stakes
from plainodds.phrases.units import tidy

__all__ = ["stakes_cautions"]

_DECISIONS: dict[Stakes, str] = {
    "health": (
        "Decisions about anybody's care belong to licensed practitioners, with the person "
        "concerned and by the rules that hold where they are; these figures can inform them and "
        "replace none of them."
    ),
    "safety": (
        "What must be inspected, repaired or shut down is decided by the standards and the "
        "licensed engineers responsible where this is used; a low chance is no clearance."
    ),
    "money": (
        "Decisions on credit, insurance or prices are bound by the law that holds where they are "
        "made, also on which predictors may be used at all; these figures are no advice."
    ),
    "rights": (
        "Decisions about anybody's liberty, work, schooling or benefits are bound by the law that "
        "holds where they are made, and owe that person a hearing; these figures cannot decide."
    ),
}


def stakes_cautions(outcome: OutcomeFacts) -> tuple[str, ...]:
    """What must be said of groups and individuals, and of who decides; empty without stakes."""
    if outcome.stakes is None:
        return ()
    cases = tidy(outcome.cases)
    return (
        f"A chance speaks of many {cases} alike: how many of them, never which. For a single "
        f"{tidy(outcome.case)} much may matter that the model does not know.",
        _DECISIONS[outcome.stakes],
    )
