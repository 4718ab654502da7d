"""Roots and turning points of many functions at once."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.answers.roots import roots_between, turning_points


def rooted(function, low, high):
    low, high = np.array(low, dtype=float), np.array(high, dtype=float)
    return roots_between(function, low, high, function(low), function(high))


def test_roots_are_found_to_the_last_digits_each_in_its_own_bracket():
    where = np.array([0.1, 1.7, 2.9])

    def function(x):
        return np.expm1(3 * (x - where))

    found = rooted(function, [0, 1, 2], [1, 2, 3])
    np.testing.assert_allclose(found, where, rtol=0, atol=4e-15)


@given(st.floats(-0.999, 0.999), st.integers(0, 3))
def test_flat_and_kinked_functions_have_their_root_too(where, power):
    found = rooted(lambda x: np.sign(x - where) * np.abs(x - where) ** (2 * power + 1), [-1], [1])
    # a root of order 7 is known only to where the function itself is 0
    assert found[0] == pytest.approx(where, abs=1e-12 if power == 0 else 1e-4)
    jump = rooted(lambda x: np.where(x < where, -1.0, 2.0), [-1], [1])
    assert jump[0] == pytest.approx(where, abs=1e-14)


def test_an_end_that_is_a_root_is_the_root():
    assert rooted(lambda x: x - 1, [0], [1]).tolist() == [1]
    assert rooted(lambda x: x, [0], [1]).tolist() == [0]


def test_few_passes_are_needed():
    seen = []

    def function(x):
        seen.append(x)
        return np.cos(x)

    assert rooted(function, [1.0], [2.0])[0] == pytest.approx(np.pi / 2, abs=1e-15)
    assert len(seen) < 14


@given(st.floats(-0.9, 0.9), st.sampled_from([-1.0, 1.0]))
def test_turning_points_are_found_with_their_value(where, sign):
    def function(x):
        return 3.0 - sign * np.expm1(-np.exp(-((x - where) ** 2)))

    found, value = turning_points(function, np.array([-1.0]), np.array([1.0]), np.array([sign]))
    assert found[0] == pytest.approx(where, abs=1e-6)
    assert value[0] == pytest.approx(float(function(np.array(where))), abs=1e-12)


def test_a_kink_is_a_turning_point():
    found, value = turning_points(
        lambda x: np.abs(x - 0.3), np.array([0.0]), np.array([1.0]), np.array([-1.0])
    )
    assert found[0] == pytest.approx(0.3, abs=0.02)
    assert value[0] == pytest.approx(0, abs=0.02)


def test_nothing_asked_is_nothing_found():
    nothing = np.empty(0)
    assert len(roots_between(np.cos, nothing, nothing, nothing, nothing)) == 0
    assert len(turning_points(np.cos, nothing, nothing, nothing)[0]) == 0
