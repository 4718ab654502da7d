"""∂²(row)/∂a∂b is what differencing the rows twice gives, whatever joins the two numbers."""

import numpy as np
import pytest

import plainodds as po
from plainodds.model.design.cross import cross_derivatives
from tests.model.made import ENGINES, cases, formula_engine, logit

FORMULAS = {
    "apart": "left ~ age + depth",
    "product": "left ~ age * depth",
    "product within levels": "left ~ age * depth * site",
    "spline by number": "left ~ bs(age, df=4) * depth",
    "two splines": "left ~ bs(age, df=4) * bs(whole_depth, df=4)",
    "one factor reads both": "left ~ I(age * depth)",
    "one factor bends in both": "left ~ np.log(age) + np.log1p(age * money_m) + money_m",
    "one factor by another": "left ~ I(age * depth) : depth + age",
}


def joined(formula, engine="patsy"):
    frame = cases()
    frame["whole_depth"] = frame.depth
    frame["money_m"] = frame.money / 1e6
    with formula_engine(engine):
        return po.FittedLogit(logit(formula, frame).fit(disp=0)).model


def second_differences(design, a, b, coded, step):
    """The rows' cross difference over small steps either way, (n, columns)."""

    def rows(one, other):
        return design.rows({**coded, a: coded[a] + one * step, b: coded[b] + other * step})

    corners = rows(1, 1) - rows(1, -1) - rows(-1, 1) + rows(-1, -1)
    return corners / (4 * step**2)


def of_formula(name):
    b = {"two splines": "whole_depth", "one factor bends in both": "money_m"}.get(name, "depth")
    return FORMULAS[name], "age", b


@pytest.mark.parametrize("engine", ENGINES)
@pytest.mark.parametrize("name", FORMULAS)
def test_cross_derivatives_are_the_rows_second_differences(name, engine):
    formula, a, b = of_formula(name)
    model = joined(formula, engine)
    inner = {"age": np.array([2.5, 4.1, 6.3]), b: np.array([0.21, 0.33, 0.74])}
    coded = {n: v[:3] for n, v in model.sample.columns.items()} | inner
    touched, found = cross_derivatives(model.design, a, b, coded)
    expected = second_differences(model.design, a, b, coded, 1e-3)
    everywhere = np.zeros_like(expected)
    everywhere[:, touched] = found
    np.testing.assert_allclose(everywhere, expected, rtol=2e-5, atol=2e-5)


def test_the_order_of_the_two_numbers_does_not_matter():
    model = joined("left ~ bs(age, df=4) * depth + np.log1p(age * money_m)")
    coded = {n: v[:20] for n, v in model.sample.columns.items()}
    for b in ("depth", "money_m"):
        one, forth = cross_derivatives(model.design, "age", b, coded)
        other, back = cross_derivatives(model.design, b, "age", coded)
        assert one.tolist() == other.tolist()
        np.testing.assert_allclose(forth, back, rtol=1e-6, atol=1e-7)


def test_a_product_of_a_derived_column_is_differentiated_through_it():
    frame = cases()
    frame["both"] = frame.age * frame.depth
    result = logit("left ~ age + depth + both", frame).fit(disp=0)
    model = po.FittedLogit(result, frame, derived={"both": "age * depth"}).model
    coded = {n: v[:5] for n, v in model.sample.columns.items()}
    touched, found = cross_derivatives(model.design, "age", "depth", coded)
    assert [model.design.columns[i].name for i in touched] == ["both"]
    np.testing.assert_allclose(found, 1.0, rtol=1e-7)
