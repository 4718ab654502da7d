"""What was observed, as the pictures of shape and of calibration draw it."""

import math

import pytest

from plainodds.answers.checks.shape import Bin
from plainodds.drawings.checks.observed import band, dot_areas
from tests.drawings.checks.sheet import THEME


def test_a_band_without_ends_is_none():
    assert band((1.0, 2.0), (math.nan,) * 2, (math.nan,) * 2) == []
    assert band((1.0, 2.0), (0.1, 0.2), (0.3, 0.4)) == [
        [(1.0, 0.3), (2.0, 0.4), (2.0, 0.2), (1.0, 0.1)]
    ]


def made(cases):
    half = cases / 2
    return Bin(0.0, 1.0, 0.5, cases, half, observed=0.5, expected=0.5, lower=0.4, upper=0.6)


def test_dots_have_areas_in_proportion_but_the_least_can_be_seen():
    bins = [made(cases) for cases in (100.0, 50.0, 1.0)]
    largest, half, least = dot_areas(bins, THEME)
    assert half == pytest.approx(largest / 2)
    assert least == pytest.approx(largest / 5)


def test_no_cases_no_dots():
    assert dot_areas([], THEME) == []
