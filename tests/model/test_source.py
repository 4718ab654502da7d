"""The rows, weights and offset of the fit are found, wherever they are kept."""

import pickle

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm

from plainodds import FitRefused, FittedLogit, Predictor
from tests.model import made

INDEXES = {
    "range": pd.RangeIndex,
    "reversed": lambda n: pd.RangeIndex(n)[::-1],
    "text": lambda n: pd.Index([f"row {i}" for i in range(n)]),
    "dates": lambda n: pd.date_range("2020-01-01", periods=n),
    "duplicated": lambda n: pd.Index(np.arange(n) // 3),
    "two levels": lambda n: pd.MultiIndex.from_arrays([np.arange(n) % 2, np.arange(n)]),
}
FORMULA = "left ~ age + site + soil"


def with_gaps(index="range"):
    frame = made.cases()
    frame.loc[[3, 17], "age"] = np.nan
    frame.loc[[17, 30], "site"] = None
    frame.loc[[41], "soil"] = None
    frame.loc[[50], "money"] = np.nan  # of a column that the formula doesn't read
    frame["left"] = frame["left"].astype(float)
    frame.loc[[60], "left"] = np.nan
    frame.index = INDEXES[index](len(frame))
    return frame


def whole_rows(frame):
    return frame.dropna(subset=["left", "age", "site", "soil"])


def assert_rows_are_those_of_the_fit(fit, result, frame):
    columns = fit.model.sample.columns
    np.testing.assert_array_equal(columns["age"], frame["age"])
    for name in ("site", "soil"):
        levels = np.array(fit.subject.predictor(name).levels, dtype=object)
        np.testing.assert_array_equal(levels[columns[name]], frame[name].astype(object))
    np.testing.assert_allclose(fit.model.design.rows(columns), result.model.exog, rtol=1e-12)
    assert fit.subject.rows == len(frame) == len(result.model.endog)


@pytest.mark.parametrize(
    ("engine", "index"),
    [
        (engine, index)
        for engine in made.ENGINES
        for index in INDEXES
        # statsmodels itself cannot drop rows of a duplicated index through formulaic
        if (engine, index) != ("formulaic", "duplicated")
    ],
)
@pytest.mark.parametrize("kind", [made.logit, made.glm, made.gee], ids=lambda kind: kind.__name__)
def test_rows_dropped_for_missing_values_are_left_out(engine, kind, index):
    frame = with_gaps(index)
    with made.formula_engine(engine):
        result = kind(FORMULA, frame).fit()
    if index == "duplicated" and kind is made.gee:
        with pytest.raises(FitRefused, match=r"which of them cannot be told.*dropna"):
            FittedLogit(result)
        fit = FittedLogit(result, data=whole_rows(frame))
    else:
        fit = FittedLogit(result)
    assert_rows_are_those_of_the_fit(fit, result, whole_rows(frame))


@pytest.mark.parametrize("engine", made.ENGINES)
def test_a_missing_weight_drops_its_row_too(engine):
    frame = with_gaps()
    weights = np.arange(1.0, len(frame) + 1)
    weights[[5, 17]] = np.nan
    with made.formula_engine(engine):
        result = made.glm(FORMULA, frame, freq_weights=weights).fit()
    used = whole_rows(frame).drop(index=5)
    fit = FittedLogit(result)
    assert_rows_are_those_of_the_fit(fit, result, used)
    np.testing.assert_array_equal(fit.model.sample.weights, used.index + 1)


@pytest.mark.parametrize("kind", ["Logit", "GLM", "GEE"])
def test_rows_dropped_without_a_formula_are_left_out(kind):
    frame = with_gaps()
    exog = sm.add_constant(frame[["age", "depth"]])
    made_by = {
        "Logit": lambda: sm.Logit(frame["left"], exog, missing="drop"),
        "GLM": lambda: sm.GLM(frame["left"], exog, sm.families.Binomial(), missing="drop"),
        "GEE": lambda: sm.GEE(
            frame["left"], exog, frame["group"], family=sm.families.Binomial(), missing="drop"
        ),
    }
    result = made_by[kind]().fit()
    used = frame.dropna(subset=["left", "age"])
    for fit in (FittedLogit(result), FittedLogit(result, data=frame)):
        np.testing.assert_array_equal(fit.model.sample.columns["age"], used["age"])
        assert fit.subject.rows == len(used)


@pytest.mark.parametrize("engine", made.ENGINES)
@pytest.mark.parametrize("index", ["range", "text"])
def test_a_subset_is_the_sample(engine, index):
    frame = with_gaps(index)
    older = (frame["visits"] > 1).to_numpy()
    with made.formula_engine(engine):
        result = made.glm(FORMULA, frame, subset=older).fit()
    used = whole_rows(frame[older])
    assert_rows_are_those_of_the_fit(FittedLogit(result), result, used)
    # the whole frame will do as well as the rows of the subset
    for data in (frame, frame[older], used):
        assert_rows_are_those_of_the_fit(FittedLogit(result, data=data), result, used)


# --- weights and offsets ------------------------------------------------------


@pytest.mark.parametrize("engine", made.ENGINES)
def test_frequency_weights_are_rows_written_out(engine):
    frame = made.cases()
    times = np.random.default_rng(4).integers(0, 4, len(frame))
    written_out = frame.loc[np.repeat(frame.index, times)]
    formula = "left ~ age * site + soil"
    with made.formula_engine(engine):
        weighted = FittedLogit(made.glm(formula, frame, freq_weights=times).fit())
        plain = FittedLogit(made.glm(formula, written_out.reset_index()).fit())
    np.testing.assert_allclose(weighted.model.coefficients, plain.model.coefficients, rtol=1e-6)
    np.testing.assert_allclose(weighted.model.covariance, plain.model.covariance, rtol=1e-6)
    assert weighted.model.typical == plain.model.typical
    assert weighted.subject.outcome.share == pytest.approx(plain.subject.outcome.share)
    for one, other in zip(weighted.subject.predictors, plain.subject.predictors, strict=True):
        assert one.step == pytest.approx(other.step, nan_ok=True)
        assert one.quartiles == pytest.approx(other.quartiles, nan_ok=True)
    along = {"by": "site", "others": "observed", "at": (2.0, 5.0, 8.0)}
    one, other = weighted.curve("age", **along), plain.curve("age", **along)
    for line, same in zip(one.lines, other.lines, strict=True):
        np.testing.assert_allclose(line.estimate, same.estimate, rtol=1e-6)
        np.testing.assert_allclose(line.se, same.se, rtol=1e-6)


def test_variance_weights_weigh_the_averages():
    frame = made.cases()
    weights = np.random.default_rng(4).uniform(0.5, 3, len(frame))
    result = made.glm("left ~ age + site", frame, var_weights=weights).fit()
    fit = FittedLogit(result)
    np.testing.assert_array_equal(fit.model.sample.weights, weights)
    found = fit.curve("age", others="observed", at=(4.0,)).lines[0].estimate[0]
    moved = made.predicted(result, frame.assign(age=4.0))
    assert found == pytest.approx(np.average(moved, weights=weights))


def test_both_weights_are_multiplied():
    frame = made.cases()
    draw = np.random.default_rng(4)
    freq, var = draw.integers(1, 4, len(frame)), draw.uniform(0.5, 2, len(frame))
    result = made.glm("left ~ age", frame, freq_weights=freq, var_weights=var).fit()
    np.testing.assert_allclose(FittedLogit(result).model.sample.weights, freq * var)


def test_an_unweighted_fit_has_no_weights():
    frame = made.cases()
    for result in (
        made.glm("left ~ age", frame).fit(),
        made.glm("left ~ age", frame, freq_weights=np.ones(len(frame))).fit(),
        made.gee("left ~ age", frame).fit(),
        made.logit("left ~ age", frame).fit(disp=0),
    ):
        assert FittedLogit(result).model.sample.weights is None


def test_weights_of_a_gee_are_its_own():
    frame = made.cases()
    weights = np.random.default_rng(4).uniform(0.5, 3, len(frame))
    result = made.gee("left ~ age", frame, weights=weights).fit()
    np.testing.assert_array_equal(FittedLogit(result).model.sample.weights, weights)


@pytest.mark.filterwarnings("ignore:unknown kwargs")
def test_weights_that_a_logit_ignores_are_told():
    frame = made.cases()
    result = made.logit("left ~ age", frame, freq_weights=frame["visits"]).fit(disp=0)
    fit = FittedLogit(result)
    assert fit.model.sample.weights is None
    assert any("ignores freq_weights=" in notice for notice in fit.subject.notices)


OFFSET = np.random.default_rng(6).normal(0.4, 0.3, 240)


@pytest.mark.parametrize("kind", [made.logit, made.glm, made.gee], ids=lambda kind: kind.__name__)
@pytest.mark.parametrize("engine", made.ENGINES)
def test_an_offset_is_held_at_its_median_and_kept_in_averages(engine, kind):
    frame = made.cases()
    with made.formula_engine(engine):
        result = kind("left ~ age + site", frame, offset=OFFSET).fit()
    fit = FittedLogit(result)
    np.testing.assert_array_equal(fit.model.sample.offset, OFFSET)
    assert fit.subject.offset == pytest.approx(np.median(OFFSET))
    slope = dict(zip(result.model.exog_names, np.asarray(result.params), strict=True))
    eta = slope["Intercept"] + 4 * slope["age"] + slope["site[T.b]"] + np.median(OFFSET)
    chance = made.chances(fit, [{"age": 4.0, "site": "b"}])[0]
    assert chance == pytest.approx(1 / (1 + np.exp(-eta)))
    moved = np.asarray(result.model.exog).copy()
    moved[:, list(result.model.exog_names).index("age")] = 4.0
    expected = np.mean(1 / (1 + np.exp(-(moved @ np.asarray(result.params) + OFFSET))))
    found = fit.curve("age", others="observed", at=(4.0,)).lines[0].estimate[0]
    assert found == pytest.approx(expected)


def test_the_offset_may_be_held_elsewhere():
    result = made.glm("left ~ age", made.cases(), offset=OFFSET).fit()
    assert FittedLogit(result, offset=-1).subject.offset == -1.0
    assert FittedLogit(result, offset=0).subject.offset == 0.0


# --- pickled results, and results without their data ---------------------------


@pytest.mark.parametrize("kind", [made.logit, made.glm, made.gee], ids=lambda kind: kind.__name__)
@pytest.mark.parametrize("engine", made.ENGINES)
def test_a_pickled_and_loaded_result_gives_the_same_model(engine, kind):
    frame = with_gaps()
    with made.formula_engine(engine):
        result = kind(FORMULA + " + np.log(age) + bs(depth, df=4)", frame).fit()
        loaded = pickle.loads(pickle.dumps(result))
    before, after = FittedLogit(result), FittedLogit(loaded)
    assert after.subject == before.subject
    np.testing.assert_array_equal(after.model.coefficients, before.model.coefficients)
    np.testing.assert_array_equal(after.model.covariance, before.model.covariance)
    profile = {"age": 3.0, "depth": 1.0, "site": "b"}
    assert after.profile(profile) == before.profile(profile)


@pytest.mark.parametrize("kind", [made.logit, made.glm, made.gee], ids=lambda kind: kind.__name__)
@pytest.mark.parametrize("engine", made.ENGINES)
def test_a_result_without_its_data_needs_them_again(engine, kind):
    frame = whole_rows(with_gaps())
    offset = OFFSET[: len(frame)]
    with made.formula_engine(engine):
        result = kind(FORMULA, frame, offset=offset).fit()
    before = FittedLogit(result)
    result.remove_data()
    with pytest.raises(FitRefused, match=r"removed.*FittedLogit\(result, data=frame\)"):
        FittedLogit(result)
    after = FittedLogit(result, data=frame)
    np.testing.assert_allclose(after.model.sample.matrix, before.model.sample.matrix, rtol=1e-12)
    assert any("no longer carries its data" in notice for notice in after.subject.notices)
    assert after.subject.offset == before.subject.offset
    profile = {"age": 3.0, "site": "b"}
    assert made.chances(after, [profile]) == pytest.approx(made.chances(before, [profile]))
    with pytest.raises(FitRefused, match="dropna"):
        FittedLogit(result, data=frame.iloc[:-1])


def test_without_a_formula_removed_data_cannot_be_made_again():
    frame = made.cases()
    exog = sm.add_constant(frame[["age"]])
    result = sm.Logit(frame["left"], exog).fit(disp=0)
    result.remove_data()
    with pytest.raises(FitRefused, match=r"without a formula.*fit it again"):
        FittedLogit(result, data=frame)


def test_data_handed_over_take_the_place_of_the_results_own():
    frame = made.cases()
    result = made.glm("left ~ age + site", frame).fit()
    result.model.data.frame = None
    handed = FittedLogit(result, data=frame)
    assert handed.subject.setting.with_data
    assert handed.subject.predictor("site").levels == ("a", "b", "c")


def test_a_formula_fit_of_a_mapping_is_taken_in():
    frame = made.cases()
    with pytest.warns(DeprecationWarning, match="dict"):
        result = made.glm("left ~ age", {"left": frame["left"], "age": frame["age"]}).fit()
    assert FittedLogit(result, predictors={"age": Predictor(step=1)}).subject.rows == len(frame)
