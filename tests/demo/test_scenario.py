"""Tessel Bay: the invented winter is what it is said to be."""

import numpy as np
import pandas as pd
import pytest

from plainodds.demo import tessel_bay


@pytest.fixture(scope="module")
def mains():
    return tessel_bay()


def test_the_same_seed_gives_the_same_frame():
    pd.testing.assert_frame_equal(tessel_bay(rows=500, seed=4), tessel_bay(rows=500, seed=4))


def test_another_seed_gives_another_winter():
    assert not tessel_bay(rows=500, seed=4).equals(tessel_bay(rows=500, seed=5))


def test_it_has_six_thousand_mains_and_eight_columns(mains):
    assert mains.shape == (6000, 8)
    assert list(mains.columns) == [
        "burst",
        "age_years",
        "material",
        "soil",
        "pressure_m",
        "diameter_mm",
        "past_repairs",
        "district",
    ]
    assert not mains.isna().any().any()


def test_numbers_stay_in_their_ranges(mains):
    assert set(mains["burst"]) == {0, 1}
    assert mains["age_years"].dtype.kind == "i"
    assert mains["age_years"].between(0, 110).all()
    assert mains["pressure_m"].between(20, 100).all()
    assert set(mains["diameter_mm"]) == {80, 100, 150, 200, 250, 300, 400, 500}
    assert mains["past_repairs"].dtype.kind == "i"
    assert mains["past_repairs"].min() == 0


def test_levels_come_in_their_order_and_all_occur(mains):
    assert list(mains["material"].cat.categories) == ["cast iron", "ductile iron", "PVC"]
    assert list(mains["soil"].cat.categories) == ["low", "moderate", "high"]
    assert mains["soil"].cat.ordered
    assert mains["district"].nunique() == 48
    assert mains.groupby(["material", "soil"], observed=False).size().min() > 300


@pytest.mark.parametrize("seed", [1, 2, 3])
def test_six_to_nine_mains_in_a_hundred_burst(seed):
    assert 0.06 < tessel_bay(seed=seed)["burst"].mean() < 0.09


def test_plastic_pipes_are_younger_than_iron_ones(mains):
    ages = mains.groupby("material", observed=True)["age_years"]
    assert ages.median()["PVC"] < ages.median()["ductile iron"] < ages.median()["cast iron"]
    assert ages.max()["PVC"] < 60
    assert ages.min()["cast iron"] > 30


def test_ground_at_the_bay_is_lower_and_more_corrosive(mains):
    at_the_bay = mains["district"].astype(str).str.startswith("A")
    on_the_hills = mains["district"].astype(str).str.startswith("F")
    corrosive = mains["soil"] == "high"
    assert corrosive[at_the_bay].mean() > 2 * corrosive[on_the_hills].mean()
    pressure = mains["pressure_m"]
    assert pressure[at_the_bay].mean() > pressure[on_the_hills].mean() + 10


def test_pipes_that_break_have_broken_before(mains):
    repairs = mains.groupby("burst")["past_repairs"].mean()
    assert repairs[1] > 1.5 * repairs[0]


def test_one_main_is_enough_and_none_is_refused():
    assert len(tessel_bay(rows=1)) == 1
    with pytest.raises(ValueError, match="at least one length"):
        tessel_bay(rows=0)


def test_the_callers_random_state_is_left_alone():
    np.random.seed(3)  # noqa: NPY002
    expected = np.random.random()  # noqa: NPY002
    np.random.seed(3)  # noqa: NPY002
    tessel_bay(rows=10)
    assert np.random.random() == expected  # noqa: NPY002
