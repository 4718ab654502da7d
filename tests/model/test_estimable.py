"""Which functions of the coefficients the rows determine."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from plainodds.model.estimable import estimable


def full_rank(rng, n=200, k=5):
    return np.column_stack([np.ones(n), rng.normal(size=(n, k - 1))])


def test_a_design_of_full_rank_leaves_nothing_open():
    found = estimable(full_rank(np.random.default_rng(3)), None)
    assert found.open.shape == (5, 0)
    assert found.determined(np.eye(5)).all()


def test_a_column_of_zeros_leaves_its_own_coefficient_open():
    matrix = full_rank(np.random.default_rng(4))
    matrix[:, 2] = 0
    np.testing.assert_array_equal(
        estimable(matrix, None).determined(np.eye(5)), [True, True, False, True, True]
    )


def test_of_two_columns_that_say_the_same_only_the_sum_is_determined():
    matrix = full_rank(np.random.default_rng(5))
    matrix = np.column_stack([matrix, 1e6 * matrix[:, 1]])
    found = estimable(matrix, None)
    asked = np.zeros((3, 6))
    asked[0, 1] = 1  # the one alone
    asked[1, 5] = 1  # the other alone
    asked[2, [1, 5]] = 1, 1e6  # both moved as they move in the rows
    np.testing.assert_array_equal(found.determined(asked), [False, False, True])


def test_rows_without_weight_tell_nothing():
    matrix = np.array([[1.0, 0.0], [1.0, 0.0], [1.0, 1.0]])
    weights = np.array([2.0, 1.0, 0.0])
    assert estimable(matrix, None).determined(np.eye(2)).all()
    np.testing.assert_array_equal(estimable(matrix, weights).determined(np.eye(2)), [True, False])


def test_without_rows_nothing_is_called_open():
    assert estimable(np.empty((0, 3)), None).determined(np.eye(3)).all()


def test_years_and_their_squares_and_cubes_are_ill_conditioned_but_determined():
    year = np.linspace(1990, 2020, 400)
    matrix = np.column_stack([np.ones(400), year, year**2, year**3])
    found = estimable(matrix, None)
    assert np.linalg.cond(matrix) > 1e12
    assert found.determined(np.diff(matrix[::50], axis=0)).all()


@settings(max_examples=50, deadline=None)
@given(seed=st.integers(0, 10_000), rank=st.integers(1, 6), power=st.integers(-5, 5))
def test_rows_of_the_design_are_determined_and_directions_beyond_them_are_not(seed, rank, power):
    rng = np.random.default_rng(seed)
    matrix = rng.normal(size=(80, rank)) @ rng.normal(size=(rank, 7))
    # units of measurement make no difference
    units = 10.0 ** (power * rng.uniform(-1, 1, 7))
    found = estimable(matrix * units, None)
    assert found.open.shape[1] == 7 - rank
    assert found.determined((matrix * units)[:10]).all()
    beyond = np.linalg.svd(matrix)[2][rank:] * units
    assert not found.determined(beyond).any()


@pytest.mark.parametrize("rows", [1, 70_000])
def test_blocks_make_no_difference(rows):
    rng = np.random.default_rng(6)
    matrix = np.column_stack([np.ones(rows), rng.integers(0, 2, rows), np.zeros(rows)])
    assert found_rank(matrix) == np.linalg.matrix_rank(matrix)


def found_rank(matrix):
    return matrix.shape[1] - estimable(matrix, None).open.shape[1]
