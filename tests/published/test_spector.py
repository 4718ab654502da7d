"""Spector & Mazzeo's students, as in Greene, Econometric Analysis, the table of logit estimates.

The values are as remembered, and were reproduced by an independent calculation to the digits
shown.
"""

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from tests.published.data import spector

COEFFICIENTS = {"GPA": (2.826, 1.263), "TUCE": (0.095, 0.142), "PSI": (2.379, 1.065)}
SLOPES_AT_THE_MEANS = {"GPA": 0.534, "TUCE": 0.018, "PSI": 0.449}


@pytest.fixture(scope="module")
def students():
    return spector()


@pytest.fixture(scope="module")
def result(students):
    return smf.logit("GRADE ~ GPA + TUCE + PSI", students).fit(disp=0)


@pytest.fixture(scope="module")
def fit(result):
    # Greene treats PSI, 0 or 1, as a number and differentiates along it
    return po.FittedLogit(result, predictors={"PSI": po.Predictor(kind="number")})


def test_the_intercept_and_likelihood_are_greenes(result):
    assert result.params["Intercept"] == pytest.approx(-13.021, abs=5e-4)
    assert result.bse["Intercept"] == pytest.approx(4.931, abs=5e-4)
    assert result.llf == pytest.approx(-12.890, abs=5e-4)


@pytest.mark.parametrize("predictor", COEFFICIENTS)
def test_log_odds_ratios_are_greenes_coefficients(fit, predictor):
    row = fit.odds(predictor, steps={predictor: 1}).rows[0]
    coefficient, se = COEFFICIENTS[predictor]
    assert row.log_odds_ratio.estimate == pytest.approx(coefficient, abs=5e-4)
    assert row.log_odds_ratio.se == pytest.approx(se, abs=6e-4)


@pytest.mark.parametrize("predictor", SLOPES_AT_THE_MEANS)
def test_slopes_at_the_means_are_greenes(fit, students, predictor):
    means = students.drop(columns="GRADE").mean().to_dict()
    at = means.pop(predictor)
    slope = fit.curve(predictor, others=means, scale="slope", at=[at]).lines[0]
    assert slope.estimate[0] == pytest.approx(SLOPES_AT_THE_MEANS[predictor], abs=5e-4)


@pytest.mark.parametrize("predictor", SLOPES_AT_THE_MEANS)
def test_the_slopes_standard_error_is_statsmodels(fit, result, students, predictor):
    effects = result.get_margeff(at="mean").summary_frame()
    means = students.drop(columns="GRADE").mean().to_dict()
    at = means.pop(predictor)
    slope = fit.curve(predictor, others=means, scale="slope", at=[at]).lines[0]
    assert slope.se[0] == pytest.approx(effects.loc[predictor, "Std. Err."], rel=1e-6)


AVERAGE_EFFECTS = {"GPA": 0.363, "TUCE": 0.012, "PSI": 0.358}


@pytest.mark.parametrize("predictor", AVERAGE_EFFECTS)
def test_average_effects_are_greenes(result, predictor):
    # PSI as what it is, a yes/no: its effect is the average discrete change
    (row,) = po.FittedLogit(result).effects(predictor).rows
    assert row.effect.estimate == pytest.approx(AVERAGE_EFFECTS[predictor], abs=6e-4)


@pytest.mark.parametrize("predictor", SLOPES_AT_THE_MEANS)
def test_effects_at_the_means_are_the_slopes_there(fit, students, predictor):
    means = students.drop(columns="GRADE").mean().to_dict()
    (row,) = fit.effects(predictor, others=means).rows
    assert row.effect.estimate == pytest.approx(SLOPES_AT_THE_MEANS[predictor], abs=5e-4)
