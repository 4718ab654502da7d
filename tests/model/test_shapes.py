"""Straight or not, and how far a formula can be computed: found out by trying."""

import numpy as np
import pytest

from plainodds import FittedLogit
from plainodds.model.shapes import _edge
from tests.model import made

FRAME = made.cases()
INF = np.inf
AGE = (FRAME["age"].min(), FRAME["age"].max())

STRAIGHT = {
    "age": True,
    "age + depth": True,
    "age * site": True,
    "age:depth": True,
    "I(age * depth)": True,
    "I(2 * age + 1e6)": True,
    "standardize(age)": True,
    "standardize(year)": True,
    "center(age):site": True,
    "np.log(age)": False,
    "age + I(age**2)": False,
    "bs(age, df=4)": False,
    "cr(age, df=3)": False,
    "bs(age, df=3, degree=1)": False,
    "I(age > 5)": False,
    "age.clip(3, 20)": False,
    "np.minimum(age, 5)": False,
    "I((age + depth)**2)": False,
    # straight at some values of depth
    "I(np.where(depth > 0, age, age**2))": False,
    "I(np.where(depth > 0, age**2, age))": False,
    "age * np.log(age)": False,
    "C(age > 5)": False,
    "I(1 / age)": False,
}


@pytest.mark.filterwarnings("ignore")
@pytest.mark.parametrize("formula", STRAIGHT)
def test_a_predictor_that_enters_straight_is_told_from_one_that_bends(formula):
    fit = FittedLogit(made.glm(f"left ~ {formula}", FRAME).fit())
    name = "year" if "year" in formula else "age"
    assert fit.subject.predictor(name).linear == STRAIGHT[formula]


@pytest.mark.parametrize("engine", made.ENGINES)
def test_a_pole_within_the_range_bends(engine):
    # the range is looked at in equal steps, of which one is 0
    frame = FRAME.assign(depth=np.append(np.linspace(-1, 1, 239) + 0.001, [-1.0])[::-1])
    frame.loc[0, "depth"], frame.loc[1, "depth"] = -1.001, 1.001
    assert 0.0 in np.linspace(frame["depth"].min(), frame["depth"].max(), 33)
    with made.formula_engine(engine):
        fit = FittedLogit(made.glm("left ~ I(1 / depth)", frame).fit())
    assert not fit.subject.predictor("depth").linear


ALLOWED = {
    "age": (-INF, INF),
    "age + I(age**2)": (-INF, INF),
    "standardize(age)": (-INF, INF),
    "np.log(age)": (0, INF),
    "np.sqrt(age)": (0, INF),
    "np.log(12 - age)": (-INF, 12),
    "np.sqrt(age + 3)": (-3, INF),
    "np.sqrt(age) + np.sqrt(20 - age)": (0, 20),
    "bs(age, df=4)": AGE,
    "bs(age, df=4, lower_bound=0, upper_bound=12)": (0, 12),
    "np.log(age + 10 + depth)": (-INF, INF),
    "np.log(age) * bs(depth, df=3)": (0, INF),
    "C(age > 5)": (-INF, INF),
}


@pytest.mark.parametrize("engine", made.ENGINES)
@pytest.mark.parametrize("formula", ALLOWED)
def test_the_range_in_which_a_formula_can_be_computed_is_found(formula, engine):
    with made.formula_engine(engine):
        fit = FittedLogit(made.glm(f"left ~ {formula}", FRAME).fit())
    low, high = fit.subject.predictor("age").allowed
    expected = ALLOWED[formula]
    assert (low, high) == pytest.approx(expected, abs=1e-6)
    for end in (low, high):
        if np.isfinite(end):
            # the end itself can be computed
            assert np.isfinite(made.chances(fit, [{"age": end}])).all()


def test_a_root_may_be_taken_of_zero():
    fit = FittedLogit(made.glm("left ~ np.sqrt(age)", FRAME).fit())
    assert fit.subject.predictor("age").allowed[0] == 0.0


@pytest.mark.parametrize(
    ("works", "end", "spread", "found"),
    [
        (lambda x: True, 5.0, -4.0, -INF),
        (lambda x: True, 5.0, 4.0, INF),
        (lambda x: x > 0, 5.0, -4.0, 0.0),
        (lambda x: x >= 0, 5.0, -4.0, 0.0),
        (lambda x: x >= 0, 0.0, -4.0, 0.0),
        (lambda x: x < 0, -5.0, 4.0, 0.0),
        (lambda x: x <= 8, 5.0, 4.0, 8.0),
        (lambda x: x < 8, 5.0, 4.0, 8.0),
        (lambda x: x >= -3, 5.0, -4.0, -3.0),
        (lambda x: x >= 5, 5.0, -4.0, 5.0),
        (lambda x: x <= 1e6 + 1, 1e6, 4.0, 1e6 + 1),
    ],
)
def test_an_edge_is_found_and_works_itself(works, end, spread, found):
    edge = _edge(works, end, spread)
    assert edge == pytest.approx(found, abs=1e-6 * abs(spread))
    assert works(edge)
