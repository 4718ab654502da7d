"""What questions at a held profile have in common."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from typing import Any

from plainodds.answers.curve import Others
from plainodds.answers.drawn import Sampling
from plainodds.answers.population import Averages
from plainodds.answers.where import Where
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.scales import probability_from_linear_predictor, probability_slope
from plainodds.values import Pairs, Scalar

__all__ = ["held_probabilities", "stated_values"]


def stated_values(others: Others, where: Where, sample: Sampling) -> dict[str, Any]:
    """The values that `others=` states for a profile; what it leaves out is typical.

    Raises
    ------
    QuestionRefused
        If `others` is no such thing, or rows are spoken of where none are averaged over.
    """
    if isinstance(others, str) and others != "typical":
        raise QuestionRefused(
            f"others={others!r}: choose 'observed', 'typical' or a mapping of values."
        )
    if where is not None:
        raise QuestionRefused("where= chooses rows to average over; it needs others='observed'.")
    if sample != "fixed":
        raise QuestionRefused(
            f"sample={sample!r} is about rows averaged over; at a profile there are none. Ask "
            "others='observed', or leave sample out."
        )
    return {} if isinstance(others, str) else dict(others)


def held_probabilities(
    model: FittedModel, profiles: Sequence[Mapping[str, Scalar] | Pairs]
) -> Averages:
    """The probability at each profile with its gradient, as an average of one would be."""
    rows = model.rows([model.completed(profile) for profile in profiles])
    pi = probability_from_linear_predictor(rows @ model.coefficients + model.offset)
    return Averages(pi, probability_slope(pi)[:, None] * rows)
