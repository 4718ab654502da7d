"""Linear programmes over the directions d with Ad ≥ 0, for many rows and few columns."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray
from scipy.optimize import linprog

__all__ = ["farthest", "normalised", "null_space", "spanned", "strictly_inside"]

Floats = NDArray[np.float64]
Flags = NDArray[np.bool_]

# rows have length 1 and directions coordinates up to 1
_FEASIBLE = 1e-9
_STRICT = 1e-7
_ROUNDS = 200
# of a decomposition: for more numbers LAPACK starts threads, which on a busy machine cost more
# than they give
_UNTHREADED = 8_000
_FIRST_ROWS_PER_COLUMN = 20
_MORE_ROWS_PER_COLUMN = 5


def farthest(rows: Floats, objective: Floats, hardest: Floats | None = None) -> Floats:
    """The direction d with rows @ d ≥ 0 and coordinates from −1 to 1 that goes farthest.

    Rows are taken up as they are violated, so that few of many are ever in the programme:
    where these few already leave no way, the rest need not be looked at.

    Parameters
    ----------
    rows : array (n, q)
        Of length 1, or 0.
    objective : array (q,)
    hardest : array (n,), optional
        The smaller, the sooner a row is taken up.

    Returns
    -------
    array (q,)
        Zeros where no direction goes along the objective at all.
    """
    n, q = rows.shape
    nowhere = np.zeros(q)
    if not np.any(objective):
        return nowhere
    first = min(n, _FIRST_ROWS_PER_COLUMN * q)
    chosen = np.unique(np.linspace(0, n - 1, first).astype(int)) if n else np.array([], dtype=int)
    if hardest is not None and first < n:
        chosen = np.union1d(chosen, np.argpartition(hardest, first)[:first])
    cost = -objective / np.abs(objective).max()
    for _ in range(_ROUNDS):
        found = linprog(
            cost,
            A_ub=-rows[chosen] if len(chosen) else None,
            b_ub=np.zeros(len(chosen)) if len(chosen) else None,
            bounds=(-1.0, 1.0),
            method="highs",
            options={"primal_feasibility_tolerance": 1e-10, "dual_feasibility_tolerance": 1e-10},
        )
        if found.x is None:
            return nowhere
        direction = np.asarray(found.x, dtype=float)
        size = float(np.abs(direction).max())
        # nothing of any size: the rows taken up so far leave no way, and more would leave less
        if size < 1e-6 or -float(cost @ direction) <= _FEASIBLE:
            return nowhere
        direction /= size
        along = np.einsum("ij,j->i", rows, direction)
        along[chosen] = np.maximum(along[chosen], 0.0)
        violated = np.flatnonzero(along < -_FEASIBLE)
        if not len(violated):
            return direction
        more = _MORE_ROWS_PER_COLUMN * q
        if len(violated) > more:
            violated = violated[np.argpartition(along[violated], more)[:more]]
        chosen = np.union1d(chosen, violated)
    return nowhere


def strictly_inside(rows: Floats, guess: Floats) -> tuple[Floats, Flags]:
    """A direction d with rows @ d ≥ 0, and > 0 wherever any such direction has that.

    A programme's best corner may favour some rows over others; so it is asked again for
    the rest, and the directions are added, until the rest gives nothing.

    Parameters
    ----------
    rows : array (n, q)
    guess : array (q,)
        A direction in which the answer may lie; rows that it violates most are looked at
        first.

    Returns
    -------
    direction : array (q,)
    strict : array (n,) of bool
    """
    direction, strict = np.zeros(rows.shape[1]), np.zeros(len(rows), dtype=bool)
    hardest = np.einsum("ij,j->i", rows, guess)
    for _ in range(rows.shape[1]):
        further = farthest(rows, rows[~strict].sum(axis=0), hardest)
        gained = (np.einsum("ij,j->i", rows, further) > _STRICT) & ~strict
        if not gained.any():
            break
        direction += further
        strict |= gained
    return direction, strict


def normalised(rows: Floats) -> Floats:
    """Rows of length 1; those of length 0 stay."""
    lengths = np.linalg.norm(rows, axis=1, keepdims=True)
    return np.asarray(rows / np.where(lengths > 0, lengths, 1.0))


def null_space(rows: Floats, tolerance: float) -> Floats:
    """Orthonormal basis, (q, any), of what is orthogonal to all rows of length 1."""
    q = rows.shape[1]
    if not len(rows) or not q:
        return np.eye(q)
    _, values, vectors = np.linalg.svd(_triangle(rows), full_matrices=True)
    values = np.append(values, np.zeros(q - len(values)))
    return np.asarray(vectors[values <= tolerance * np.sqrt(len(rows))].T)


def spanned(matrix: Floats) -> tuple[Floats, Floats]:
    """What a matrix's rows span, and coordinates in which they lie evenly.

    Returns
    -------
    basis : array (k, r)
        Orthonormal; r is the rank.
    to_coordinates : array (k, r)
        The columns of matrix @ to_coordinates are orthonormal.
    """
    n, k = matrix.shape
    _, values, vectors = np.linalg.svd(_triangle(matrix), full_matrices=False)
    # a column that follows from others leaves rounding errors only
    kept = values > values[0] * max(n, k, 1_000) * np.finfo(float).eps
    basis = vectors[kept].T
    return basis, basis / values[kept]


def _triangle(matrix: Floats) -> Floats:
    """R of a QR decomposition, block by block so that a long matrix is not copied."""
    k = max(matrix.shape[1], 1)
    done, size = np.empty((0, matrix.shape[1])), max(2 * k, _UNTHREADED // k - k)
    for start in range(0, len(matrix), size):
        below = matrix[start : start + size]
        done = np.asarray(np.linalg.qr(np.vstack([done, below]), mode="r"))
    return done
