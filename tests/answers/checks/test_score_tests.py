"""Score tests of added columns."""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from scipy.stats import chi2

from plainodds.answers.checks.fitted_rows import fitted_rows
from plainodds.answers.checks.score_tests import score_tests
from tests.answers.checks.fits import binomial, invented, logit, model_of


def columns_of(*arrays):
    stacked = np.vstack(arrays)
    return lambda block: stacked[:, block]


def score_test(model, *arrays):
    return score_tests(model, fitted_rows(model), [columns_of(*arrays)])[0]


def test_the_statistic_is_the_one_of_the_whole_score_and_information():
    data = invented()
    model = logit("y ~ x + w + group", data)
    added = np.column_stack([data.x**2, np.log(data.w)])
    X = np.column_stack([model.sample.matrix, added])
    pi = fitted_rows(model).probability
    score = X.T @ (data.y - pi)
    information = X.T @ (X * (pi * (1 - pi))[:, None])
    found = score_test(model, *added.T)
    assert found.statistic == pytest.approx(score @ np.linalg.solve(information, score), rel=1e-6)
    assert found.degrees_of_freedom == 2
    assert found.p_value == pytest.approx(chi2.sf(found.statistic, 2))


def test_it_is_near_the_likelihood_ratio_of_a_new_fit():
    data = invented(3000, bend=0.1)
    less = smf.logit("y ~ x + w", data).fit(disp=0)
    more = smf.logit("y ~ x + w + I(x**2)", data).fit(disp=0)
    found = score_test(model_of(less), data.x**2)
    assert found.statistic == pytest.approx(2 * (more.llf - less.llf), rel=0.05)


def test_columns_in_the_models_span_leave_nothing_to_test():
    data = invented()
    model = logit("y ~ x + I(x**2) + w", data)
    found = score_test(model, data.x, 3 - data.x**2 + data.w)
    assert found.degrees_of_freedom == 0
    assert np.isnan(found.statistic)
    assert score_test(model, data.x, data.x**3).degrees_of_freedom == 1


def test_a_number_far_from_zero_changes_nothing():
    data = invented().assign(year=lambda frame: 1990 + frame["count"] + frame.x / 100)
    near, far = (
        model_of(smf.glm(f"y ~ {year}", data, family=binomial()).fit(tol=1e-12))
        for year in ("I(year - 1990)", "year")
    )
    squared = (data.year - 1990) ** 2
    assert score_test(far, squared).statistic == pytest.approx(
        score_test(near, squared).statistic, rel=1e-6
    )


def test_weights_are_rows_written_out_and_offsets_are_kept():
    data = invented(300)
    times = np.arange(300) % 3 + 1
    offset = np.linspace(-1, 1, 300)
    weighted = smf.glm("y ~ x", data, family=binomial(), freq_weights=times, offset=offset).fit()
    rows = data.index.repeat(times)
    out = data.loc[rows].reset_index(drop=True)
    repeated = smf.glm("y ~ x", out, family=binomial(), offset=np.repeat(offset, times)).fit()
    assert score_test(model_of(weighted), data.x**2).statistic == pytest.approx(
        score_test(model_of(repeated), out.x**2).statistic
    )


def test_under_a_right_model_p_is_uniform():
    p = []
    for seed in range(60):
        data = invented(400, seed=seed)
        model = logit("y ~ x + w + count", data)
        added = [columns_of(each) for each in (data.x**2, data.w**2, data["count"] == 2)]
        p += [each.p_value for each in score_tests(model, fitted_rows(model), added)]
    assert np.mean(p) == pytest.approx(0.5, abs=0.07)
    assert np.mean(np.array(p) < 0.1) == pytest.approx(0.1, abs=0.07)


def test_a_fit_without_an_intercept_can_miss_one():
    data = invented()
    model = model_of(sm.Logit(data.y, data[["x", "w"]]).fit(disp=0))
    assert score_test(model, np.ones(len(data))).degrees_of_freedom == 1
    assert score_test(logit("y ~ x + w", data), np.ones(len(data))).degrees_of_freedom == 0
