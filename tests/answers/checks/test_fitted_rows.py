"""What checks need of the rows."""

import gc
import weakref

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

from plainodds.answers.checks.fitted_rows import (
    FEWEST,
    fitted_rows,
    has_score_tests,
    ranked,
    rows_are_strangers,
    unknown_rows,
)
from tests.answers.checks.fits import binomial, invented, logit, model_of

DATA = invented(300)


def test_chances_are_the_fits_own_with_its_offset():
    offset = np.linspace(-1, 1, len(DATA))
    result = smf.glm("y ~ x", DATA, family=binomial(), offset=offset).fit()
    rows = fitted_rows(model_of(result))
    assert rows.probability == pytest.approx(result.fittedvalues.to_numpy())
    assert rows.share == pytest.approx(DATA.y.mean())
    assert rows.residual.sum() == pytest.approx(0, abs=1e-6)


def test_a_prevalence_shifts_nothing_here():
    plain = fitted_rows(logit("y ~ x", DATA))
    stated = fitted_rows(logit("y ~ x", DATA, sampling="case-control", prevalence=0.01))
    assert np.array_equal(plain.probability, stated.probability)


def test_frequency_weights_are_cases_and_variance_weights_are_not():
    times = np.arange(len(DATA)) % 3 + 1.0
    of_cases = smf.glm("y ~ x", DATA, family=binomial(), freq_weights=times).fit()
    of_variance = smf.glm("y ~ x", DATA, family=binomial(), var_weights=times).fit()
    assert fitted_rows(model_of(of_cases)).cases.sum() == times.sum()
    rows = fitted_rows(model_of(of_variance))
    assert rows.cases.sum() == len(DATA)
    assert rows.weights.sum() == times.sum()


def test_variance_weights_of_shares_are_their_trials():
    shares = DATA.groupby("count").y.agg(["mean", "size"]).reset_index()
    result = smf.glm("mean ~ count", shares, family=binomial(), var_weights=shares["size"]).fit()
    assert fitted_rows(model_of(result)).cases.sum() == len(DATA)


def test_equal_values_are_found_in_spite_of_rounding():
    order, starts = ranked(np.array([0.3, 0.1 + 0.2, -1.0, 5.0]))
    assert order.tolist()[0] == 2
    assert starts.tolist() == [0, 1, 3]


def test_a_fit_says_what_it_takes_rows_for():
    groups = np.arange(len(DATA)) // 3
    robust = smf.logit("y ~ x", DATA).fit(disp=0, cov_type="HC1")
    clustered = smf.logit("y ~ x", DATA).fit(
        disp=0, cov_type="cluster", cov_kwds={"groups": groups}
    )
    together = smf.gee("y ~ x", groups, DATA, family=binomial()).fit()
    penalised = smf.logit("y ~ x", DATA).fit_regularized(alpha=1.0, disp=0)
    scaled = smf.glm("y ~ x", DATA, family=binomial()).fit(scale="X2")
    survey = np.random.default_rng(0).uniform(1, 9, len(DATA))
    weighed = smf.glm("y ~ x", DATA, family=binomial(), freq_weights=survey).fit(cov_type="HC1")
    said = [
        (rows_are_strangers(model_of(each)), has_score_tests(model_of(each)))
        for each in (robust, clustered, together, penalised, scaled, weighed)
    ]
    neither = (False, False)
    assert said == [(True, True), neither, neither, (True, False), neither, neither]


def test_without_an_outcome_that_is_said():
    result = smf.logit("y ~ x", DATA).fit(disp=0)
    result.remove_data()
    model = model_of(result, data=DATA)
    assert unknown_rows(model) == "no outcome"
    with pytest.raises(ValueError, match="outcome"):
        fitted_rows(model)


def test_a_handful_of_events_is_too_few_for_a_curve():
    few = DATA.assign(y=(np.arange(len(DATA)) % 100 == 0).astype(int))
    model = model_of(sm.Logit(few.y, sm.add_constant(few[["x"]])).fit(disp=0))
    assert fitted_rows(model).rarer == 3
    assert unknown_rows(model) == ""
    assert unknown_rows(model, FEWEST) == "too few rows"


def test_the_rows_go_with_their_model():
    model = logit("y ~ x", DATA)
    assert fitted_rows(model) is fitted_rows(model)
    gone = weakref.ref(model)
    del model
    gc.collect()
    assert gone() is None
