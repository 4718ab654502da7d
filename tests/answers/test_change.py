"""Two chances and how they compare."""

import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.comparing import number_needed
from plainodds.answers.estimate import Estimate

# a two by two table: events and others, exposed and not
A, B, C, D = 30, 70, 15, 135


@pytest.fixture(scope="module")
def saturated():
    data = pd.DataFrame(
        {
            "exposed": ["yes"] * (A + B) + ["no"] * (C + D),
            "ill": [1] * A + [0] * B + [1] * C + [0] * D,
        }
    )
    return po.FittedLogit(smf.logit("ill ~ exposed", data).fit(disp=0, tol=1e-12))


def test_a_saturated_model_gives_the_two_by_two_tables_measures(saturated):
    # risk difference (Wald), log risk ratio (Katz 1978, Biometrics 34:469), log odds ratio
    # (Woolf 1955): the textbook formulas
    answer = saturated.change("exposed", "no", "yes")
    one, none = A / (A + B), C / (C + D)
    difference = answer.comparison.risk_difference
    assert difference.estimate == pytest.approx(one - none)
    assert difference.se == pytest.approx(
        math.sqrt(one * (1 - one) / (A + B) + none * (1 - none) / (C + D)), rel=1e-6
    )
    ratio = answer.comparison.risk_ratio
    log_se = math.sqrt(1 / A - 1 / (A + B) + 1 / C - 1 / (C + D))
    assert ratio.estimate == pytest.approx(one / none)
    assert ratio.upper == pytest.approx(one / none * math.exp(1.959963984540054 * log_se), rel=1e-6)
    odds = answer.comparison.odds_ratio
    woolf = math.sqrt(1 / A + 1 / B + 1 / C + 1 / D)
    assert odds.estimate == pytest.approx(A * D / (B * C))
    assert odds.lower == pytest.approx(
        A * D / (B * C) * math.exp(-1.959963984540054 * woolf), rel=1e-6
    )
    assert answer.number_needed.estimate == pytest.approx(1 / (one - none))


def test_both_chances_are_the_plain_loops(fit, result, pipes):
    answer = fit.change("age_years", 20, 60)
    for estimate, age in ((answer.start, 20), (answer.end, 60)):
        assert estimate.estimate == pytest.approx(
            result.predict(pipes.assign(age_years=age)).mean()
        )
        assert 0 < estimate.lower < estimate.estimate < estimate.upper < 1


def test_predictors_move_together(fit, result, pipes):
    answer = fit.change({"age_years": (80, 0), "material": ("cast iron", "PVC")})
    expected = result.predict(pipes.assign(age_years=0, material="PVC")).mean()
    assert answer.end.estimate == pytest.approx(expected)


@pytest.mark.parametrize(
    ("shift", "moved"),
    [
        (po.Shift(by=-10, lowest=0), lambda a: np.maximum(a - 10, 0)),
        (po.Shift(times=1.1), lambda a: a * 1.1),
        (po.Shift(by=5, highest=60), lambda a: np.where(a > 60, a, np.minimum(a + 5, 60))),
    ],
)
def test_everybody_is_shifted_from_his_own_value_up_to_the_cap(fit, result, pipes, shift, moved):
    answer = fit.change("age_years", shift)
    expected = result.predict(pipes.assign(age_years=moved(pipes.age_years))).mean()
    assert answer.start.estimate == pytest.approx(result.predict(pipes).mean())
    assert answer.end.estimate == pytest.approx(expected)


def test_a_shift_and_a_move_go_together(fit, result, pipes):
    answer = fit.change({"age_years": po.Shift(by=-10, lowest=0), "material": ("cast iron", "PVC")})
    younger = pipes.assign(age_years=np.maximum(pipes.age_years - 10, 0), material="PVC")
    assert answer.start.estimate == pytest.approx(
        result.predict(pipes.assign(material="cast iron")).mean()
    )
    assert answer.end.estimate == pytest.approx(result.predict(younger).mean())


def test_the_joint_standard_error_counts_the_covariance(fit):
    answer = fit.change("age_years", 59, 60)
    apart = math.hypot(answer.start.se, answer.end.se)
    assert answer.comparison.risk_difference.se < 0.2 * apart


def test_drawn_rows_add_the_variance_of_the_rows_own_differences(fit, result, pipes):
    fixed = fit.change("age_years", 20, 60).comparison.risk_difference
    drawn = fit.change("age_years", 20, 60, sample="drawn").comparison.risk_difference
    own = result.predict(pipes.assign(age_years=60)) - result.predict(pipes.assign(age_years=20))
    assert drawn.se**2 == pytest.approx(fixed.se**2 + own.var(ddof=0) / len(pipes), rel=1e-8)


