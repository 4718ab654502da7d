"""c and DeLong's interval."""

import math

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from scipy.stats import norm
from sklearn.metrics import roc_auc_score

from plainodds.answers.checks.discrimination import concordance, discrimination_of
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of


def drawn(n=200, ties=False, seed=0):
    rng = np.random.default_rng(seed)
    eta = rng.normal(size=n)
    if ties:
        eta = np.round(eta, 0)
    y = (rng.uniform(size=n) < 1 / (1 + np.exp(-eta))).astype(float)
    return eta, y


def pair_by_pair(eta, y):
    """DeLong, DeLong & Clarke-Pearson's variance as they write it: every event with every other."""
    event, other = eta[y == 1], eta[y == 0]
    wins = (event[:, None] > other) + 0.5 * (event[:, None] == other)
    c = wins.mean()
    of_events, of_others = wins.mean(axis=1), wins.mean(axis=0)
    return c, of_events.var(ddof=1) / len(event) + of_others.var(ddof=1) / len(other)


@pytest.mark.parametrize("ties", [False, True])
def test_c_and_its_variance_are_those_of_all_pairs(ties):
    eta, y = drawn(ties=ties)
    c, variance = pair_by_pair(eta, y)
    assert concordance(eta, y, 1 - y) == pytest.approx((c, variance), rel=1e-10)
    assert c == pytest.approx(roc_auc_score(y, eta))


def test_the_standard_error_is_the_bootstraps():
    eta, y = drawn(400)
    rng = np.random.default_rng(1)
    again = []
    for _ in range(600):
        times = np.bincount(rng.integers(400, size=400), minlength=400)
        again.append(concordance(eta, times * y, times * (1 - y))[0])
    assert math.sqrt(concordance(eta, y, 1 - y)[1]) == pytest.approx(np.std(again), rel=0.1)


def test_counted_cases_are_rows_written_out():
    rng = np.random.default_rng(0)
    eta, events, others = rng.normal(size=30), rng.integers(0, 9, 30), rng.integers(0, 9, 30)
    long = np.concatenate([np.repeat(eta, events), np.repeat(eta, others)])
    y = np.repeat([1, 0], [events.sum(), others.sum()])
    found = concordance(eta, events.astype(float), others.astype(float))
    assert found == pytest.approx(pair_by_pair(long, y), rel=1e-10)
    assert found[0] == pytest.approx(
        roc_auc_score(np.repeat([1, 0], 30), np.tile(eta, 2), sample_weight=[*events, *others])
    )


def test_the_interval_is_on_the_logit_scale():
    model = logit("y ~ x + w", invented(300))
    c = discrimination_of(model, 0.9).evidence.c
    reach = norm.ppf(0.95) * c.se / (c.estimate * (1 - c.estimate))
    middle = math.log(c.estimate / (1 - c.estimate))
    assert (c.lower, c.upper) == pytest.approx(
        (1 / (1 + math.exp(reach - middle)), 1 / (1 + math.exp(-reach - middle)))
    )


def test_the_interval_holds_the_truth_as_often_as_it_says():
    far = np.random.default_rng(99).normal(size=(2, 400_000))
    truth = norm.cdf(1 / math.sqrt(2))
    assert np.mean(far[0] + 1 > far[1]) == pytest.approx(truth, abs=0.002)
    held = []
    for seed in range(400):
        rng = np.random.default_rng(seed)
        y = np.repeat([1.0, 0.0], [60, 90])
        c, variance = concordance(rng.normal(size=150) + y, y, 1 - y)
        held.append(abs(c - truth) < 1.96 * math.sqrt(variance))
    assert np.mean(held) == pytest.approx(0.95, abs=0.03)


def test_events_and_others_are_counted_along_the_chance():
    data = invented(500)
    evidence = discrimination_of(logit("y ~ x + w", data), 0.95).evidence
    assert len(evidence.edges) == len(evidence.events) + 1
    assert sum(evidence.events) == data.y.sum()
    assert sum(evidence.others) == 500 - data.y.sum()


def test_noise_is_no_better_than_chance():
    data = invented(300).assign(noise=np.random.default_rng(5).normal(size=300))
    found = discrimination_of(logit("y ~ noise", data), 0.95)
    assert (found.concern, found.reasons) == ("keep in mind", ("no better than chance",))
    assert discrimination_of(logit("y ~ x + w", data), 0.95).concern == "nothing found"


def test_chances_that_are_all_the_same_rank_nothing():
    y = np.arange(40) % 2.0
    c, variance = concordance(np.zeros(40), y, 1 - y)
    assert c == 0.5
    assert variance == 0.0


def test_perfect_ranks_have_no_interval():
    x = np.linspace(-1, 1, 60)
    data = invented(60).assign(x=x, y=(x > 0.01).astype(int))
    model = model_of(smf.glm("y ~ x", data, family=binomial()).fit())
    found = discrimination_of(model, 0.95)
    assert found.evidence.c.estimate == 1
    assert found.evidence.c.lower is None
    assert found.concern == "nothing found"


def test_rows_that_belong_together_have_no_interval_of_strangers():
    data = invented(300)
    result = smf.gee("y ~ x", np.arange(300) // 3, data, family=binomial()).fit()
    found = discrimination_of(model_of(result), 0.95)
    assert (found.concern, found.unknown) == ("not known", "no likelihood")
    assert found.evidence.c.se is None
    assert found.evidence.c.estimate == pytest.approx(roc_auc_score(data.y, result.fittedvalues))


def test_c_is_the_same_for_rows_chosen_by_outcome():
    data = invented(300)
    plain = discrimination_of(logit("y ~ x", data), 0.95)
    chosen = discrimination_of(logit("y ~ x", data, sampling="case-control"), 0.95)
    assert plain == chosen


def test_without_an_outcome_nothing_is_known():
    data = invented(100)
    result = smf.logit("y ~ x", data).fit(disp=0)
    result.remove_data()
    found = discrimination_of(model_of(result, data=data), 0.95)
    assert (found.concern, found.unknown) == ("not known", "no outcome")


def test_grouped_counts_and_models_without_an_intercept_have_a_c():
    data = invented(600)
    cells = data.groupby(["count", "group"]).y.agg(["sum", "size"]).reset_index()
    cells["rest"] = cells["size"] - cells["sum"]
    grouped = smf.glm("sum + rest ~ count + group", cells, family=binomial()).fit(tol=1e-12)
    single = logit("y ~ count + group", data)
    one, other = (discrimination_of(each, 0.95) for each in (model_of(grouped), single))
    assert one.evidence.c.estimate == pytest.approx(other.evidence.c.estimate)
    assert one.evidence.c.se == pytest.approx(other.evidence.c.se)
    through_zero = model_of(sm.Logit(data.y, data[["x", "w"]]).fit(disp=0))
    assert discrimination_of(through_zero, 0.95).evidence.c.estimate > 0.5


def test_the_finding_goes_to_json_and_back():
    found = discrimination_of(logit("y ~ x", invented(100)), 0.95)
    assert from_json(to_json(found)) == found
