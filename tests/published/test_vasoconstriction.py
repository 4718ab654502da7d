"""Vasoconstriction, as in Pregibon 1981 (Annals of Statistics 9:705).

The values are as remembered, and were reproduced by an independent calculation to the digits
shown.
"""

import math

import numpy as np  # noqa: F401  (the formula reads it)
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from tests.published.data import vasoconstriction


@pytest.fixture(scope="module")
def result():
    return smf.logit("Y ~ np.log(Volume) + np.log(Rate)", vasoconstriction()).fit(disp=0)


def test_the_intercept_is_published(result):
    assert result.params["Intercept"] == pytest.approx(-2.875, abs=5e-4)


@pytest.mark.parametrize(("predictor", "coefficient"), [("Volume", 5.179), ("Rate", 4.562)])
def test_multiplying_by_e_adds_the_published_coefficient(result, predictor, coefficient):
    fit = po.FittedLogit(result)
    (row,) = fit.odds(predictor, between={predictor: (1.0, math.e)}).rows
    assert row.log_odds_ratio.estimate == pytest.approx(coefficient, abs=5e-4)
