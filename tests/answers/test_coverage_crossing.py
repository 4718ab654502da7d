"""Do 95 % intervals of the averaged interaction cover the truth? Differences and partials."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po

FITS = 250
ROWS = 400


def expit(z):
    return 1 / (1 + np.exp(-z))


def eta(x, z):
    return -0.4 + 0.9 * x + 0.7 * z - 0.5 * x * z


@pytest.fixture(scope="module")
def frame():
    rng = np.random.default_rng(77)
    return pd.DataFrame({"x": rng.normal(size=ROWS), "z": rng.binomial(1, 0.45, ROWS)})


@pytest.fixture(scope="module")
def covered(frame):
    rng = np.random.default_rng(78)
    x, z = frame.x.to_numpy(), frame.z.to_numpy()
    p = {(i, j): expit(eta(np.full(ROWS, i), np.full(ROWS, j))).mean() for i in (-1, 1)
         for j in (0, 1)}  # fmt: skip
    difference = p[1, 1] - p[1, 0] - p[-1, 1] + p[-1, 0]
    slopes = {}
    for j in (0, 1):
        chance = expit(eta(x, j))
        slopes[j] = np.mean(chance * (1 - chance) * (0.9 - 0.5 * j))
    truths = {
        "cross difference": ({"a_values": (-1, 1)}, difference),
        "difference of slopes": ({"number": "slope"}, slopes[1] - slopes[0]),
    }
    hits = dict.fromkeys(truths, 0)
    for _ in range(FITS):
        data = frame.assign(y=(rng.uniform(size=ROWS) < expit(eta(x, z))).astype(int))
        fit = po.FittedLogit(smf.logit("y ~ x * z", data).fit(disp=0))
        for what, (asked, truth) in truths.items():
            found = fit.pair("x", "z", **asked).interaction.averaged
            hits[what] += found.lower <= truth <= found.upper
    return {what: count / FITS for what, count in hits.items()}


@pytest.mark.parametrize("what", ["cross difference", "difference of slopes"])
def test_nominal_coverage_is_reached_within_monte_carlo_error(covered, what):
    # three standard errors of a share of 0.95 over the number of fits
    assert abs(covered[what] - 0.95) <= 3 * np.sqrt(0.95 * 0.05 / FITS), covered[what]
