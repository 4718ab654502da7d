"""Likelihood intervals, near and far from separation."""

import math
from dataclasses import replace

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from scipy.optimize import brentq, minimize_scalar
from scipy.stats import chi2

import plainodds as po
from plainodds.answers.likelihood import likelihood_of

EXCESS = chi2.ppf(0.95, 1)


def test_at_each_end_the_refitted_deviance_exceeds_the_minimum_by_chi_square(fit):
    answer = fit.odds(interval="likelihood")
    likelihood = likelihood_of(fit.model)
    rows = fit.model.rows
    for row in answer.rows:
        profiles = [
            fit.model.completed((*row.given, (row.predictor, value)))
            for value in (row.end, row.start)
        ]
        one, other = rows(profiles)
        contrast = one - other
        for end in (row.log_odds_ratio.lower, row.log_odds_ratio.upper):
            assert likelihood.excess(contrast, end) == pytest.approx(EXCESS, abs=1e-6)


def test_the_refit_is_statsmodels_with_an_offset(pipes):
    result = smf.logit("burst ~ age_years + material", pipes).fit(disp=0)
    fit = po.FittedLogit(result)
    (row,) = fit.odds("age_years", steps={"age_years": 1}, interval="likelihood").rows
    for end in (row.log_odds_ratio.lower, row.log_odds_ratio.upper):
        held = smf.glm(
            "burst ~ material",
            pipes,
            family=sm.families.Binomial(),
            offset=end * pipes.age_years,
        ).fit(tol=1e-12)
        assert held.deviance + 2 * result.llf == pytest.approx(EXCESS, abs=1e-6)


def test_the_test_is_the_likelihood_ratio_test(pipes):
    full = smf.logit("burst ~ age_years + material", pipes).fit(disp=0)
    less = smf.logit("burst ~ material", pipes).fit(disp=0)
    (row,) = po.FittedLogit(full).odds("age_years", interval="likelihood").rows
    assert row.p_value == pytest.approx(chi2.sf(2 * (full.llf - less.llf), 1), rel=1e-6)


def test_weights_and_offsets_are_kept(pipes):
    weights = np.arange(len(pipes)) % 3 + 1
    offset = np.linspace(-1, 1, len(pipes))
    family = sm.families.Binomial()
    weighted = smf.glm(
        "burst ~ age_years", pipes, family=family, freq_weights=weights, offset=offset
    ).fit()
    rows = pipes.index.repeat(weights)
    repeated = smf.glm(
        "burst ~ age_years",
        pipes.loc[rows].reset_index(drop=True),
        family=family,
        offset=np.repeat(offset, weights),
    ).fit()
    one, other = (
        po.FittedLogit(each).odds(interval="likelihood").rows[0].odds_ratio
        for each in (weighted, repeated)
    )
    assert (one.lower, one.upper) == pytest.approx((other.lower, other.upper), rel=1e-6)


def separated(x, y):
    data = pd.DataFrame({"x": x, "y": y})
    return po.FittedLogit(smf.glm("y ~ x", data, family=sm.families.Binomial()).fit())


@pytest.mark.filterwarnings("ignore")
def test_where_a_fit_has_run_away_the_likelihood_is_found_all_the_same(fit):
    # of singular columns an engine can end anywhere, as the arithmetic of the machine has it
    likelihood = likelihood_of(fit.model)
    lost = replace(likelihood, coefficients=1e15 * np.linspace(-1, 1, len(fit.model.coefficients)))
    for contrast in np.eye(len(lost.coefficients))[1:]:
        assert lost.interval(contrast, 0.95) == pytest.approx(
            likelihood.interval(contrast, 0.95), rel=1e-6
        )
        assert lost.p_value(contrast) == pytest.approx(likelihood.p_value(contrast), rel=1e-6)


def test_complete_separation_leaves_one_end_open_and_finds_the_other():
    x, y = np.arange(1.0, 7), np.array([0, 0, 0, 1, 1, 1])
    fit = separated(x, y)
    (row,) = fit.odds(steps={"x": 1}, interval="likelihood").rows

    def least(slope):
        def deviance(intercept):
            eta = intercept + slope * x
            return 2 * np.sum(np.logaddexp(0, eta) - y * eta)

        return minimize_scalar(deviance, bounds=(-500, 500), method="bounded").fun

    lower = brentq(lambda slope: least(slope) - EXCESS, 0.01, 20)
    assert row.log_odds_ratio.lower == pytest.approx(lower, rel=1e-4)
    assert row.odds_ratio.upper == math.inf
    assert po.from_json(po.to_json(fit.odds(interval="likelihood"))).rows[0].odds_ratio.upper == (
        math.inf
    )


@pytest.mark.filterwarnings("ignore")
def test_an_empty_cell_leaves_an_end_open():
    x = np.repeat([0.0, 1.0], 10)
    y = np.r_[np.zeros(10), np.ones(4), np.zeros(6)]
    (row,) = separated(x, y).odds(interval="likelihood").rows
    assert row.log_odds_ratio.upper == math.inf
    # with an intercept per group the profile depends on the two shares alone
    best = -2 * (4 * math.log(0.4) + 6 * math.log(0.6))

    def least(slope):
        def deviance(eta):
            softplus = np.logaddexp(0, [eta, eta + slope])
            return 2 * (10 * softplus[0] + 10 * softplus[1] - 4 * (eta + slope))

        return minimize_scalar(deviance, bounds=(-40, 5), method="bounded").fun

    lower = brentq(lambda slope: least(slope) - best - EXCESS, -2, 15)
    assert row.log_odds_ratio.lower == pytest.approx(lower, abs=1e-3)


BINOMIAL = sm.families.Binomial()


@pytest.mark.parametrize(
    ("make", "words"),
    [
        (
            lambda d: smf.gee(
                "burst ~ age_years", "district", d, family=sm.families.Binomial()
            ).fit(),
            ["GEE", "no likelihood", "wald"],
        ),
        (lambda d: smf.logit("burst ~ age_years", d).fit(disp=0, cov_type="HC1"), ["HC1", "wald"]),
        (
            lambda d: smf.logit("burst ~ age_years", d).fit_regularized(alpha=1, disp=0),
            ["penalised"],
        ),
        (
            lambda d: smf.glm("burst ~ age_years", d, family=sm.families.Binomial()).fit(
                scale="X2"
            ),
            ["scale", "wald"],
        ),
    ],
)
def test_where_the_likelihood_means_nothing_it_is_refused(pipes, make, words):
    fit = po.FittedLogit(make(pipes))
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.odds(interval="likelihood")
    for word in words:
        assert word in str(refusal.value)


def test_long_work_tells_how_far_it_is_and_can_be_stopped(fit):
    from plainodds.answers.odds import answer_odds
    from plainodds.answers.progress import Stopped

    told = []

    def progress(done, parts):
        told.append((done, parts))
        if done == 2:
            raise Stopped

    with pytest.raises(Stopped):
        answer_odds(fit.model, fit.odds(interval="likelihood").question, progress)
    parts = len(fit.odds().rows)
    assert told == [(1, parts), (2, parts)]
