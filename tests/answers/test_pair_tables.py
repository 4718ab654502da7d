"""Tables of two predictors together: one row per estimate, each with its measure."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from tests.model.made import cases, logit

NUMBERS = ["estimate", "se", "lower", "upper"]


@pytest.fixture(scope="module")
def fit():
    return po.FittedLogit(logit("left ~ age * site + flag * site", cases(600)).fit(disp=0))


def test_the_table_holds_the_effect_along_the_second_predictor_and_the_interaction(fit):
    answer = fit.pair("age", "site")
    table = po.table(answer)
    assert list(table.columns) == ["measure", "site", *NUMBERS, "p_value", "supported"]
    effect = table[table.measure == "risk_difference"]
    assert list(effect.site) == ["a", "b", "c"]
    assert effect[NUMBERS].to_numpy() == pytest.approx(
        np.array([answer.effect.estimate, answer.effect.se, answer.effect.lower,
                  answer.effect.upper]).T
    )  # fmt: skip
    averaged = table[table.measure == "interaction_averaged"].iloc[0]
    assert averaged.estimate == answer.interaction.averaged.estimate
    assert averaged.p_value == answer.interaction.averaged_p_value
    test = table[table.measure == "wald_test"].iloc[0]
    assert (test.estimate, test.p_value) == (
        answer.interaction.test.statistic,
        answer.interaction.test.p_value,
    )
    assert pd.isna(test.se)


@pytest.mark.parametrize(
    ("asked", "measure"),
    [
        ({"scale": "odds"}, "odds_ratio"),
        ({"number": "slope"}, "slope"),
        ({"a_values": (2, 7), "number": "slope"}, "risk_difference"),
        ({"scale": "odds", "number": "slope"}, "odds_ratio"),
    ],
)
def test_the_effects_measure_is_named(fit, asked, measure):
    table = po.table(fit.pair("age", "site", **asked))
    assert list(table.measure[:3]) == [measure] * 3
    assert table.p_value.dtype == float


def test_without_intervals_the_columns_hold_nothing():
    result = smf.logit("left ~ age * site", cases()).fit_regularized(alpha=1.0, disp=0)
    table = po.table(po.FittedLogit(result).pair("age", "site"))
    assert table.estimate.notna().all()
    assert table[["se", "lower", "upper", "p_value"]].isna().all(axis=None)


def test_the_joint_table_has_a_row_for_each_estimate(fit):
    answer = fit.pair("site", "flag", a_values=("a", "c"))
    table, joint = po.joint_table(answer), answer.joint
    assert list(table.columns) == ["part", "measure", "site", "flag", "rows", "events", *NUMBERS]
    ratios = table[(table.part == "combination") & (table.measure == "odds_ratio")]
    assert list(zip(ratios.site, ratios.flag, strict=True)) == [(c.a, c.b) for c in joint.cells]
    assert list(ratios.estimate) == [c.odds_ratio.estimate for c in joint.cells]
    assert list(ratios.rows) == [c.rows for c in joint.cells]
    chances = table[(table.part == "combination") & (table.measure == "chance")]
    assert list(chances.estimate) == [c.chance.estimate for c in joint.cells]
    effects = table[table.part == "effect"]
    assert len(effects) == 8
    first = joint.strata[0]
    assert effects.iloc[0].site == f"{first.start} to {first.end}"
    assert effects.iloc[0].flag == first.within
    interaction = table[table.part == "interaction"].set_index("measure").estimate
    assert interaction["ratio_of_odds_ratios"] == joint.multiplicative.estimate
    assert interaction["relative_excess_risk_by_chances"] == (
        joint.additive_by_chances.relative_excess_risk.estimate
    )


def test_in_a_case_control_sample_the_joint_table_holds_odds_ratios_only():
    result = logit("left ~ flag * site", cases(600)).fit(disp=0)
    fit = po.FittedLogit(result, sampling="case-control")
    table = po.joint_table(fit.pair("flag", "site", scale="odds"))
    assert not set(table.measure) & {"chance", "risk_difference"}
    assert not table.measure.str.endswith("_by_chances").any()


@pytest.mark.parametrize(
    ("asked", "message"),
    [
        ({"a": "age", "b": "site"}, r"age is a number.*pair\('age', 'site', a_values=\("),
        ({"a": "site", "b": "age"}, r"age is a number.*pair\('site', 'age', b_values=\("),
        ({"a": "age", "b": "depth"}, r"age and depth are numbers.*a_values=.*b_values="),
        (
            {"a": "age", "b": "depth", "a_values": (2, 7)},
            r"and depth is a number.*a_values=\(2, 7\), b_values=",
        ),
    ],
)
def test_without_two_values_of_a_number_there_is_no_joint_table(asked, message):
    fit = po.FittedLogit(logit("left ~ age * site + depth", cases()).fit(disp=0))
    with pytest.raises(po.QuestionRefused, match=message):
        po.joint_table(fit.pair(**asked))
