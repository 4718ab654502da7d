"""For any formula: rows, slopes, splits and chances are those of the fit."""

import numpy as np
import pytest

from plainodds.model.design.split import split
from tests.model import made
from tests.model.design import formulas
from tests.model.design.formulas import CASES, FRAME, fitted

every_formula = pytest.mark.parametrize(("engine", "formula"), CASES)


@every_formula
def test_the_predictors_are_the_raw_columns(engine, formula):
    _, fit = fitted(engine, formula)
    names = sorted(facts.name for facts in fit.subject.predictors)
    assert names == formulas.names_in(formula)


@every_formula
def test_rows_of_the_sample_are_the_fits_own(engine, formula):
    result, fit = fitted(engine, formula)
    design, columns = fit.model.design, fit.model.sample.columns
    assert [column.name for column in design.columns] == list(result.model.exog_names)
    np.testing.assert_allclose(design.rows(columns), result.model.exog, rtol=1e-12, atol=1e-13)


@every_formula
def test_a_row_is_the_same_alone_as_among_others(engine, formula):
    result, fit = fitted(engine, formula)
    for place in (0, 17, 101):
        alone = {name: c[place : place + 1] for name, c in fit.model.sample.columns.items()}
        np.testing.assert_allclose(
            fit.model.design.rows(alone)[0], result.model.exog[place], rtol=1e-12, atol=1e-13
        )


@every_formula
def test_chances_of_new_rows_are_those_that_statsmodels_predicts(engine, formula):
    result, fit = fitted(engine, formula)
    new = formulas.shuffled(formula)
    profiles = [dict(zip(new, row, strict=True)) for row in new.itertuples(index=False)]
    if engine == "formulaic" and "doubled" in formula:
        # statsmodels hands formulaic no function of the caller's
        expected = result.predict(np.column_stack([np.ones(len(new)), 2 * new["age"] + 1]),
                                  transform=False)  # fmt: skip
    else:
        expected = made.predicted(result, new, engine)
    np.testing.assert_allclose(made.chances(fit, profiles), expected, rtol=1e-9)


def numeric_slopes(design, name, columns):
    """Central differences, five points."""
    x = columns[name]
    h = 1e-4 * np.ptp(x)
    near, far = (
        design.rows({**columns, name: x + k * h}) - design.rows({**columns, name: x - k * h})
        for k in (1, 2)
    )
    return (8 * near - far) / (12 * h)


@every_formula
def test_slopes_are_those_of_numeric_differentiation(engine, formula):
    _, fit = fitted(engine, formula)
    design = fit.model.design
    for facts in fit.subject.predictors:
        if not facts.is_number:
            continue
        # within the data's range and at no kink, so that each point can be computed
        sample = fit.model.sample.columns
        low, spread = sample[facts.name].min(), np.ptp(sample[facts.name])
        columns = {name: c[:40] for name, c in sample.items()}
        columns[facts.name] = low + spread * (np.arange(40) + 0.37) / 41
        found = design.row_derivatives(facts.name, columns)
        expected = numeric_slopes(design, facts.name, columns)
        scale = np.abs(expected).max(axis=0) + 1e-7
        np.testing.assert_allclose(found / scale, expected / scale, atol=2e-6)


@pytest.mark.parametrize("engine", made.ENGINES)
def test_a_number_cut_into_levels_has_no_slope_even_where_it_is_cut(engine):
    _, fit = fitted(engine, "visits + C(visits > 2)")
    slopes = fit.model.design.row_derivatives("visits", fit.model.sample.columns)
    names = [column.name for column in fit.model.design.columns]
    assert names == ["Intercept", "C(visits > 2)[T.True]", "visits"]
    np.testing.assert_array_equal(slopes, np.tile([0.0, 0.0, 1.0], (len(FRAME), 1)))


@every_formula
def test_a_moved_predictor_changes_the_touched_columns_only(engine, formula):
    _, fit = fitted(engine, formula)
    design, columns = fit.model.design, fit.model.sample.columns
    for name in columns:
        moved = {**columns, name: columns[name][::-1]}
        changed = np.nonzero((design.rows(moved) != design.rows(columns)).any(axis=0))[0]
        assert set(changed) <= set(design.touched([name]))


@every_formula
def test_what_moves_times_what_stays_is_the_column(engine, formula):
    result, fit = fitted(engine, formula)
    design, columns = fit.model.design, fit.model.sample.columns
    n, whole = len(FRAME), 0
    for name in columns:
        parts = split(design, [name])
        if parts is None:
            shared = [f for f in design.factors if name in f.variables and len(f.variables) > 1]
            assert shared
            continue
        whole += 1
        moving = parts.own_values({name: columns[name]})
        staying = parts.still_values(columns, n)[:, parts.group]
        np.testing.assert_allclose(
            moving * staying, result.model.exog[:, parts.touched], rtol=1e-12, atol=1e-13
        )
        assert sorted([*parts.touched, *parts.resting]) == list(range(result.model.exog.shape[1]))
    assert whole or "I(" in formula or "np.log(" in formula or "te(" in formula
