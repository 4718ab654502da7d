"""The models that notebooks of the browser tests fit, and the same results here to compare with."""

from typing import Any

__all__ = ["MANY", "PLAIN", "TESSEL_BAY", "fitted", "named"]

TESSEL_BAY = """
import numpy as np
import statsmodels.formula.api as smf

import plainodds as po

mains = po.demo.tessel_bay(rows=3000)
result = smf.logit(
    "burst ~ age_years * material + soil + bs(pressure_m, df=4)"
    " + np.log2(diameter_mm) + past_repairs",
    mains,
).fit(disp=False)
fit = po.FittedLogit(
    result,
    predictors={
        "age_years": po.Predictor(label="Age", unit="years", step=10),
        "pressure_m": po.Predictor(label="Pressure", unit="m"),
        "diameter_mm": po.Predictor(label="Diameter", unit="mm"),
    },
    outcome=po.Outcome(event="a burst this winter", case="main", cases="mains"),
)
"""

PLAIN = """
import statsmodels.formula.api as smf

import plainodds as po

mains = po.demo.tessel_bay(rows=3000)
result = smf.logit("burst ~ age_years + material + soil + past_repairs", mains).fit(disp=False)
"""

MANY = PLAIN.replace("rows=3000", "rows=150_000")


def named(cell: str, *wanted: str) -> tuple[Any, ...]:
    """What a cell calls by these names."""
    names: dict[str, Any] = {}
    exec(cell, names)
    return tuple(names[each] for each in wanted)


def fitted(cell: str) -> Any:
    """What a cell calls `result`."""
    (result,) = named(cell, "result")
    return result
