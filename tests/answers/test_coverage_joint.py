"""Do 95 % intervals of additive interaction cover the truth? A few hundred seeded fits say."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.averaging import Exact
from plainodds.answers.joint import joint_table_of
from plainodds.answers.population import everyone

FITS = 250
ROWS = 2000


def eta(a, b, x):
    return -1.5 + 0.6 * a + 0.8 * b + 0.5 * a * b + 0.7 * x


def expit(z):
    return 1 / (1 + np.exp(-z))


def truths(by):
    """RERI, AP and S of four odds or chances: neither, a, b, both."""
    a, b, both = np.array(by[1:]) / by[0]
    excess = both - a - b + 1
    return [excess, excess / both, (both - 1) / (a + b - 2)]


@pytest.fixture(scope="module")
def covered():
    rng = np.random.default_rng(20263)
    a, b = (rng.integers(0, 2, ROWS) for _ in range(2))
    frame = pd.DataFrame({"a": a, "b": b, "x": rng.normal(size=ROWS)})
    corners = [(0, 0), (1, 0), (0, 1), (1, 1)]
    # the covariates stay, the outcomes are drawn anew: sample averages are then fixed truths
    by_odds = truths([np.exp(eta(*corner, 0.0)) for corner in corners])
    by_chances = truths([expit(eta(*corner, frame.x)).mean() for corner in corners])
    chance = expit(eta(a, b, frame.x))
    hits = []
    for _ in range(FITS):
        data = frame.assign(y=(rng.uniform(size=ROWS) < chance).astype(int))
        model = po.FittedLogit(smf.logit("y ~ a * b + x", data).fit(disp=0)).model
        averager = Exact(model, everyone(model))
        base = model.completed({"x": 0.0})
        table = joint_table_of(model, "a", "b", (0, 1), (0, 1), base, averager, 0.95)
        found = [
            estimate
            for each in (table.additive_by_odds, table.additive_by_chances)
            for estimate in (
                each.relative_excess_risk,
                each.attributable_proportion,
                each.synergy_index,
            )
        ]
        assert table.recoded == ()
        hits.append(
            [e.lower <= t <= e.upper for e, t in zip(found, by_odds + by_chances, strict=True)]
        )
    return np.mean(hits, axis=0)


@pytest.mark.parametrize(
    ("place", "what"),
    list(enumerate(f"{m} by {by}" for by in ("odds", "chances") for m in ("RERI", "AP", "S"))),
)
def test_nominal_coverage_is_reached_within_monte_carlo_error(covered, place, what):
    # three standard errors of a share of 0.95 over the number of fits
    assert abs(covered[place] - 0.95) <= 3 * np.sqrt(0.95 * 0.05 / FITS), f"{what}: {covered}"
