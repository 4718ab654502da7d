"""Odds ratios and profiles of separated data: no number where there is none."""

import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from scipy.optimize import brentq
from scipy.stats import chi2

import plainodds as po
from plainodds.answers.bounded import limits_of
from plainodds.values import from_json, to_json

pytestmark = pytest.mark.filterwarnings("ignore")


def invented(rows=200, seed=0):
    draw = np.random.default_rng(seed)
    frame = pd.DataFrame({"g": draw.choice(list("abc"), rows), "x": draw.normal(size=rows)})
    frame["y"] = (draw.uniform(size=rows) < 1 / (1 + np.exp(-frame["x"]))).astype(int)
    return frame


FRAME = invented().assign(y=lambda frame: frame["y"].where(frame["g"] != "c", 1))
KINDS = {
    "Logit": lambda formula, frame: smf.logit(formula, frame).fit(disp=0),
    "Logit, two iterations": lambda formula, frame: smf.logit(formula, frame).fit(
        disp=0, maxiter=2
    ),
    "Logit, bfgs": lambda formula, frame: smf.logit(formula, frame).fit(disp=0, method="bfgs"),
    "GLM": lambda formula, frame: smf.glm(formula, frame, family=sm.families.Binomial()).fit(),
    "GLM, coarse": lambda formula, frame: smf.glm(
        formula, frame, family=sm.families.Binomial()
    ).fit(tol=0.1),
}


def row_of(answer, predictor, end=None):
    (row,) = [r for r in answer.rows if r.predictor == predictor and end in (None, r.end)]
    return row


@pytest.mark.parametrize("kind", KINDS)
@pytest.mark.parametrize("interval", ["wald", "likelihood"])
def test_a_level_with_events_only_has_an_infinite_odds_ratio_with_one_end(kind, interval):
    fit = po.FittedLogit(KINDS[kind]("y ~ g + x", FRAME))
    row = row_of(fit.odds(interval=interval), "g", "c")
    assert row.log_odds_ratio.estimate == row.odds_ratio.estimate == math.inf
    assert row.log_odds_ratio.upper == row.odds_ratio.upper == math.inf
    assert row.log_odds_ratio.se is row.odds_ratio.se is None
    # the end is where the deviance exceeds that of the limit, by one-dimensional search
    expected = brentq(lambda at: excess(at) - chi2.ppf(0.95, 1), 0, 6)
    assert row.log_odds_ratio.lower == pytest.approx(expected, abs=1e-4)
    assert row.odds_ratio.lower == pytest.approx(math.exp(expected), rel=1e-4)
    assert row.p_value == pytest.approx(chi2.sf(excess(0.0), 1), rel=1e-3)


def excess(at):
    """By how much the deviance with a stated coefficient of c exceeds its infimum."""
    is_c = (FRAME["g"] == "c").to_numpy()
    rest = sm.add_constant(np.column_stack([FRAME["g"] == "b", FRAME["x"]]).astype(float))
    family = sm.families.Binomial
    held = sm.GLM(FRAME["y"].to_numpy(), rest, family=family(), offset=at * is_c).fit()
    # at the infimum the rows of c are told perfectly, and the others fitted by themselves
    others = sm.GLM(FRAME["y"].to_numpy()[~is_c], rest[~is_c], family=family()).fit()
    return held.deviance - others.deviance


@pytest.mark.parametrize("kind", ["Logit", "GLM"])
def test_odds_ratios_beside_it_are_those_of_the_rows_that_are_not_separated(kind):
    fit = po.FittedLogit(KINDS[kind]("y ~ g + x", FRAME))
    others = po.FittedLogit(KINDS[kind]("y ~ g + x", FRAME[FRAME["g"] != "c"]))
    for predictor, end in (("g", "b"), ("x", None)):
        steps = {"x": 1.0}
        found = row_of(fit.odds(steps=steps), predictor, end).log_odds_ratio
        expected = row_of(others.odds(steps=steps), predictor, end).log_odds_ratio
        for field in ("estimate", "se", "lower", "upper"):
            assert getattr(found, field) == pytest.approx(getattr(expected, field), rel=1e-4)


def test_a_level_without_events_has_an_odds_ratio_of_0_with_one_end():
    frame = FRAME.assign(y=1 - FRAME["y"])
    row = row_of(po.FittedLogit(KINDS["GLM"]("y ~ g + x", frame)).odds(), "g", "c")
    assert row.log_odds_ratio.estimate == row.log_odds_ratio.lower == -math.inf
    assert row.odds_ratio.estimate == row.odds_ratio.lower == 0.0
    assert 0 < row.odds_ratio.upper < 1
    mirrored = row_of(po.FittedLogit(KINDS["GLM"]("y ~ g + x", FRAME)).odds(), "g", "c")
    assert row.log_odds_ratio.upper == pytest.approx(-mirrored.log_odds_ratio.lower, abs=1e-6)


def test_with_a_separated_reference_every_change_goes_on_for_ever():
    answer = po.FittedLogit(KINDS["GLM"]("y ~ g + x", FRAME)).odds("g", references={"g": "c"})
    assert [row.log_odds_ratio.estimate for row in answer.rows] == [-math.inf, -math.inf]


def test_a_change_between_two_levels_without_events_is_left_open():
    frame = FRAME.assign(y=FRAME["y"].where(FRAME["g"] == "a", 0))
    fit = po.FittedLogit(KINDS["GLM"]("y ~ g + x", frame))
    (row,) = fit.odds("g", between={"g": ("b", "c")}).rows
    assert math.isnan(row.odds_ratio.estimate)
    assert (row.odds_ratio.lower, row.odds_ratio.upper, row.p_value) == (None, None, None)


