"""Small fits by Newton's method."""

import numpy as np
import pytest
import statsmodels.api as sm

from plainodds.answers.checks.refitting import refitted
from tests.answers.checks.fits import binomial, invented


def test_it_is_statsmodels_with_weights_and_offset():
    data = invented(300)
    X = sm.add_constant(data[["x", "w"]]).to_numpy()
    weights, offset = np.arange(300) % 4 + 0.0, np.linspace(-1, 1, 300)
    y = data.y.to_numpy(dtype=float)
    found = refitted(X, y, weights, np.zeros(3), offset)
    theirs = sm.GLM(y, X, family=binomial(), freq_weights=weights, offset=offset).fit(tol=1e-12)
    assert found.converged
    assert found.coefficients == pytest.approx(theirs.params, rel=1e-6)
    assert found.covariance == pytest.approx(theirs.cov_params(), rel=1e-4)
    assert found.deviance == pytest.approx(theirs.deviance)


def test_separated_outcomes_do_not_converge():
    x = np.linspace(-1, 1, 40)
    X = np.column_stack([np.ones(40), x])
    assert not refitted(X, (x > 0.01).astype(float), np.ones(40), np.zeros(2)).converged


def test_columns_that_follow_from_each_other_lower_the_rank():
    y, x = np.arange(40) % 2.0, np.linspace(-1, 1, 40)
    empty = np.column_stack([np.ones(40), np.zeros(40)])
    twice = np.column_stack([np.ones(40), x, 3 - 2e6 * x])
    for X, rank in ((empty, 1), (twice, 2), (twice[:, [0, 2]], 2)):
        found = refitted(X, y, np.ones(40), np.zeros(X.shape[1]))
        assert (found.converged, found.rank) == (True, rank)


def test_a_start_that_is_far_off_is_brought_back():
    data = invented(300)
    X = np.column_stack([np.ones(300), (data.x - 50) / 10])
    y = data.y.to_numpy(dtype=float)
    near = refitted(X, y, np.ones(300), np.zeros(2))
    far = refitted(X, y, np.ones(300), np.array([2.0, -3.0]))
    assert far.coefficients == pytest.approx(near.coefficients, abs=1e-6)
