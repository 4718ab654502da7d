"""Averages over the sample, against the plain loop over statsmodels' predict."""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.averaging import Exact, averaged_own_slope
from plainodds.answers.population import everyone
from plainodds.model.products import product, transposed_product

GRID = np.array([5.0, 20.0, 45.0, 80.0])


def averaged(model, moved):
    return Exact(model, everyone(model)).probability(moved)


def sloped(model, name, moved):
    return Exact(model, everyone(model)).slope(name, moved)


def plain_loop(result, frame, name, values, weights=None, **predict):
    """The average of predict() with everybody's value replaced, one value at a time."""
    return np.array(
        [
            np.average(result.predict(frame.assign(**{name: v}), **predict), weights=weights)
            for v in values
        ]
    )


def numeric_gradient(function, coefficients):
    """Central differences over each coefficient."""
    steps = 1e-6 * np.maximum(1.0, np.abs(coefficients))
    columns = []
    for j, step in enumerate(steps):
        up, down = coefficients.copy(), coefficients.copy()
        up[j] += step
        down[j] -= step
        columns.append((function(up) - function(down)) / (2 * step))
    return np.stack(columns, axis=-1)


def with_coefficients(model, coefficients):
    from dataclasses import replace

    return replace(model, coefficients=coefficients)


def test_averages_equal_the_plain_loop(fit, result, pipes):
    averages = averaged(fit.model, {"age_years": GRID})
    assert averages.value == pytest.approx(plain_loop(result, pipes, "age_years", GRID), rel=1e-12)


def test_averages_over_two_moved_predictors_equal_the_plain_loop(fit, result, pipes):
    moved = {"age_years": GRID, "material": np.array([2, 2, 0, 1])}
    averages = averaged(fit.model, moved)
    levels = ["PVC", "PVC", "cast iron", "ductile iron"]
    expected = [
        result.predict(pipes.assign(age_years=a, material=m)).mean()
        for a, m in zip(GRID, levels, strict=True)
    ]
    assert averages.value == pytest.approx(expected, rel=1e-12)


def test_the_gradient_is_the_numeric_one(fit):
    moved = {"age_years": GRID, "material": np.array([2, 2, 0, 1])}
    model = fit.model
    found = averaged(model, moved).gradient
    numeric = numeric_gradient(
        lambda b: averaged(with_coefficients(model, b), moved).value,
        model.coefficients,
    )
    assert found == pytest.approx(numeric, abs=1e-8, rel=1e-6)


@pytest.mark.parametrize("name", ["age_years", "pressure_m", "past_repairs"])
def test_averaged_slopes_are_the_averages_numeric_derivative(fit, name):
    low, high = fit.subject.predictor(name).quartiles[0], fit.subject.predictor(name).quartiles[2]
    x = np.array([low + 0.3, (low + high) / 2, high + 0.2])
    found = sloped(fit.model, name, {name: x}).value
    h = 1e-4
    up = averaged(fit.model, {name: x + h}).value
    down = averaged(fit.model, {name: x - h}).value
    assert found == pytest.approx((up - down) / (2 * h), rel=1e-6)


def test_the_slopes_gradient_is_the_numeric_one(fit):
    moved = {"age_years": GRID}
    found = sloped(fit.model, "age_years", moved).gradient
    numeric = numeric_gradient(
        lambda b: sloped(with_coefficients(fit.model, b), "age_years", moved).value,
        fit.model.coefficients,
    )
    assert found == pytest.approx(numeric, abs=1e-9, rel=1e-6)


@pytest.fixture(scope="module")
def tangled(pipes):
    # one factor reads two predictors: the columns cannot be split
    return smf.logit("burst ~ np.log1p(age_years * past_repairs) + material", pipes).fit(disp=0)


def test_what_cannot_be_split_is_rebuilt_to_the_same_average(tangled, pipes):
    model = po.FittedLogit(tangled).model
    averages = averaged(model, {"age_years": GRID})
    assert averages.value == pytest.approx(plain_loop(tangled, pipes, "age_years", GRID), rel=1e-12)
    numeric = numeric_gradient(
        lambda b: averaged(with_coefficients(model, b), {"age_years": GRID}).value,
        model.coefficients,
    )
    assert averages.gradient == pytest.approx(numeric, abs=1e-8, rel=1e-6)


def test_slopes_of_what_cannot_be_split_are_numeric_derivatives(tangled):
    model = po.FittedLogit(tangled).model
    h = 1e-4
    up = averaged(model, {"age_years": GRID + h}).value
    down = averaged(model, {"age_years": GRID - h}).value
    slopes = sloped(model, "age_years", {"age_years": GRID})
    assert slopes.value == pytest.approx((up - down) / (2 * h), rel=1e-6)
    numeric = numeric_gradient(
        lambda b: sloped(with_coefficients(model, b), "age_years", {"age_years": GRID}).value,
        model.coefficients,
    )
    assert slopes.gradient == pytest.approx(numeric, abs=1e-9, rel=1e-5)


