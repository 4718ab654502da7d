"""The model that is measured: 27 columns, a spline, interactions, 6,000 rows."""

import numpy as np
import statsmodels.formula.api as smf

import plainodds as po

__all__ = ["COLUMNS", "fit_of_27_columns"]

COLUMNS = 27
_FORMULA = (
    "burst ~ age_years * material * soil + bs(pressure_m, df=6) + np.log2(diameter_mm)"
    " + past_repairs + I(past_repairs ** 2)"
)


def fit_of_27_columns() -> po.FittedLogit:
    """Fit the model and take it in."""
    assert np.log2(2) == 1  # the formula reads np here
    result = smf.logit(_FORMULA, po.demo.tessel_bay()).fit(disp=False)
    assert len(result.params) == COLUMNS
    return po.FittedLogit(result)
