"""The likelihood at the fit's coefficients, and the proof of overlap that it gives."""

import gc
import weakref

import numpy as np
import pytest
import statsmodels.api as sm

import plainodds as po
from plainodds.answers.optimum import optimum_of
from tests.model import made

FRAME = made.cases()
FORMULA = "left ~ age + depth + site"


@pytest.mark.parametrize("iterations", [1, 35])
def test_score_and_information_are_statsmodels_own(iterations):
    model = made.logit(FORMULA, FRAME)
    result = model.fit(maxiter=iterations, disp=0, warn_convergence=False)
    found = optimum_of(po.FittedLogit(result).model)
    np.testing.assert_allclose(found.score, model.score(result.params), atol=1e-8)
    np.testing.assert_allclose(found.information, -model.hessian(result.params), rtol=1e-9)
    np.testing.assert_allclose(found.inverse, np.linalg.inv(found.information), rtol=1e-6)


def test_weights_and_offset_count():
    weights = FRAME["visits"] + 1.0
    settings = {"freq_weights": weights, "offset": FRAME["real"].astype(float)}
    result = made.glm(FORMULA, FRAME, **settings).fit(tol=1e-12)
    found = optimum_of(po.FittedLogit(result).model)
    np.testing.assert_allclose(found.inverse, result.cov_params(), rtol=1e-6)
    assert np.abs(found.step).max() < 1e-6


def test_overlap_can_be_proved_some_way_off_the_optimum():
    result = made.logit(FORMULA, FRAME).fit(maxiter=3, disp=0, warn_convergence=False)
    assert optimum_of(po.FittedLogit(result).model).overlap


def test_columns_that_repeat_each_other_prove_nothing():
    result = made.glm("left ~ age + I(2 * age)", FRAME).fit()
    found = optimum_of(po.FittedLogit(result).model)
    assert found.inverse is None
    assert not found.overlap


def test_the_proof_bounds_how_far_the_optimum_lies():
    """In the information's norm the optimum is nearer than −ln(1 − νR)/R, by the same proof."""
    X = sm.add_constant(np.random.default_rng(0).normal(size=(400, 3)))
    eta = X @ [0.2, 1.0, -1.0, 0.5]
    y = (np.random.default_rng(1).uniform(size=400) < 1 / (1 + np.exp(-eta))) * 1.0
    whole = sm.Logit(y, X).fit(disp=0)
    for iterations in (2, 3, 4):
        part = sm.Logit(y, X).fit(maxiter=iterations, disp=0, warn_convergence=False)
        found = optimum_of(po.FittedLogit(part).model)
        decrement = np.sqrt(found.score @ found.inverse @ found.score)
        reach = np.sqrt(np.einsum("ij,jk,ik->i", X, found.inverse, X).max())
        if decrement * reach < 1:
            away = whole.params - part.params
            distance = np.sqrt(away @ found.information @ away)
            assert distance <= -np.log(1 - decrement * reach) / reach + 1e-9


def test_it_is_found_once_and_forgotten_with_the_model():
    model = po.FittedLogit(made.logit(FORMULA, FRAME).fit(disp=0)).model
    assert optimum_of(model) is optimum_of(model)
    gone = weakref.ref(model)
    del model
    gc.collect()
    assert gone() is None
