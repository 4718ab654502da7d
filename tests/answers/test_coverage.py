"""Do 95 % intervals cover the truth 95 times in 100? A few hundred seeded fits say."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po

FITS = 300
ROWS = 400
TRUE = {"intercept": -0.8, "x": 0.7, "group": 0.6, "product": -0.5}


def drawn(rng):
    x = rng.normal(size=ROWS)
    group = rng.integers(0, 2, ROWS)
    return pd.DataFrame({"x": x, "group": np.where(group, "b", "a")})


def true_probability(x, group):
    b = (group == "b").astype(float)
    eta = TRUE["intercept"] + TRUE["x"] * x + TRUE["group"] * b + TRUE["product"] * x * b
    return 1 / (1 + np.exp(-eta))


@pytest.fixture(scope="module")
def covered():
    rng = np.random.default_rng(20261)
    frame = drawn(rng)
    truth = true_probability(frame.x.to_numpy(), frame.group.to_numpy())
    averaged_truth = np.mean(true_probability(np.full(ROWS, 1.0), frame.group.to_numpy()))
    held_truth = float(true_probability(np.array([1.0]), np.array(["b"]))[0])
    log_odds_ratio = TRUE["x"] + TRUE["product"]
    hits = []
    for _ in range(FITS):
        # the covariates stay, the outcomes are drawn anew: sample averages are then fixed truths
        data = frame.assign(y=(rng.uniform(size=ROWS) < truth).astype(int))
        fit = po.FittedLogit(smf.logit("y ~ x * group", data).fit(disp=0))
        odds = fit.odds("x", steps={"x": 1}, given={"group": "b"}).rows[0].odds_ratio
        held = fit.curve("x", others={"group": "b"}, at=[1.0]).lines[0]
        averaged = fit.curve("x", others="observed", at=[1.0]).lines[0]
        hits.append(
            (
                odds.lower <= np.exp(log_odds_ratio) <= odds.upper,
                held.lower[0] <= held_truth <= held.upper[0],
                averaged.lower[0] <= averaged_truth <= averaged.upper[0],
            )
        )
    return np.mean(hits, axis=0)


@pytest.mark.parametrize(("place", "what"), list(enumerate(["odds ratio", "held", "averaged"])))
def test_nominal_coverage_is_reached_within_monte_carlo_error(covered, place, what):
    # three standard errors of a share of 0.95 over the number of fits
    assert abs(covered[place] - 0.95) <= 3 * np.sqrt(0.95 * 0.05 / FITS), what
