"""Linear programmes over many rows, a few of them at a time."""

import numpy as np
import pytest
from scipy.optimize import linprog

from plainodds.answers.programme import (
    farthest,
    normalised,
    null_space,
    spanned,
    strictly_inside,
)


def cone(seed, rows=3_000, columns=4, narrow=0.3):
    """Rows of length 1 near a direction, so that some directions have no negative product."""
    draw = np.random.default_rng(seed)
    middle = np.zeros(columns)
    middle[0] = 1.0
    return normalised(middle + narrow * draw.uniform(-1, 1, (rows, columns)))


@pytest.mark.parametrize("seed", range(8))
def test_taking_rows_up_as_they_are_violated_ends_where_all_rows_at_once_do(seed):
    rows = cone(seed)
    objective = np.random.default_rng(seed + 100).normal(size=4)
    found = farthest(rows, objective)
    at_once = linprog(-objective, A_ub=-rows, b_ub=np.zeros(len(rows)), bounds=(-1, 1))
    assert objective @ found == pytest.approx(-at_once.fun, abs=1e-6)
    assert (rows @ found).min() >= -1e-8


@pytest.mark.parametrize("seed", range(4))
def test_where_rows_point_everywhere_there_is_no_way(seed):
    draw = np.random.default_rng(seed)
    rows = normalised(draw.normal(size=(5_000, 5)))
    assert not farthest(rows, draw.normal(size=5)).any()
    direction, strict = strictly_inside(rows, np.zeros(5))
    assert not direction.any()
    assert not strict.any()


def test_one_row_among_many_can_close_the_way():
    rows = cone(3, narrow=0.01)
    open_way = farthest(rows, rows.sum(axis=0))
    assert (rows @ open_way > 0).all()
    closed = np.vstack([rows, -rows[17]])
    assert np.abs(closed @ farthest(closed, closed.sum(axis=0))).min() < 1e-8
    assert not strictly_inside(np.vstack([rows, -normalised(rows[:1])]), open_way)[1][0]


def test_what_a_favoured_row_hides_is_found_by_asking_again():
    # the first programme spends its whole step on the first direction, for the sake of many rows
    rows = normalised(np.array([[1.0, -1.0]] * 10 + [[0.0, 1.0]]))
    assert rows[-1] @ farthest(rows, rows.sum(axis=0)) == pytest.approx(0, abs=1e-9)
    direction, strict = strictly_inside(rows, np.zeros(2))
    assert strict.all()
    assert (rows @ direction > 0).all()


def test_rows_that_leave_nothing_are_told_from_those_that_leave_a_line():
    assert null_space(np.eye(3), 1e-9).shape == (3, 0)
    (line,) = null_space(np.array([[1.0, 0, 0], [0, 1, 0]]), 1e-9).T
    np.testing.assert_allclose(np.abs(line), [0, 0, 1], atol=1e-12)
    np.testing.assert_array_equal(null_space(np.empty((0, 2)), 1e-9), np.eye(2))


@pytest.mark.parametrize("rows", [5, 400, 3_000])
def test_coordinates_lie_evenly_and_basis_spans_the_rows(rows):
    draw = np.random.default_rng(rows)
    matrix = draw.normal(size=(rows, 3)) @ draw.normal(size=(3, 4))
    basis, to_coordinates = spanned(matrix)
    assert basis.shape == to_coordinates.shape == (4, 3)
    np.testing.assert_allclose(matrix @ basis @ basis.T, matrix, atol=1e-9)
    coordinates = matrix @ to_coordinates
    np.testing.assert_allclose(coordinates.T @ coordinates, np.eye(3), atol=1e-9)