def test_weighted_rows_average_as_rows_written_out(pipes):
    weights = np.arange(len(pipes)) % 3 + 1
    family = sm.families.Binomial()
    weighted = smf.glm("burst ~ age_years * soil", pipes, family=family, freq_weights=weights).fit()
    written_out = pipes.loc[pipes.index.repeat(weights)].reset_index(drop=True)
    repeated = smf.glm("burst ~ age_years * soil", written_out, family=family).fit()
    one = po.FittedLogit(weighted).curve("age_years", others="observed", at=[10, 60])
    other = po.FittedLogit(repeated).curve("age_years", others="observed", at=[10, 60])
    assert one.lines[0].estimate == pytest.approx(other.lines[0].estimate, rel=1e-9)
    assert one.lines[0].se == pytest.approx(other.lines[0].se, rel=1e-6)


def test_each_row_keeps_its_own_offset(pipes):
    offset = np.linspace(-1, 1, len(pipes))
    family = sm.families.Binomial()
    result = smf.glm("burst ~ age_years", pipes, family=family, offset=offset).fit()
    found = averaged(po.FittedLogit(result).model, {"age_years": GRID}).value
    assert found == pytest.approx(
        plain_loop(result, pipes, "age_years", GRID, offset=offset), rel=1e-12
    )


def test_row_order_does_not_matter(pipes, result):
    shuffled = pipes.sample(frac=1, random_state=5)
    refitted = smf.logit(result.model.formula, shuffled).fit(disp=0)
    one = po.FittedLogit(result).curve("age_years", others="observed", at=[10, 60])
    other = po.FittedLogit(refitted).curve("age_years", others="observed", at=[10, 60])
    assert one.lines[0].estimate == pytest.approx(other.lines[0].estimate, rel=1e-6)
    assert one.support == other.support


@pytest.mark.parametrize("rows", [0, 1, 7, 5_000])
def test_products_in_pieces_are_products(rows):
    rng = np.random.default_rng(rows)
    one, other = rng.normal(size=(rows, 5)), rng.normal(size=(rows, 40))
    matrix = rng.normal(size=(5, 900))
    assert product(one, matrix) == pytest.approx(one @ matrix)
    assert transposed_product(one, other) == pytest.approx(one.T @ other)


OWN = {
    # formula, the sloped number, what everybody is given
    "levels": ("age_years * material + soil", "age_years", {"material": np.array([0, 1, 2])}),
    "a spline": (
        "bs(pressure_m, df=4) * age_years + soil",
        "pressure_m",
        {"age_years": GRID},
    ),
    "splined by the other": (
        "bs(pressure_m, df=4) * age_years + I(age_years**2)",
        "age_years",
        {"pressure_m": np.array([40.0, 55.0, 70.0])},
    ),
    "nothing shared": ("age_years + material", "age_years", {"material": np.array([0, 2])}),
    "tangled": ("np.log1p(age_years * past_repairs)", "age_years", {"past_repairs": GRID[:2]}),
}


def own_slopes(model, name, moved):
    return averaged_own_slope(model, name, moved, everyone(model))


@pytest.mark.parametrize("case", OWN)
def test_slopes_at_own_values_are_numeric_derivatives_with_the_other_moved(pipes, case):
    formula, name, moved = OWN[case]
    inner = pipes[pipes.pressure_m.between(*np.quantile(pipes.pressure_m, [0.01, 0.99]))]
    # fitted on all, so that the knots leave room for a step
    result = smf.logit(f"burst ~ {formula}", pipes).fit(disp=0)
    model = po.FittedLogit(result).model
    ((other, values),) = moved.items()
    levels = np.array(["cast iron", "ductile iron", "PVC"])
    among = everyone(model).among(pipes.index.isin(inner.index), "pressures within")
    found = averaged_own_slope(model, name, moved, among).value
    for value, slope in zip(values, found, strict=True):
        frame = inner.assign(**{other: levels[value] if other == "material" else value})
        h = 1e-4
        up, down = (result.predict(frame.assign(**{name: frame[name] + s})).mean() for s in (h, -h))
        assert slope == pytest.approx((up - down) / (2 * h), rel=1e-5, abs=1e-9)


@pytest.mark.parametrize("case", OWN)
def test_the_gradient_of_slopes_at_own_values_is_the_numeric_one(pipes, case):
    formula, name, moved = OWN[case]
    model = po.FittedLogit(smf.logit(f"burst ~ {formula}", pipes).fit(disp=0)).model
    found = own_slopes(model, name, moved).gradient
    numeric = numeric_gradient(
        lambda c: own_slopes(with_coefficients(model, c), name, moved).value, model.coefficients
    )
    assert found == pytest.approx(numeric, rel=1e-5, abs=1e-6 * np.abs(found).max())
