"""Small data of every kind of column, and fits of it."""

from contextlib import contextmanager

import numpy as np
import pandas as pd
import statsmodels.api as sm
import statsmodels.formula
import statsmodels.formula.api as smf

ENGINES = ("patsy", "formulaic")


@contextmanager
def formula_engine(name):
    options = statsmodels.formula.options
    before = options.formula_engine
    options.formula_engine = name
    try:
        yield
    finally:
        options.formula_engine = before


def cases(n=240, seed=7):
    """A frame with a column of each kind that a formula may read."""
    draw = np.random.default_rng(seed)
    age = draw.uniform(1, 9, n)
    depth = draw.normal(0, 2, n)
    site = draw.choice(["a", "b", "c"], n)
    eta = -1 + 0.4 * age - 0.3 * depth + 0.8 * (site == "b")
    frame = pd.DataFrame({"left": (draw.uniform(size=n) < 1 / (1 + np.exp(-eta))).astype(int)})
    frame["age"] = age
    frame["depth"] = depth
    frame["visits"] = draw.integers(0, 6, n)
    frame["site"] = site
    frame["a b"] = draw.normal(size=n)
    frame["class"] = draw.uniform(1, 2, n)
    frame["money"] = np.where(draw.uniform(size=n) < 0.5, 0.0, draw.uniform(0, 1e6, n))
    frame["year"] = draw.integers(1990, 2020, n)
    frame["flag"] = draw.uniform(size=n) < 0.4
    frame["dummy"] = draw.integers(0, 2, n)
    frame["code"] = draw.choice([10.0, 20.0, 30.0], n)
    frame["soil"] = pd.Categorical(
        draw.choice(["low", "middle", "high"], n), ["low", "middle", "high"], ordered=True
    )
    frame["spare"] = pd.Categorical(draw.choice(["u", "v"], n), ["u", "v", "w"])
    frame["band"] = pd.cut(frame["age"], [0, 3, 6, 10])
    frame["cat_flag"] = pd.Categorical(draw.uniform(size=n) < 0.5, [True, False])
    frame["object_flag"] = (draw.uniform(size=n) < 0.5).astype(object)
    frame["object_text"] = pd.Series(draw.choice(["p", "q", "r"], n), dtype=object)
    frame["object_number"] = pd.Series(draw.integers(1, 4, n), dtype=object)
    frame["text"] = pd.array(draw.choice(["p", "q", "r"], n), dtype="string")
    frame["whole"] = pd.array(draw.integers(0, 9, n), dtype="Int64")
    frame["real"] = pd.array(draw.normal(size=n), dtype="Float64")
    frame["maybe"] = pd.array(draw.uniform(size=n) < 0.5, dtype="boolean")
    frame["group"] = np.arange(n) // 4
    return frame


def glm(formula, frame, **settings):
    return smf.glm(formula, frame, family=sm.families.Binomial(), **settings)


def logit(formula, frame, **settings):
    return smf.logit(formula, frame, **settings)


def gee(formula, frame, **settings):
    return smf.gee(formula, settings.pop("groups", "group"), frame, family=sm.families.Binomial(),
                   **settings)  # fmt: skip


def chances(fit, profiles):
    """The model's chance at each profile, the rest typical."""
    model = fit.model
    rows = model.rows([model.completed(profile) for profile in profiles])
    return 1 / (1 + np.exp(-(rows @ model.coefficients + model.offset)))


def predicted(result, frame, engine="patsy"):
    """What statsmodels predicts; it builds new rows with the engine that is set."""
    with formula_engine(engine):
        return np.asarray(result.predict(frame))
