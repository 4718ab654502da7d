"""What was found of a model is kept, as long as the model lives and for that model only."""

import gc
import weakref

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.remembered import remembered
from tests.model.made import cases


@pytest.fixture
def model():
    return po.FittedLogit(smf.logit("left ~ age", cases()).fit(disp=0)).model


def test_it_is_computed_once_for_each_key_and_model(model):
    counted = []

    def find():
        counted.append(1)
        return len(counted)

    other = po.FittedLogit(smf.logit("left ~ age", cases()).fit(disp=0)).model
    assert [remembered(model, "one", find) for _ in range(3)] == [1, 1, 1]
    assert remembered(model, "two", find) == 2
    assert remembered(other, "one", find) == 3


def test_what_is_refused_is_not_kept(model):
    def refuse():
        raise po.QuestionRefused("no")

    for _ in range(2):
        with pytest.raises(po.QuestionRefused):
            remembered(model, "refused", refuse)
    assert remembered(model, "refused", lambda: 1) == 1


def test_old_things_are_forgotten(model):
    for i in range(500):
        remembered(model, i, lambda i=i: i)
    assert remembered(model, 0, lambda: "anew") == "anew"
    assert remembered(model, 499, lambda: "anew") == 499


def test_a_model_that_nobody_needs_goes_with_all_that_was_kept_of_it():
    fit = po.FittedLogit(smf.logit("left ~ age * site", cases()).fit(disp=0))
    fit.pair("age", "site", others="observed", scale="odds")
    gone = weakref.ref(fit.model)
    del fit
    gc.collect()
    assert gone() is None
