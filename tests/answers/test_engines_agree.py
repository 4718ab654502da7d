"""One model through patsy, formulaic and bare arrays: one expected answer for all.

The numbers of each answer are compared with those of patsy, which the other tests hold
against statsmodels itself.
"""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula
import statsmodels.formula.api as smf

import plainodds as po

SPLINED = "burst ~ age_years * material + bs(pressure_m, df=4) + np.log1p(past_repairs)"


def fitted_with(engine, formula, data):
    before = statsmodels.formula.options.formula_engine
    statsmodels.formula.options.formula_engine = engine
    try:
        return po.FittedLogit(smf.logit(formula, data).fit(disp=0))
    finally:
        statsmodels.formula.options.formula_engine = before


def answers(fit):
    return (
        fit.odds("age_years", steps={"age_years": 10}),
        fit.curve("age_years", by="material", at=[10, 60]),
        fit.curve("age_years", by="material", at=[10, 60], others="observed"),
        fit.curve("age_years", at=[10, 60], others="observed", scale="slope"),
        fit.curve("past_repairs", at=[0.5, 2], scale="slope"),
        fit.profile({"age_years": 80}, against={"material": "cast iron"}),
        fit.pair("age_years", "material", a_values=(10, 60)),
        fit.pair("age_years", "pressure_m", number="slope", others="observed"),
    )


def numbers(answer):
    return po.table(answer)[["estimate", "se", "lower", "upper"]].to_numpy()


def test_formulaic_gives_patsys_answers(pipes):
    one, other = fitted_with("patsy", SPLINED, pipes), fitted_with("formulaic", SPLINED, pipes)
    for mine, theirs in zip(answers(one), answers(other), strict=True):
        assert numbers(theirs) == pytest.approx(numbers(mine), rel=1e-5, abs=1e-9, nan_ok=True)


@pytest.fixture(scope="module")
def dummies(pipes):
    columns = pd.DataFrame({"age": pipes.age_years.astype(float)})
    for level in ("ductile iron", "PVC"):
        columns[level] = (pipes.material == level).astype(float)
        columns[f"age x {level}"] = columns["age"] * columns[level]
    return sm.add_constant(columns)


@pytest.mark.parametrize("bare", [False, True])
def test_arrays_give_the_formulas_answers_once_their_columns_are_declared(pipes, dummies, bare):
    formula = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
    if bare:
        fitted = sm.Logit(pipes.burst.to_numpy(), dummies.to_numpy()).fit(disp=0)
        names = dict(zip(dummies.columns, fitted.model.exog_names, strict=True))
    else:
        fitted = sm.Logit(pipes.burst, dummies).fit(disp=0)
        names = {name: name for name in dummies.columns}
    fit = po.FittedLogit(
        fitted,
        pipes[["material"]],
        derived={
            names["ductile iron"]: "material == 'ductile iron'",
            names["PVC"]: "material == 'PVC'",
            names["age x ductile iron"]: f"{names['age']} * (material == 'ductile iron')",
            names["age x PVC"]: f"{names['age']} * (material == 'PVC')",
        },
    )
    mine = formula.curve("age_years", by="material", others="observed", at=[10, 60])
    theirs = fit.curve(
        names["age"],
        by="material",
        by_values=[line.by for line in mine.lines],
        others="observed",
        at=[10, 60],
    )
    assert numbers(theirs) == pytest.approx(numbers(mine), rel=1e-5, abs=1e-9)
    slope = formula.curve("age_years", by="material", scale="slope", at=[30])
    other_slope = fit.curve(
        names["age"],
        by="material",
        by_values=[line.by for line in mine.lines],
        scale="slope",
        at=[30],
    )
    assert numbers(other_slope) == pytest.approx(numbers(slope), rel=1e-5, abs=1e-9)


def test_the_predictors_of_all_are_the_raw_columns(pipes):
    for engine in ("patsy", "formulaic"):
        fit = fitted_with(engine, SPLINED, pipes)
        assert {facts.name for facts in fit.subject.predictors} == {
            "age_years",
            "material",
            "pressure_m",
            "past_repairs",
        }
        assert np.isfinite(fit.subject.predictor("pressure_m").allowed).all()
