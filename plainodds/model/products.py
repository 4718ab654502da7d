"""Matrix products of long, narrow arrays, in pieces for which no threads are started.

A threaded product of a small block waits for the slowest core. On a machine whose
cores are busy with a kernel, a browser and other kernels that costs far more than the
threads gain: in pieces it was between as fast and a hundred times as fast.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

__all__ = ["product", "transposed_product"]

Floats = NDArray[np.float64]

# OpenBLAS starts no threads for a product of up to 262,144 multiplications
_UNTHREADED = 262_144


def product(rows: Floats, matrix: Floats) -> Floats:
    """rows @ matrix, for rows of shape (n, a) and a matrix of shape (a, b)."""
    piece = _piece(matrix.size)
    whole = len(rows) // piece * piece
    result = np.empty((len(rows), matrix.shape[1]))
    np.matmul(_stacked(rows[:whole], piece), matrix, out=_stacked(result[:whole], piece))
    np.matmul(rows[whole:], matrix, out=result[whole:])
    return result


def transposed_product(one: Floats, other: Floats) -> Floats:
    """one.T @ other, for arrays of shape (n, a) and (n, b)."""
    piece = _piece(one.shape[1] * other.shape[1])
    whole = len(one) // piece * piece
    stacked = _stacked(one[:whole], piece).transpose(0, 2, 1)
    products = np.matmul(stacked, _stacked(other[:whole], piece))
    return np.asarray(products.sum(axis=0) + one[whole:].T @ other[whole:])


def _piece(multiplications_per_row: int) -> int:
    return max(1, _UNTHREADED // max(multiplications_per_row, 1))


def _stacked(rows: Floats, piece: int) -> Floats:
    return rows.reshape(-1, piece, rows.shape[1])
