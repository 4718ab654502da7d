"""Distinct covariate patterns: rows that the model cannot tell apart."""

from __future__ import annotations

from dataclasses import dataclass
from weakref import WeakKeyDictionary

import numpy as np
from numpy.typing import NDArray

from plainodds.model.fitted import FittedModel, Sample

__all__ = ["Patterns", "patterns_of"]

Floats = NDArray[np.float64]
Places = NDArray[np.intp]

# numbers worked on at once, so that they stay in the processor's cache
_CACHED = 131_072


@dataclass(frozen=True, eq=False)
class Patterns:
    """Rows gathered by design row and offset, in the order of their first appearance.

    Attributes
    ----------
    first : array (p,)
        Each pattern's first row: `sample.matrix[first]` are the distinct design rows.
    of_row : array (n,)
        Each row's pattern.
    cases : array (p,)
        Cases by frequencies.
    events : array (p,) or None
        Cases with the event; None where the outcome is not carried.
    weights : array (p,)
        Sum of the fit's weights, which are the frequencies unless there are variance
        weights.
    weighted_events : array (p,) or None
        Sum of weights times outcome.
    """

    first: Places
    of_row: Places
    cases: Floats
    events: Floats | None
    weights: Floats
    weighted_events: Floats | None

    @property
    def count(self) -> int:
        """How many."""
        return len(self.first)

    def rows_of(self, pattern: int) -> Places:
        """Positions of one pattern's rows."""
        return np.nonzero(self.of_row == pattern)[0]


def patterns_of(model: FittedModel) -> Patterns:
    """A fitted model's covariate patterns, found once.

    Rows are gathered by a hash of their bits and then compared with the pattern's first
    row, number by number, so that the result is exact; linear in rows but for a sort of
    one number per row.
    """
    if model not in _found:
        _found[model] = _patterns(model.sample)
    return _found[model]


_found: WeakKeyDictionary[FittedModel, Patterns] = WeakKeyDictionary()


def _patterns(sample: Sample) -> Patterns:
    first, of_row = _gathered(sample, _hashes(sample))
    if not _alike(sample, first[of_row]):
        first, of_row = _gathered(sample, _ranks(sample))

    def summed(each: Floats | None) -> Floats:
        return np.bincount(of_row, weights=each, minlength=len(first)).astype(float)

    def summed_events(each: Floats | None) -> Floats | None:
        if sample.outcome is None:
            return None
        return summed(sample.outcome if each is None else sample.outcome * each)

    counted = sample.cases
    cases, events = summed(counted), summed_events(counted)
    if sample.weights is counted:
        return Patterns(first, of_row, cases, events, cases, events)
    weights, weighted_events = summed(sample.weights), summed_events(sample.weights)
    return Patterns(first, of_row, cases, events, weights, weighted_events)


def _gathered(sample: Sample, keys: NDArray[np.uint64]) -> tuple[Places, Places]:
    """First rows, and each row's pattern, of rows with equal keys."""
    _, first, of_row = np.unique(keys, return_index=True, return_inverse=True)
    order = np.argsort(first)
    place = np.empty_like(order)
    place[order] = np.arange(len(order))
    return first[order], place[of_row.reshape(sample.rows)]


def _hashes(sample: Sample) -> NDArray[np.uint64]:
    """One number for each row, equal for equal rows and almost surely different for others."""
    n, k = sample.matrix.shape
    draw = np.random.default_rng(0)
    factors = draw.integers(0, 2**63, k + 1, dtype=np.uint64) * np.uint64(2) + np.uint64(1)
    hashes = np.zeros(n, dtype=np.uint64)
    for block in _blocks(n, k):
        hashes[block] = _mixed(sample.matrix[block], factors[:k]).sum(axis=1)
        if sample.offset is not None:
            hashes[block] += _mixed(sample.offset[block], factors[k])
    return hashes


def _mixed(numbers: Floats, factors: NDArray[np.uint64] | np.uint64) -> NDArray[np.uint64]:
    # adding 0 turns −0 into 0 and makes a copy; round numbers differ in high bits only, so
    # these are folded onto the low ones before and after a product that moves bits up
    bits = (numbers + 0.0).view(np.uint64)
    bits ^= bits >> np.uint64(32)
    bits *= factors
    bits ^= bits >> np.uint64(29)
    bits *= np.uint64(0x9E3779B97F4A7C15)
    return bits


def _alike(sample: Sample, example: Places) -> bool:
    """Whether every row equals its pattern's first row."""
    repeated = np.nonzero(example != np.arange(sample.rows))[0]
    for block in _blocks(len(repeated), sample.matrix.shape[1]):
        rows, others = repeated[block], example[repeated[block]]
        if not np.array_equal(sample.matrix[rows], sample.matrix[others]):
            return False
        if sample.offset is not None and not np.array_equal(
            sample.offset[rows], sample.offset[others]
        ):
            return False
    return True


def _ranks(sample: Sample) -> NDArray[np.uint64]:
    """Exact keys, for the day on which two different rows have one hash: by sorting rows."""
    columns = [sample.matrix] if sample.offset is None else [sample.matrix, sample.offset[:, None]]
    _, rank = np.unique(np.concatenate(columns, axis=1) + 0.0, axis=0, return_inverse=True)
    return np.asarray(rank, dtype=np.uint64).reshape(sample.rows)


def _blocks(rows: int, width: int) -> list[slice]:
    size = max(256, _CACHED // max(width, 1))
    return [slice(start, start + size) for start in range(0, rows, size)]
