"""Profiles are completed and coded, and the information is that of the fit."""

import numpy as np
import pytest

from plainodds import FittedLogit, QuestionRefused
from tests.model import made

FRAME = made.cases()
FORMULA = "left ~ age * site + visits + flag + soil"


@pytest.fixture(scope="module")
def fit():
    return FittedLogit(made.glm(FORMULA, FRAME).fit())


def test_a_profile_is_completed_with_what_is_typical(fit):
    names = [facts.name for facts in fit.subject.predictors]
    completed = fit.model.completed({"site": "b", "age": np.int64(3)})
    assert [name for name, _ in completed] == names
    assert dict(completed) == dict(fit.model.typical) | {"site": "b", "age": 3.0}


@pytest.mark.parametrize(
    ("name", "stated", "held"),
    [
        ("age", 3, 3.0),
        ("age", np.float32(2.5), 2.5),
        ("visits", 2.0, 2),
        ("visits", 2.5, 2.5),
        ("flag", 1, True),
        ("flag", np.bool_(False), False),
        ("site", np.str_("c"), "c"),
    ],
)
def test_a_value_is_held_as_the_predictors_own_kind(fit, name, stated, held):
    found = dict(fit.model.completed({name: stated}))[name]
    assert (found, type(found)) == (held, type(held))


def test_a_profile_may_come_as_pairs(fit):
    assert fit.model.completed((("site", "b"),)) == fit.model.completed({"site": "b"})


def test_rows_of_profiles_are_rows_of_the_sample(fit):
    names = [facts.name for facts in fit.subject.predictors]
    profiles = [fit.model.completed(row) for row in FRAME[names].to_dict("records")[:20]]
    np.testing.assert_array_equal(fit.model.rows(profiles), fit.model.sample.matrix[:20])


def test_an_unknown_predictor_is_refused(fit):
    with pytest.raises(QuestionRefused, match=r"no predictor 'height'. It has: "):
        fit.model.completed({"height": 3})


WEIGHTS = np.random.default_rng(0).integers(1, 4, len(FRAME))
OFFSET = np.random.default_rng(1).normal(size=len(FRAME)) / 3


@pytest.mark.parametrize(
    "settings",
    [{}, {"freq_weights": WEIGHTS}, {"offset": OFFSET}, {"var_weights": WEIGHTS, "offset": OFFSET}],
    ids=["plain", "weighted", "offset", "both"],
)
def test_the_inverse_information_is_the_model_based_covariance(settings):
    result = made.glm(FORMULA, FRAME, **settings).fit()
    model = FittedLogit(result).model
    np.testing.assert_allclose(model.information_inverse, result.cov_params(), rtol=1e-6, atol=1e-9)


def test_the_inverse_information_stays_model_based_beside_a_robust_covariance():
    model = made.glm(FORMULA, FRAME)
    robust, plain = model.fit(cov_type="HC0"), model.fit()
    found = FittedLogit(robust).model
    assert not np.allclose(found.covariance, plain.cov_params(), rtol=1e-3)
    np.testing.assert_allclose(found.information_inverse, plain.cov_params(), rtol=1e-6, atol=1e-9)


def test_leverages_are_those_of_each_row(fit):
    X = fit.model.sample.matrix
    leverages = np.diag(X @ fit.model.information_inverse @ X.T)
    expected = (np.quantile(leverages, 0.99), leverages.max())
    assert fit.model.leverage_quantiles == pytest.approx(expected)


def test_standard_deviations_are_those_of_the_numbers(fit):
    assert fit.model.standard_deviations == pytest.approx(
        {name: FRAME[name].std(ddof=0) for name in ("age", "visits")}
    )


def test_blocks_cover_every_row_once(fit):
    rows = np.arange(fit.model.sample.rows)
    np.testing.assert_array_equal(
        np.concatenate([rows[b] for b in fit.model.sample.blocks()]), rows
    )
