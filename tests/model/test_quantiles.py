"""Weighted quantiles are those of the rows written out."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.model.quantiles import weighted_quantiles

SHARES = (0.0, 0.05, 0.25, 0.5, 0.75, 0.95, 1.0)
rows = st.lists(
    st.tuples(st.integers(-5, 5), st.integers(0, 4)), min_size=1, max_size=30
).filter(lambda listed: any(weight for _, weight in listed))  # fmt: skip


@given(rows)
def test_whole_weights_are_rows_written_out(listed):
    values, weights = np.array(listed, dtype=float).T
    written_out = np.repeat(values, weights.astype(int))
    found = weighted_quantiles(values, weights, SHARES)
    assert found == pytest.approx(weighted_quantiles(written_out, None, SHARES))
    assert found[3] == pytest.approx(np.median(written_out))
    assert (found[0], found[-1]) == (written_out.min(), written_out.max())


@given(rows, st.floats(0.01, 100))
def test_the_size_of_weights_does_not_matter(listed, scale):
    values, weights = np.array(listed, dtype=float).T
    assert weighted_quantiles(values, weights * scale, SHARES) == pytest.approx(
        weighted_quantiles(values, weights, SHARES)
    )


@given(rows, st.randoms(use_true_random=False))
def test_the_order_of_rows_does_not_matter(listed, random):
    values, weights = np.array(listed, dtype=float).T
    shuffled = list(listed)
    random.shuffle(shuffled)
    assert weighted_quantiles(values, weights, SHARES) == pytest.approx(
        weighted_quantiles(*np.array(shuffled, dtype=float).T, SHARES)
    )


def test_rows_of_no_weight_do_not_count():
    values, weights = np.array([-9.0, 1, 2, 3, 99]), np.array([0.0, 1, 1, 1, 0])
    assert weighted_quantiles(values, weights, (0, 0.5, 1)) == (1.0, 2.0, 3.0)
