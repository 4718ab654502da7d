"""Likelihood intervals of the budworm moths, as in Venables & Ripley, Modern Applied Statistics
with S, section 7.2. As remembered, and reproduced by an independent calculation to the digits
shown.
"""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.likelihood import likelihood_of
from tests.published.data import budworm

INTERVALS = {
    "sex[female]": (-4.4581, -2.6135),
    "sex[male]": (-3.1728, -1.6551),
    "log2_dose": (0.82285, 1.33904),
}


@pytest.fixture(scope="module")
def fit():
    formula = "dead + alive ~ 0 + sex + log2_dose"
    return po.FittedLogit(smf.glm(formula, budworm(), family=sm.families.Binomial()).fit())


@pytest.mark.parametrize(("place", "coefficient"), list(enumerate(INTERVALS)))
def test_each_coefficients_interval_is_published(fit, place, coefficient):
    found = likelihood_of(fit.model).interval(np.eye(3)[place], 0.95)
    digits = 5e-6 if coefficient == "log2_dose" else 5e-5
    assert found == pytest.approx(INTERVALS[coefficient], abs=digits)


def test_the_public_answer_carries_it(fit):
    (row,) = fit.odds("log2_dose", steps={"log2_dose": 1}, interval="likelihood").rows
    ends = (row.log_odds_ratio.lower, row.log_odds_ratio.upper)
    assert ends == pytest.approx(INTERVALS["log2_dose"], abs=5e-6)
    assert row.odds_ratio.upper == pytest.approx(np.exp(ends[1]))
