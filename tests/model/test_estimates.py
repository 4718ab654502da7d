"""Coefficients, covariance and intervals are the result's own, whatever kind it is."""

import warnings

import numpy as np
import pytest
import statsmodels.api as sm

from plainodds import FittedLogit
from plainodds.errors import FitRefused
from tests.model import made

FRAME = made.cases()
FORMULA = "left ~ age + depth + site"
COVARIANCE_STRUCTURES = {
    "independence": sm.cov_struct.Independence,
    "exchangeable": sm.cov_struct.Exchangeable,
    "autoregressive": lambda: sm.cov_struct.Autoregressive(grid=True),
    "stationary": lambda: sm.cov_struct.Stationary(max_lag=1, grid=True),
}
COVARIANCES = {
    "nonrobust": {},
    **{kind: {"cov_type": kind} for kind in ("HC0", "HC1", "HC2", "HC3")},
    "cluster": {"cov_type": "cluster", "cov_kwds": {"groups": FRAME["group"]}},
    "HAC": {"cov_type": "HAC", "cov_kwds": {"maxlags": 2}},
    "hac-groupsum": {
        "cov_type": "hac-groupsum",
        "cov_kwds": {"time": np.tile(np.arange(4), len(FRAME) // 4), "maxlags": 1},
    },
}


def arrays(bare):
    exog = sm.add_constant(FRAME[["age", "depth"]])
    return (FRAME["left"].to_numpy(), exog.to_numpy()) if bare else (FRAME["left"], exog)


def without_formula(kind, bare):
    outcome, exog = arrays(bare)
    if kind == "logit":
        return sm.Logit(outcome, exog).fit(disp=0)
    if kind == "glm":
        return sm.GLM(outcome, exog, family=sm.families.Binomial()).fit()
    return sm.GEE(outcome, exog, FRAME["group"], family=sm.families.Binomial()).fit()


def with_formula(kind, engine):
    with made.formula_engine(engine):
        model = {"logit": made.logit, "glm": made.glm, "gee": made.gee}[kind](FORMULA, FRAME)
    return model.fit(disp=0) if kind == "logit" else model.fit()


def assert_taken_over(result):
    fit = FittedLogit(result)
    np.testing.assert_array_equal(fit.model.coefficients, np.asarray(result.params))
    np.testing.assert_array_equal(fit.model.covariance, np.asarray(result.cov_params()))
    assert fit.subject.covariance_kind == result.cov_type
    assert fit.subject.no_interval == ""
    assert_intervals_agree(fit, result)
    return fit


def assert_intervals_agree(fit, result):
    """The interval of age's odds ratio is that of statsmodels."""
    place = [column.name for column in fit.model.design.columns].index(age_of(fit))
    row = fit.odds(age_of(fit), steps={age_of(fit): 1}).rows[0]
    lower, upper = np.asarray(result.conf_int())[place]
    found = (row.log_odds_ratio.lower, row.log_odds_ratio.upper)
    assert found == pytest.approx((lower, upper), rel=1e-9)
    assert row.p_value == pytest.approx(np.asarray(result.pvalues)[place], rel=1e-6)


def age_of(fit):
    names = [facts.name for facts in fit.subject.predictors]
    return "age" if "age" in names else "x1"


@pytest.mark.parametrize("engine", made.ENGINES)
@pytest.mark.parametrize("kind", ["logit", "glm", "gee"])
def test_a_formula_fit_is_taken_over(kind, engine):
    fit = assert_taken_over(with_formula(kind, engine))
    assert sorted(facts.name for facts in fit.subject.predictors) == ["age", "depth", "site"]


@pytest.mark.parametrize("bare", [False, True], ids=["frame", "bare arrays"])
@pytest.mark.parametrize("kind", ["logit", "glm", "gee"])
def test_a_fit_without_formula_is_taken_over(kind, bare):
    fit = assert_taken_over(without_formula(kind, bare))
    names = [facts.name for facts in fit.subject.predictors]
    assert names == (["x1", "x2"] if bare else ["age", "depth"])


@pytest.mark.parametrize(
    ("structure", "kind"),
    [
        *((structure, "robust") for structure in COVARIANCE_STRUCTURES),
        ("exchangeable", "naive"),
        ("exchangeable", "bias_reduced"),
    ],
)
def test_a_gee_keeps_its_structure_and_covariance(structure, kind):
    model = made.gee(FORMULA, FRAME, cov_struct=COVARIANCE_STRUCTURES[structure]())
    with warnings.catch_warnings():
        warnings.simplefilter("ignore")
        result = model.fit(cov_type=kind)
    assert_taken_over(result)


@pytest.mark.parametrize("use_t", [False, True], ids=["normal", "t"])
@pytest.mark.parametrize("covariance", COVARIANCES)
@pytest.mark.parametrize("kind", ["logit", "glm"])
def test_every_covariance_is_the_results_own(kind, covariance, use_t):
    model = {"logit": made.logit, "glm": made.glm}[kind](FORMULA, FRAME)
    quiet = {"disp": 0} if kind == "logit" else {}
    fit = assert_taken_over(model.fit(**quiet, **COVARIANCES[covariance], use_t=use_t))
    assert fit.subject.covariance_kind == covariance
    assert (fit.model.degrees_of_freedom is not None) == use_t


def test_t_intervals_of_clusters_count_the_clusters():
    clustered = {"cov_type": "cluster", "cov_kwds": {"groups": FRAME["group"]}, "use_t": True}
    fit = FittedLogit(made.glm(FORMULA, FRAME).fit(**clustered))
    assert fit.model.degrees_of_freedom == FRAME["group"].nunique() - 1


def test_a_result_without_its_wrapper_is_taken_over():
    result = with_formula("glm", "patsy")
    assert_taken_over(result._results)


def test_a_constrained_fit_keeps_its_constraint():
    result = made.glm(FORMULA, FRAME).fit_constrained("age = depth")
    fit = assert_taken_over(result)
    assert fit.odds("age", steps={"age": 1}).rows[0].odds_ratio.estimate == pytest.approx(
        fit.odds("depth", steps={"depth": 1}).rows[0].odds_ratio.estimate
    )


PENALISED = {
    "Logit, L1": lambda: made.logit(FORMULA, FRAME).fit_regularized(alpha=1, disp=0),
    "GLM, elastic net": lambda: made.glm(FORMULA, FRAME).fit_regularized(alpha=0.01),
    "GLM, ridge": lambda: made.glm(FORMULA, FRAME).fit_regularized(alpha=0.01, L1_wt=0.0),
    "GLM, L1": lambda: made.glm(FORMULA, FRAME).fit_regularized(alpha=0.01, method="l1_slsqp"),
    "GLM, refitted after selection": lambda: made.glm(FORMULA, FRAME).fit_regularized(
        alpha=0.05, refit=True
    ),
    "GEE": lambda: made.gee(FORMULA, FRAME).fit_regularized(0.05),
}


@pytest.mark.parametrize("kind", PENALISED)
def test_a_penalised_fit_gives_estimates_and_says_why_there_are_no_intervals(kind):
    result = PENALISED[kind]()
    fit = FittedLogit(result)
    np.testing.assert_array_equal(fit.model.coefficients, np.asarray(result.params))
    assert fit.model.covariance is None
    assert "penalised" in fit.subject.no_interval
    row = fit.odds("age", steps={"age": 1}).rows[0]
    place = list(result.model.exog_names).index("age")
    assert row.odds_ratio.estimate == pytest.approx(np.exp(np.asarray(result.params)[place]))
    assert (row.odds_ratio.se, row.odds_ratio.lower, row.odds_ratio.upper) == (None,) * 3


@pytest.mark.parametrize(
    ("column", "method"), [("total", "newton"), ("nothing", "lbfgs")], ids=["sum", "zeros"]
)
def test_a_fit_without_usable_standard_errors_is_taken_in_without_intervals(column, method):
    frame = FRAME.assign(total=FRAME["age"] + FRAME["depth"], nothing=0.0)
    model = made.logit(f"left ~ age + depth + {column}", frame)
    fit = FittedLogit(model.fit(disp=0, method=method))
    assert fit.model.covariance is None
    assert column in fit.model.record.without_standard_error
    assert f"{column} is not a number" in fit.subject.no_interval
    assert "leave one of them out" in fit.subject.no_interval
    assert np.isfinite(fit.model.coefficients).all()


def test_coefficients_that_are_no_numbers_are_refused():
    result = made.logit("left ~ age", FRAME).fit(disp=0)
    result._results.params = np.array([np.nan, 1.0])
    with pytest.raises(FitRefused, match="coefficient of Intercept is not a number"):
        FittedLogit(result)
