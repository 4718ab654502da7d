"""Do 95 % intervals of averaged effects and risks cover the truth? With rows fixed and drawn."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po

FITS = 250
ROWS = 400


def drawn(rng, rows):
    x = rng.normal(size=rows)
    return pd.DataFrame({"x": x, "group": np.where(rng.uniform(size=rows) < 0.4, "b", "a")})


def eta(x, group):
    b = (group == "b").astype(float)
    # a strong x makes rows differ much in their effects, so that drawing them matters
    return -0.6 + 1.4 * x + 0.9 * b


def expit(z):
    return 1 / (1 + np.exp(-z))


def truths(frame):
    """Average slope of x, risk difference and ratio of group, over these very rows."""
    x, group = frame.x.to_numpy(), frame.group.to_numpy()
    p = expit(eta(x, group))
    p1, p0 = expit(eta(x, np.full(len(x), "b"))), expit(eta(x, np.full(len(x), "a")))
    return np.mean(1.4 * p * (1 - p)), np.mean(p1 - p0), np.mean(p1) / np.mean(p0)


def hits(frame, rng, truth, sample):
    p = expit(eta(frame.x.to_numpy(), frame.group.to_numpy()))
    data = frame.assign(y=(rng.uniform(size=len(frame)) < p).astype(int))
    fit = po.FittedLogit(smf.logit("y ~ x + group", data).fit(disp=0))
    slope = fit.effects("x", sample=sample).rows[0].effect
    risks = fit.change("group", "a", "b", sample=sample).comparison
    found = (slope, risks.risk_difference, risks.risk_ratio)
    return [e.lower <= t <= e.upper for e, t in zip(found, truth, strict=True)]


@pytest.fixture(scope="module")
def covered():
    rng = np.random.default_rng(20262)
    fixed_frame = drawn(rng, ROWS)
    fixed_truth = truths(fixed_frame)
    # the population that rows are drawn from, by a large sample of it
    population_truth = truths(drawn(rng, 2_000_000))
    fixed = [hits(fixed_frame, rng, fixed_truth, "fixed") for _ in range(FITS)]
    anew = [hits(drawn(rng, ROWS), rng, population_truth, "drawn") for _ in range(FITS)]
    return {"fixed": np.mean(fixed, axis=0), "drawn": np.mean(anew, axis=0)}


@pytest.mark.parametrize("sample", ["fixed", "drawn"])
@pytest.mark.parametrize(
    ("place", "what"), list(enumerate(["average effect", "risk difference", "risk ratio"]))
)
def test_nominal_coverage_is_reached_within_monte_carlo_error(covered, sample, place, what):
    # three standard errors of a share of 0.95 over the number of fits
    share = covered[sample][place]
    assert abs(share - 0.95) <= 3 * np.sqrt(0.95 * 0.05 / FITS), f"{what}, {sample}: {share}"
