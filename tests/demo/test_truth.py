"""Tessel Bay's true coefficients are those that its winter was drawn from."""

import numpy as np
import patsy
import pytest
import statsmodels.formula.api as smf
from scipy import stats

from plainodds.demo import TRUE_FORMULA, tessel_bay, true_coefficients, true_linear_predictor


def wald_p_value(fit):
    """Chance of estimates this far from the truth, were it the truth."""
    truth = true_coefficients()[fit.params.index]
    miss = (fit.params - truth).to_numpy()
    statistic = miss @ np.linalg.solve(fit.cov_params().to_numpy(), miss)
    return stats.chi2(len(miss)).sf(statistic)


def test_formula_and_coefficients_give_the_true_linear_predictor():
    mains = tessel_bay(rows=3000, seed=2)
    _, design = patsy.dmatrices(TRUE_FORMULA, mains, return_type="dataframe")
    truth = true_coefficients()
    assert set(truth.index) == set(design.columns)
    by_formula = design @ truth[design.columns]
    np.testing.assert_allclose(by_formula, true_linear_predictor(mains), rtol=0, atol=1e-12)


@pytest.fixture(scope="module")
def large_sample():
    return tessel_bay(rows=80_000, seed=6)


@pytest.fixture(scope="module")
def right_fit(large_sample):
    return smf.logit(TRUE_FORMULA, large_sample).fit(disp=0)


def test_the_right_model_recovers_the_truth_within_monte_carlo_error(right_fit):
    assert wald_p_value(right_fit) > 0.001
    truth = true_coefficients()[right_fit.params.index]
    assert ((right_fit.params - truth).abs() < 4.5 * right_fit.bse).all()


def test_what_bursts_follows_the_true_chance(large_sample):
    chance = 1 / (1 + np.exp(-true_linear_predictor(large_sample)))
    group = np.searchsorted(np.quantile(chance, np.arange(0.1, 1, 0.1)), chance)
    burst = large_sample["burst"].to_numpy()
    for tenth in range(10):
        inside = group == tenth
        error = np.sqrt(np.sum(chance[inside] * (1 - chance[inside]))) / inside.sum()
        assert abs(burst[inside].mean() - chance[inside].mean()) < 4 * error


def test_without_the_bend_in_pressure_the_model_fits_visibly_worse(large_sample, right_fit):
    straight = TRUE_FORMULA.replace("+ np.maximum(pressure_m - 65, 0) ", "")
    assert straight != TRUE_FORMULA
    straight_fit = smf.logit(straight, large_sample).fit(disp=0)
    assert 2 * (right_fit.llf - straight_fit.llf) > 50


def ageing(material, soil):
    """What ten more years add to the true linear predictor."""
    younger = tessel_bay(rows=1)
    younger["material"], younger["soil"], younger["age_years"] = material, soil, 40
    older = younger.assign(age_years=50)
    return float(true_linear_predictor(older)[0] - true_linear_predictor(younger)[0])


@pytest.mark.parametrize("material", ["cast iron", "ductile iron"])
def test_iron_ages_badly_in_corrosive_soil(material):
    assert ageing(material, "high") > 2 * ageing(material, "low")


def test_plastic_hardly_cares_about_the_soil():
    assert abs(ageing("PVC", "high") - ageing("PVC", "low")) < 0.05


def test_a_district_that_is_not_on_the_map_is_refused():
    strange = tessel_bay(rows=2).assign(district="Z9")
    with pytest.raises(ValueError, match="no district"):
        true_linear_predictor(strange)
