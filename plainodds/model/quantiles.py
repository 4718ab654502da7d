"""Weighted quantiles: the same for rows with weights and for rows written out."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np
from numpy.typing import NDArray

__all__ = ["weighted_quantiles"]


def weighted_quantiles(
    values: NDArray[np.float64], weights: NDArray[np.float64] | None, shares: Sequence[float]
) -> tuple[float, ...]:
    """Quantiles by the averaged inverse of the weighted distribution function.

    Without weights the median is the textbook's: the middle value, or the mean of the
    middle two. Source: Hyndman & Fan 1996 (Am Stat 50:361), definition 2.

    Parameters
    ----------
    values : array (n,)
    weights : array (n,) or None
        At least one above 0.
    shares : sequence of float in [0, 1]

    Examples
    --------
    >>> weighted_quantiles(np.array([1.0, 2.0, 9.0]), np.array([1.0, 1.0, 2.0]), (0.5,))
    (5.5,)
    """
    if weights is None:
        return tuple(float(q) for q in np.quantile(values, shares, method="averaged_inverted_cdf"))
    order = np.argsort(values, kind="stable")
    order = order[weights[order] > 0]
    ordered, cumulated = values[order], np.cumsum(weights[order])
    found = []
    for share in shares:
        target, slack = share * cumulated[-1], 1e-12 * cumulated[-1]
        place = min(int(np.searchsorted(cumulated, target - slack)), len(ordered) - 1)
        # where the weights so far are exactly the share, the next value has as good a claim
        following = place + 1 if abs(cumulated[place] - target) <= slack else place
        following = min(following, len(ordered) - 1)
        found.append(float((ordered[place] + ordered[following]) / 2))
    return tuple(found)
