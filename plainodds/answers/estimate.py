"""An estimate with its standard error and interval, as every answer holds it."""

from __future__ import annotations

import math

from plainodds.values import value

__all__ = ["UNKNOWN", "Estimate"]


@value
class Estimate:
    """A number with its uncertainty.

    Attributes
    ----------
    estimate : float
    se : float or None
        Standard error on the scale of the estimate.
    lower, upper : float or None
        Ends of the interval. All three are None where no interval can be had;
        the answer's `subject.no_interval` says why.
    """

    estimate: float
    se: float | None
    lower: float | None
    upper: float | None


UNKNOWN = Estimate(math.nan, None, None, None)
"""Of a quantity that the rows leave open."""