def test_a_held_change_is_the_profiles_comparison(fit):
    answer = fit.change("age_years", 20, 60, others={"soil": "high"})
    profile = fit.profile(
        {"age_years": 60, "soil": "high"}, against={"age_years": 20, "soil": "high"}
    )
    for measure in ("risk_difference", "risk_ratio", "odds_ratio"):
        mine, theirs = getattr(answer.comparison, measure), getattr(profile.comparison, measure)
        assert (mine.estimate, mine.lower, mine.upper) == pytest.approx(
            (theirs.estimate, theirs.lower, theirs.upper)
        )


def test_beyond_the_data_is_answered_and_marked(pipes):
    fit = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit(disp=0))
    assert fit.change("age_years", 50, 300).beyond == ("age_years",)
    assert fit.change("age_years", 20, 60).beyond == ()


def test_an_interval_of_a_difference_stays_where_a_difference_can_be():
    data = pd.DataFrame({"x": [0.0, 1, 2, 3, 4, 5, 6, 7], "y": [0, 0, 1, 0, 1, 0, 1, 1]})
    fit = po.FittedLogit(smf.logit("y ~ x", data).fit(disp=0))
    difference = fit.change("x", 0, 7).comparison.risk_difference
    assert difference.estimate + 1.96 * difference.se > 1
    assert difference.upper == 1


@pytest.mark.filterwarnings("ignore")
def test_a_level_that_no_row_has_is_refused(pipes):
    levels = ["cast iron", "ductile iron", "PVC", "lead"]
    unused = pipes.assign(material=pd.Categorical(pipes.material.astype(str), levels))
    result = smf.glm("burst ~ material", unused, family=sm.families.Binomial()).fit()
    fit = po.FittedLogit(result)
    with pytest.raises(po.QuestionRefused, match=r"No row has material = 'lead'.*'PVC'"):
        fit.change("material", "PVC", "lead")
    assert fit.change("material", "PVC", "cast iron").beyond == ()
    for answer in (fit.effects(), fit.odds()):
        assert {row.end for row in answer.rows} == {"ductile iron", "PVC"}
        assert any("No row has material = 'lead'" in n for n in answer.subject.notices)


def test_the_number_needed_has_two_pieces_where_the_interval_includes_zero():
    # Altman 1998: a difference of 0.05 (−0.02 to 0.12) needs 20: from 8.3 for one more,
    # through infinity, to 50 for one fewer
    needed = number_needed(Estimate(0.05, 0.0357, -0.02, 0.12))
    assert needed.estimate == pytest.approx(20)
    assert needed.more
    assert needed.for_one_more == pytest.approx((1 / 0.12, math.inf))
    assert needed.for_one_fewer == pytest.approx((50, math.inf))


def test_the_number_needed_has_one_piece_elsewhere():
    needed = number_needed(Estimate(-0.1, 0.02, -0.14, -0.06))
    assert not needed.more
    assert needed.for_one_more is None
    assert needed.for_one_fewer == pytest.approx((1 / 0.14, 1 / 0.06))


def test_without_a_covariance_there_are_chances_without_intervals(pipes):
    fit = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit_regularized(alpha=1.0, disp=0))
    answer = fit.change("age_years", 20, 60, sample="drawn")
    assert answer.comparison.risk_difference.se is None
    assert answer.number_needed.for_one_more is None
    assert "penalised" in answer.subject.no_interval


@pytest.mark.parametrize(
    ("args", "asked", "words"),
    [
        (("age_years", 20, 20), {}, ["age_years", "no change"]),
        (("age_years", 20), {}, ["from where to where", "Shift"]),
        (("material", po.Shift(by=1)), {}, ["material", "levels", "cannot be shifted"]),
        (("material", "PVC", "lead"), {}, ["material", "'lead'"]),
        (("age_years", po.Shift()), {}, ["age_years", "shift by 0"]),
        (("age_years", po.Shift(by=1, lowest=5, highest=2)), {}, ["lowest=5", "highest=2"]),
        (("pressure_m", po.Shift(by=500)), {}, ["pressure_m", "Cap it", "highest="]),
        (({"age_years": 20},), {}, ["age_years", "(from, to)"]),
        (({"age_years": (20, 60)}, 1, 2), {}, ["mapping"]),
        (({},), {}, ["needs a predictor"]),
        (("age_years", 20, 60), {"where": {"age_years": (900, 901)}}, ["No row has"]),
        (("age_years", 20, 60), {"others": {"age_years": 3}}, ["age_years", "itself moves"]),
        (("age_years", 20, 60), {"others": "typical", "sample": "drawn"}, ["sample='drawn'"]),
    ],
)
def test_what_cannot_be_answered_is_refused_with_the_way_out(fit, args, asked, words):
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.change(*args, **asked)
    for word in words:
        assert word in str(refusal.value)
