"""The scales' textbook facts: common practice, no source."""

import numpy as np
import pytest

from plainodds import scales


@pytest.mark.parametrize(("probability", "odds"), [(0.01, 0.0101), (0.99, 99.0), (0.5, 1.0)])
def test_a_probability_has_its_odds(probability, odds):
    assert float(scales.odds_from_probability(probability)) == pytest.approx(odds, abs=5e-5)


def test_odds_of_three_to_two_are_sixty_percent():
    assert float(scales.probability_from_odds(3 / 2)) == pytest.approx(0.6)


def test_the_log_odds_of_one_half_are_zero():
    assert float(scales.linear_predictor_from_probability(0.5)) == 0.0


def test_the_variance_of_one_case_peaks_at_one_half():
    grid = np.linspace(0, 1, 1001)
    assert grid[np.argmax(scales.probability_slope(grid))] == 0.5
