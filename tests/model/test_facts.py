"""Kinds, levels, ranges, typical values and steps come from the data, or from the analyst."""

import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
from hypothesis import given
from hypothesis import strategies as st

from plainodds import FittedLogit, Predictor
from plainodds.model.facts import sensible_step
from tests.model import made

FRAME = made.cases()
KINDS = {
    "age": ("number", ()),
    "real": ("number", ()),
    "visits": ("whole number", ()),
    "whole": ("whole number", ()),
    "code": ("whole number", ()),
    "flag": ("yes/no", (False, True)),
    "object_flag": ("yes/no", (False, True)),
    "cat_flag": ("yes/no", (False, True)),
    "dummy": ("yes/no", (0, 1)),
    "C(flag)": ("yes/no", (False, True)),
    "C(dummy)": ("yes/no", (0, 1)),
    "site": ("category", ("a", "b", "c")),
    "text": ("category", ("p", "q", "r")),
    "object_text": ("category", ("p", "q", "r")),
    "object_number": ("category", (1, 2, 3)),
    "soil": ("category", ("low", "middle", "high")),
    "spare": ("category", ("u", "v", "w")),
    "band": ("category", ("(0, 3]", "(3, 6]", "(6, 10]")),
    "C(visits)": ("category", (0, 1, 2, 3, 4, 5)),
    "C(code)": ("category", (10, 20, 30)),
    "code + C(code)": ("category", (10, 20, 30)),
    "C(site, levels=['c', 'a', 'b'])": ("category", ("c", "a", "b")),
    "C(site, Treatment('c'))": ("category", ("a", "b", "c")),
    "C(visits > 2)": ("whole number", ()),
    "I(site == 'b')": ("category", ("a", "b", "c")),
}


def facts_of(term, predictors=None, frame=FRAME, engine="patsy", **settings):
    with made.formula_engine(engine):
        result = made.glm(f"left ~ {term}", frame, **settings).fit()
    return FittedLogit(result, predictors=predictors).subject.predictors[0]


@pytest.mark.filterwarnings("ignore")
@pytest.mark.parametrize("engine", made.ENGINES)
@pytest.mark.parametrize("term", KINDS)
def test_the_kind_and_the_levels_are_those_of_the_column(term, engine):
    facts = facts_of(term, engine=engine)
    assert (facts.kind, facts.levels) == KINDS[term]
    # True equals 1, so their types are compared as well
    assert [type(level) for level in facts.levels] == [type(level) for level in KINDS[term][1]]


def test_a_nullable_yes_or_no_is_one():
    assert facts_of("maybe", engine="formulaic").levels == (False, True)


@pytest.mark.parametrize("engine", made.ENGINES)
@pytest.mark.parametrize("name", ["site", "soil", "spare", "object_number"])
@pytest.mark.filterwarnings("ignore")
def test_levels_are_counted_and_the_most_frequent_is_typical(name, engine):
    facts = facts_of(name, engine=engine)
    counts = FRAME[name].value_counts()
    assert facts.level_counts == tuple(counts.get(level, 0) for level in facts.levels)
    assert counts[facts.typical] == counts.max()
    assert math.isnan(facts.step)
    assert math.isnan(facts.minimum)


def test_every_levels_cases_and_events_are_counted():
    facts = FittedLogit(made.logit("left ~ soil", FRAME).fit(disp=0)).subject.predictor("soil")
    assert facts.levels == ("low", "middle", "high")
    counted = FRAME.groupby("soil", observed=True).left.agg(["size", "sum"])
    assert list(facts.level_cases) == list(counted["size"])
    assert list(facts.level_events) == list(counted["sum"])


def test_grouped_counts_are_counted_as_cases():
    frame = pd.DataFrame({"dead": [3, 9, 7], "alive": [7, 1, 3], "dose": ["low", "high", "low"]})
    facts = FittedLogit(made.glm("dead + alive ~ dose", frame).fit()).subject.predictor("dose")
    assert facts.levels == ("high", "low")
    assert facts.level_counts == (1, 2)
    assert facts.level_cases == (10, 20)
    assert facts.level_events == pytest.approx((9, 10))


