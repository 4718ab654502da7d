"""What the rows of a design tell of the coefficients, and what they leave open.

Where a column is an exact combination of others, a fit's coefficients are one choice of
many with the same likelihood. Only what is the same for all of them is estimable: a
linear function c'β whose c lies in the row space of the design. Source: Searle, Linear
Models, ch. 5.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from plainodds.model.design.design import Floats
from plainodds.model.products import product, transposed_product

__all__ = ["Estimable", "estimable"]

_BLOCK = 65_536
# a product X'X squares the ratio of the largest to the smallest: what it calls small is
# looked at again by its own linear predictor
_LOOK_AGAIN = 1e-8
_NOTHING = 1e-10
_NEGLIGIBLE = 1e-7


@dataclass(frozen=True, eq=False)
class Estimable:
    """Tells functions of the coefficients that the rows determine from those they leave open.

    Attributes
    ----------
    scale : array (k,)
        Length of each column of the design; 1 for a column of zeros.
    open : array (k, m)
        Orthonormal directions, in coefficients times `scale`, along which no row's
        linear predictor moves; m is 0 where the design has full rank.
    """

    scale: Floats
    open: Floats

    def determined(self, gradients: Floats) -> NDArray[np.bool_]:
        """Whether each function, by its gradient in the coefficients (m, k), is determined."""
        scaled = gradients / self.scale
        along = np.linalg.norm(scaled @ self.open, axis=1)
        return np.asarray(along <= _NEGLIGIBLE * np.linalg.norm(scaled, axis=1))


def estimable(matrix: Floats, weights: Floats | None) -> Estimable:
    """What a design matrix leaves open.

    Parameters
    ----------
    matrix : array (n, k)
    weights : array (n,) or None
        A row of weight 0 tells nothing.
    """
    k = matrix.shape[1]
    if not len(matrix):
        return Estimable(np.ones(k), np.empty((k, 0)))
    squares = _cross_product(matrix, weights, None)
    length = np.sqrt(np.diag(squares))
    scale = np.where(length > 0, length, 1.0)
    values, vectors = np.linalg.eigh(squares / np.outer(scale, scale))
    candidates = vectors[:, values <= _LOOK_AGAIN * values[-1]]
    if candidates.shape[1]:
        moved = _cross_product(matrix, weights, candidates / scale[:, None])
        values, vectors = np.linalg.eigh(moved)
        candidates = candidates @ vectors[:, np.sqrt(np.maximum(values, 0.0)) <= _NOTHING]
    return Estimable(scale, candidates)


def _cross_product(matrix: Floats, weights: Floats | None, directions: Floats | None) -> Floats:
    """X'X over the rows that have weight, or (XD)'XD for some directions D."""
    size = (matrix if directions is None else directions).shape[1]
    total = np.zeros((size, size))
    for start in range(0, len(matrix), _BLOCK):
        block = slice(start, start + _BLOCK)
        rows = matrix[block] if weights is None else matrix[block][weights[block] > 0]
        moved = rows if directions is None else product(rows, directions)
        total += transposed_product(moved, moved)
    return total
