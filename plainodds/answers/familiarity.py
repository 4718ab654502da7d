"""How familiar a profile is to the data, so that nobody trusts an answer from nowhere."""

from __future__ import annotations

from typing import Literal

import numpy as np
from numpy.typing import NDArray

from plainodds.model.fitted import FittedModel, code_values
from plainodds.values import Pairs, Scalar, value

__all__ = ["Familiarity", "familiarity_of"]

# half a standard deviation either way counts as alike: common practice, no source
_ALIKE = 0.5


@value
class Familiarity:
    """How familiar a profile is to the data.

    Attributes
    ----------
    leverage : float
        x₀'(X'WX)⁻¹x₀ of the profile.
    common_leverage, largest_leverage : float
        99th percentile and largest leverage among the rows; nan where the model
        carries no rows.
    rows_alike : int
        Rows of the same levels, each number within half a standard deviation.
    beyond : tuple of str
        Predictors whose value lies outside the data's range.
    verdict : {"familiar", "rare", "beyond"}
        "beyond" where a value is outside the range or the leverage is larger than
        every row's; "rare" where no row is alike or the leverage is above the 99th
        percentile.
    """

    leverage: float
    common_leverage: float
    largest_leverage: float
    rows_alike: int
    beyond: tuple[str, ...]
    verdict: Literal["familiar", "rare", "beyond"]


def familiarity_of(model: FittedModel, values: Pairs, row: NDArray[np.float64]) -> Familiarity:
    """Compare a profile with the rows that the fit used.

    The leverage x₀'(X'WX)⁻¹x₀ finds hidden extrapolation: a combination that no row
    comes near although each value is within its own range. Source: Montgomery, Peck &
    Vining, Introduction to Linear Regression Analysis, on hidden extrapolation.

    Parameters
    ----------
    model : FittedModel
    values : pairs
        The whole profile.
    row : array (k,)
        Its design row.
    """
    leverage = float(row @ model.information_inverse @ row)
    common, largest = model.leverage_quantiles
    alike = _rows_alike(model, values)
    beyond = tuple(name for name, held in values if _is_beyond(model, name, held))
    verdict: Literal["familiar", "rare", "beyond"] = "familiar"
    # a hair of slack, so that a row of the data is never beyond itself
    if beyond or leverage > largest * (1 + 1e-9):
        verdict = "beyond"
    elif alike == 0 or leverage > common * (1 + 1e-9):
        verdict = "rare"
    return Familiarity(leverage, common, largest, alike, beyond, verdict)


def _rows_alike(model: FittedModel, values: Pairs) -> int:
    alike = np.ones(model.sample.rows, dtype=bool)
    for name, held in values:
        facts = model.subject.predictor(name)
        column = model.sample.columns[name]
        code = code_values(facts, [held])[0]
        if facts.is_number:
            alike &= np.abs(column - code) <= _ALIKE * model.standard_deviations[name]
        else:
            alike &= column == code
    return int(alike.sum())


def _is_beyond(model: FittedModel, name: str, held: Scalar) -> bool:
    facts = model.subject.predictor(name)
    if facts.is_number:
        return not facts.minimum <= float(held) <= facts.maximum
    return facts.level_counts[facts.levels.index(held)] == 0
