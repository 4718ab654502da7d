"""What the rows leave open is not known, whatever a generalised inverse makes of it."""

import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po

pytestmark = pytest.mark.filterwarnings("ignore:The design matrix is rank-deficient")


@pytest.fixture(scope="module")
def data():
    """Nobody has both a and b."""
    rng = np.random.default_rng(1)
    a, b = np.repeat(["no", "yes"], 300), np.tile(["u", "v"], 300)
    frame = pd.DataFrame({"a": a, "b": b, "x": rng.normal(size=600)})
    frame = frame[~((frame.a == "yes") & (frame.b == "v"))]
    frame["y"] = (rng.uniform(size=len(frame)) < 0.3 + 0.2 * (frame.a == "yes")).astype(int)
    return frame.assign(twice=2 * frame.x)


def fitted(formula, data):
    return po.FittedLogit(smf.glm(formula, data, family=sm.families.Binomial()).fit())


@pytest.fixture(scope="module")
def hole(data):
    return fitted("y ~ a * b + x", data)


def test_a_chance_of_whom_nobody_is_is_not_known(hole):
    table = po.table(hole.curve("a", by="b"))
    open_cell = (table.a == "yes") & (table.b == "v")
    assert table[open_cell][["estimate", "se", "lower", "upper"]].isna().all(axis=None)
    assert table[~open_cell][["estimate", "se", "lower", "upper"]].notna().all(axis=None)
    point = hole.profile({"a": "yes", "b": "v"}).point
    assert math.isnan(point.probability.estimate)
    assert not math.isnan(hole.profile({"a": "yes"}).point.probability.estimate)


def test_the_cells_with_rows_are_what_their_own_shares_say(hole, data):
    fit = fitted("y ~ a * b", data)
    table = po.table(fit.curve("a", by="b")).set_index(["a", "b"]).estimate
    shares = data.groupby(["a", "b"]).y.mean()
    for cell, share in shares.items():
        assert table[cell] == pytest.approx(share, abs=1e-6)


def test_an_average_that_needs_nobody_is_not_known_and_others_are(hole):
    effects = po.table(hole.effects()).set_index("predictor").estimate
    assert math.isnan(effects["a"])
    assert math.isnan(effects["b"])
    assert not math.isnan(effects["x"])


@pytest.mark.parametrize("others", ["observed", {"b": "v"}])
def test_a_change_that_the_rows_leave_open_is_refused(hole, others):
    with pytest.raises(po.QuestionRefused, match="leave open what this change does"):
        hole.change("a", "no", "yes", others=others)
    held = hole.change("a", "no", "yes", others={"b": "u"})
    assert held.comparison.risk_difference.lower > 0


def test_columns_that_repeat_each_other_leave_their_effects_open(data):
    fit = fitted("y ~ b + x + twice", data)
    effects = po.table(fit.effects()).set_index("predictor").estimate
    assert math.isnan(effects["x"])
    assert math.isnan(effects["twice"])
    assert not math.isnan(effects["b"])
    single = po.table(fitted("y ~ b + x", data).effects()).set_index("predictor").estimate
    assert effects["b"] == pytest.approx(single["b"], rel=1e-6)


def test_every_answer_says_that_something_is_left_open(hole, data):
    for answer in (hole.odds(), hole.curve("x"), hole.effects(), hole.profile()):
        assert "the data leave some figures open" in str(po.words(answer))
        po.draw(answer)
    assert "leave some figures open" not in str(po.words(fitted("y ~ a + b", data).odds()))


def test_few_clusters_leave_nothing_open():
    mains = po.demo.tessel_bay(rows=1_500)
    groups = mains["district"].cat.codes % 4
    result = smf.logit("burst ~ age_years * material + soil", mains).fit(
        disp=0, cov_type="cluster", cov_kwds={"groups": groups}
    )
    fit = po.FittedLogit(result)
    # four clusters make a covariance of rank four at most, and yet every row tells
    assert np.linalg.matrix_rank(result.cov_params().to_numpy()) < len(result.params)
    assert po.table(fit.effects()).estimate.notna().all()
    assert po.table(fit.curve("age_years")).estimate.notna().all()
