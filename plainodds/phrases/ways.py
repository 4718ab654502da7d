"""How the estimates of a curve are spoken of on each scale."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from plainodds.answers.curve import CurveLine, Scale
from plainodds.answers.estimate import Estimate
from plainodds.phrases.numbers import chance, percentage_points, ratio, signed
from plainodds.phrases.parts import (
    chance_with_interval,
    difference_with_interval,
    ratio_with_interval,
    signed_with_interval,
)

__all__ = ["Way", "estimate_at", "way_of"]


@dataclass(frozen=True)
class Way:
    """How estimates on one scale are spoken of.

    Attributes
    ----------
    noun : str
        What is estimated, to stand before "of" and the event.
    plural : bool
        Whether the noun is a plural.
    bare : callable
        Writes the estimate alone.
    told : callable
        Writes the estimate with its interval at a confidence level.
    se : callable
        Writes the standard error.
    """

    noun: str
    plural: bool
    bare: Callable[[float], str]
    told: Callable[[Estimate, float], str]
    se: Callable[[float], str]


def _unsigned(number: float) -> str:
    return signed(number).removeprefix("+")


_WAYS: dict[Scale, Way] = {
    "probability": Way("chance", False, chance, chance_with_interval, percentage_points),
    "odds": Way("odds", True, ratio, ratio_with_interval, _unsigned),
    "linear_predictor": Way("log odds", True, signed, signed_with_interval, _unsigned),
    "slope": Way("chance", False, percentage_points, difference_with_interval, percentage_points),
}


def way_of(scale: Scale) -> Way:
    """How estimates on this scale are spoken of."""
    return _WAYS[scale]


def estimate_at(line: CurveLine, place: int) -> Estimate:
    """One point of a line."""
    return Estimate(
        line.estimate[place],
        None if line.se is None else line.se[place],
        None if line.lower is None else line.lower[place],
        None if line.upper is None else line.upper[place],
    )
