"""Formulas as analysts write them, with the raw columns behind each."""

import functools

import numpy as np
import pandas as pd
import statsmodels.api as sm
import statsmodels.formula.api as smf

from plainodds import FittedLogit
from tests.model import made

BOTH = {
    # transforms
    "np.log(age)": "age",
    "np.sqrt(age) + np.exp(-age)": "age",
    "age + I(age**2)": "age",
    "I(age) + depth": "age depth",
    "I((age - 5) * (age > 5))": "age",
    "I(1 / (depth**2 + 1))": "depth",
    "np.log(age + 10 + depth)": "age depth",
    "np.minimum(age, 5)": "age",
    "age.clip(2, 6)": "age",
    "np.where(site == 'a', 1, 0)": "site",
    "I(site == 'b')": "site",
    "I(site.isin(['a', 'b']))": "site",
    "I(age > 5)": "age",
    # bases
    "bs(age, df=4)": "age",
    "bs(age, knots=[3, 5], degree=1)": "age",
    "bs(age, df=4, lower_bound=0, upper_bound=12)": "age",
    "cr(age, df=4)": "age",
    "cc(age, df=4)": "age",
    "cr(money, df=3)": "money",
    "bs(age, df=4) * site": "age site",
    # remembered state
    "center(age)": "age",
    "standardize(money)": "money",
    "scale(age) + center(visits)": "age visits",
    "standardize(year) * age": "age year",
    # categories and their contrasts
    "site": "site",
    "C(site, Treatment('b'))": "site",
    "C(site, Sum)": "site",
    "C(site, Helmert)": "site",
    "C(soil, Poly)": "soil",
    "C(site, levels=['c', 'b', 'a'])": "site",
    "C(visits)": "visits",
    "visits + C(visits > 2)": "visits",
    "C(code)": "code",
    "code + C(code)": "code",
    # names
    "Q('a b')": "a b",
    'Q("class") + age': "age class",
    # interactions
    "age:depth": "age depth",
    "age * depth": "age depth",
    "(age + depth)**2": "age depth",
    "(age + depth + site)**2": "age depth site",
    "age * site": "age site",
    "site * soil": "site soil",
    "age * site * flag": "age flag site",
    "flag:age": "age flag",
    "dummy * flag": "dummy flag",
    "I(age * depth)": "age depth",
    "I(age**2):site": "age site",
    "age / depth": "age depth",
    "site + site:age": "age site",
    # no intercept
    "0 + site": "site",
    "age + site - 1": "age site",
    "0 + site:age": "age site",
    "0 + age": "age",
    # kinds of column
    "flag": "flag",
    "C(flag) + dummy": "dummy flag",
    "C(dummy) * age": "age dummy",
    "soil": "soil",
    "spare": "spare",
    "band": "band",
    "cat_flag": "cat_flag",
    "object_flag": "object_flag",
    "object_text": "object_text",
    "object_number": "object_number",
    "text": "text",
    "whole + real": "real whole",
    "money + depth + age": "age depth money",
}
PATSY = {
    "te(cr(age, df=3), cr(depth, df=3))": "age depth",
    "pd.cut(age, [0, 3, 10])": "age",
    "C(pd.cut(age, [0, 3, 10]))": "age",
    "doubled(age)": "age",
    "site.map({'a': 1, 'b': 2, 'c': 5})": "site",
}
FORMULAIC = {
    "poly(age, 3)": "age",
    "{age**2} + age": "age",
    "np.log(`a b` + 10)": "a b",
    "I(`a b` * 2)": "a b",
    "C(site, contr.treatment('b'))": "site",
    "C(site, contr.sum)": "site",
    "C(site, contr.helmert)": "site",
    "C(soil, contr.poly)": "soil",
    "maybe": "maybe",
    "maybe * age": "age maybe",
    "C(whole)": "whole",
    "hashed(site, levels=5)": "site",
    "doubled(age)": "age",
}
CASES = [
    *((engine, formula) for engine in made.ENGINES for formula in BOTH),
    *(("patsy", formula) for formula in PATSY),
    *(("formulaic", formula) for formula in FORMULAIC),
]
PREDICTORS = BOTH | PATSY | FORMULAIC

FRAME = made.cases()


def doubled(values):
    return 2 * np.asarray(values) + 1


@functools.cache
def fitted(engine, formula):
    """The result and its FittedLogit."""
    own = {"doubled": doubled} if "doubled" in formula else None
    with made.formula_engine(engine):
        # a GLM is fitted with a generalised inverse, so that collinear columns don't matter here
        # fitted from here, whose functions patsy then finds
        frame = FRAME[["left", *names_in(formula)]]
        result = smf.glm(f"left ~ {formula}", frame, family=sm.families.Binomial()).fit()
        return result, FittedLogit(result, functions=own if engine == "formulaic" else None)


def names_in(formula):
    """The raw columns behind a formula."""
    return ["a b"] if PREDICTORS[formula] == "a b" else PREDICTORS[formula].split()


def shuffled(formula, seed=3, rows=12):
    """New rows: every column's own values, each column in an order of its own."""
    draw = np.random.default_rng(seed)
    return pd.DataFrame(
        {
            name: FRAME[name].iloc[draw.permutation(len(FRAME))[:rows]].array
            for name in names_in(formula)
        }
    )
