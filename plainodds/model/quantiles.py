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
    shares : sequence of float in [0, 1]
    """
    if weights is None:
        return tuple(float(q) for q in np.quantile(values, shares, method="averaged_inverted_cdf"))
    order = np.argsort(values, kind="stable")
    ordered, cumulated = values[order], np.cumsum(weights[order])
    found = []
    for share in shares:
        target = share * cumulated[-1]
        place = min(int(np.searchsorted(cumulated, target * (1 - 1e-12))), len(ordered) - 1)
        following = min(place + 1, len(ordered) - 1)
        ends_here = abs(cumulated[place] - target) <= 1e-12 * cumulated[-1]
        found.append(
            float((ordered[place] + ordered[following]) / 2 if ends_here else ordered[place])
        )
    return tuple(found)
