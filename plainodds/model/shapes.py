"""How the linear predictor depends on a predictor: with which others, how straight, how far."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping

import numpy as np

from plainodds.errors import QuestionRefused
from plainodds.model.design.design import Coded, Design

__all__ = ["allowed_range", "is_linear", "shares_terms_with"]

_POINTS = 33
_ROUNDING = np.finfo(float).eps


def shares_terms_with(design: Design) -> Mapping[str, tuple[str, ...]]:
    """For each raw predictor, the others that stand in a column together with it."""
    order = design.variables
    together: dict[str, set[str]] = {name: set() for name in order}
    for column in design.columns:
        names = design.variables_of(column)
        for name in names:
            together[name] |= names - {name}
    return {name: tuple(n for n in order if n in together[name]) for name in order}


def is_linear(design: Design, name: str, low: float, high: float, at: Coded) -> bool:
    """Whether every column is a straight line in a number, everything else held.

    Parameters
    ----------
    design : Design
    name : str
    low, high : float
        The data's range.
    at : coded rows
        Values, each of shape (m,), at which the other predictors of a factor are held.
    """
    grid = np.linspace(low, high, _POINTS)
    for i in design.touched([name]):
        column = design.columns[i]
        moving = [atom for atom in column.atoms if name in design.factors[atom[0]].variables]
        if len(moving) > 1:
            return False
        position, k = moving[0]
        factor = design.factors[position]
        if factor.name == name:
            continue
        m = len(at[name]) if len(factor.variables) > 1 else 1
        coded = {other: np.repeat(at[other][:m], _POINTS) for other in factor.variables}
        try:
            values = design.factor_values(position, {**coded, name: np.tile(grid, m)})[:, k]
        except QuestionRefused:
            # a pole within the range, as 1/x has at 0
            return False
        bend = np.abs(np.diff(values.reshape(m, _POINTS), 2, axis=1)).max()
        if bend > 1e-9 * np.ptp(values) + 8 * _ROUNDING * np.abs(values).max():
            return False
    return True


def allowed_range(design: Design, name: str, low: float, high: float) -> tuple[float, float]:
    """The range over which the formula can be computed, found by trying.

    A spline's basis ends at its boundary knots, a logarithm at zero. Factors that read
    other predictors too have no range of their own: they are tried when they are asked.
    """
    positions = [
        p
        for p, factor in enumerate(design.factors)
        if factor.variables == {name} and factor.name != name
    ]
    if not positions:
        return -math.inf, math.inf

    def works(x: float) -> bool:
        try:
            for position in positions:
                design.factor_values(position, {name: np.array([x])})
        except QuestionRefused:
            return False
        return True

    spread = (high - low) or 1.0
    return _edge(works, low, -spread), _edge(works, high, spread)


def _edge(works: Callable[[float], bool], end: float, spread: float) -> float:
    """How far beyond an end of the data, in the direction of `spread`, a function works."""
    outside, hair = end + 10 * spread, 1e-9 * spread
    if works(outside):
        return math.copysign(math.inf, spread)
    if not works(end + hair):
        return end
    inside = end
    # zero is where most functions end, and trying it spares the search
    if min(inside, outside) < 0 < max(inside, outside):
        inside, outside = (-hair, outside) if works(-hair) else (inside, -hair)
        inside, outside = (hair, outside) if works(hair) else (inside, hair)
    while abs(outside - inside) > 2.5 * abs(hair):
        middle = (inside + outside) / 2
        inside, outside = (middle, outside) if works(middle) else (inside, middle)
    # the bound itself may work, as 0 does for a square root
    bound = float(f"{(inside + outside) / 2:.8g}")
    return bound if works(bound) else inside
