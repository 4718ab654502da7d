"""Columns that follow from others are noticed, and others are left in peace."""

import numpy as np
import pytest
import statsmodels.api as sm
from hypothesis import given, settings
from hypothesis import strategies as st

from plainodds import FittedLogit
from plainodds.model.noticed import noticed
from tests.model import made

DRAW = np.random.default_rng(2)
AGE, DEPTH = DRAW.uniform(1, 9, 300), DRAW.normal(size=300)
MAN, WET = DRAW.integers(0, 2, 300).astype(float), DRAW.integers(0, 2, 300).astype(float)

FOLLOWS = {
    "age ** 2": ({"age": AGE}, AGE**2),
    "age ** 3": ({"age": AGE}, AGE**3),
    "log(age)": ({"age": AGE}, np.log(AGE)),
    "log1p(age)": ({"age": AGE}, np.log1p(AGE)),
    "sqrt(age)": ({"age": AGE}, np.sqrt(AGE)),
    "age * depth": ({"age": AGE, "depth": DEPTH}, AGE * DEPTH),
    "age * man": ({"age": AGE, "man": MAN}, AGE * MAN),
    "man * wet": ({"man": MAN.astype(np.int8), "wet": WET}, MAN * WET),
    "depth ** 2": ({"depth": DEPTH}, DEPTH**2),
    "Q('a b') ** 2": ({"a b": AGE}, AGE**2),
    "Q('class') ** 2": ({"class": AGE}, AGE**2),
    "big ** 2": ({"big": AGE * 1e8}, (AGE * 1e8) ** 2),
    "small ** 2": ({"small": AGE * 1e-4}, (AGE * 1e-4) ** 2),
}


@pytest.mark.parametrize("first", [False, True], ids=["after", "before"])
@pytest.mark.parametrize("expression", FOLLOWS)
def test_a_column_that_follows_is_noticed(expression, first):
    sources, target = FOLLOWS[expression]
    columns = {"target": target} | sources if first else sources | {"target": target}
    found = noticed(columns)
    # of two that say the same, either may be the source
    if first and set(found) != {"target"}:
        assert len(found) == 1
        assert "target" in next(iter(found.values()))
    else:
        assert found == {"target": expression}


NOTHING = {
    "no columns": {},
    "one column": {"age": AGE},
    "a 0/1 column is its own square": {"man": MAN, "age": AGE},
    "a constant": {"age": AGE, "one": np.ones(300), "none": np.zeros(300)},
    "nearly the square": {"age": AGE, "sq": AGE**2 + np.append(np.zeros(299), 1e-6)},
    "square in the rows looked at only": {"age": AGE, "sq": np.where(AGE[1] == AGE, 0, AGE**2)},
    "steps of one another": {
        f"at least {level}": (level < AGE).astype(float) for level in range(2, 8)
    },
    "levels of one category": {
        f"is {level}": (np.floor(AGE) == level).astype(float) for level in range(1, 9)
    },
}


@pytest.mark.parametrize("what", NOTHING)
def test_nothing_is_noticed_where_nothing_follows(what):
    assert noticed(NOTHING[what]) == {}


@settings(max_examples=60, deadline=None)
@given(st.integers(0, 2**32 - 1), st.integers(40, 400), st.integers(2, 8))
def test_independent_columns_are_left_in_peace(seed, n, many):
    draw = np.random.default_rng(seed)
    columns = {f"real {i}": draw.normal(size=n) for i in range(many)}
    columns |= {f"whole {i}": draw.integers(0, 9, n).astype(float) for i in range(many)}
    columns |= {f"dummy {i}": draw.integers(0, 2, n).astype(float) for i in range(many)}
    assert noticed(columns) == {}


@settings(max_examples=40, deadline=None)
@given(st.integers(0, 2**32 - 1), st.integers(60, 400))
def test_products_are_noticed_among_many_columns(seed, n):
    draw = np.random.default_rng(seed)
    columns = {f"x{i}": draw.normal(size=n) for i in range(8)}
    columns["both"] = columns["x2"] * columns["x5"]
    columns["cube"] = columns["x3"] ** 3
    assert noticed(columns) == {"both": "x2 * x5", "cube": "x3 ** 3"}


def notices(frame, columns, **settings):
    exog = sm.add_constant(frame[columns].astype(float))
    result = sm.GLM(frame["left"], exog, family=sm.families.Binomial()).fit()
    return FittedLogit(result, **settings).subject.notices


def test_a_suggestion_says_what_to_write_and_goes_once_it_is_written():
    frame = made.cases().assign(age_sq=lambda f: f["age"] ** 2)
    (notice,) = notices(frame, ["age", "age_sq"])
    assert "age_sq is exactly age ** 2" in notice
    assert "derived={'age_sq': 'age ** 2'}" in notice
    assert notices(frame, ["age", "age_sq"], derived={"age_sq": "age ** 2"}) == ()


@pytest.mark.parametrize("engine", made.ENGINES)
def test_columns_of_a_formula_are_looked_at_too(engine):
    frame = made.cases().assign(age_depth=lambda f: f["age"] * f["depth"])
    with made.formula_engine(engine):
        result = made.glm("left ~ age + depth + age_depth + site", frame).fit()
    (notice,) = FittedLogit(result).subject.notices
    assert "derived={'age_depth': 'age * depth'}" in notice


def test_terms_of_a_formula_need_no_suggestion():
    result = made.glm("left ~ age + I(age**2) + age:depth + flag * dummy", made.cases()).fit()
    assert FittedLogit(result).subject.notices == ()