@pytest.mark.parametrize("kind", ["Logit, bfgs", "GLM"])
def test_columns_that_repeat_each_other_leave_their_own_changes_open_only(kind):
    frame = invented().assign(twice=lambda each: 2 * each["x"])
    fit = po.FittedLogit(KINDS[kind]("y ~ g + x + twice", frame))
    answer = fit.odds()
    assert all(math.isnan(row_of(answer, name).odds_ratio.estimate) for name in ("x", "twice"))
    whole = po.FittedLogit(KINDS[kind]("y ~ g + x", invented()))
    assert row_of(answer, "g", "b").odds_ratio.estimate == pytest.approx(
        row_of(whole.odds(), "g", "b").odds_ratio.estimate, rel=1e-3
    )


def test_separation_and_repeated_columns_together_keep_the_finite_end():
    doubled = FRAME.assign(twice=2 * FRAME["x"])
    row = row_of(po.FittedLogit(KINDS["GLM"]("y ~ g + x + twice", doubled)).odds(), "g", "c")
    plain = row_of(po.FittedLogit(KINDS["GLM"]("y ~ g + x", FRAME)).odds(), "g", "c")
    assert row.odds_ratio.lower == pytest.approx(plain.odds_ratio.lower, rel=1e-5)


def test_an_empty_cell_stops_only_the_odds_ratios_that_need_it():
    frame = invented(seed=4).assign(h=lambda each: np.where(each["x"] > 0, "k", "l"))
    frame.loc[(frame["g"] == "c") & (frame["h"] == "l"), "y"] = 0
    answer = po.FittedLogit(KINDS["GLM"]("y ~ g * h", frame)).odds("g")
    unbounded = {(row.end, row.given) for row in answer.rows if row.odds_ratio.estimate == 0}
    assert unbounded == {("c", (("h", "l"),))}


def test_without_a_likelihood_there_is_no_end():
    model = smf.glm("y ~ g + x", FRAME, family=sm.families.Binomial())
    row = row_of(po.FittedLogit(model.fit(cov_type="HC1")).odds(), "g", "c")
    assert row.odds_ratio == po.answers.estimate.Estimate(math.inf, None, None, None)
    assert row.p_value is None


def test_a_penalised_fit_keeps_its_numbers():
    result = smf.logit("y ~ g + x", FRAME).fit_regularized(alpha=1.0, disp=0)
    row = row_of(po.FittedLogit(result).odds(), "g", "c")
    assert row.odds_ratio.estimate == pytest.approx(math.exp(result.params["g[T.c]"]))


def test_rows_without_a_finite_estimate_come_first_and_open_ones_last():
    frame = FRAME.assign(u=FRAME["x"] ** 2, v=2 * FRAME["x"] ** 2)
    answer = po.FittedLogit(KINDS["GLM"]("y ~ x + g + u + v", frame)).odds(order="size")
    sizes = [abs(row.log_odds_ratio.estimate) for row in answer.rows]
    assert sizes[0] == math.inf
    assert [math.isnan(size) for size in sizes] == [False, False, False, True, True]


def test_such_an_answer_goes_to_json_and_into_a_table():
    answer = po.FittedLogit(KINDS["GLM"]("y ~ g + x", FRAME)).odds()
    assert from_json(to_json(answer)) == answer
    row = po.table(answer).set_index("to").loc["c"]
    assert (row["estimate"], row["upper"]) == (math.inf, math.inf)
    assert math.isnan(row["se"])
    assert row["lower"] > 1


def test_models_side_by_side_each_have_their_own_limits():
    crude = KINDS["GLM"]("y ~ g", FRAME)
    other = KINDS["GLM"]("y ~ g + x", invented())
    answer = po.odds_of({"separated": crude, "not": other})
    found = {row.model: row.odds_ratio.estimate for row in answer.rows if row.end == "c"}
    assert found["separated"] == math.inf
    assert found["not"] < 10


def test_a_profile_says_where_its_linear_predictor_has_no_finite_estimate():
    fit = po.FittedLogit(KINDS["GLM"]("y ~ g + x", FRAME))
    assert fit.profile({"g": "c"}).point.limit == math.inf
    compared = fit.profile({"g": "c"}, against={"g": "a"})
    assert (compared.point.limit, compared.start.limit) == (math.inf, 0.0)
    assert compared.comparison.odds_ratio.estimate == math.inf
    assert compared.comparison.odds_ratio.lower == pytest.approx(
        row_of(fit.odds(), "g", "c").odds_ratio.lower
    )
    assert fit.profile({"g": "a"}).point.limit == 0.0
    assert from_json(to_json(compared)) == compared


def test_ordinary_fits_have_finite_limits_at_no_cost_of_a_programme(monkeypatch):
    from plainodds.answers import bounded

    def refused(model):
        raise AssertionError("a linear programme was run")

    monkeypatch.setattr(bounded, "recession_of", refused)
    fit = po.FittedLogit(KINDS["GLM"]("y ~ g + x", invented()))
    np.testing.assert_array_equal(limits_of(fit.model, np.eye(4)), np.zeros(4))


def test_ends_are_found_once_for_each_change(monkeypatch):
    from plainodds.answers.likelihood import Likelihood

    fit = po.FittedLogit(KINDS["GLM"]("y ~ g + x", FRAME))
    first = fit.odds()
    monkeypatch.setattr(Likelihood, "end", None)
    assert fit.odds() == first
