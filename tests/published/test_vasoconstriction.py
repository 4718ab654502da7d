"""Vasoconstriction, as in Pregibon 1981 (Annals of Statistics 9:705).

The values are as remembered, and were reproduced by an independent calculation to the digits
shown.
"""

import math

import numpy as np  # noqa: F401  (the formula reads it)
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.checks.influence import influence_of
from plainodds.answers.checks.leaving_out import leaving_out
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


def test_cases_4_and_18_stand_out(result):
    found = influence_of(po.FittedLogit(result).model)
    assert (found.concern, found.reasons) == ("keep in mind", ("moves an odds ratio",))
    first, second, third = found.evidence.standing_out[:3]
    assert (first.labels, second.labels) == (("4",), ("18",))
    assert min(first.delta_beta, second.delta_beta) > 3 * third.delta_beta
    assert min(first.delta_chi2, second.delta_chi2) > 4 * third.delta_chi2


def test_cases_28_and_37_are_one_covariate_pattern(result):
    found = influence_of(po.FittedLogit(result).model).evidence
    assert found.patterns == 38
    (pair,) = [each for each in found.standing_out if len(each.labels) > 1]
    assert pair.labels == ("28", "37")


@pytest.mark.parametrize(("case", "deviance"), [(4, 22.42), (18, 23.59)])
def test_the_deviance_falls_by_nearly_as_much_as_one_step_says(result, case, deviance):
    frame = vasoconstriction()
    fit = leaving_out(po.FittedLogit(result).model)
    without = smf.logit("Y ~ np.log(Volume) + np.log(Rate)", frame.drop(index=case)).fit(disp=0)
    assert -2 * result.llf == pytest.approx(29.23, abs=5e-3)
    assert -2 * without.llf == pytest.approx(deviance, abs=6e-3)
    fallen = 2 * (without.llf - result.llf)
    # one step stops short of the refitted minimum
    assert 0.9 * fallen < fit.measures.delta_deviance[frame.index.get_loc(case)] < fallen


def test_without_both_cases_the_coefficients_are_the_published_ones():
    frame = vasoconstriction().drop(index=[4, 18])
    found = smf.logit("Y ~ np.log(Volume) + np.log(Rate)", frame).fit(disp=0)
    assert list(found.params) == pytest.approx([-24.58, 39.55, 31.94], abs=6e-3)


def test_the_refit_without_both_one_after_the_other_is_that_fit(result):
    fit = leaving_out(po.FittedLogit(result).model)
    frame = vasoconstriction()
    at = frame.index.get_loc(4)
    once = smf.logit("Y ~ np.log(Volume) + np.log(Rate)", frame.drop(index=4)).fit(disp=0)
    assert fit.refitted(at) == pytest.approx(once.params.to_numpy(), abs=1e-6)
    fit = leaving_out(po.FittedLogit(once).model)
    at = frame.drop(index=4).index.get_loc(18)
    assert fit.refitted(at) == pytest.approx([-24.58, 39.55, 31.94], abs=6e-3)
