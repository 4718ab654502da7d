"""Rows are gathered into distinct covariate patterns, exactly."""

import numpy as np
import pandas as pd
import pytest
from hypothesis import given
from hypothesis import strategies as st

import plainodds as po
from plainodds.model import patterns
from plainodds.model.fitted import Sample
from plainodds.model.patterns import patterns_of
from tests.model.made import cases, glm


def sample_of(matrix, offset=None):
    return Sample(np.asarray(matrix, dtype=float), {}, None, offset)


def gathered(sample):
    return patterns._patterns(sample)


@pytest.fixture(scope="module")
def sites():
    return cases().assign(visits=lambda frame: frame.visits.clip(0, 2))


def test_rows_of_equal_design_are_one_pattern(sites):
    found = patterns_of(po.FittedLogit(glm("left ~ site + visits", sites).fit()).model)
    grouped = sites.groupby(["site", "visits"], observed=True).left.agg(["size", "sum"])
    assert found.count == len(grouped)
    for pattern, row in enumerate(found.first):
        size, events = grouped.loc[(sites.site[row], sites.visits[row])]
        assert (found.cases[pattern], found.events[pattern]) == (size, events)
        same = (sites.site == sites.site[row]) & (sites.visits == sites.visits[row])
        assert list(found.rows_of(pattern)) == list(np.nonzero(same)[0])


def test_patterns_stand_in_the_order_of_their_first_rows():
    found = gathered(sample_of([[1, 5], [1, 3], [1, 5], [1, 4], [1, 3]]))
    assert list(found.first) == [0, 1, 3]
    assert list(found.of_row) == [0, 1, 0, 2, 1]


def test_rows_with_another_offset_are_another_pattern():
    X = np.ones((4, 2))
    assert gathered(sample_of(X)).count == 1
    assert gathered(sample_of(X, np.array([0.0, 1.0, 0.0, 1.0]))).count == 2


def test_a_zero_has_no_sign():
    assert gathered(sample_of([[1.0, 0.0], [1.0, -0.0]])).count == 1


@pytest.mark.parametrize("order", ["C", "F"])
def test_neighbouring_numbers_are_told_apart(order):
    x = 1.0 + np.arange(50) * np.spacing(1.0)
    X = np.asarray(np.column_stack([np.ones(100), np.tile(x, 2)]), order=order)
    assert gathered(sample_of(X)).count == 50


def test_numbers_swapped_between_columns_make_another_pattern():
    assert gathered(sample_of([[1, 2], [2, 1], [3, 0], [0, 3]])).count == 4


@given(
    st.lists(st.tuples(*[st.sampled_from([0.0, 1.0, 0.5, 2.0, -1.0])] * 3), min_size=1, max_size=40)
)
def test_patterns_are_those_that_sorting_whole_rows_finds(rows):
    expected, inverse = np.unique(np.array(rows), axis=0, return_inverse=True)
    found = gathered(sample_of(rows))
    assert found.count == len(expected)
    assert np.array_equal(np.array(rows)[found.first][found.of_row], np.array(rows))
    assert len(set(zip(found.of_row, inverse.ravel(), strict=True))) == len(expected)


def test_rows_that_share_a_hash_are_still_told_apart(monkeypatch):
    X = np.array([[1.0, 2.0], [1.0, 3.0], [1.0, 2.0], [4.0, 3.0]])
    offset = np.array([0.0, 0.0, 0.0, 1.0])
    monkeypatch.setattr(patterns, "_hashes", lambda sample: np.zeros(len(X), dtype=np.uint64))
    found = gathered(sample_of(X, offset))
    assert list(found.of_row) == [0, 1, 0, 2]
    assert list(found.cases) == [2, 1, 1]


def test_frequencies_count_cases_and_variance_weights_weigh_them():
    frame = pd.DataFrame({"y": [0.5, 0.25, 1.0, 0.0], "n": [4, 8, 2, 3], "x": [0, 0, 1, 1]})
    frame["w"] = [1.0, 3.0, 2.0, 1.0]
    result = glm("y ~ x", frame, freq_weights=frame.n, var_weights=frame.w).fit()
    found = patterns_of(po.FittedLogit(result).model)
    assert list(found.cases) == [12, 5]
    assert list(found.events) == [4, 2]
    assert list(found.weights) == [28, 7]
    assert list(found.weighted_events) == [2 + 6, 4]


def test_without_an_outcome_there_are_cases_but_no_events(sites):
    result = glm("left ~ site", sites).fit()
    result.remove_data()
    found = patterns_of(po.FittedLogit(result, data=sites).model)
    assert found.count == 3
    assert found.cases.sum() == len(sites)
    assert found.events is None


def test_patterns_are_found_once_for_a_model(sites):
    model = po.FittedLogit(glm("left ~ site", sites).fit()).model
    assert patterns_of(model) is patterns_of(model)
