"""What makes a main burst in Tessel Bay: the model that the invented winter is drawn from."""

from __future__ import annotations

from types import MappingProxyType

import numpy as np
import pandas as pd
from numpy.typing import NDArray

__all__ = [
    "DISTRICTS",
    "MATERIALS",
    "SOILS",
    "TRUE_FORMULA",
    "pipe_linear_predictor",
    "true_coefficients",
    "true_linear_predictor",
]

MATERIALS = ("cast iron", "ductile iron", "PVC")
SOILS = ("low", "moderate", "high")
DISTRICTS = tuple(f"{column}{row}" for column in "ABCDEF" for row in range(1, 9))
"""Squares of the town's map: A lies at the bay, F on the hills."""

_AGE_COMPARED = 40
"""Years of age at which the materials' levels below are stated."""

# linear predictor at 40 years, 60 m, 100 mm and no repairs: one row per material, one column per
# soil
_LEVEL = np.array(
    [
        [-3.10, -2.85, -2.55],
        [-3.30, -2.95, -2.40],
        [-3.45, -3.40, -3.35],
    ]
)

# what ten more years add to it: iron ages badly in corrosive soil, PVC hardly cares
_PER_DECADE = np.array(
    [
        [0.14, 0.24, 0.40],
        [0.10, 0.22, 0.44],
        [0.05, 0.05, 0.07],
    ]
)

_PRESSURE_COMPARED = 60.0
_PRESSURE_BEND = 65.0
_PER_METRE = 0.006
_PER_METRE_ABOVE_BEND = 0.055
_DIAMETER_COMPARED = 100.0
_PER_DOUBLED_DIAMETER = -0.35
_PER_REPAIR = 0.32

# multiples of an angle look haphazard, and are the same everywhere without a random generator
_DISTRICT = MappingProxyType(
    dict(zip(DISTRICTS, (0.3 * np.cos(2.4 * np.arange(len(DISTRICTS)))).tolist(), strict=True))
)

TRUE_FORMULA = (
    "burst ~ age_years * material * soil + pressure_m "
    f"+ np.maximum(pressure_m - {_PRESSURE_BEND:g}, 0) "
    "+ np.log2(diameter_mm) + past_repairs + district"
)
"""The correctly specified model, as a formula for statsmodels."""


def pipe_linear_predictor(
    age_years: NDArray[np.float64],
    material: NDArray[np.intp],
    soil: NDArray[np.intp],
    pressure_m: NDArray[np.float64],
    diameter_mm: NDArray[np.float64],
) -> NDArray[np.float64]:
    """Everything but past repairs and district; material and soil as positions of their level."""
    ageing = _PER_DECADE[material, soil] * (age_years - _AGE_COMPARED) / 10
    pressing = _PER_METRE * (pressure_m - _PRESSURE_COMPARED)
    bending = _PER_METRE_ABOVE_BEND * np.maximum(pressure_m - _PRESSURE_BEND, 0)
    narrowing = _PER_DOUBLED_DIAMETER * np.log2(diameter_mm / _DIAMETER_COMPARED)
    return np.asarray(_LEVEL[material, soil] + ageing + pressing + bending + narrowing)


def true_linear_predictor(frame: pd.DataFrame) -> NDArray[np.float64]:
    """The true log odds of a burst for each row of a Tessel Bay frame.

    Parameters
    ----------
    frame : DataFrame
        With the columns that `tessel_bay` gives; `burst` isn't needed.

    Returns
    -------
    ndarray of float, shape (rows,)

    Raises
    ------
    ValueError
        If a material, a soil or a district isn't one of Tessel Bay's.

    Examples
    --------
    >>> from plainodds.demo import tessel_bay, true_linear_predictor
    >>> true_linear_predictor(tessel_bay(rows=3)).shape
    (3,)
    """
    pipe = pipe_linear_predictor(
        frame["age_years"].to_numpy(dtype=float),
        _positions(frame["material"], MATERIALS),
        _positions(frame["soil"], SOILS),
        frame["pressure_m"].to_numpy(dtype=float),
        frame["diameter_mm"].to_numpy(dtype=float),
    )
    repairs = _PER_REPAIR * frame["past_repairs"].to_numpy(dtype=float)
    effects = np.array(list(_DISTRICT.values()))
    return np.asarray(pipe + repairs + effects[_positions(frame["district"], DISTRICTS)])


def true_coefficients() -> pd.Series:
    """The coefficients of `TRUE_FORMULA`, under the names that patsy gives its columns.

    Returns
    -------
    Series of float
        In no particular order: match it with a fit's `params` by name.

    Examples
    --------
    >>> from plainodds.demo import true_coefficients
    >>> float(true_coefficients()["past_repairs"])
    0.32
    """
    # the same surface, restated for an age of 0 and each first level as the reference
    newborn = _LEVEL - _PER_DECADE * _AGE_COMPARED / 10
    yearly = _PER_DECADE / 10
    constant = (
        newborn[0, 0]
        - _PER_METRE * _PRESSURE_COMPARED
        - _PER_DOUBLED_DIAMETER * np.log2(_DIAMETER_COMPARED)
        + _DISTRICT[DISTRICTS[0]]
    )
    by_name = {
        "Intercept": constant,
        "age_years": yearly[0, 0],
        "pressure_m": _PER_METRE,
        f"np.maximum(pressure_m - {_PRESSURE_BEND:g}, 0)": _PER_METRE_ABOVE_BEND,
        "np.log2(diameter_mm)": _PER_DOUBLED_DIAMETER,
        "past_repairs": _PER_REPAIR,
    }
    for table, prefix in ((newborn, ""), (yearly, "age_years:")):
        for m, material in enumerate(MATERIALS[1:], start=1):
            by_name[f"{prefix}material[T.{material}]"] = table[m, 0] - table[0, 0]
        for s, soil in enumerate(SOILS[1:], start=1):
            by_name[f"{prefix}soil[T.{soil}]"] = table[0, s] - table[0, 0]
        for m, material in enumerate(MATERIALS[1:], start=1):
            for s, soil in enumerate(SOILS[1:], start=1):
                by_name[f"{prefix}material[T.{material}]:soil[T.{soil}]"] = (
                    table[m, s] - table[m, 0] - table[0, s] + table[0, 0]
                )
    for district in DISTRICTS[1:]:
        by_name[f"district[T.{district}]"] = _DISTRICT[district] - _DISTRICT[DISTRICTS[0]]
    return pd.Series(by_name, name="truth", dtype=float)


def _positions(column: pd.Series, levels: tuple[str, ...]) -> NDArray[np.intp]:
    found = pd.Index(levels).get_indexer(pd.Index(column.astype(str)))
    if (found < 0).any():
        strange = sorted(set(column[found < 0].astype(str)))
        raise ValueError(f"Tessel Bay has no {column.name} {strange}; it has {list(levels)}.")
    return np.asarray(found)
