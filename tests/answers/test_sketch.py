"""A sketch of the rows stands in for them, to one part in a million."""

import numpy as np
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.averaging import Exact
from plainodds.answers.population import everyone
from plainodds.answers.quick import answer_by_sketch, sketch_for
from plainodds.answers.sketch import sketch_of

GRID = np.linspace(1, 100, 40)


@pytest.mark.parametrize("names", [("age_years",), ("age_years", "material"), ("pressure_m",)])
def test_a_sketch_agrees_with_the_exact_average(fit, names):
    model = fit.model
    population = everyone(model)
    sketch, exact = sketch_of(model, names, population), Exact(model, population)
    low, _, high = fit.subject.predictor(names[0]).quartiles
    moved = {names[0]: np.linspace(low, high, 30)}
    if len(names) == 2:
        moved["material"] = np.arange(30) % 3
    one, other = sketch.probability(moved), exact.probability(moved)
    assert np.abs(one.value - other.value).max() < 1e-6
    assert np.abs(one.gradient - other.gradient).max() < 1e-6 * np.abs(other.gradient).max()
    one, other = sketch.slope(names[0], moved), exact.slope(names[0], moved)
    assert np.abs(one.value - other.value).max() < 1e-6
    assert np.abs(one.gradient - other.gradient).max() < 1e-6 * np.abs(other.gradient).max()


def test_a_sketch_follows_the_population(fit, pipes):
    model = fit.model
    among = everyone(model).among((pipes.soil == "high").to_numpy(), "high soil")
    moved = {"age_years": GRID}
    one = sketch_of(model, ("age_years",), among).probability(moved)
    assert one.value == pytest.approx(Exact(model, among).probability(moved).value, abs=1e-6)


def test_there_is_no_sketch_where_few_patterns_do_not_tell_the_rows_apart(pipes):
    numbers = smf.logit("burst ~ age_years * pressure_m", pipes).fit(disp=0)
    model = po.FittedLogit(numbers).model
    assert sketch_of(model, ("age_years",), everyone(model)) is None
    tangled = smf.logit("burst ~ np.log1p(age_years * past_repairs)", pipes).fit(disp=0)
    model = po.FittedLogit(tangled).model
    assert sketch_of(model, ("age_years",), everyone(model)) is None


def test_moving_every_predictor_needs_no_rest(pipes):
    model = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit(disp=0)).model
    moved = {"age_years": GRID}
    one = sketch_of(model, ("age_years",), everyone(model)).probability(moved)
    assert one.value == pytest.approx(Exact(model, everyone(model)).probability(moved).value)


@pytest.mark.parametrize(
    "ask",
    [
        lambda f: f.curve("age_years", by="material", others="observed"),
        lambda f: f.curve("age_years", others="observed", scale="slope"),
        lambda f: f.change("age_years", 20, 60),
        lambda f: f.change({"age_years": (80, 10), "material": ("PVC", "cast iron")}),
        lambda f: f.change("age_years", 20, 60, where={"soil": "high"}),
        lambda f: f.pair("age_years", "material", others="observed"),
        lambda f: f.pair("material", "age_years", others="observed", scale="odds"),
        lambda f: f.pair("age_years", "pressure_m", others="observed", shape="map"),
        lambda f: f.pair("soil", "material", others="observed"),
    ],
)
def test_an_answer_by_sketch_is_the_exact_one_to_one_in_a_million(fit, ask):
    exact = ask(fit)
    question = exact.question
    quick = answer_by_sketch(fit.model, question, sketch_for(fit.model, question))
    assert quick.question == question
    columns = ["estimate", "se", "lower", "upper"]
    one = po.table(quick)[columns].dropna()
    other = po.table(exact)[columns].dropna()
    # per 1,000 is a thousand times the difference
    assert one.to_numpy() == pytest.approx(other.to_numpy(), abs=2e-6, rel=2e-6)


def test_all_of_a_pair_by_sketch_is_the_exact_one(fit):
    exact = fit.pair("age_years", "pressure_m", others="observed", shape="map")
    quick = answer_by_sketch(fit.model, exact.question, sketch_for(fit.model, exact.question))
    assert quick.surface == exact.surface
    assert quick.held == exact.held
    assert quick.counted == exact.counted
    assert quick.effect.turns == pytest.approx(exact.effect.turns, abs=0.05)
    for mine, theirs in zip(quick.effect.stretches, exact.effect.stretches, strict=True):
        assert mine.sign == theirs.sign
        assert (mine.start, mine.end) == pytest.approx((theirs.start, theirs.end), abs=0.01)
    for mine, theirs in zip(quick.lines.lines, exact.lines.lines, strict=True):
        assert mine.estimate == pytest.approx(theirs.estimate, abs=1e-6)


@pytest.mark.parametrize(
    "ask",
    [
        lambda f: f.curve("age_years"),
        lambda f: f.odds(),
        lambda f: f.change("age_years", po.Shift(by=-10, lowest=0)),
        lambda f: f.change("age_years", 20, 60, sample="drawn"),
        lambda f: f.change("age_years", 20, 60, others="typical"),
        lambda f: f.change("age_years", 20, 60, where=np.arange(1500) < 700),
        lambda f: f.pair("age_years", "material"),
        lambda f: f.pair("age_years", "material", others="observed", number="slope"),
    ],
)
def test_other_questions_have_no_sketch(fit, ask):
    assert sketch_for(fit.model, ask(fit).question) is None
