"""The event that was modelled is found out, named, and turned round if asked for."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm

from plainodds import FitRefused, FittedLogit, Outcome
from tests.model import made


def outcomes():
    frame = made.cases()
    frame["yes"] = frame["left"] == 1
    frame["yes_object"] = frame["yes"].astype(object)
    frame["yes_nullable"] = frame["yes"].astype("boolean")
    frame["whole"] = frame["left"].astype("Int64")
    frame["share"] = frame["left"].astype(float)
    frame["fate"] = np.where(frame["yes"], "left", "home")
    frame["fate_object"] = frame["fate"].astype(object)
    frame["fate_category"] = pd.Categorical(frame["fate"], ["home", "left"])
    frame["fate_ordered"] = pd.Categorical(frame["fate"], ["left", "home"], ordered=True)
    frame["fate_interval"] = pd.cut(frame["left"], [-1, 0.5, 1])
    frame["fate_bracket"] = np.where(frame["yes"], "a[1]", "a[0]")
    frame["two"] = frame["left"] + 1
    draw = np.random.default_rng(1)
    frame["trials"] = draw.integers(1, 9, len(frame))
    frame["hits"] = draw.binomial(frame["trials"], 1 / (1 + np.exp(1 - 0.3 * frame["age"])))
    frame["misses"] = frame["trials"] - frame["hits"]
    frame["rate"] = frame["hits"] / frame["trials"]
    return frame


FRAME = outcomes()
NEW = made.cases(40, seed=8)

# engine, outcome as the formula writes it, level that statsmodels models, whether it is the
# one that most people would not expect
CODED = [
    *((engine, name, 1, False) for engine in made.ENGINES for name in ("left", "share", "whole")),
    *((engine, "np.where(fate == 'left', 1, 0)", 1, False) for engine in made.ENGINES),
    *((engine, name, "home", True) for engine in made.ENGINES
      for name in ("fate", "fate_object", "fate_category", "C(fate)")),
    *((engine, "fate_ordered", "left", True) for engine in made.ENGINES),
    *((engine, "fate_bracket", "a[0]", True) for engine in made.ENGINES),
    *((engine, "C(left)", "0", True) for engine in made.ENGINES),
    *((engine, "C(two)", "1", True) for engine in made.ENGINES),
    *((engine, "yes_object", False, True) for engine in made.ENGINES),
    ("patsy", "yes", False, True),
    ("patsy", "I(fate == 'left')", False, True),
    ("patsy", "fate_interval", "Interval(-1.0, 0.5, closed='right')", True),
    ("formulaic", "yes", 1, False),
    ("formulaic", "yes_nullable", 1, False),
    ("formulaic", "I(fate == 'left')", 1, False),
    ("formulaic", "fate_interval", "(-1.0, 0.5]", True),
]  # fmt: skip


def fitted(engine, outcome, kind="glm", **settings):
    with made.formula_engine(engine):
        return {"glm": made.glm, "gee": made.gee}[kind](
            f"{outcome} ~ age + site", FRAME, **settings
        ).fit()


def new_chances(fit):
    """Chances of the first new rows, as the model says."""
    rows = NEW[["age", "site"]].itertuples(index=False)
    return made.chances(fit, [{"age": row.age, "site": row.site} for row in rows])


@pytest.mark.parametrize(("engine", "outcome", "level", "flipped"), CODED)
def test_the_modelled_event_is_stated_and_its_chance_right(engine, outcome, level, flipped):
    # GLM and GEE code outcomes alike; Logit takes none that would have to be coded
    result = fitted(engine, outcome, "gee" if "yes" in outcome or "fate" in outcome else "glm")
    fit = FittedLogit(result)
    facts = fit.subject.outcome
    assert (facts.name, facts.level) == (outcome, level)
    assert facts.event == f"{outcome} = {level}"
    np.testing.assert_allclose(new_chances(fit), made.predicted(result, NEW, engine), rtol=1e-12)
    # the share tells which event it is, whatever its name
    gone = FRAME["left"].mean()
    speaks_of_gone = level in (1, "left")
    assert facts.share == pytest.approx(gone if speaks_of_gone else 1 - gone)
    assert any("first level" in notice for notice in fit.subject.notices) == flipped


@pytest.mark.parametrize(("engine", "outcome", "level", "flipped"), CODED)
def test_the_other_level_turns_every_sign(engine, outcome, level, flipped):
    result = fitted(engine, outcome)
    plain = FittedLogit(result)
    others = {1: 0, "home": "left", "left": "home", "a[0]": "a[1]", "0": 1, "1": 2, False: True}
    other = others.get(level, plain.subject.outcome.level and _other_interval(engine))
    stated = FittedLogit(result, outcome=Outcome(level=level))
    np.testing.assert_array_equal(stated.model.coefficients, plain.model.coefficients)
    turned = FittedLogit(result, outcome=Outcome(level=other))
    np.testing.assert_allclose(new_chances(turned), 1 - new_chances(plain), rtol=1e-9)
    np.testing.assert_array_equal(turned.model.covariance, plain.model.covariance)
    assert turned.subject.outcome.share == pytest.approx(1 - plain.subject.outcome.share)
    assert str(turned.subject.outcome.level) == str(other)
    assert "every sign was turned" in turned.subject.notices[0]
    ratio, inverse = (f.odds("age", steps={"age": 1}).rows[0].odds_ratio for f in (plain, turned))
    assert inverse.estimate == pytest.approx(1 / ratio.estimate)
    assert (inverse.lower, inverse.upper) == pytest.approx((1 / ratio.upper, 1 / ratio.lower))


def _other_interval(engine):
    return {"patsy": "Interval(0.5, 1.0, closed='right')", "formulaic": "(0.5, 1.0]"}[engine]


def test_offsets_turn_with_the_level():
    offset = np.random.default_rng(2).normal(0.5, 0.3, len(FRAME))
    result = fitted("patsy", "left", offset=offset)
    plain, turned = FittedLogit(result), FittedLogit(result, outcome=Outcome(level=0))
    assert turned.subject.offset == pytest.approx(-plain.subject.offset)
    np.testing.assert_allclose(new_chances(turned), 1 - new_chances(plain), rtol=1e-9)
    held = FittedLogit(result, offset=1.25)
    held_turned = FittedLogit(result, offset=1.25, outcome=Outcome(level=0))
    np.testing.assert_allclose(new_chances(held_turned), 1 - new_chances(held), rtol=1e-9)
    at = {"others": "observed", "at": (2.0, 6.0)}
    averaged, averaged_turned = (f.curve("age", **at).lines[0].estimate for f in (plain, turned))
    np.testing.assert_allclose(averaged_turned, 1 - np.array(averaged), rtol=1e-9)


def counts(way, weights="none"):
    family = sm.families.Binomial()
    exog = sm.add_constant(FRAME[["age", "depth"]])
    pairs = FRAME[["hits", "misses"]]
    ways = {
        "patsy": lambda: fit_counts("patsy", "hits + misses"),
        "formulaic": lambda: fit_counts("formulaic", "hits + misses"),
        "stacked": lambda: fit_counts("patsy", "np.column_stack([hits, misses])"),
        "frame": lambda: sm.GLM(pairs, exog, family=family).fit(),
        "array": lambda: sm.GLM(pairs.to_numpy(), exog.to_numpy(), family=family).fit(),
        "shares": lambda: fit_counts("patsy", "rate", var_weights=FRAME["trials"]),
        "shares, freq_weights": lambda: fit_counts("patsy", "rate", freq_weights=FRAME["trials"]),
        "shares, formulaic": lambda: fit_counts("formulaic", "rate", var_weights=FRAME["trials"]),
    }
    return ways[way]()


def fit_counts(engine, outcome, **settings):
    with made.formula_engine(engine):
        return made.glm(f"{outcome} ~ age + depth", FRAME, **settings).fit()


COUNTED = {
    "patsy": "hits",
    "formulaic": "hits",
    "stacked": "np.column_stack([hits, misses])[0]",
    "frame": "hits",
    "array": "y1",
    "shares": "rate",
    "shares, freq_weights": "rate",
    "shares, formulaic": "rate",
}


@pytest.mark.parametrize("way", COUNTED)
def test_counts_and_shares_are_one_model(way):
    result = counts(way)
    fit = FittedLogit(result)
    facts = fit.subject.outcome
    assert (facts.name, facts.event, facts.level) == (COUNTED[way], COUNTED[way], None)
    assert facts.share == pytest.approx(FRAME["hits"].sum() / FRAME["trials"].sum())
    np.testing.assert_array_equal(fit.model.sample.weights, FRAME["trials"])
    reference = FittedLogit(counts("patsy"))
    np.testing.assert_allclose(fit.model.coefficients, reference.model.coefficients, rtol=1e-7)
    assert fit.subject.notices == ()
    x, z = (column.name for column in fit.model.design.columns[1:])
    new = [{x: 3.0, z: 0.5}, {x: 7.0, z: -1.0}]
    columns = np.array([[1, 3.0, 0.5], [1, 7.0, -1.0]])
    expected = 1 / (1 + np.exp(-columns @ np.asarray(result.params)))
    np.testing.assert_allclose(made.chances(fit, new), expected, rtol=1e-12)


@pytest.mark.parametrize("way", COUNTED)
def test_counts_have_no_levels_to_choose(way):
    with pytest.raises(FitRefused, match="no levels but counts or shares"):
        FittedLogit(counts(way), outcome=Outcome(level="misses"))


def test_a_gee_of_counts_says_that_the_counts_do_not_count():
    result = made.gee("hits + misses ~ age", FRAME).fit()
    fit = FittedLogit(result)
    shares = made.gee("rate ~ age", FRAME).fit()
    np.testing.assert_allclose(fit.model.coefficients, np.asarray(shares.params))
    assert fit.model.sample.weights is None
    assert any("weights=" in notice for notice in fit.subject.notices)


def test_words_of_the_analyst_come_first():
    fit = FittedLogit(
        fitted("patsy", "left"), outcome=Outcome(event="leaving", case="guest", cases="guests")
    )
    facts = fit.subject.outcome
    assert (facts.event, facts.case, facts.cases) == ("leaving", "guest", "guests")
    alone = FittedLogit(fitted("patsy", "left"), outcome=Outcome(case="guest")).subject.outcome
    assert (alone.event, alone.cases) == ("left = 1", "guests")


def test_an_unknown_level_is_refused_with_the_levels_there_are():
    with pytest.raises(FitRefused, match=r"'gone'.*'left' and 'home'"):
        FittedLogit(fitted("patsy", "fate"), outcome=Outcome(level="gone"))
