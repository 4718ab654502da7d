"""Overall tests and measures."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf
from scipy.stats import chi2

from plainodds.answers.checks.overall import overall_of
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of


def test_hosmer_and_lemeshows_statistic_is_that_of_ten_written_out_groups():
    data = invented(500)
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    evidence = overall_of(model_of(result)).evidence
    fitted, events = result.predict(), data.y.to_numpy()
    order = np.argsort(fitted)
    total = 0.0
    for part in np.array_split(order, 10):
        chance, y = fitted[part], events[part]
        for observed, expected in ((y.sum(), chance.sum()), ((1 - y).sum(), (1 - chance).sum())):
            total += (observed - expected) ** 2 / expected
    assert evidence.statistic == pytest.approx(total)
    assert (evidence.groups, evidence.degrees_of_freedom) == (10, 8)
    assert evidence.p_value == pytest.approx(chi2.sf(evidence.statistic, 8))


def test_few_distinct_chances_make_few_groups():
    evidence = overall_of(logit("y ~ count", invented(500))).evidence
    assert (evidence.groups, evidence.degrees_of_freedom) == (4, 2)
    assert np.isfinite(evidence.p_value)
    evidence = overall_of(logit("y ~ C(count > 1)", invented(500))).evidence
    assert (evidence.groups, evidence.degrees_of_freedom) == (2, 0)
    assert np.isnan(evidence.p_value)


def test_under_a_right_model_the_tests_are_uniform():
    p = [
        (found.p_value, found.link_p_value)
        for seed in range(60)
        for found in [overall_of(logit("y ~ x + w + count", invented(500, seed=seed))).evidence]
    ]
    assert np.mean(p, axis=0) == pytest.approx([0.5, 0.5], abs=0.12)
    assert np.mean(np.array(p) < 0.1) < 0.2


def test_mcfaddens_is_statsmodels_also_with_an_offset():
    data = invented()
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    assert overall_of(model_of(result)).evidence.mcfadden == pytest.approx(result.prsquared)
    offset = np.linspace(-1, 1, len(data))
    held = smf.glm("y ~ x + w", data, family=binomial(), offset=offset).fit(tol=1e-12)
    nothing = smf.glm("y ~ 1", data, family=binomial(), offset=offset).fit(tol=1e-12)
    assert overall_of(model_of(held)).evidence.mcfadden == pytest.approx(1 - held.llf / nothing.llf)


def test_tjurs_is_the_difference_of_mean_chances():
    data = invented()
    result = smf.logit("y ~ x + w", data).fit(disp=0)
    means = pd.Series(result.predict()).groupby(data.y).mean()
    assert overall_of(model_of(result)).evidence.tjur == pytest.approx(means[1] - means[0])


def test_the_link_test_is_kept_in_mind_where_chances_are_off():
    found = overall_of(logit("y ~ x", invented(2000, bend=0.7)))
    assert (found.concern, found.reasons) == ("keep in mind", ("link test",))
    assert found.evidence.link_p_value < 0.01


def test_a_failed_overall_test_alone_is_no_verdict():
    found = overall_of(logit("y ~ x + w + count", invented(60_000, bend=0.05)))
    assert found.evidence.link_p_value < 0.01
    assert (found.concern, found.reasons) == ("nothing found", ())


def test_grouped_counts_are_single_cases():
    data = invented(1000)
    cells = data.groupby(["count", "group"]).y.agg(["sum", "size"]).reset_index()
    cells["rest"] = cells["size"] - cells["sum"]
    grouped = smf.glm("sum + rest ~ count + group", cells, family=binomial()).fit(tol=1e-12)
    one, other = (
        overall_of(each).evidence for each in (model_of(grouped), logit("y ~ count + group", data))
    )
    for name in ("statistic", "p_value", "tjur", "mcfadden", "link_p_value"):
        assert getattr(one, name) == pytest.approx(getattr(other, name), rel=1e-4)


def test_without_a_likelihood_there_are_measures_but_no_tests():
    data = invented(600)
    result = smf.gee("y ~ x", np.arange(600) // 3, data, family=binomial()).fit()
    found = overall_of(model_of(result))
    assert found.unknown == "no likelihood"
    assert np.isnan([found.evidence.p_value, found.evidence.link_p_value]).all()
    assert found.evidence.tjur > 0


def test_rows_chosen_by_outcome_are_said():
    assert overall_of(logit("y ~ x", invented(), sampling="case-control")).unknown == (
        "rows chosen by outcome"
    )


def test_without_an_outcome_nothing_is_known():
    data = invented(100)
    result = smf.logit("y ~ x", data).fit(disp=0)
    result.remove_data()
    found = overall_of(model_of(result, data=data))
    assert (found.concern, found.unknown, found.evidence) == ("not known", "no outcome", None)


def test_the_finding_goes_to_json_and_back():
    found = overall_of(logit("y ~ x", invented(100)))
    assert from_json(to_json(found)) == found
