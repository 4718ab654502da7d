"""Numeric derivatives are as exact as they need to be, and stay within the bounds."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.errors import QuestionRefused
from plainodds.model.design.differences import derivative

INF = np.inf
coefficients = st.lists(st.floats(-5, 5), min_size=4, max_size=4)


def column(function):
    return lambda x: function(x)[:, None]


def slope(function, x, lower=-INF, upper=INF, spread=1.0):
    x = np.atleast_1d(np.asarray(x, dtype=float))
    return derivative(column(function), x, lower, upper, spread)[:, 0]


@given(coefficients, st.lists(st.floats(-3, 3), min_size=1, max_size=5), st.floats(0.5, 20))
def test_a_cubic_is_differentiated_exactly(polynomial, x, spread):
    cubic = np.polynomial.Polynomial(polynomial)
    found = slope(cubic, x, spread=spread)
    size = np.abs(polynomial).sum() * 27 + 1
    np.testing.assert_allclose(found, cubic.deriv()(np.array(x)), atol=1e-9 * size)


@given(coefficients, st.floats(0, 1))
def test_a_cubic_is_differentiated_exactly_within_bounds(polynomial, share):
    cubic = np.polynomial.Polynomial(polynomial)
    lower, upper = -1.0, 2.0
    x = lower + share * (upper - lower)
    seen = []

    def watched(values):
        seen.append(values)
        return cubic(values)

    found = slope(watched, [lower, x, upper], lower, upper, spread=3.0)
    seen = np.concatenate(seen)
    assert lower <= seen.min()
    assert seen.max() <= upper
    np.testing.assert_allclose(found, cubic.deriv()(np.array([lower, x, upper])), atol=1e-8)


SMOOTH = {
    # function, its derivative, where, the data's spread
    "exp": (np.exp, np.exp, [-2.0, 0.0, 2.0], 4.0),
    "log": (np.log, lambda x: 1 / x, [1e-3, 0.5, 900.0], 1000.0),
    "log of 1 and more": (np.log1p, lambda x: 1 / (1 + x), [0.0, 0.5, 900.0], 1000.0),
    "reciprocal": (lambda x: 1 / x, lambda x: -1 / x**2, [1e-3, 0.5, 900.0], 1000.0),
    "standardised sum of money": (
        lambda x: (x - 3e5) / 2e5, lambda x: 0 * x + 5e-6, [0.0, 1.0, 1e6], 1e6,
    ),
    "bent sum of money": (
        lambda x: np.sin(x / 1e6), lambda x: np.cos(x / 1e6) / 1e6, [0.0, 10.0, 1e6], 1e6,
    ),
    "year": (lambda x: (x - 2000) ** 2, lambda x: 2 * (x - 2000), [1990.0, 2000.0, 2020.0], 30.0),
    "tiny unit": (lambda x: np.exp(1e9 * x), lambda x: 1e9 * np.exp(1e9 * x), [0.0, 1e-9], 1e-9),
    "constant": (lambda x: 0 * x + 7.3, lambda x: 0 * x, [0.0, 5.0], 1.0),
}  # fmt: skip


@pytest.mark.parametrize("name", SMOOTH)
def test_smooth_functions_are_differentiated_on_their_own_scale(name):
    function, exact, x, spread = SMOOTH[name]
    lower = 0.0 if "log" in name else -INF
    found, expected = slope(function, x, lower, spread=spread), exact(np.array(x))
    np.testing.assert_allclose(found, expected, rtol=2e-8, atol=1e-9 * np.abs(expected).max())


def test_each_column_is_differentiated():
    found = derivative(lambda x: np.column_stack([x, x**2, 0 * x + 1]),
                       np.array([1.0, 3.0]), -INF, INF, 2.0)  # fmt: skip
    np.testing.assert_allclose(found, [[1, 2, 0], [1, 6, 0]], atol=1e-9)


def test_where_wide_steps_leave_the_domain_short_ones_do():
    def logarithm(x):
        if (x <= 0).any():
            raise QuestionRefused("not a number")
        return np.log(x)

    assert slope(logarithm, [1e-3], spread=1000.0) == pytest.approx([1e3])


def test_a_function_that_cannot_be_computed_says_so():
    def never(x):
        raise QuestionRefused("not a number")

    with pytest.raises(QuestionRefused, match="not a number"):
        slope(never, [1.0])