def test_without_an_outcome_a_levels_events_are_not_known():
    result = made.glm("left ~ soil", FRAME).fit()
    result.remove_data()
    facts = FittedLogit(result, data=FRAME).subject.predictor("soil")
    assert facts.level_events == ()
    assert sum(facts.level_cases) == len(FRAME)


def test_a_number_has_its_range_quartiles_and_median():
    facts = facts_of("age")
    age = FRAME["age"]
    assert (facts.minimum, facts.maximum) == facts.offered == (age.min(), age.max())
    assert facts.typical == facts.quartiles[1] == age.median()
    assert facts.quartiles == tuple(
        np.quantile(age, (0.25, 0.5, 0.75), method="averaged_inverted_cdf")
    )
    assert facts.step == 1.0


def test_the_typical_whole_number_is_whole():
    frame = FRAME.assign(visits=np.arange(len(FRAME)) % 2 + 3)
    facts = facts_of("visits", frame=frame)
    assert (facts.typical, type(facts.typical)) == (3, int)


def test_labels_read_like_words():
    assert facts_of("object_flag").label == "object flag"
    assert facts_of("object_flag").level_labels == ("no", "yes")
    assert facts_of("dummy").level_labels == ("no", "yes")
    assert facts_of("C(code)").level_labels == ("10", "20", "30")
    assert facts_of("band").level_labels == ("(0, 3]", "(3, 6]", "(6, 10]")


OVERRIDES = {
    "label": ("age", {"label": "Age of guest"}, "Age of guest"),
    "unit": ("age", {"unit": "years"}, "years"),
    "step": ("age", {"step": 0.25}, 0.25),
    "typical": ("age", {"typical": 2}, 2.0),
    "offered": ("age", {"range": (0, 12)}, (0.0, 12.0)),
    "levels": ("site", {"levels": ["c", "a", "b"]}, ("c", "a", "b")),
    "level_labels": ("site", {"level_labels": {"a": "At sea"}}, ("At sea", "b", "c")),
    "kind": ("visits", {"kind": "number"}, "number"),
}


@pytest.mark.parametrize("field", OVERRIDES)
def test_the_analyst_overrides_what_the_data_say(field):
    term, said, expected = OVERRIDES[field]
    plain, stated = facts_of(term), facts_of(term, {term: Predictor(**said)})
    assert getattr(plain, field) != expected
    assert getattr(stated, field) == expected


def test_other_orders_of_levels_change_no_chance():
    result = made.glm("left ~ site * age + band", FRAME).fit()
    levels = {"site": Predictor(levels=("c", "a", "b")),
              "band": Predictor(levels=("(6, 10]", "(0, 3]", "(3, 6]"))}  # fmt: skip
    one, other = FittedLogit(result), FittedLogit(result, predictors=levels)
    profiles = [{"site": s, "band": b} for s in "abc" for b in one.subject.predictor("band").levels]
    np.testing.assert_array_equal(made.chances(one, profiles), made.chances(other, profiles))
    np.testing.assert_array_equal(
        other.model.design.rows(other.model.sample.columns), result.model.exog
    )


@pytest.mark.parametrize(
    ("term", "kind", "levels"),
    [
        ("visits", "category", (0, 1, 2, 3, 4, 5)),
        ("code", "category", (10, 20, 30)),
        ("flag", "category", (False, True)),
        ("dummy", "number", ()),
        ("dummy", "category", (0, 1)),
        ("visits", "number", ()),
    ],
)
def test_the_analyst_may_see_a_column_as_another_kind(term, kind, levels):
    facts = facts_of(f"{term} * age", {term: Predictor(kind=kind)})
    result = made.glm(f"left ~ {term} * age", FRAME).fit()
    fit = FittedLogit(result, predictors={term: Predictor(kind=kind)})
    facts = fit.subject.predictor(term)
    assert (facts.kind, facts.levels) == (kind, levels)
    np.testing.assert_array_equal(
        fit.model.design.rows(fit.model.sample.columns), result.model.exog
    )


