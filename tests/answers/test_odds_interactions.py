"""Tests of interaction beside the odds ratios that are stated at values of a modifier."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf
from scipy.stats import chi2

import plainodds as po
from plainodds.values import from_json, to_json

FORMULA = "burst ~ age_years * material + soil + past_repairs"


@pytest.fixture(scope="module")
def mains():
    return po.demo.tessel_bay(rows=1500)


@pytest.fixture(scope="module")
def result(mains):
    return smf.logit(FORMULA, mains).fit(disp=0)


@pytest.fixture(scope="module")
def fit(result):
    return po.FittedLogit(result)


def test_the_wald_test_is_that_of_statsmodels_of_all_terms_that_join_the_two(fit, result):
    (found,) = fit.odds().interactions
    assert {found.predictor, found.modifier} == {"age_years", "material"}
    names = [name for name in result.params.index if ":" in name]
    theirs = result.wald_test(", ".join(f"{name} = 0" for name in names), scalar=True)
    assert found.test.kind == "wald"
    assert found.test.degrees_of_freedom == len(names) == 2
    assert found.test.statistic == pytest.approx(float(theirs.statistic), rel=1e-6)
    assert found.test.p_value == pytest.approx(float(theirs.pvalue), rel=1e-6)


def test_with_likelihood_intervals_the_test_is_of_the_fit_without_the_interaction(
    fit, result, mains
):
    (found,) = fit.odds("age_years", interval="likelihood").interactions
    without = smf.logit(FORMULA.replace("*", "+"), mains).fit(disp=0)
    excess = 2 * (result.llf - without.llf)
    assert found.test.kind == "likelihood_ratio"
    assert found.test.statistic == pytest.approx(excess, rel=1e-5)
    assert found.test.p_value == pytest.approx(chi2.sf(excess, 2), rel=1e-5)


def test_a_pair_is_tested_once_whichever_of_the_two_is_asked_for(fit):
    tests = [fit.odds(asked).interactions for asked in ("age_years", "material", ())]
    assert [len(each) for each in tests] == [1, 1, 1]
    assert len({each[0].test for each in tests}) == 1


def test_predictors_that_share_no_term_have_no_test(fit):
    assert fit.odds(["soil", "past_repairs"]).interactions == ()


def test_another_reference_level_leaves_the_test_as_it_is(fit):
    (usual,) = fit.odds("material").interactions
    (other,) = fit.odds("material", references={"material": "PVC"}).interactions
    assert other.test == usual.test


def test_each_of_several_models_has_its_own(fit, mains):
    plain = smf.logit(FORMULA.replace("*", "+"), mains).fit(disp=0)
    answer = po.odds_of({"plain": plain, "joined": fit}, layout="table")
    assert [found.model for found in answer.interactions] == ["joined"]
    assert answer.interactions[0].test == fit.odds().interactions[0].test


def test_without_a_covariance_there_is_no_test(mains):
    result = smf.logit(FORMULA, mains).fit_regularized(alpha=1.0, disp=0)
    assert po.FittedLogit(result).odds("age_years").interactions == ()


def test_separated_along_the_interaction_a_wald_test_has_no_meaning():
    x, group = np.tile(np.arange(8.0), 10), np.repeat(["a", "b"], 40)
    y = np.where(group == "b", x > 3.5, np.tile([0, 1, 0, 1, 1, 0, 1, 0], 10)).astype(int)
    frame = pd.DataFrame({"y": y, "x": x, "group": group})
    with np.errstate(all="ignore"):
        result = smf.logit("y ~ x * group", frame).fit(disp=0, maxiter=60, warn_convergence=False)
    assert po.FittedLogit(result).odds("x").interactions == ()


def test_it_goes_to_json_and_back_and_the_code_names_the_layout(fit):
    answer = fit.odds(layout="table")
    assert from_json(to_json(answer)) == answer
    assert 'layout="table"' in po.code(answer)
    assert fit.ask(answer.question) == answer


def test_an_unknown_layout_is_refused(fit):
    with pytest.raises(po.QuestionRefused, match="'changes' or 'table'"):
        fit.odds(layout="forest")
