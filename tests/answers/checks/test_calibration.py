"""Fitted chances against what happened."""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from sklearn.metrics import brier_score_loss

from plainodds.answers.checks.calibration import Optimism, calibration_of, grouped_by_chance
from plainodds.answers.checks.fitted_rows import FittedRows, fitted_rows
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of


def optimism(slope, repeats=200):
    return Optimism("bootstrap", repeats, 0, slope, 0.2, 0.7)


def test_on_its_own_data_a_fit_has_intercept_0_and_slope_1():
    evidence = calibration_of(logit("y ~ x + w", invented()), 0.95).evidence
    assert evidence.intercept.estimate == pytest.approx(0, abs=1e-6)
    assert evidence.slope.estimate == pytest.approx(1, abs=1e-6)
    assert evidence.slope.lower < 1 < evidence.slope.upper


def test_intercept_and_slope_are_those_of_statsmodels():
    data = invented()
    result = sm.Logit(data.y, data[["x", "w"]] / 20).fit(disp=0)
    evidence = calibration_of(model_of(result), 0.9).evidence
    eta = result.fittedvalues
    large = sm.GLM(data.y, np.ones(len(data)), family=binomial(), offset=eta).fit()
    both = sm.Logit(data.y, sm.add_constant(eta)).fit(disp=0)
    for found, theirs, at in ((evidence.intercept, large, 0), (evidence.slope, both, 1)):
        assert found.estimate == pytest.approx(np.asarray(theirs.params)[at], rel=1e-5)
        assert found.se == pytest.approx(np.asarray(theirs.bse)[at], rel=1e-4)
        ends = np.asarray(theirs.conf_int(0.1))[at]
        assert (found.lower, found.upper) == pytest.approx(ends, rel=1e-4)


def test_the_brier_score_is_sklearns():
    data = invented()
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    evidence = calibration_of(model_of(result), 0.95).evidence
    share = np.full(len(data), data.y.mean())
    assert evidence.brier == pytest.approx(brier_score_loss(data.y, result.predict()))
    assert evidence.brier_of_share == pytest.approx(brier_score_loss(data.y, share))


def test_groups_are_tenths_by_fitted_chance():
    data = invented(500)
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    bins = calibration_of(model_of(result), 0.95).evidence.bins
    chance = np.sort(result.predict())
    assert [each.cases for each in bins] == [50] * 10
    for place, each in enumerate(bins):
        of_group = chance[50 * place : 50 * (place + 1)]
        assert (each.low, each.high) == pytest.approx((of_group[0], of_group[-1]))
        assert each.expected == pytest.approx(of_group.mean())
    assert sum(each.events for each in bins) == data.y.sum()


def test_rows_of_one_chance_stay_in_one_group():
    model = logit("y ~ count", invented(500))
    groups = grouped_by_chance(fitted_rows(model))
    assert len(groups.cases) == 4
    assert sorted(groups.cases) == sorted(invented(500)["count"].value_counts())


def test_rows_of_no_weight_make_no_group():
    ones, pi = np.ones(30), np.linspace(0.1, 0.9, 30)
    ones[-5:] = 0
    groups = grouped_by_chance(FittedRows(np.log(pi / (1 - pi)), pi, pi.round(), ones, ones))
    assert groups.cases.sum() == 25
    assert len(groups.cases) == 10


def test_a_fit_that_fits_is_not_accused():
    found = calibration_of(logit("y ~ x + w + count", invented(800)), 0.95)
    assert (found.concern, found.reasons) == ("nothing found", ())
    evidence = found.evidence
    assert len(evidence.at) == len(evidence.smoothed) == len(evidence.lower) == len(evidence.upper)
    smoothed, at = np.array(evidence.smoothed), np.array(evidence.at)
    assert evidence.largest_gap <= np.abs(smoothed - at).max()


def test_a_missing_bend_shows_in_the_curve():
    found = calibration_of(logit("y ~ x", invented(2000, bend=0.7)), 0.95)
    assert found.concern in ("keep in mind", "don't explain yet")
    assert found.reasons == ("curve",)
    assert found.evidence.largest_gap > 0.03


