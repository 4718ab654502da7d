"""How far long work is, and that it stops where it is told to."""

import numpy as np
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.pair import PairQuestion, answer_pair
from plainodds.answers.progress import Stopped, within


@pytest.fixture
def model(pipes):
    """One in which every point of an averaged map is dear."""
    frame = pipes.assign(diameter_mm=np.arange(len(pipes)) / 10)
    formula = "burst ~ age_years * past_repairs + pressure_m * diameter_mm"
    return po.FittedLogit(smf.logit(formula, frame).fit(disp=0)).model


QUESTION = PairQuestion("age_years", "pressure_m", others="observed", shape="map")


def test_stages_follow_each_other_whatever_their_parts():
    told = []
    for stage, parts in enumerate((3, 1, 8)):
        for done in range(parts):
            within(lambda *each: told.append(each), stage, 3)(done + 1, parts)
    assert told == sorted(told)
    assert {parts for _, parts in told} == {100}
    assert told[-1] == (100, 100)


def test_a_map_tells_how_far_it_is_and_is_the_same_map(model):
    told = []
    answer = answer_pair(model, QUESTION, progress=lambda *each: told.append(each))
    assert told == sorted(told)
    assert len(set(told)) > 5
    assert told[-1] == (100, 100)
    assert answer == answer_pair(model, QUESTION)


def test_a_map_stops_where_it_is_told_to_and_can_be_had_later(model):
    def stop(done, parts):
        if done > 30:
            raise Stopped

    with pytest.raises(Stopped):
        answer_pair(model, QUESTION, progress=stop)
    assert answer_pair(model, QUESTION).surface is not None
