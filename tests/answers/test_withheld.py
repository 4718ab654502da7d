"""Which counts of events are not told."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.answers.withheld import withheld

counted = st.lists(st.tuples(st.integers(0, 60), st.integers(0, 60)), min_size=2, max_size=8).map(
    lambda pairs: [(float(a), float(a + b)) for a, b in pairs]
)


@given(counted, st.integers(2, 15))
def test_no_count_that_is_too_few_follows_from_the_others_and_a_total(counts, smallest):
    hidden = withheld(counts, smallest)
    few = [0 < events < smallest or 0 < cases - events < smallest for events, cases in counts]
    assert all(is_hidden or not is_few for is_hidden, is_few in zip(hidden, few, strict=True))
    assert sum(hidden) == (0 if not any(few) else max(2, sum(few)))


@pytest.mark.parametrize(
    ("counts", "hidden"),
    [
        # enough everywhere
        ([(40.0, 400.0), (30.0, 300.0)], (False, False)),
        # two hide each other
        ([(40.0, 400.0), (3.0, 300.0), (297.0, 300.0)], (False, True, True)),
        # one is hidden by the smallest of the others, with an event or without
        ([(40.0, 400.0), (285.0, 300.0), (3.0, 300.0)], (False, True, True)),
        # none of them hides little
        ([(40.0, 400.0), (0.0, 300.0), (3.0, 300.0)], (True, False, True)),
        ([(0.0, 400.0), (3.0, 300.0)], (True, True)),
        # alone there is nothing to hide it by
        ([(3.0, 300.0)], (True,)),
        # what is withheld already counts
        ([(40.0, 400.0), (math.nan, 300.0), (math.nan, 300.0)], (False, True, True)),
        ([], ()),
    ],
)
def test_one_count_is_never_hidden_alone(counts, hidden):
    assert withheld(counts, 10) == hidden