def test_a_fit_without_an_intercept_is_found_to_lack_one():
    data = invented(1500).assign(x=lambda frame: (frame.x - 50) / 10, w=lambda frame: frame.w / 4)
    data["y"] = (np.random.default_rng(0).uniform(size=1500) < 0.2).astype(int)
    found = calibration_of(model_of(sm.Logit(data.y, data[["x", "w"]]).fit(disp=0)), 0.95)
    assert found.reasons == ("curve",)
    assert found.evidence.intercept.upper < 0


def test_optimism_weighs_by_the_slope_that_is_left():
    model = logit("y ~ x + w", invented())
    told = {slope: calibration_of(model, 0.95, optimism(slope)) for slope in (0.95, 0.85, 0.5)}
    assert [each.concern for each in told.values()] == [
        "nothing found",
        "keep in mind",
        "don't explain yet",
    ]
    assert told[0.85].reasons == ("optimism",)
    assert told[0.85].evidence.optimism == optimism(0.85)


def test_a_fit_that_no_resample_repeats_is_kept_in_mind():
    found = calibration_of(logit("y ~ x", invented()), 0.95, optimism(float("nan"), repeats=0))
    assert (found.concern, found.reasons) == ("keep in mind", ("optimism",))


def test_grouped_counts_are_single_cases():
    data = invented(1000).assign(x=lambda frame: frame.x.round(-1))
    cells = data.groupby(["x", "count"]).y.agg(["sum", "size"]).reset_index()
    cells["rest"] = cells["size"] - cells["sum"]
    grouped = model_of(smf.glm("sum + rest ~ x + count", cells, family=binomial()).fit(tol=1e-12))
    one = calibration_of(grouped, 0.95).evidence
    other = calibration_of(logit("y ~ x + count", data), 0.95).evidence
    assert one.brier == pytest.approx(other.brier)
    assert one.largest_gap == pytest.approx(other.largest_gap, abs=1e-5)
    assert [each.cases for each in one.bins] == [each.cases for each in other.bins]
    assert one.slope.se == pytest.approx(other.slope.se, rel=1e-5)


def test_rows_chosen_by_outcome_are_judged_in_the_sample_and_said():
    data = invented()
    plain = calibration_of(logit("y ~ x", data), 0.95)
    for stated in ({}, {"prevalence": 0.01}):
        chosen = calibration_of(logit("y ~ x", data, sampling="case-control", **stated), 0.95)
        assert chosen.unknown == "rows chosen by outcome"
        assert chosen.evidence == plain.evidence


def test_rows_that_belong_together_have_no_interval_of_strangers():
    data = invented(600, bend=0.7)
    result = smf.gee("y ~ x", np.arange(600) // 3, data, family=binomial()).fit()
    found = calibration_of(model_of(result), 0.95)
    assert (found.concern, found.unknown) == ("not known", "no likelihood")
    assert found.evidence.slope.se is None


def test_variance_weights_weigh_shares_and_count_no_cases():
    data = invented(500)
    weights = np.where(data.y == 1, 3.0, 1.0)
    model = model_of(smf.glm("y ~ x", data, family=binomial(), var_weights=weights).fit())
    evidence = calibration_of(model, 0.95).evidence
    assert sum(each.cases for each in evidence.bins) == 500
    share = np.average(data.y, weights=weights)
    assert evidence.brier_of_share == pytest.approx(share * (1 - share))
    assert evidence.intercept.estimate == pytest.approx(0, abs=1e-6)


def test_separated_outcomes_are_no_trouble():
    x = np.linspace(-1, 1, 60)
    data = invented(60).assign(x=x, y=(x > 0.01).astype(int))
    model = model_of(smf.glm("y ~ x", data, family=binomial()).fit())
    evidence = calibration_of(model, 0.95).evidence
    assert evidence.brier < 1e-6


def test_without_an_outcome_nothing_is_known():
    data = invented(100)
    result = smf.logit("y ~ x", data).fit(disp=0)
    result.remove_data()
    found = calibration_of(model_of(result, data=data), 0.95)
    assert (found.concern, found.unknown, found.evidence) == ("not known", "no outcome", None)


def test_the_finding_goes_to_json_and_back():
    found = calibration_of(logit("y ~ x", invented(100)), 0.95, optimism(0.8))
    assert from_json(to_json(found)) == found
