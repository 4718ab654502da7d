"""Columns may be called anything."""

import keyword

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

from plainodds import FittedLogit
from tests.model import made

NAMES = [
    "class", "lambda", "a b", "a-b", "a.b", "1st", "x[0]", "x[T.1]", "it's", 'say "so"', "a:b",
    "ümläut", "年齢", "<b>age</b>", "$x_1$", "log", "np", "C", "Q", "I", "bs", "Intercept", "const",
    "_age", " age ", "age\n",
]  # fmt: skip


def frame_with(name):
    frame = made.cases()
    return pd.DataFrame({"left": frame["left"], name: frame["age"], "depth": frame["depth"]})


def assert_found(fit, result, name):
    assert {facts.name for facts in fit.subject.predictors} == {name, "depth"}
    assert fit.subject.predictor(name).label.strip()
    coefficients = np.asarray(result.params)
    place = [column.name for column in fit.model.design.columns].index(
        next(n for n in result.model.exog_names if n not in ("depth", "Intercept", "const")
             or n == name)
    )  # fmt: skip
    row = fit.odds(name, steps={name: 1}).rows[0]
    assert row.log_odds_ratio.estimate == pytest.approx(coefficients[place])


@pytest.mark.parametrize("name", [name for name in NAMES if name != "const"])
def test_columns_of_a_frame_may_have_any_name(name):
    frame = frame_with(name)
    exog = sm.add_constant(frame[[name, "depth"]])
    result = sm.GLM(frame["left"], exog, family=sm.families.Binomial()).fit()
    assert_found(FittedLogit(result), result, name)


@pytest.mark.parametrize("name", [name for name in NAMES if name not in ("Q", "I", "Intercept")])
def test_quoted_names_of_a_patsy_formula_may_be_anything(name):
    frame = frame_with(name)
    quoted = f"Q({name!r})" if NAMES.index(name) % 2 else f"I(Q({name!r}) * 1)"
    result = smf.glm(f"left ~ {quoted} + depth", frame, family=sm.families.Binomial()).fit()
    assert_found(FittedLogit(result), result, name)


@pytest.mark.parametrize("name", ["class", "lambda", "a b", "a-b", "1st", "ümläut", "年齢", "_age"])
def test_quoted_names_of_a_formulaic_formula_may_be_much(name):
    frame = frame_with(name)
    with made.formula_engine("formulaic"):
        result = smf.glm(f"left ~ Q({name!r}) + depth", frame, family=sm.families.Binomial()).fit()
    assert_found(FittedLogit(result), result, name)


@pytest.mark.parametrize("name", ["log", "np", "C", "Q", "I", "bs", "ümläut", "_age"])
def test_plain_names_may_be_those_of_functions(name):
    assert name.isidentifier()
    assert not keyword.iskeyword(name)
    frame = frame_with(name)
    result = smf.glm(f"left ~ {name} + depth", frame, family=sm.families.Binomial()).fit()
    assert_found(FittedLogit(result), result, name)


@pytest.mark.parametrize("name", ["log", "exp"])
def test_a_function_may_be_applied_to_a_column_of_its_name(name):
    frame = frame_with(name)
    result = smf.glm(f"left ~ np.{name}({name}) + depth", frame,
                     family=sm.families.Binomial()).fit()  # fmt: skip
    fit = FittedLogit(result)
    assert {facts.name for facts in fit.subject.predictors} == {name, "depth"}
    new = pd.DataFrame({name: [2.0, 6.0], "depth": [0.0, 1.0]})
    found = made.chances(fit, new.to_dict("records"))
    np.testing.assert_allclose(found, result.predict(new), rtol=1e-12)


def test_numbers_may_be_names_of_columns_that_a_formula_leaves_alone():
    frame = made.cases().assign(**{"x": 1}).rename(columns={"x": 3})
    fit = FittedLogit(made.glm("left ~ age", frame).fit())
    assert [facts.name for facts in fit.subject.predictors] == ["age"]


def test_values_of_the_callers_own_are_no_predictors():
    shift = 3.0
    frame = made.cases()
    result = smf.glm("left ~ I(age + shift) + depth", frame, family=sm.families.Binomial()).fit()
    fit = FittedLogit(result)
    del shift
    assert {facts.name for facts in fit.subject.predictors} == {"age", "depth"}
    np.testing.assert_allclose(
        fit.model.design.rows(fit.model.sample.columns), result.model.exog, rtol=1e-12
    )
