"""Which rows belong together: by a predictor, a column of the data, or values handed over."""

import gc

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.groups import Groups, stated_groups
from tests.answers.checks.fits import logit
from tests.answers.checks.test_dependence import DATA, FORMULA, by, clinics


def fitted(frame):
    """A fit that leaves no frame in the caller's own local names, as a formula's does."""
    return po.FittedLogit(smf.logit(FORMULA, frame).fit(disp=0))


def test_a_predictor_a_column_and_values_tell_the_same_groups():
    model = logit("y ~ x + C(clinic_of_ten)", DATA.assign(clinic_of_ten=DATA.clinic // 6))
    stated = [
        by(model, "clinic_of_ten"),
        by(model, (DATA.clinic // 6).to_numpy()),
        by(model, DATA.clinic // 6),
        by(model, [f"clinic {each // 6}" for each in DATA.clinic]),
    ]
    for each in stated:
        assert each.count == 10
        assert np.array_equal(each.of_row, DATA.clinic // 6)


def test_rows_left_out_of_the_fit_are_left_out_of_the_groups():
    frame = DATA.assign(x=DATA.x.where(DATA.index >= 15))
    model = logit(FORMULA, frame)
    together = by(model, "clinic")
    assert (together.count, len(together.of_row)) == (59, 585)
    assert np.bincount(together.of_row)[0] == 5


def test_the_question_holds_no_rows():
    model = logit(FORMULA, DATA)
    assert stated_groups(model, "clinic") == (Groups("clinic"), None)
    handed_over = DATA.clinic
    stated, values = stated_groups(model, handed_over)
    assert (stated.name, len(stated.fingerprint)) == ("groups", 16)
    assert values is handed_over
    assert stated_groups(model, DATA.clinic + 100)[0] == stated
    assert stated_groups(model, DATA.clinic // 2)[0] != stated


def test_the_data_are_read_while_they_are_there():
    frame = clinics()
    fit = fitted(frame)
    assert fit.soundness(groups="clinic").question.groups == Groups("clinic")
    del frame
    gc.collect()
    with pytest.raises(po.QuestionRefused, match=r"no longer there.*groups=frame"):
        fit.soundness(groups="clinic")


def test_data_that_grew_since_the_fit_are_not_read():
    frame = clinics()
    fit = fitted(frame)
    frame.loc[len(frame)] = frame.loc[0]
    with pytest.raises(po.QuestionRefused, match="other rows than at the fit"):
        fit.soundness(groups="clinic")


@pytest.mark.parametrize(
    ("groups", "words"),
    [
        ("doctor", ["'doctor'", "clinic"]),
        (np.arange(5), ["5 values", "600 rows"]),
        (np.ones((600, 2)), ["one value for each row"]),
        (np.zeros(600), ["one group"]),
        (DATA.clinic.where(DATA.index >= 7), ["missing in 7"]),
        ("hole", ["'hole'", "missing in 7"]),
    ],
)
def test_groups_that_cannot_be_are_refused_with_the_way_out(groups, words):
    frame = DATA.assign(hole=DATA.clinic.where(DATA.index >= 7))
    fit = fitted(frame)
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.soundness(groups=groups)
    for word in words:
        assert word in str(refusal.value)


def test_a_column_of_no_frame_is_refused():
    exog = sm.add_constant(DATA[["x", "size"]].to_numpy())
    fit = po.FittedLogit(sm.Logit(DATA.y.to_numpy(), exog).fit(disp=0))
    with pytest.raises(po.QuestionRefused, match="groups=frame"):
        fit.soundness(groups="clinic")
