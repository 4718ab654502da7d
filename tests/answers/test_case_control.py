"""Samples chosen by the outcome: odds ratios stay, chances need the population's share."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po


@pytest.fixture(scope="module")
def population():
    rng = np.random.default_rng(11)
    n = 400_000
    x = rng.normal(size=n)
    g = rng.choice(["a", "b"], n)
    eta = -4.2 + 0.8 * x + 0.7 * (g == "b")
    y = (rng.uniform(size=n) < 1 / (1 + np.exp(-eta))).astype(int)
    return pd.DataFrame({"x": x, "g": g, "y": y})


@pytest.fixture(scope="module")
def sampled(population):
    cases = population[population.y == 1]
    controls = population[population.y == 0].sample(len(cases), random_state=1)
    return pd.concat([cases, controls], ignore_index=True)


@pytest.fixture(scope="module")
def result(sampled):
    return smf.logit("y ~ x + g", sampled).fit(disp=0)


def test_the_intercept_is_shifted_by_the_prior_correction(result, sampled):
    # King & Zeng 2001: β₀ − ln[(1 − τ)/τ · ȳ/(1 − ȳ)]
    tau, share = 0.02, sampled.y.mean()
    corrected = po.FittedLogit(result, prevalence=tau).profile({"x": 0, "g": "a"})
    shift = np.log((1 - tau) / tau * share / (1 - share))
    expected = result.params["Intercept"] - shift
    assert corrected.point.linear_predictor.estimate == pytest.approx(expected)


def test_odds_ratios_stay(result):
    plain, corrected = po.FittedLogit(result), po.FittedLogit(result, prevalence=0.02)
    assert [r.odds_ratio for r in corrected.odds().rows] == [
        r.odds_ratio for r in plain.odds().rows
    ]


def test_corrected_chances_are_the_populations(result, population):
    fit = po.FittedLogit(result, prevalence=float(population.y.mean()))
    whole = po.FittedLogit(smf.logit("y ~ x + g", population).fit(disp=0))
    for ask in (
        lambda f: f.change("g", "a", "b").start.estimate,
        lambda f: f.change("g", "a", "b").end.estimate,
        lambda f: f.profile({"x": 1, "g": "b"}).point.probability.estimate,
        lambda f: f.effects("x").rows[0].effect.estimate,
        lambda f: f.curve("x", others="observed", at=[1]).lines[0].estimate[0],
    ):
        assert ask(fit) == pytest.approx(ask(whole), rel=0.06)


def test_marked_as_case_control_without_a_prevalence_chances_are_refused(result):
    fit = po.FittedLogit(result, sampling="case-control")
    assert fit.odds().rows
    for ask in (
        fit.effects,
        lambda: fit.change("g", "a", "b"),
        lambda: fit.curve("x"),
        lambda: fit.profile({"x": 1}),
    ):
        with pytest.raises(po.QuestionRefused, match=r"case-control.*prevalence=0.02"):
            ask()


@pytest.mark.parametrize("prevalence", [0, 1, -0.1, 2, "rare", float("nan")])
def test_a_prevalence_is_a_share_between_zero_and_one(result, prevalence):
    with pytest.raises(po.FitRefused, match="prevalence"):
        po.FittedLogit(result, prevalence=prevalence)


def test_a_cohort_needs_no_prevalence(result):
    with pytest.raises(po.FitRefused, match="cohort"):
        po.FittedLogit(result, sampling="cohort", prevalence=0.1)