def test_numpy_values_state_what_plain_values_do():
    plain = Predictor(levels=(1, 2), range=(0, 1), typical=3, step=2, level_labels={1: "one"})
    numpy = Predictor(
        levels=np.array([1, 2]),
        range=np.array([0, 1]),
        typical=np.int64(3),
        step=np.int64(2),
        level_labels={np.int64(1): "one"},
    )
    assert plain == numpy
    assert hash(plain) == hash(numpy)


def test_a_stated_range_that_leaves_the_median_out_holds_its_nearer_end():
    assert facts_of("age", {"age": Predictor(range=(0, 2))}).typical == 2.0
    assert facts_of("age", {"age": Predictor(range=(8, 9))}).typical == 8.0


def test_a_typical_value_beyond_the_data_widens_what_is_offered():
    assert facts_of("age", {"age": Predictor(typical=20)}).offered == (FRAME["age"].min(), 20.0)


def test_a_number_that_never_varies_still_has_a_range_to_offer():
    facts = facts_of("0 + age", frame=FRAME.assign(age=3.5))
    assert facts.offered == (3.5, 4.5)
    assert facts.typical == 3.5


@pytest.mark.parametrize(
    ("formula", "modifiers"),
    [
        ("age + depth", {"age": (), "depth": ()}),
        ("age * depth", {"age": ("depth",), "depth": ("age",)}),
        ("age * site + depth", {"age": ("site",), "site": ("age",), "depth": ()}),
        ("I(age * depth)", {"age": ("depth",), "depth": ("age",)}),
        ("np.log(age) + bs(age, df=4):site", {"age": ("site",), "site": ("age",)}),
        (
            "age * site * flag",
            {"age": ("site", "flag"), "site": ("flag", "age"), "flag": ("site", "age")},
        ),
    ],
)
def test_modifiers_share_a_term(formula, modifiers):
    fit = FittedLogit(made.glm(f"left ~ {formula}", FRAME).fit())
    found = {facts.name: set(facts.modifiers) for facts in fit.subject.predictors}
    assert found == {name: set(others) for name, others in modifiers.items()}


@given(
    st.floats(1e-9, 1e9),
    st.sampled_from(["number", "whole number"]),
)
def test_a_step_is_1_2_or_5_times_a_power_of_ten_near_a_tenth_of_the_spread(spread, kind):
    step = sensible_step(spread, kind)
    digits, exponent = f"{step:.9e}".split("e")
    assert float(digits) in (1, 2, 5)
    assert step == float(f"{float(digits):g}e{exponent}")
    if kind == "number" or spread > 10:
        assert spread / 10 / 1.6 < step < spread / 10 * 1.6
    else:
        assert step in (1, 2)


@given(st.floats(1e-6, 1e6), st.sampled_from([10.0, 100.0, 0.001]))
def test_another_unit_changes_the_step_by_as_much(spread, unit):
    assert sensible_step(spread * unit, "number") == pytest.approx(
        sensible_step(spread, "number") * unit
    )


def test_no_spread_has_a_step_of_one():
    assert sensible_step(0.0, "number") == 1.0


def test_columns_of_a_frame_without_a_formula_have_kinds_too():
    exog = sm.add_constant(
        pd.DataFrame({"age": FRAME["age"], "visits": FRAME["visits"], "dummy": FRAME["dummy"]})
        .astype(float)
    )  # fmt: skip
    fit = FittedLogit(sm.Logit(FRAME["left"], exog).fit(disp=0))
    kinds = {facts.name: facts.kind for facts in fit.subject.predictors}
    assert kinds == {"age": "number", "visits": "whole number", "dummy": "yes/no"}
