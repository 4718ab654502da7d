"""The test of an interaction takes all terms that join two predictors, however they are coded."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from scipy.stats import chi2, f

import plainodds as po
from tests.model.made import cases, formula_engine, gee, glm, logit

NESTED = {
    # formula, without the joining terms, a, b, degrees of freedom
    "a number and levels": ("age * site", "age + site", "age", "site", 2),
    "two categories": ("soil * site", "soil + site", "soil", "site", 4),
    "two numbers": ("age * depth", "age + depth", "age", "depth", 1),
    "a spline and levels": (
        "bs(age, df=4) * flag",
        "bs(age, df=4) + flag",
        "flag",
        "age",
        4,
    ),
    "a spline and a number": ("bs(age, df=4) * depth", "bs(age, df=4) + depth", "age", "depth", 4),
    "three together": (
        "age * site * flag",
        "age * flag + site * flag",
        "age",
        "site",
        4,
    ),
    "one factor of both": ("age + depth + I(age * depth)", "age + depth", "age", "depth", 1),
    "powers": ("age * depth + I(age**2) : depth", "age + depth", "age", "depth", 2),
}


@pytest.fixture(scope="module")
def frame():
    return cases(900)


def asked(result, a, b, **settings):
    return po.FittedLogit(result).pair(a, b, **settings).interaction


@pytest.mark.parametrize(
    ("name", "engine"),
    [(name, "patsy") for name in NESTED]
    + [("a spline and levels", "formulaic"), ("three together", "formulaic")],
)
def test_the_likelihood_ratio_is_that_of_the_model_without_the_terms(frame, name, engine):
    whole, less, a, b, freedom = NESTED[name]
    with formula_engine(engine):
        full = logit(f"left ~ {whole}", frame).fit(disp=0, maxiter=100, tol=1e-12)
        nested = logit(f"left ~ {less}", frame).fit(disp=0, maxiter=100, tol=1e-12)
        found = asked(full, a, b, test="likelihood_ratio")
    expected = 2 * (full.llf - nested.llf)
    assert found.joined
    assert found.test.kind == "likelihood_ratio"
    assert found.test.degrees_of_freedom == freedom
    assert found.test.statistic == pytest.approx(expected, rel=1e-6, abs=1e-7)
    assert found.test.p_value == pytest.approx(chi2.sf(expected, freedom), rel=1e-5)


@pytest.mark.parametrize("name", [name for name in NESTED if name != "three together"])
def test_the_wald_test_is_statsmodels_of_all_those_terms(frame, name):
    whole, _, a, b, freedom = NESTED[name]
    result = logit(f"left ~ {whole}", frame).fit(disp=0)
    joint = [n for n in result.params.index if ":" in n or "I(age * depth)" in n]
    theirs = result.wald_test(np.eye(len(result.params))[result.params.index.isin(joint)],
                              scalar=True, use_f=False)  # fmt: skip
    found = asked(result, a, b).test
    assert found.kind == "wald"
    assert found.degrees_of_freedom == len(joint) == freedom
    assert found.statistic == pytest.approx(float(theirs.statistic), rel=1e-6)
    assert found.p_value == pytest.approx(float(theirs.pvalue), rel=1e-5)
    assert found.denominator is None


CODINGS = {
    "treatment": "C(site) * age",
    "another reference": "C(site, Treatment('c')) * age",
    "sums": "C(site, Sum) * age",
    "slopes within levels": "C(site) + C(site):age",
    "without an intercept": "0 + C(site) + C(site):age",
    "centred": "C(site) * I(age - 5)",
    "rescaled": "C(site) * I(age / 1000)",
}


@pytest.mark.parametrize("test", ["wald", "likelihood_ratio"])
@pytest.mark.parametrize("coding", CODINGS)
def test_how_levels_are_coded_does_not_matter(frame, coding, test):
    expected = asked(logit("left ~ site * age", frame).fit(disp=0, tol=1e-12), "age", "site",
                     test=test).test  # fmt: skip
    result = logit(f"left ~ {CODINGS[coding]}", frame).fit(disp=0, tol=1e-12)
    found = asked(result, "age", "site", test=test).test
    assert found.degrees_of_freedom == expected.degrees_of_freedom == 2
    assert found.statistic == pytest.approx(expected.statistic, rel=1e-6)


def test_the_wald_test_of_a_third_factors_groups_is_a_hand_made_one(frame):
    result = logit("left ~ age * site * flag", frame).fit(disp=0)
    names = result.params.index
    joint = [n for n in names if "age" in n and "site" in n]
    theirs = result.wald_test(np.eye(len(names))[names.isin(joint)], scalar=True, use_f=False)
    found = asked(result, "age", "site").test
    assert found.degrees_of_freedom == len(joint)
    assert found.statistic == pytest.approx(float(theirs.statistic), rel=1e-6)


@pytest.mark.parametrize(
    "formula", ["age + site", "I(age + depth) + site", "I(2 * age + 1) + depth + site"]
)
def test_terms_that_only_add_join_nothing(frame, formula):
    b = "depth" if "depth" in formula else "site"
    found = asked(logit(f"left ~ {formula}", frame).fit(disp=0), "age", b)
    assert not found.joined
    assert found.test is None
    refit = asked(logit(f"left ~ {formula}", frame).fit(disp=0), "age", b, test="likelihood_ratio")
    assert refit.test is None


def test_a_derived_product_joins(frame):
    frame = frame.assign(both=frame.age * frame.depth)
    X = sm.add_constant(frame[["age", "depth", "both"]])
    result = sm.Logit(frame.left, X).fit(disp=0)
    fit = po.FittedLogit(result, frame, derived={"both": "age * depth"})
    found = fit.pair("age", "depth").interaction
    assert found.test.degrees_of_freedom == 1
    assert found.test.statistic == pytest.approx(float(result.tvalues["both"]) ** 2, rel=1e-8)


def test_an_f_statistic_where_the_result_uses_t(frame):
    result = glm("left ~ age * site", frame).fit(use_t=True)
    found = asked(result, "age", "site").test
    joint = [n for n in result.params.index if ":" in n]
    theirs = result.wald_test(np.eye(len(result.params))[result.params.index.isin(joint)],
                              scalar=True, use_f=True)  # fmt: skip
    assert found.denominator == result.df_resid
    assert found.statistic == pytest.approx(float(theirs.statistic), rel=1e-7)
    assert found.p_value == pytest.approx(f.sf(found.statistic, 2, result.df_resid), rel=1e-9)


def test_a_gee_has_a_wald_test_and_no_likelihood(frame):
    result = gee("left ~ age * site", frame).fit()
    assert asked(result, "age", "site").test.degrees_of_freedom == 2
    with pytest.raises(po.QuestionRefused, match=r"test='likelihood_ratio'.*GEE.*test='wald'"):
        asked(result, "age", "site", test="likelihood_ratio")


def test_weights_and_offsets_are_kept_in_the_refit(frame):
    weights, offset = np.arange(len(frame)) % 3 + 1, np.linspace(-1, 1, len(frame))
    settings = {"freq_weights": weights, "offset": offset}
    full, less = (
        glm(f"left ~ {formula}", frame, **settings).fit(tol=1e-12)
        for formula in ("age * site", "age + site")
    )
    found = asked(full, "age", "site", test="likelihood_ratio").test
    assert found.statistic == pytest.approx(less.deviance - full.deviance, rel=1e-6)


@pytest.mark.filterwarnings("ignore:The design matrix is rank-deficient")
def test_combinations_without_rows_take_their_degrees_of_freedom_away(frame):
    empty = (frame.soil == "high") & (frame.site == "c")
    kept = frame[~empty].reset_index(drop=True)
    full = glm("left ~ C(soil) * C(site)", kept).fit(tol=1e-12)
    less = glm("left ~ C(soil) + C(site)", kept).fit(tol=1e-12)
    for kind in ("wald", "likelihood_ratio"):
        found = asked(full, "soil", "site", test=kind).test
        assert found.degrees_of_freedom == 3
    assert found.statistic == pytest.approx(less.deviance - full.deviance, rel=1e-6)
    # by hand: the three contrasts of the four that rows do tell
    told = asked(full, "soil", "site").test
    cells = [(one, two) for one in ("low", "middle", "high") for two in ("a", "b", "c")]
    dummies = pd.DataFrame(
        {f"{one} {two}": ((kept.soil == one) & (kept.site == two)).astype(float)
         for one, two in cells if (one, two) != ("high", "c")}
    )  # fmt: skip
    by_cell = sm.GLM(kept.left, dummies, family=sm.families.Binomial()).fit(tol=1e-12)
    contrasts = []
    for one, other, two, also in (
        ("low", "middle", "a", "b"),
        ("low", "middle", "a", "c"),
        ("low", "high", "a", "b"),
    ):
        row = pd.Series(0.0, dummies.columns)
        row[f"{one} {two}"], row[f"{other} {also}"] = 1, 1
        row[f"{one} {also}"], row[f"{other} {two}"] = -1, -1
        contrasts.append(row)
    theirs = by_cell.wald_test(np.array(contrasts), scalar=True, use_f=False)
    assert told.statistic == pytest.approx(float(theirs.statistic), rel=1e-6)


def test_without_a_covariance_there_is_no_wald_test(frame):
    result = logit("left ~ age * site", frame).fit_regularized(alpha=1.0, disp=0)
    found = asked(result, "age", "site")
    assert found.joined
    assert found.test is None


def test_clusters_fewer_than_terms_leave_the_directions_that_they_tell(frame):
    groups = np.arange(len(frame)) % 3
    result = smf.logit("left ~ bs(age, df=6) * site", frame).fit(
        disp=0, cov_type="cluster", cov_kwds={"groups": groups}
    )
    found = asked(result, "age", "site").test
    assert found.degrees_of_freedom <= 3
    assert np.isfinite(found.statistic)
