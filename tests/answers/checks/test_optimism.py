"""How much better a fit looks on its own data than on others."""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from sklearn.linear_model import LogisticRegression
from sklearn.metrics import brier_score_loss, roc_auc_score
from sklearn.model_selection import StratifiedKFold, cross_val_predict

from plainodds.answers.checks.optimism import optimism_of, performance_of
from plainodds.answers.progress import Stopped
from plainodds.errors import QuestionRefused
from tests.answers.checks.fits import binomial, invented, logit, model_of


def overfitted(rows=120, noise=10, seed=0):
    rng = np.random.default_rng(10_000 + seed)
    data = invented(rows, seed=seed).assign(
        **{f"noise_{n}": rng.normal(size=rows) for n in range(noise)}
    )
    return data, logit("y ~ x + w + " + " + ".join(f"noise_{n}" for n in range(noise)), data)


@pytest.mark.parametrize("way", ["bootstrap", "cross-validation"])
def test_the_same_seed_gives_the_same_answer_and_another_one_another(way):
    model = logit("y ~ x + w", invented(200))
    one, again, other = (optimism_of(model, way, 5, seed) for seed in (1, 1, 2))
    assert one == again
    assert one != other
    assert (one.way, one.repeats, one.failed) == (way, 5, 0)


@pytest.mark.parametrize("way", ["bootstrap", "cross-validation"])
def test_an_overfitted_model_loses_and_one_of_many_rows_keeps_what_it_shows(way):
    _, much = overfitted()
    found = optimism_of(much, way, 15, 0)
    assert found.slope < 0.85
    little = logit("y ~ x + w", invented(5000))
    assert optimism_of(little, way, 5, 0).slope == pytest.approx(1, abs=0.03)


def test_what_is_left_is_nearer_to_what_other_cases_show():
    left, shown, new = [], [], []
    for seed in range(12):
        data, model = overfitted(200, 5, seed)
        fresh, other = overfitted(4000, 5, 1000 + seed)
        found = optimism_of(model, "bootstrap", 20, 0)
        left.append((found.slope, found.brier, found.c))
        for kept, cases, seen in ((shown, data, model), (new, fresh, other)):
            y = cases.y.to_numpy(dtype=float)
            eta = seen.sample.matrix @ model.coefficients
            kept.append(performance_of(eta, y, 1 - y).plain())
    left, shown, new = (np.mean(each, axis=0) for each in (left, shown, new))
    assert (np.abs(left - new) < 0.6 * np.abs(shown - new)).all()


def test_cross_validation_is_sklearns():
    data = invented(300)
    data[["x", "w"]] -= data[["x", "w"]].mean()
    found = optimism_of(logit("y ~ x + w", data), "cross-validation", 12, 0)
    learner = LogisticRegression(C=np.inf, solver="newton-cholesky")
    scores = []
    for seed in range(12):
        chance = cross_val_predict(
            learner,
            data[["x", "w"]],
            data.y,
            cv=StratifiedKFold(10, shuffle=True, random_state=seed),
            method="predict_proba",
        )[:, 1]
        scores.append((brier_score_loss(data.y, chance), roc_auc_score(data.y, chance)))
    assert (found.brier, found.c) == pytest.approx(np.mean(scores, axis=0), abs=0.003)


def test_performance_is_statsmodels_and_sklearns():
    data = invented(300)
    eta, y = ((data.x - 45) / 7).to_numpy(), data.y.to_numpy(dtype=float)
    found = performance_of(eta, y, 1 - y)
    pi = 1 / (1 + np.exp(-eta))
    slope = sm.Logit(y, sm.add_constant(eta)).fit(disp=0).params[1]
    assert found.plain() == pytest.approx(
        (slope, brier_score_loss(y, pi), roc_auc_score(y, eta)), rel=1e-6
    )


