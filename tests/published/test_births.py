"""Low birth weight, as in Hosmer, Lemeshow & Sturdivant, Applied Logistic Regression.

The values are as remembered, and were reproduced by an independent calculation to the digits
shown.
"""

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from tests.published.data import births

COEFFICIENTS = {
    ("age", ""): (-0.024, 0.034),
    ("lwt", ""): (-0.014, 0.007),
    ("race", "black"): (1.004, 0.498),
    ("race", "other"): (0.433, 0.362),
    ("ftv", ""): (-0.049, 0.167),
}


@pytest.fixture(scope="module")
def result():
    return smf.logit("low ~ age + lwt + race + ftv", births()).fit(disp=0)


def test_the_intercept_and_likelihood_are_published(result):
    assert result.params["Intercept"] == pytest.approx(1.295, abs=5e-4)
    assert result.bse["Intercept"] == pytest.approx(1.071, abs=6e-4)
    assert result.llf == pytest.approx(-111.286, abs=5e-4)


@pytest.mark.parametrize(("predictor", "level"), COEFFICIENTS)
def test_log_odds_ratios_are_the_published_coefficients(result, predictor, level):
    fit = po.FittedLogit(result)
    steps = {} if level else {predictor: 1}
    rows = fit.odds(predictor, steps=steps).rows
    row = next(row for row in rows if not level or row.end == level)
    coefficient, se = COEFFICIENTS[predictor, level]
    assert row.log_odds_ratio.estimate == pytest.approx(coefficient, abs=5e-4)
    assert row.log_odds_ratio.se == pytest.approx(se, abs=6e-4)


def test_smoking_alone_has_the_published_odds_ratio():
    fit = po.FittedLogit(smf.logit("low ~ smoke", births()).fit(disp=0))
    (row,) = fit.odds().rows
    found = row.odds_ratio
    assert (found.estimate, found.lower, found.upper) == pytest.approx((2.02, 1.08, 3.78), abs=5e-3)


def test_crude_and_adjusted_stand_side_by_side():
    crude = smf.logit("low ~ smoke", births()).fit(disp=0)
    adjusted = smf.logit("low ~ smoke + age + race", births()).fit(disp=0)
    answer = po.odds_of({"crude": crude, "adjusted": adjusted}, "smoke")
    assert [row.model for row in answer.rows] == ["crude", "adjusted"]
    assert [row.log_odds_ratio.estimate for row in answer.rows] == pytest.approx(
        [crude.params["smoke"], adjusted.params["smoke"]]
    )


def test_average_effects_are_statsmodels_where_no_predictor_shares_a_term(result):
    theirs = result.get_margeff().summary_frame()
    fit = po.FittedLogit(result)
    for name in ("age", "lwt", "ftv"):
        (row,) = fit.effects(name).rows
        assert row.effect.estimate == pytest.approx(theirs.loc[name, "dy/dx"], rel=1e-8)
        assert row.effect.se == pytest.approx(theirs.loc[name, "Std. Err."], rel=1e-6)


def test_smoking_alone_gives_the_two_by_two_tables_risks():
    mothers = births()
    fit = po.FittedLogit(smf.logit("low ~ smoke", mothers).fit(disp=0, tol=1e-12))
    answer = fit.change("smoke", 0, 1)
    risks = mothers.groupby("smoke").low.mean()
    assert answer.start.estimate == pytest.approx(risks[0])
    assert answer.end.estimate == pytest.approx(risks[1])
    assert answer.comparison.risk_ratio.estimate == pytest.approx(risks[1] / risks[0])
