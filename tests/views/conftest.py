"""Fits that the tests of the views share, and a front end that records."""

import comm
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from tests.views.frontend import FrontEnd


@pytest.fixture(scope="session")
def mains():
    frame = po.demo.tessel_bay(rows=900)
    return frame.assign(lined=frame["diameter_mm"] > 150)


@pytest.fixture(scope="session")
def result(mains):
    formula = "burst ~ age_years * material + bs(pressure_m, df=4) + past_repairs + lined"
    return smf.logit(formula, mains).fit(disp=0)


@pytest.fixture(scope="session")
def fit(result):
    return po.FittedLogit(
        result,
        predictors={
            "age_years": po.Predictor(label="Pipe age", unit="years", step=10),
            "pressure_m": po.Predictor(label="Pressure", unit="m"),
        },
        outcome=po.Outcome(event="a burst", case="main", cases="mains"),
    )


@pytest.fixture(scope="session")
def two_numbers(mains):
    """Age depends on pressure and pressure on age."""
    return po.FittedLogit(smf.logit("burst ~ age_years * pressure_m", mains).fit(disp=0))


@pytest.fixture
def page(monkeypatch):
    """The front end of every widget that the test makes."""
    front_end = FrontEnd()
    monkeypatch.setattr(comm, "create_comm", front_end.create_comm)
    return front_end
