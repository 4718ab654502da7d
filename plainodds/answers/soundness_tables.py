"""What was looked at in a fit, as a table."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import fields, is_dataclass

import pandas as pd

from plainodds.answers.checks.finding import Evidence
from plainodds.answers.estimate import Estimate
from plainodds.answers.soundness import SoundnessAnswer

__all__ = ["findings_table"]


def findings_table(answer: SoundnessAnswer) -> pd.DataFrame:
    """One row for each finding.

    Parameters
    ----------
    answer : SoundnessAnswer

    Returns
    -------
    DataFrame
        `topic`, `concern`, the predictors it is `about`, its `reasons`, its main `figures`
        as text, and why something is `unknown`.
    """
    rows = [
        {
            "topic": found.topic,
            "concern": found.concern,
            "about": ", ".join(found.about),
            "reasons": ", ".join(found.reasons),
            "figures": ", ".join(f"{name} = {held}" for name, held in _figures(found.evidence)),
            "unknown": found.unknown,
        }
        for found in answer.findings
    ]
    return pd.DataFrame(rows)


def _figures(evidence: Evidence | None) -> Iterator[tuple[str, str]]:
    """Whatever of the evidence is a single figure; curves, bins and lists are left out."""
    if not is_dataclass(evidence):
        return
    for field in fields(evidence):
        held = getattr(evidence, field.name)
        if isinstance(held, Estimate):
            ends = "" if held.lower is None else f" ({held.lower:.4g} to {held.upper:.4g})"
            yield field.name, f"{held.estimate:.4g}{ends}"
        elif isinstance(held, float):
            yield field.name, f"{held:.4g}"
        elif isinstance(held, bool | int | str) and held != "":
            yield field.name, str(held)
