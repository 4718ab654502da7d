"""What the columns of tables have in common."""

from __future__ import annotations

from plainodds.answers.estimate import Estimate
from plainodds.values import Pairs

__all__ = ["numbers", "written"]


def numbers(estimate: Estimate) -> dict[str, float]:
    """An estimate's four columns; NaN where no interval can be had."""

    def or_nan(number: float | None) -> float:
        return float("nan") if number is None else number

    return {
        "estimate": estimate.estimate,
        "se": or_nan(estimate.se),
        "lower": or_nan(estimate.lower),
        "upper": or_nan(estimate.upper),
    }


def written(values: Pairs) -> str:
    """Values of several predictors in one cell."""
    return ", ".join(f"{name} = {held}" for name, held in values)