@pytest.mark.parametrize("way", ["bootstrap", "cross-validation"])
def test_counted_cases_are_resampled_one_by_one(way):
    data = invented(600).assign(x=lambda frame: frame.x.round(-1))
    cells = data.groupby(["x", "count"]).y.agg(["sum", "size"]).reset_index()
    cells["rest"] = cells["size"] - cells["sum"]
    grouped = model_of(smf.glm("sum + rest ~ x + count", cells, family=binomial()).fit())
    one = optimism_of(grouped, way, 40, 0)
    other = optimism_of(logit("y ~ x + count", data), way, 40, 0)
    assert one.slope == pytest.approx(other.slope, abs=0.03)
    assert one.brier == pytest.approx(other.brier, abs=0.002)
    assert one.c == pytest.approx(other.c, abs=0.01)


@pytest.mark.parametrize("way", ["bootstrap", "cross-validation"])
def test_offsets_and_weights_that_are_no_counts_are_kept(way):
    data = invented(300)
    rng = np.random.default_rng(1)
    weights, offset = rng.uniform(0.5, 2, 300), np.linspace(-2, 2, 300)
    data["y"] = rng.uniform(size=300) < 1 / (1 + np.exp(-offset - (data.x - 50) / 10))
    data["y"] = data.y.astype(int)
    result = smf.glm("y ~ x + w", data, family=binomial(), freq_weights=weights, offset=offset)
    found = optimism_of(model_of(result.fit()), way, 6, 0)
    assert found.failed == 0
    assert 0.7 < found.slope < 1.1


def test_resamples_that_cannot_be_fitted_are_counted():
    # one of the few rare cases is missing from many a resample, and then outcomes are separated
    data = invented(120).assign(rare=lambda frame: (np.arange(120) < 4).astype(int))
    data.loc[:3, "y"] = [0, 1, 1, 1]
    found = optimism_of(logit("y ~ x + rare", data), "bootstrap", 30, 0)
    assert found.repeats + found.failed == 30
    assert found.failed > 3
    assert np.isfinite(found.slope)


def test_a_fit_with_a_column_too_many_is_refitted_like_itself():
    data = invented(300)
    X = sm.add_constant(data[["x", "w"]])
    result = sm.GLM(data.y, X.assign(twice=2 * data.x), family=binomial()).fit()
    one = optimism_of(model_of(result), "bootstrap", 5, 0)
    other = optimism_of(model_of(sm.Logit(data.y, X).fit(disp=0)), "bootstrap", 5, 0)
    assert one.failed == 0
    assert one.slope == pytest.approx(other.slope, rel=1e-4)


def test_where_none_can_be_fitted_nothing_is_known():
    x = np.linspace(-1, 1, 60)
    data = invented(60).assign(x=x, y=(x > 0.01).astype(int))
    model = model_of(smf.glm("y ~ x", data, family=binomial()).fit())
    found = optimism_of(model, "bootstrap", 3, 0)
    assert (found.repeats, found.failed) == (0, 3)
    assert np.isnan(found.slope)


@pytest.mark.parametrize("way", ["bootstrap", "cross-validation"])
def test_progress_is_told_after_each_repeat_and_can_stop(way):
    told = []

    def progress(done, parts):
        told.append((done, parts))
        if done == 3:
            raise Stopped

    with pytest.raises(Stopped):
        optimism_of(logit("y ~ x", invented(100)), way, 9, 0, progress)
    assert told == [(1, 9), (2, 9), (3, 9)]


def test_fits_of_another_kind_are_refused_with_the_reason():
    data = invented(200)
    groups = np.arange(200) // 4
    removed = smf.logit("y ~ x", data).fit(disp=0)
    removed.remove_data()
    for model, reason in (
        (model_of(smf.gee("y ~ x", groups, data, family=binomial()).fit()), "maximum likelihood"),
        (model_of(smf.logit("y ~ x", data).fit_regularized(alpha=0.1, disp=0)), "penalised"),
        (model_of(removed, data=data), "outcome"),
    ):
        with pytest.raises(QuestionRefused, match=reason) as refusal:
            optimism_of(model, "bootstrap", 3)
        assert "optimism='none'" in str(refusal.value)


def test_chances_that_are_all_the_same_have_no_slope():
    y = np.arange(20) % 2.0
    found = performance_of(np.zeros(20), y, 1 - y)
    assert np.isnan(found.slope)
    assert (found.brier, found.c) == (0.25, 0.5)
