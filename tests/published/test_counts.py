"""Two published tables of counts: budworm moths, and mouth cancer.

Sources: Collett (1991), Modelling Binary Data, and Venables & Ripley, Modern Applied Statistics
with S, for the moths; Rothman & Keller (1972) and Hosmer & Lemeshow (1992), Epidemiology 3:452,
for mouth cancer. The values are as remembered, and were reproduced by an independent calculation
to the digits shown.
"""

import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from tests.published.data import budworm, mouth_cancer


@pytest.fixture(scope="module")
def moths():
    formula = "dead + alive ~ 0 + sex + log2_dose"
    return po.FittedLogit(smf.glm(formula, budworm(), family=sm.families.Binomial()).fit())


@pytest.mark.parametrize(("sex", "coefficient"), [("female", -3.473), ("male", -2.372)])
def test_a_sexs_coefficient_is_its_linear_predictor_at_dose_one(moths, sex, coefficient):
    answer = moths.profile({"sex": sex, "log2_dose": 0})
    assert answer.point.linear_predictor.estimate == pytest.approx(coefficient, abs=5e-4)


def test_a_doubling_of_the_dose_has_the_published_log_odds_ratio(moths):
    (row,) = moths.odds("log2_dose", steps={"log2_dose": 1}).rows
    assert row.log_odds_ratio.estimate == pytest.approx(1.064, abs=5e-4)


def test_counts_weigh_the_average_by_their_trials(moths):
    moth_share = budworm().dead.sum() / (budworm().dead + budworm().alive).sum()
    assert moths.subject.outcome.share == pytest.approx(moth_share)
    assert moths.subject.outcome.event == "dead"


@pytest.fixture(scope="module")
def mouths():
    formula = "cases + controls ~ alcohol * smoking"
    return po.FittedLogit(smf.glm(formula, mouth_cancer(), family=sm.families.Binomial()).fit())


@pytest.mark.parametrize(
    ("values", "odds_ratio"),
    [
        ({"alcohol": 1, "smoking": 0}, 2.96),
        ({"alcohol": 0, "smoking": 1}, 3.33),
        ({"alcohol": 1, "smoking": 1}, 9.04),
    ],
)
def test_each_combination_against_neither_has_the_published_odds_ratio(mouths, values, odds_ratio):
    answer = mouths.profile(values, against={"alcohol": 0, "smoking": 0})
    assert answer.comparison.odds_ratio.estimate == pytest.approx(odds_ratio, abs=5e-3)


def test_a_saturated_models_odds_ratio_is_the_two_by_two_tables(mouths):
    # a·d / (b·c), with Woolf's standard error of its log (Woolf 1955, Ann Hum Genet 19:251)
    cells = mouth_cancer().set_index(["alcohol", "smoking"])[["cases", "controls"]]
    (a, b), (c, d) = (
        cells.loc[(1, 0), ["cases", "controls"]],
        cells.loc[(0, 0), ["cases", "controls"]],
    )
    row = next(r for r in mouths.odds("alcohol").rows if dict(r.given)["smoking"] == 0)
    assert row.odds_ratio.estimate == pytest.approx(a * d / (b * c))
    assert row.log_odds_ratio.se == pytest.approx((1 / a + 1 / b + 1 / c + 1 / d) ** 0.5, rel=1e-6)
