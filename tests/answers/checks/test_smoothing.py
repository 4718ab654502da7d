"""Bins, smooth curves and their bands."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from statsmodels.stats.proportion import proportion_confint

from plainodds.answers.checks.fitted_rows import FittedRows
from plainodds.answers.checks.smoothing import binned, smoother_of, wilson


def rows_of(outcome, probability, cases=None):
    cases = np.ones(len(outcome)) if cases is None else np.asarray(cases, dtype=float)
    probability = np.asarray(probability, dtype=float)
    eta = np.log(probability / (1 - probability))
    return FittedRows(eta, probability, np.asarray(outcome, dtype=float), cases, cases)


def drawn(n, seed=0, chance=lambda x: 1 / (1 + np.exp(-x))):
    rng = np.random.default_rng(seed)
    x = rng.normal(size=n)
    return x, rows_of(rng.uniform(size=n) < chance(x), chance(x))


@pytest.mark.parametrize("n", [50, 5_000, 60_000])
def test_bins_hold_every_case_and_event_once(n):
    x, rows = drawn(n)
    bins = binned(x, rows)
    assert len(bins.centre) <= 200
    assert bins.cases.sum() == n
    assert bins.events.sum() == pytest.approx(rows.outcome.sum())
    assert bins.low[0] == x.min()
    assert bins.high[-1] == x.max()
    assert (bins.low[1:] >= bins.high[:-1]).all()
    assert ((bins.low <= bins.centre) & (bins.centre <= bins.high)).all()


def test_few_values_are_bins_of_their_own():
    x = np.array([3, 1, 1, 2, 3, 3], dtype=float)
    bins = binned(x, rows_of([1, 0, 1, 0, 1, 0], np.full(6, 0.5)))
    assert bins.low.tolist() == bins.high.tolist() == bins.centre.tolist() == [1, 2, 3]
    assert bins.cases.tolist() == [2, 1, 3]
    assert bins.observed == pytest.approx([0.5, 0, 2 / 3])


def test_coarser_groups_hold_about_equally_many():
    x, rows = drawn(5000)
    groups = binned(x, rows).coarser(10)
    assert len(groups.centre) == 10
    assert groups.cases.sum() == 5000
    assert groups.cases.max() / groups.cases.min() < 1.3


def test_counted_cases_are_rows_written_out():
    rng = np.random.default_rng(1)
    x, y, times = rng.integers(0, 40, 200), rng.integers(0, 2, 200), rng.integers(1, 5, 200)
    counted = binned(x.astype(float), rows_of(y, np.full(200, 0.3), times))
    written = binned(
        np.repeat(x, times).astype(float), rows_of(np.repeat(y, times), np.full(times.sum(), 0.3))
    )
    for name in ("centre", "cases", "events", "observed"):
        assert getattr(counted, name) == pytest.approx(getattr(written, name))
    assert smoother_of(counted).worth == pytest.approx(smoother_of(written).worth)


def test_a_line_is_smoothed_to_itself():
    x, rows = drawn(800)
    bins = binned(x, rows)
    smoother = smoother_of(bins)
    assert smoother.weights.sum(axis=1) == pytest.approx(np.ones(len(smoother.at)))
    line = 0.5 + 0.1 * bins.centre
    assert smoother.curve(line) == pytest.approx(0.5 + 0.1 * smoother.at)


def test_the_band_holds_the_truth_as_often_as_it_says():
    within = []
    for seed in range(120):
        x, rows = drawn(800, seed)
        bins = binned(x, rows)
        smoother = smoother_of(bins)
        lower, upper = wilson(smoother.curve(bins.observed), smoother.worth, 0.95)
        truth = smoother.curve(bins.expected)
        within.append((lower <= truth) & (truth <= upper))
    assert np.mean(within) == pytest.approx(0.95, abs=0.02)


def test_the_local_average_is_worth_what_its_variance_says():
    x, rows = drawn(2000)
    bins = binned(x, rows)
    smoother = smoother_of(bins)
    rng = np.random.default_rng(2)
    shares = rng.binomial(bins.cases.astype(int), 0.4, size=(4000, len(bins.cases))) / bins.cases
    variance = (shares @ smoother.weights.T).var(axis=0)
    assert 0.4 * 0.6 / smoother.worth == pytest.approx(variance, rel=0.12)


@settings(max_examples=60, deadline=None)
@given(
    st.lists(st.sampled_from([0.0, 0.0, 0.0, 1.0, 2.5, 7.0, 100.0, 1e6]), min_size=3, max_size=60),
    st.integers(0, 2**31),
)
def test_curve_and_band_stay_within_0_and_1_whatever_the_values(values, seed):
    x = np.array(values)
    y = np.random.default_rng(seed).integers(0, 2, len(x))
    bins = binned(x, rows_of(y, np.full(len(x), 0.3)))
    smoother = smoother_of(bins)
    curve = smoother.curve(bins.observed)
    lower, upper = wilson(curve, smoother.worth, 0.95)
    assert ((lower >= 0) & (lower <= curve + 1e-12)).all()
    assert ((curve - 1e-12 <= upper) & (upper <= 1)).all()


def test_the_interval_is_wilsons():
    lower, upper = wilson(np.array([0.0, 0.3, 1.0]), np.array([7.0, 20.0, 5.0]), 0.9)
    for place, (events, cases) in enumerate([(0, 7), (6, 20), (5, 5)]):
        theirs = proportion_confint(events, cases, alpha=0.1, method="wilson")
        assert (lower[place], upper[place]) == pytest.approx(theirs, abs=1e-12)
