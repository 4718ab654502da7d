"""Model against data along each number."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from scipy.stats import chi2

from plainodds.answers.checks.curvature import curvature, knots_of, spline_columns
from plainodds.answers.checks.shape import gap_that_matters, shape_of
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of


def along(model, name):
    return next(each for each in shape_of(model, 0.95) if each.about == (name,))


def test_a_bend_that_the_model_lacks_is_found_and_gone_once_it_is_in():
    data = invented(1500, bend=0.5)
    bent = along(logit("y ~ x + w", data), "x")
    assert bent.concern == "don't explain yet"
    assert bent.reasons == ("bends",)
    assert bent.evidence.p_value < 1e-6
    right = along(logit("y ~ x + I(x**2) + w", data), "x")
    assert right.concern == "nothing found"
    assert right.evidence.largest_gap < bent.evidence.largest_gap / 2


def test_the_test_is_near_the_likelihood_ratio_of_the_refitted_spline():
    data = invented(3000, bend=0.1)
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    model = model_of(result)
    columns = spline_columns(data.x.to_numpy(), knots_of(curvature(model).bins["x"]))
    _, one, two = columns(slice(0, len(data)))
    more = smf.logit("y ~ x + w + one + two", data.assign(one=one, two=two)).fit(disp=0)
    evidence = along(model, "x").evidence
    assert evidence.degrees_of_freedom == 2
    assert evidence.statistic == pytest.approx(2 * (more.llf - result.llf), rel=0.1)
    assert evidence.p_value == pytest.approx(chi2.sf(evidence.statistic, 2))


def test_a_number_with_a_handful_of_values_is_tested_level_by_level():
    data = invented(1500)
    data["y"] = np.where(data["count"] == 1, np.random.default_rng(0).integers(0, 2, 1500), data.y)
    straight = smf.logit("y ~ x + count", data).fit(disp=0)
    levels = smf.logit("y ~ x + C(count)", data).fit(disp=0)
    evidence = along(model_of(straight), "count").evidence
    assert evidence.degrees_of_freedom == 2
    assert evidence.statistic == pytest.approx(2 * (levels.llf - straight.llf), rel=0.1)
    assert evidence.at == (0, 1, 2, 3)
    shares = data.groupby("count").y.mean()
    assert evidence.observed == pytest.approx(tuple(shares))
    assert [each.observed for each in evidence.bins] == pytest.approx(list(shares))


def test_a_number_of_two_values_cannot_bend():
    data = invented(200).assign(dose=lambda frame: np.where(frame["count"] > 1, 50, 20))
    model = logit("y ~ x + dose", data)
    assert [each.about for each in shape_of(model, 0.95)] == [("x",)]


def test_bins_hold_raw_shares_and_the_models():
    data = invented(900)
    model = logit("y ~ x + w", data)
    bins = along(model, "x").evidence.bins
    assert 10 <= len(bins) <= 20
    assert sum(each.cases for each in bins) == 900
    first = data[data.x < bins[0].high]
    assert bins[0].events == first.y.sum()
    assert bins[0].observed == pytest.approx(first.y.mean())
    assert bins[0].lower < bins[0].observed < bins[0].upper


def test_a_small_gap_is_nothing_however_sure():
    data = invented(60_000, bend=0.06)
    found = along(logit("y ~ x + w + count", data), "x")
    assert found.evidence.p_value < 1e-4
    assert found.evidence.largest_gap < 0.03
    assert found.concern == "nothing found"


def test_a_rare_event_takes_a_smaller_gap():
    assert gap_that_matters(0.4) == pytest.approx(0.03)
    assert gap_that_matters(0.02) == pytest.approx(0.005)
    assert gap_that_matters(0.98) == pytest.approx(0.005)


def test_right_models_raise_no_alarm():
    raised = 0
    for seed in range(40):
        model = logit("y ~ x + w + count + group", invented(500, seed=seed))
        raised += sum(each.concern != "nothing found" for each in shape_of(model, 0.95))
    # 120 tests at 1 %: five or more have a chance of 1 in 150
    assert raised < 5


def test_a_number_that_enters_by_its_logarithm_is_tested_for_its_straight_line_too():
    model = logit("y ~ np.log(w)", invented(800))
    assert along(model, "w").evidence.degrees_of_freedom == 3


def test_a_spline_of_the_same_knots_leaves_nothing_to_test():
    data = invented(500)
    model = logit("y ~ x", data)
    _, one, two = spline_columns(data.x.to_numpy(), knots_of(curvature(model).bins["x"]))(
        slice(0, 500)
    )
    X = sm.add_constant(data.assign(one=one, two=two)[["x", "one", "two"]])
    found = along(model_of(sm.Logit(data.y, X).fit(disp=0)), "x")
    assert found.evidence.degrees_of_freedom == 0
    assert np.isnan(found.evidence.p_value)
    assert found.concern == "nothing found"


def test_grouped_counts_are_single_cases():
    data = invented(1200).assign(x=lambda frame: frame.x.round(-1))
    cells = data.groupby(["x", "count"]).y.agg(["sum", "size"]).reset_index()
    cells["rest"] = cells["size"] - cells["sum"]
    grouped = model_of(smf.glm("sum + rest ~ x + count", cells, family=binomial()).fit(tol=1e-12))
    single = logit("y ~ x + count", data)
    for name in ("x", "count"):
        one, other = along(grouped, name).evidence, along(single, name).evidence
        assert one.statistic == pytest.approx(other.statistic, rel=1e-5)
        assert one.largest_gap == pytest.approx(other.largest_gap, rel=1e-5)
        assert [each.cases for each in one.bins] == [each.cases for each in other.bins]


def test_without_a_likelihood_there_are_curves_but_no_test():
    data = invented(600, bend=0.5)
    groups = np.arange(600) // 3
    for result in (
        smf.gee("y ~ x", groups, data, family=binomial()).fit(),
        smf.logit("y ~ x", data).fit(disp=0, cov_type="cluster", cov_kwds={"groups": groups}),
    ):
        (found,) = shape_of(model_of(result), 0.95)
        assert found.unknown == "no likelihood"
        assert found.concern == "not known"
        assert np.isnan(found.evidence.p_value)
        assert found.evidence.largest_gap > 0.03


def test_without_an_outcome_nothing_is_known():
    data = invented(200)
    result = smf.logit("y ~ x + w + group", data).fit(disp=0)
    result.remove_data()
    found = shape_of(model_of(result, data=data), 0.95)
    assert [each.about for each in found] == [("x",), ("w",)]
    assert {(each.concern, each.unknown) for each in found} == {("not known", "no outcome")}


def test_rows_chosen_by_outcome_are_said():
    (found,) = shape_of(logit("y ~ x", invented(300), sampling="case-control"), 0.95)
    assert found.unknown == "rows chosen by outcome"
    assert found.evidence is not None


def test_many_zeros_and_a_long_tail_are_no_trouble():
    rng = np.random.default_rng(0)
    dose = np.where(rng.uniform(size=800) < 0.7, 0.0, rng.lognormal(3, 1.5, 800))
    data = pd.DataFrame({"dose": dose, "y": rng.integers(0, 2, 800)})
    evidence = along(logit("y ~ dose", data), "dose").evidence
    assert evidence.degrees_of_freedom == 2
    assert np.isfinite([*evidence.observed, *evidence.lower, *evidence.upper]).all()


def test_findings_go_to_json_and_back():
    found = shape_of(logit("y ~ x + count", invented(200)), 0.95)
    assert from_json(to_json(found)) == found
