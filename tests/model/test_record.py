"""How a fit went is read from its result: convergence, method, rows left out, row labels."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm

from plainodds import FittedLogit
from plainodds.model.record import Dropped, FitRecord
from plainodds.phrases import words
from tests.model import made
from tests.model.made import ENGINES, formula_engine

BINOMIAL = sm.families.Binomial
QUIET = {made.logit: {"disp": 0}}


def holed():
    """Four of 240 rows lack something; two of these have a known outcome, one the event."""
    frame = made.cases()
    frame.index = [f"case {place}" for place in range(len(frame))]
    frame["left"] = frame["left"].astype(float)
    frame.iloc[3, frame.columns.get_loc("left")] = 1.0
    frame.iloc[5, frame.columns.get_loc("left")] = 0.0
    frame.iloc[[3, 5], frame.columns.get_loc("depth")] = np.nan
    frame.iloc[[5, 9], frame.columns.get_loc("site")] = None
    frame.iloc[[9, 11], frame.columns.get_loc("left")] = np.nan
    frame["fate"] = frame["left"].map({1.0: "left", 0.0: "stayed"})
    return frame


FRAME = holed()
GONE = [3, 5, 9, 11]
KINDS = {
    "Logit": lambda formula: made.logit(formula, FRAME).fit(disp=0),
    "GLM": lambda formula: made.glm(formula, FRAME).fit(),
    "GEE": lambda formula: made.gee(formula, FRAME).fit(),
}


def dropped_of(fit):
    return fit.model.record.dropped


@pytest.mark.parametrize("engine", ENGINES)
@pytest.mark.parametrize("kind", KINDS)
def test_rows_left_out_are_counted_by_column_and_outcome(kind, engine):
    with formula_engine(engine):
        fit = FittedLogit(KINDS[kind]("left ~ depth + C(site)"))
    found = dropped_of(fit)
    assert (found.rows, found.known, found.events) == (4, 2, 1.0)
    assert dict(found.columns) == {"depth": 2, "site": 2, "left": 2}


@pytest.mark.parametrize("engine", ENGINES)
def test_of_a_text_outcome_the_events_are_those_that_the_answers_speak_of(engine):
    FRAME.loc["case 15", "depth"] = np.nan
    try:
        with formula_engine(engine):
            result = KINDS["GLM"]("fate ~ depth")
    finally:
        FRAME.loc["case 15", "depth"] = 0.0
    fates = FRAME["fate"].iloc[[3, 5, 15]].map({"left": 1.0, "stayed": 0.0})
    modelled = FittedLogit(result)
    share = fates if modelled.subject.outcome.level == "left" else 1 - fates
    assert dropped_of(modelled).events == share.sum()
    assert dropped_of(modelled).known == 3


def test_the_most_often_missing_column_comes_first():
    holes = FRAME.assign(visits=FRAME["visits"].where(np.arange(240) > 30))
    found = dropped_of(FittedLogit(made.logit("left ~ depth + visits", holes).fit(disp=0)))
    assert found.columns[0] == ("visits", 31)


def test_counts_in_two_columns_tell_rows_but_no_outcome():
    frame = FRAME.assign(dead=FRAME["visits"].astype(float), alive=2.0)
    frame.iloc[0, frame.columns.get_loc("dead")] = np.nan
    frame["dead"] += np.arange(240) % 3
    result = made.glm("dead + alive ~ depth", frame).fit()
    found = dropped_of(FittedLogit(result))
    assert (found.rows, found.known) == (3, 0)
    assert dict(found.columns) == {"depth": 2}


@pytest.mark.parametrize("kind", [sm.Logit, sm.GLM])
def test_without_a_formula_only_the_number_of_rows_left_out_is_known(kind):
    X = sm.add_constant(FRAME[["depth"]])
    settings = {"family": BINOMIAL()} if kind is sm.GLM else {}
    fit = FittedLogit(kind(FRAME["left"], X, missing="drop", **settings).fit())
    assert dropped_of(fit) == Dropped(4)
    assert list(fit.model.sample.labels) == [
        f"case {place}" for place in range(240) if place not in GONE
    ]


def test_data_handed_over_tell_what_was_missing_without_a_formula():
    X = sm.add_constant(FRAME[["depth"]])
    result = sm.Logit(FRAME["left"], X, missing="drop").fit(disp=0)
    found = dropped_of(FittedLogit(result, data=FRAME))
    assert (found.rows, found.known, found.events) == (4, 2, 1.0)
    assert dict(found.columns) == {"depth": 2, "left": 2}


def test_nothing_is_left_out_of_whole_data():
    assert dropped_of(FittedLogit(made.logit("left ~ age", made.cases()).fit(disp=0))) == Dropped(0)


@pytest.mark.parametrize("kind", KINDS)
def test_rows_are_called_what_the_data_call_them(kind):
    labels = FittedLogit(KINDS[kind]("left ~ depth + C(site)")).model.sample.labels
    assert list(labels) == [f"case {place}" for place in range(240) if place not in GONE]


def test_rows_of_plain_arrays_are_called_by_their_places():
    X = sm.add_constant(FRAME[["depth"]]).to_numpy()
    fit = FittedLogit(sm.Logit(FRAME["left"].to_numpy(), X, missing="drop").fit(disp=0))
    assert list(fit.model.sample.labels) == [place for place in range(240) if place not in GONE]


def test_labels_of_whole_data_are_the_datas_own_index():
    frame = made.cases()
    fit = FittedLogit(made.logit("left ~ age", frame).fit(disp=0))
    assert fit.model.sample.labels is frame.index or fit.model.sample.labels.equals(frame.index)
    assert isinstance(fit.model.sample.labels, pd.RangeIndex)


@pytest.mark.parametrize(
    ("kind", "method"),
    [
        ("Logit", "maximum likelihood"),
        ("GLM", "maximum likelihood"),
        ("GEE", "estimating equations"),
    ],
)
def test_convergence_iterations_and_method_are_read(kind, method):
    record = FittedLogit(KINDS[kind]("left ~ age")).model.record
    assert record.converged is True
    assert 1 < record.iterations < 20
    assert record.method == method


def test_a_fit_that_was_stopped_says_so():
    stopped = {
        "Logit": made.logit("left ~ age + depth", made.cases()).fit(maxiter=2, disp=0),
        "GLM": made.glm("left ~ age + depth", made.cases()).fit(maxiter=2),
    }
    for result in stopped.values():
        record = FittedLogit(result).model.record
        assert record.converged is False
        assert record.iterations == 2


@pytest.mark.parametrize("kind", KINDS)
def test_a_fit_that_converged_is_not_remarked_upon(kind):
    notices = FittedLogit(KINDS[kind]("left ~ age")).subject.notices
    assert not any("converge" in notice for notice in notices)


@pytest.mark.parametrize("fit", [made.logit, made.glm])
@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_every_answer_of_a_fit_that_did_not_converge_says_so(fit, audience):
    result = fit("left ~ age + depth", made.cases()).fit(maxiter=2, **QUIET.get(fit, {}))
    stopped = FittedLogit(result)
    for answer in (stopped.odds(), stopped.curve("age"), stopped.profile()):
        assert any("did not converge" in each for each in words(answer, audience).cautions)


def test_a_penalised_fit_is_known_as_such():
    result = made.logit("left ~ age", made.cases()).fit_regularized(alpha=0.1, disp=0)
    assert FittedLogit(result).model.record.method == "penalised"


def test_constraints_are_noticed():
    result = made.glm("left ~ age + depth", made.cases()).fit_constrained("age = 0.3")
    assert FittedLogit(result).model.record.constrained
    assert not FittedLogit(KINDS["GLM"]("left ~ age")).model.record.constrained


def test_by_default_nothing_is_known():
    assert FitRecord() == FitRecord(None, None, None, False, (), None)
