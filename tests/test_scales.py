"""The derivatives of the three scales are each other's numeric derivatives."""

import numpy as np
import pytest

from plainodds import scales

ETA = np.linspace(-6, 6, 25)

CHAIN = (
    lambda pi: pi,
    scales.probability_slope,
    scales.probability_curvature,
    scales.probability_third_derivative,
)


@pytest.mark.parametrize("order", [1, 2, 3])
def test_each_derivative_of_the_chance_is_the_last_ones_slope(order):
    h = 1e-5
    high, low = (
        CHAIN[order - 1](scales.probability_from_linear_predictor(ETA + side * h))
        for side in (1, -1)
    )
    found = CHAIN[order](scales.probability_from_linear_predictor(ETA))
    np.testing.assert_allclose(found, (high - low) / (2 * h), rtol=0, atol=1e-10)


def test_at_one_half_the_curve_is_steepest_and_bends_neither_way():
    assert float(scales.probability_slope(0.5)) == 0.25
    assert float(scales.probability_curvature(0.5)) == 0.0
    assert float(scales.probability_third_derivative(0.5)) == -0.125
