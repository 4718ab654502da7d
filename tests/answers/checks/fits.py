"""Fits of invented cases that the tests of shares, chances and ranks look at."""

import numpy as np
import pandas as pd
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po

__all__ = ["binomial", "invented", "logit", "model_of"]


def binomial():
    """The family, new each time: it remembers the trials of the last fit."""
    return sm.families.Binomial()


def invented(rows=600, bend=0.0, seed=0):
    """Cases with two numbers, a count, and a category; `bend` is the square's strength."""
    rng = np.random.default_rng(seed)
    x, w = rng.normal(50, 10, rows), rng.gamma(2, 2, rows)
    count, group = rng.integers(0, 4, rows), rng.choice(list("pqr"), rows)
    spread = (x - 50) / 10
    eta = -0.7 + 0.6 * spread + 0.15 * (w - 4) + 0.2 * count + bend * (spread**2 - 1)
    y = (rng.uniform(size=rows) < 1 / (1 + np.exp(-eta))).astype(int)
    return pd.DataFrame({"x": x, "w": w, "count": count, "group": group, "y": y})


def model_of(result, **stated):
    """A result as the checks see it."""
    return po.FittedLogit(result, **stated).model


def logit(formula, data, **stated):
    """A logit fit as the checks see it."""
    return model_of(smf.logit(formula, data).fit(disp=0, tol=1e-12), **stated)
