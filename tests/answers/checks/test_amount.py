"""How much data there is: events for each coefficient, sparse levels, rows left out."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from hypothesis import given
from hypothesis import strategies as st
from statsmodels.stats.proportion import confint_proportions_2indep

from plainodds.answers.checks.amount import (
    amount_of,
    difference_of_shares,
    levels_of,
    missing_of,
)
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of

DATA = invented(600)


def first(events, rows=400, seed=0):
    """Rows of which the first so many have the event, with four numbers of no meaning."""
    draw = np.random.default_rng(seed)
    frame = pd.DataFrame(draw.normal(size=(rows, 4)), columns=list("abcd"))
    return frame.assign(y=(np.arange(rows) < events).astype(int))


# --- events for each coefficient ---------------------------------------------------


def test_events_are_counted_against_the_coefficients_without_the_intercept():
    found = amount_of(logit("y ~ x + count + group", DATA)).evidence
    assert (found.events, found.others) == (DATA.y.sum(), len(DATA) - DATA.y.sum())
    assert found.parameters == 4
    assert found.events_per_parameter == min(found.events, found.others) / 4


@pytest.mark.parametrize(
    ("events", "concern"),
    [(12, "don't explain yet"), (30, "keep in mind"), (60, "nothing found")],
)
@pytest.mark.parametrize("of", ["events", "others"])
def test_few_of_the_rarer_outcome_raise_a_concern(events, concern, of):
    frame = first(events if of == "events" else 400 - events)
    found = amount_of(logit("y ~ a + b + c + d", frame))
    assert found.concern == concern
    assert found.reasons == (() if concern == "nothing found" else ("few events",))
    assert found.evidence.events_per_parameter == events / 4


def test_a_row_of_counts_is_as_many_cases_as_it_counts():
    frame = pd.DataFrame({"dead": [3, 9, 7, 12], "alive": [17, 11, 13, 8], "dose": [0, 1, 2, 3]})
    result = smf.glm("dead + alive ~ dose", frame, family=binomial()).fit()
    found = amount_of(model_of(result))
    assert (found.evidence.events, found.evidence.others) == pytest.approx((31, 49))
    assert found.concern == "nothing found"


@pytest.mark.parametrize("weights", ["freq_weights", "var_weights"])
def test_shares_are_as_many_cases_as_their_weights(weights):
    frame = pd.DataFrame({"share": [0.25, 0.5, 0.75, 0.5], "n": [20, 10, 20, 10]})
    frame["dose"] = [0, 1, 2, 3]
    result = smf.glm("share ~ dose", frame, family=binomial(), **{weights: frame.n}).fit()
    found = amount_of(model_of(result)).evidence
    assert (found.events, found.others) == (30, 30)


@pytest.mark.parametrize(
    ("formula", "parameters"),
    [
        ("y ~ x + group", 3),
        ("y ~ 0 + x + group", 3),
        ("y ~ 0 + x", 1),
        ("y ~ 0 + x + w", 2),
        ("y ~ x * group", 5),
    ],
)
def test_full_dummies_stand_for_an_intercept(formula, parameters):
    assert amount_of(logit(formula, DATA)).evidence.parameters == parameters


def test_a_gee_has_events_too():
    fitted = smf.gee("y ~ x", np.arange(600) // 4, DATA, family=binomial()).fit()
    assert amount_of(model_of(fitted)).evidence.events == DATA.y.sum()


# --- levels ------------------------------------------------------------------------


def with_level(events, cases):
    """DATA, with so many cases of a fourth level."""
    rare = DATA.head(cases).assign(group="rare", y=(np.arange(cases) < events).astype(int))
    return pd.concat([DATA, rare], ignore_index=True)


def test_every_level_is_counted():
    found = levels_of(logit("y ~ x + group", DATA))
    assert found.concern == "nothing found"
    assert found.evidence.sparse == 0
    counted = DATA.groupby("group").y.agg(["size", "sum"])
    assert [(c.level, c.cases, c.events) for c in found.evidence.counts] == [
        (level, row["size"], row["sum"]) for level, row in counted.iterrows()
    ]


@pytest.mark.parametrize(("events", "cases"), [(3, 20), (17, 20)])
def test_a_level_of_few_events_or_few_others_is_sparse_and_comes_first(events, cases):
    found = levels_of(logit("y ~ x + group", with_level(events, cases)))
    assert (found.concern, found.reasons) == ("keep in mind", ("few events",))
    assert found.about == ("group",)
    assert found.evidence.sparse == 1
    assert found.evidence.counts[0].level == "rare"
    assert len(found.evidence.counts) == 4


@pytest.mark.filterwarnings("ignore")
@pytest.mark.parametrize(("events", "cases"), [(0, 9), (9, 9)])
def test_a_level_of_one_outcome_only_has_no_odds_ratio(events, cases):
    found = levels_of(logit("y ~ x + group", with_level(events, cases)))
    assert (found.concern, found.reasons) == ("don't explain yet", ("one outcome only",))


@pytest.mark.filterwarnings("ignore")
def test_a_level_that_no_row_has_is_not_counted():
    frame = DATA.assign(group=pd.Categorical(DATA.group, ["p", "q", "r", "never"]))
    model = model_of(smf.glm("y ~ x + group", frame, family=binomial()).fit())
    assert "never" in model.subject.predictor("group").levels
    found = levels_of(model)
    assert found.concern == "nothing found"
    assert "never" not in {count.level for count in found.evidence.counts}


def test_without_categories_there_is_nothing_sparse():
    found = levels_of(logit("y ~ x + w", DATA))
    assert (found.concern, found.evidence.counts) == ("nothing found", ())


@pytest.mark.filterwarnings("ignore")
def test_a_row_of_counts_is_not_sparse_for_being_one_row():
    frame = pd.DataFrame({"dead": [30, 40], "alive": [30, 20], "sex": ["f", "m"]})
    result = smf.glm("dead + alive ~ sex", frame, family=binomial()).fit()
    assert levels_of(model_of(result)).concern == "nothing found"


# --- rows left out -----------------------------------------------------------------


def with_missing(rows, share, seed=1):
    """DATA with so many rows added whose x is missing, and the share of events among these."""
    lost = pd.DataFrame({"x": np.nan, "w": 4.0, "count": 1, "group": "p"}, index=range(rows))
    lost["y"] = (np.arange(rows) < round(share * rows)).astype(int)
    mixed = pd.concat([DATA, lost], ignore_index=True)
    return mixed.sample(frac=1, random_state=seed, ignore_index=True)


def test_no_row_left_out_raises_no_concern():
    found = missing_of(logit("y ~ x", DATA), 0.95)
    assert (found.concern, found.unknown) == ("nothing found", "")
    assert (found.evidence.used, found.evidence.dropped) == (len(DATA), 0)


def test_few_rows_left_out_that_are_like_the_others_raise_none():
    frame = with_missing(40, DATA.y.mean())
    found = missing_of(logit("y ~ x + w", frame), 0.95)
    assert found.concern == "nothing found"
    assert (found.evidence.dropped, found.evidence.known) == (40, 40)
    assert found.evidence.columns == (("x", 40),)
    assert found.evidence.difference.lower < 0 < found.evidence.difference.upper


def test_many_rows_left_out_raise_a_concern():
    found = missing_of(logit("y ~ x", with_missing(100, DATA.y.mean())), 0.95)
    assert (found.concern, found.reasons) == ("keep in mind", ("many",))


def test_rows_left_out_with_other_outcomes_raise_a_concern():
    found = missing_of(logit("y ~ x", with_missing(40, 0.9)), 0.95)
    assert (found.concern, found.reasons) == ("keep in mind", ("differ",))
    assert found.evidence.share_dropped == 0.9
    assert found.evidence.difference.estimate == pytest.approx(0.9 - DATA.y.mean())


def test_the_level_of_the_interval_shown_changes_no_concern():
    model = logit("y ~ x", with_missing(40, DATA.y.mean() + 0.05))
    narrow, wide = missing_of(model, 0.2), missing_of(model, 0.95)
    assert narrow.evidence.difference.lower > 0 > wide.evidence.difference.lower
    assert narrow.concern == wide.concern == "nothing found"


def test_rows_without_an_outcome_do_not_tell_whether_they_differ():
    frame = DATA.assign(y=DATA.y.where(DATA.index >= 20))
    found = missing_of(logit("y ~ x", frame), 0.95)
    assert (found.concern, found.unknown) == ("nothing found", "no outcome")
    assert found.evidence.columns == (("y", 20),)
    assert found.evidence.difference is None


def test_newcombes_example_is_met():
    # Newcombe 1998 (Statistics in Medicine 17:873), table II, example (a), method 10
    found = difference_of_shares(56, 70, 48, 80, 0.95)
    assert found.estimate == pytest.approx(0.2)
    assert (found.lower, found.upper) == pytest.approx((0.0524, 0.3339), abs=5e-5)


@given(
    cases=st.tuples(st.integers(2, 400), st.integers(2, 400)),
    shares=st.tuples(st.floats(0, 1), st.floats(0, 1)),
    level=st.floats(0.5, 0.999),
)
def test_the_interval_is_statsmodels_and_stays_within_bounds(cases, shares, level):
    events = [round(n * share) for n, share in zip(cases, shares, strict=True)]
    found = difference_of_shares(events[0], cases[0], events[1], cases[1], level)
    expected = confint_proportions_2indep(
        events[0], cases[0], events[1], cases[1], method="newcomb", compare="diff", alpha=1 - level
    )
    assert (found.lower, found.upper) == pytest.approx(expected, abs=1e-9)
    assert -1 - 1e-9 <= found.lower <= found.estimate + 1e-9
    assert found.estimate - 1e-9 <= found.upper <= 1 + 1e-9


# --- what cannot be known ----------------------------------------------------------


def test_without_an_outcome_only_cases_are_counted():
    result = smf.glm("y ~ x + group", DATA, family=sm.families.Binomial()).fit()
    result.remove_data()
    model = model_of(result, data=DATA)
    assert (amount_of(model).concern, amount_of(model).unknown) == ("not known", "no outcome")
    levels = levels_of(model)
    assert (levels.concern, levels.unknown) == ("not known", "no outcome")
    assert sum(count.cases for count in levels.evidence.counts) == len(DATA)
    assert np.isnan([count.events for count in levels.evidence.counts]).all()


def test_findings_go_to_json_and_back():
    model = logit("y ~ x + group", with_missing(100, 0.9))
    for found in (amount_of(model), levels_of(model), missing_of(model, 0.95)):
        assert from_json(to_json(found)) == found
