"""Fits that the tests of the answers share."""

import pytest
import statsmodels.formula.api as smf

import plainodds as po

FORMULA = (
    "burst ~ age_years * material + bs(pressure_m, df=4) + soil + past_repairs + I(past_repairs**2)"
)


@pytest.fixture(scope="session")
def pipes():
    return po.demo.tessel_bay(rows=1500)


@pytest.fixture(scope="session")
def result(pipes):
    return smf.logit(FORMULA, pipes).fit(disp=0)


@pytest.fixture(scope="session")
def fit(result):
    return po.FittedLogit(result)
