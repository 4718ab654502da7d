"""The analyst's frame is left alone, let go, and not held twice."""

import copy
import gc
import tracemalloc
import weakref

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm

from plainodds import FittedLogit
from tests.model import made

FORMULA = (
    "left ~ bs(age, df=4) * site + depth + np.log(visits + 1) + flag + soil + band + text + whole"
)


def ask_everything(fit):
    fit.odds()
    fit.curve("age", by="site", others="observed")
    fit.profile({"age": 3.0}, against={"age": 4.0})


@pytest.mark.parametrize("engine", made.ENGINES)
def test_the_frame_is_not_changed(engine):
    frame = made.cases()
    frame.loc[[3, 9], "depth"] = np.nan
    before = copy.deepcopy(frame)
    with made.formula_engine(engine):
        result = made.glm(FORMULA, frame).fit()
    ask_everything(FittedLogit(result))
    pd.testing.assert_frame_equal(frame, before)
    ask_everything(FittedLogit(result, data=frame, derived={}))
    pd.testing.assert_frame_equal(frame, before)


@pytest.mark.parametrize("engine", made.ENGINES)
def test_the_frame_may_change_after_it_was_taken_in(engine):
    frame = made.cases()
    with made.formula_engine(engine):
        result = made.glm(FORMULA, frame).fit()
    fit, untouched = FittedLogit(result), FittedLogit(result)
    along = {"by": "site", "others": "observed", "at": (3.0, 5.0)}
    expected = untouched.curve("age", **along)
    for name in ("age", "visits"):
        frame[name] = 0
    frame.loc[:, "site"] = "a"
    frame.loc[:, "flag"] = False
    assert fit.curve("age", **along) == expected


@pytest.mark.parametrize("way", ["patsy", "formulaic", "frame", "frame, with data="])
def test_the_frame_is_let_go_with_the_result(way):
    frame = made.cases()
    if way in made.ENGINES:
        with made.formula_engine(way):
            result = made.glm(FORMULA, frame).fit()
        fit = FittedLogit(result)
    else:
        exog = sm.add_constant(frame[["age", "depth"]])
        result = sm.GLM(frame["left"], exog, family=sm.families.Binomial()).fit()
        fit = FittedLogit(result, data=frame if "data" in way else None)
        del exog
    gone = weakref.ref(frame), weakref.ref(result.model)
    del frame, result
    gc.collect()
    assert [each() for each in gone] == [None, None]
    fit.profile({"age": 3.0})
    fit.curve("age", others="observed", at=(3.0,))


def test_no_part_of_the_frame_is_kept():
    frame = made.cases()
    fit = FittedLogit(made.glm("left ~ age + depth + visits + flag + soil", frame).fit())
    for name, column in fit.model.sample.columns.items():
        held = frame[name].cat.codes if name == "soil" else frame[name]
        assert not np.shares_memory(column, held.to_numpy())


@pytest.mark.parametrize("kind", ["formula", "frame", "bare arrays"])
def test_the_design_matrix_is_the_results_own(kind):
    frame = made.cases()
    exog = sm.add_constant(frame[["age", "depth"]])
    if kind == "formula":
        result = made.glm(FORMULA, frame).fit()
    else:
        exog = exog if kind == "frame" else exog.to_numpy()
        result = sm.Logit(frame["left"].to_numpy(), exog).fit(disp=0)
    sample = FittedLogit(result).model.sample
    assert np.shares_memory(sample.matrix, result.model.exog)
    assert sample.matrix.ctypes.data == result.model.exog.ctypes.data
    if kind != "formula":
        # without a formula the predictors are the design's columns, and no copies of them
        for column in sample.columns.values():
            assert np.shares_memory(column, result.model.exog)


ROWS = 200_000


def large(engine):
    draw = np.random.default_rng(0)
    frame = pd.DataFrame(
        {
            "age": draw.uniform(0, 100, ROWS),
            "depth": draw.normal(size=ROWS),
            "visits": draw.integers(0, 9, ROWS),
            "flag": draw.uniform(size=ROWS) < 0.5,
            "site": pd.Categorical.from_codes(draw.integers(0, 8, ROWS), list("abcdefgh")),
        }
    )
    frame["left"] = (draw.uniform(size=ROWS) < 0.3).astype(int)
    with made.formula_engine(engine):
        model = made.logit("left ~ bs(age, df=6) + site * depth + visits + flag", frame)
        # one step is a fit as far as memory is concerned
        return model.fit(maxiter=1, disp=0, warn_convergence=False)


@pytest.mark.filterwarnings("ignore")
@pytest.mark.parametrize("engine", made.ENGINES)
def test_taking_in_many_rows_takes_a_fraction_of_the_matrix(engine):
    result = large(engine)
    tracemalloc.start()
    try:
        fit = FittedLogit(result)
        kept, peak = tracemalloc.get_traced_memory()
    finally:
        tracemalloc.stop()
    matrix = result.model.exog.nbytes
    sample = fit.model.sample
    raw = sum(column.nbytes for column in (*sample.columns.values(), sample.outcome))
    assert kept < raw + 0.02 * matrix
    assert peak < 0.5 * matrix
