"""Bends along numbers and along η."""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

from plainodds.answers.checks.curvature import curvature, knots_of, spline_columns
from plainodds.answers.checks.fitted_rows import fitted_rows
from plainodds.answers.checks.smoothing import binned
from tests.answers.checks.fits import binomial, invented, logit, model_of


def test_a_restricted_cubic_spline_is_straight_beyond_its_knots_and_smooth_at_them():
    x = np.linspace(-5, 15, 2001)
    knots = np.array([0.0, 2.0, 5.0, 9.0])
    found = spline_columns(x, knots)(slice(0, len(x)))
    assert np.linalg.matrix_rank(np.vstack([np.ones_like(x), found])) == 4
    bend = np.gradient(np.gradient(found, x, axis=1), x, axis=1)
    assert np.abs(bend[:, (x < -0.1) | ((x > 9.1) & (x < 14.9))]).max() < 1e-8
    assert np.abs(np.diff(bend[:, 5:-5], axis=1)).max() < 0.02 * np.abs(bend).max()


def test_knots_are_harrells_quantiles_where_values_differ():
    data = invented(2000)
    rows = fitted_rows(logit("y ~ x", data))
    knots = knots_of(binned(data.x.to_numpy(), rows))
    assert knots == pytest.approx(np.quantile(data.x, (0.05, 0.35, 0.65, 0.95)), abs=0.5)


def test_knots_are_four_also_where_most_cases_share_a_value():
    data = invented(500)
    x = np.where(np.arange(500) % 5 > 0, 0.0, data.x)
    assert len(knots_of(binned(x, fitted_rows(logit("y ~ x", data))))) == 4


def test_the_link_test_is_near_the_refit_with_the_square_of_eta():
    data = invented(3000, bend=0.1)
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    more = smf.logit("y ~ x + w + squared", data.assign(squared=result.fittedvalues**2)).fit(disp=0)
    link = curvature(model_of(result)).link
    assert link.degrees_of_freedom == 1
    assert link.statistic == pytest.approx(2 * (more.llf - result.llf), rel=0.1)
    assert link.statistic == pytest.approx(more.tvalues["squared"] ** 2, rel=0.15)


def test_along_eta_an_intercept_and_a_straight_line_are_tested_only_where_the_fit_lacks_them():
    data = invented(500)
    assert curvature(logit("y ~ x + w", data)).along_eta.degrees_of_freedom == 2
    through_zero = model_of(sm.Logit(data.y, data[["x", "w"]]).fit(disp=0))
    assert curvature(through_zero).along_eta.degrees_of_freedom == 3
    offset = np.linspace(-1, 1, 500)
    held = smf.glm("y ~ x + w", data, family=binomial(), offset=offset).fit()
    assert curvature(model_of(held)).along_eta.degrees_of_freedom == 3
