"""Averages at very many points are the plain averages, to ten digits."""

from dataclasses import replace

import numpy as np
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.averaged_values import affordable_points, averaged_values
from plainodds.answers.averaging import averaged_probability
from plainodds.answers.population import everyone

FORMULAS = {
    "few patterns": "burst ~ age_years * material + pressure_m * soil + past_repairs",
    "one pattern": "burst ~ age_years * pressure_m + material",
    "many patterns": "burst ~ age_years * past_repairs + pressure_m * diameter_mm",
    "tangled": "burst ~ np.log1p(age_years * past_repairs) + pressure_m",
    "everything moved": "burst ~ age_years + pressure_m",
}


def modelled(name, pipes):
    frame = pipes.assign(diameter_mm=np.arange(len(pipes)) / 10)
    return po.FittedLogit(smf.logit(FORMULAS[name], frame).fit(disp=0)).model


def grid(points):
    ages, pressures = np.linspace(0, 120, points), np.linspace(10, 120, points)
    return {"age_years": np.tile(ages, points), "pressure_m": np.repeat(pressures, points)}


@pytest.mark.parametrize("name", FORMULAS)
def test_they_are_the_averages_of_every_row(pipes, name):
    model = modelled(name, pipes)
    moved = grid(8 if name == "tangled" else 20)
    population = everyone(model)
    found = averaged_values(model, moved, population)
    expected = averaged_probability(model, moved, population).value
    np.testing.assert_allclose(found, expected, rtol=0, atol=1e-10)


@pytest.mark.parametrize("steep", [1.0, 30.0, 4000.0])
def test_steep_models_are_no_less_exact(pipes, steep):
    model = modelled("few patterns", pipes)
    model = replace(model, coefficients=model.coefficients * steep)
    moved = grid(20)
    found = averaged_values(model, moved, everyone(model))
    expected = averaged_probability(model, moved, everyone(model)).value
    np.testing.assert_allclose(found, expected, rtol=0, atol=1e-10)


def test_a_number_far_from_0_is_no_less_exact(pipes):
    frame = pipes.assign(year=2000 + pipes.age_years)
    result = smf.logit("burst ~ year * material + pressure_m", frame).fit(disp=0)
    model = po.FittedLogit(result).model
    model = replace(model, coefficients=model.coefficients * 20)
    moved = grid(20)
    moved["year"] = 2000 + moved.pop("age_years")
    found = averaged_values(model, moved, everyone(model))
    expected = averaged_probability(model, moved, everyone(model)).value
    np.testing.assert_allclose(found, expected, rtol=0, atol=1e-10)


@pytest.mark.parametrize("name", FORMULAS)
def test_how_far_it_is_is_told_to_the_end(pipes, name):
    model, told = modelled(name, pipes), []
    averaged_values(model, grid(4), everyone(model), lambda done, parts: told.append((done, parts)))
    assert [done for done, _ in told] == sorted(done for done, _ in told)
    assert len({parts for _, parts in told}) == 1
    assert told[-1][0] == told[-1][1]


def test_only_some_rows_may_be_averaged_over(pipes):
    model = modelled("few patterns", pipes)
    among = everyone(model).among((pipes.soil == "high").to_numpy(), "high soil")
    found = averaged_values(model, grid(5), among)
    expected = averaged_probability(model, grid(5), among).value
    np.testing.assert_allclose(found, expected, atol=1e-10)


def test_a_map_is_coarser_where_each_point_is_dear(pipes):
    names = ("age_years", "pressure_m")
    assert affordable_points(modelled("few patterns", pipes), names, 60) == 60
    tangled = affordable_points(modelled("tangled", pipes), names, 60)
    assert 12 <= tangled < 60
