"""Profiles on three scales, their comparison, and the ledger."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf
from hypothesis import given
from hypothesis import strategies as st

import plainodds as po

OLD = {"age_years": 85, "material": "cast iron", "soil": "high"}
YOUNG = {"age_years": 10, "material": "PVC"}

PROFILES = st.fixed_dictionaries(
    {
        "age_years": st.integers(0, 105),
        "material": st.sampled_from(["cast iron", "ductile iron", "PVC"]),
        "soil": st.sampled_from(["low", "moderate", "high"]),
        "past_repairs": st.integers(0, 3),
    }
)


def frame(fit, values):
    return pd.DataFrame([{**dict(fit.model.typical), **values}])


def test_the_three_scales_are_statsmodels_prediction(fit, result):
    point = fit.profile(OLD).point
    eta = result.get_prediction(frame(fit, OLD), which="linear")
    low, high = eta.conf_int()[0]
    assert point.linear_predictor.estimate == pytest.approx(eta.predicted[0])
    assert point.linear_predictor.se == pytest.approx(eta.se[0])
    assert (point.odds.lower, point.odds.upper) == pytest.approx((np.exp(low), np.exp(high)))
    assert point.probability.lower == pytest.approx(1 / (1 + np.exp(-low)))
    assert point.probability.upper == pytest.approx(1 / (1 + np.exp(-high)))


def test_what_is_not_stated_is_typical(fit, pipes):
    values = dict(fit.profile({"soil": "high"}).point.values)
    assert values["age_years"] == int(np.floor(pipes.age_years.median()))
    assert values["pressure_m"] == pytest.approx(pipes.pressure_m.median())
    assert values["material"] == pipes.material.mode()[0]


def test_the_comparison_is_the_joint_delta_methods(fit, result):
    answer = fit.profile(OLD, against=YOUNG)
    from patsy import dmatrix

    rows = np.vstack(
        [
            np.asarray(dmatrix(result.model.data.model_spec, frame(fit, each)))
            for each in (OLD, YOUNG)
        ]
    )
    V, beta = np.asarray(result.cov_params()), np.asarray(result.params)
    p = 1 / (1 + np.exp(-rows @ beta))
    w = (p * (1 - p))[:, None] * rows
    difference = answer.comparison.risk_difference
    gradient = w[0] - w[1]
    assert difference.estimate == pytest.approx(p[0] - p[1])
    assert difference.se == pytest.approx(np.sqrt(gradient @ V @ gradient))
    log_gradient = w[0] / p[0] - w[1] / p[1]
    se = np.sqrt(log_gradient @ V @ log_gradient)
    ratio = answer.comparison.risk_ratio
    assert ratio.estimate == pytest.approx(p[0] / p[1])
    assert ratio.upper == pytest.approx(p[0] / p[1] * np.exp(1.959963984540054 * se))
    contrast = rows[0] - rows[1]
    assert answer.comparison.odds_ratio.estimate == pytest.approx(np.exp(contrast @ beta))


@given(values=PROFILES, against=PROFILES)
def test_the_ledger_sums_from_its_start_to_the_profile(fit, values, against):
    answer = fit.profile(values, against=against)
    total = answer.start.linear_predictor.estimate + sum(r.adds.estimate for r in answer.ledger)
    assert total == pytest.approx(answer.point.linear_predictor.estimate, abs=1e-11)
    last = answer.ledger[-1]
    assert last.running_linear_predictor == pytest.approx(total, abs=1e-11)
    assert last.running_probability == pytest.approx(answer.point.probability.estimate, abs=1e-11)


@given(values=PROFILES)
def test_a_row_of_the_ledger_is_what_moving_its_group_alone_adds(fit, values):
    answer = fit.profile(values)
    full = dict(answer.point.values)
    for row in answer.ledger:
        alone = fit.profile({name: full[name] for name in row.predictors})
        moved = alone.point.linear_predictor.estimate - answer.start.linear_predictor.estimate
        assert row.adds.estimate == pytest.approx(moved, abs=1e-10)
        assert row.multiplies.estimate == pytest.approx(np.exp(row.adds.estimate))


def test_predictors_that_share_a_term_share_a_row(fit):
    groups = [row.predictors for row in fit.profile(OLD).ledger]
    assert ("material", "age_years") in groups
    assert sorted(name for group in groups for name in group) == sorted(
        facts.name for facts in fit.subject.predictors
    )


def test_the_coding_of_a_category_does_not_change_the_ledger(pipes, fit):
    recoded = po.FittedLogit(
        smf.logit(
            "burst ~ age_years * C(material, Sum) + bs(pressure_m, df=4) + "
            "C(soil, Treatment('high')) + past_repairs + I(past_repairs**2)",
            pipes,
        ).fit(disp=0)
    )
    one = {frozenset(r.predictors): r.adds.estimate for r in fit.profile(OLD).ledger}
    other = {frozenset(r.predictors): r.adds.estimate for r in recoded.profile(OLD).ledger}
    assert one.keys() == other.keys()
    for group, adds in one.items():
        assert other[group] == pytest.approx(adds, abs=1e-4)


def test_turning_the_comparison_round_turns_its_signs(fit):
    there, back = fit.profile(OLD, against=YOUNG), fit.profile(YOUNG, against=OLD)
    one, other = there.comparison, back.comparison
    assert one.risk_difference.estimate == pytest.approx(-other.risk_difference.estimate)
    assert one.risk_difference.lower == pytest.approx(-other.risk_difference.upper)
    assert one.risk_ratio.estimate == pytest.approx(1 / other.risk_ratio.estimate)


def test_a_typical_profile_is_familiar(fit):
    assert fit.profile().point.familiarity.verdict == "familiar"


def test_a_value_outside_the_range_is_beyond_the_data(pipes):
    fit = po.FittedLogit(smf.logit("burst ~ age_years + material", pipes).fit(disp=0))
    familiarity = fit.profile({"age_years": 300}).point.familiarity
    assert familiarity.verdict == "beyond"
    assert familiarity.beyond == ("age_years",)


def test_a_combination_nobody_has_is_beyond_although_each_value_is_within_range():
    rng = np.random.default_rng(3)
    x = rng.uniform(0, 10, 400)
    z = x + rng.normal(scale=0.2, size=400)
    data = pd.DataFrame({"x": x, "z": z, "y": rng.integers(0, 2, 400)})
    fit = po.FittedLogit(smf.logit("y ~ x + z", data).fit(disp=0))
    familiarity = fit.profile({"x": 1, "z": 9}).point.familiarity
    assert familiarity.beyond == ()
    assert familiarity.rows_alike == 0
    assert familiarity.verdict == "beyond"


def test_leverage_is_statsmodels_hat_value_over_its_weight(fit, result):
    hat = result.get_influence().hat_matrix_diag
    p = np.asarray(result.predict())
    leverages = hat / (p * (1 - p))
    common, largest = fit.model.leverage_quantiles
    assert largest == pytest.approx(leverages.max(), rel=1e-6)
    assert common == pytest.approx(np.quantile(leverages, 0.99), rel=1e-6)


def test_rows_alike_are_counted_by_hand(pipes):
    fit = po.FittedLogit(smf.logit("burst ~ age_years + material", pipes).fit(disp=0))
    near = (pipes.age_years - 40).abs() <= 0.5 * pipes.age_years.std(ddof=0)
    expected = (near & (pipes.material == "PVC")).sum()
    found = fit.profile({"age_years": 40, "material": "PVC"}).point.familiarity.rows_alike
    assert found == expected


@pytest.mark.parametrize(
    ("values", "words"),
    [
        ({"colour": "red"}, ["no predictor 'colour'", "material"]),
        ({"material": "lead"}, ["material", "'lead'", "'PVC'"]),
        ({"material": 3}, ["material", "3"]),
        ({"age_years": "old"}, ["age_years", "'old'", "text"]),
        ({"age_years": None}, ["age_years", "missing"]),
        ({"age_years": [1, 2]}, ["not a single"]),
        ({"pressure_m": 999}, ["pressure_m", "999", "spline"]),
        ({"age_years": float("inf")}, ["age_years", "finite"]),
    ],
)
def test_what_cannot_be_answered_is_refused_with_the_way_out(fit, values, words):
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.profile(values)
    for word in words:
        assert word in str(refusal.value)
