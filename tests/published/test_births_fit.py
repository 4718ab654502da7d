"""Low birth weight: Hosmer & Lemeshow's statistic, and other figures of the whole fit.

The ten groups and the statistic are the example of a manual of statistics, as remembered; they
were reproduced by the independent calculation in the first test to the digits shown.
"""

import numpy as np
import pytest
import statsmodels.formula.api as smf
from scipy.stats import chi2
from sklearn.metrics import brier_score_loss, roc_auc_score

import plainodds as po
from plainodds.answers.checks.calibration import calibration_of
from plainodds.answers.checks.discrimination import discrimination_of
from plainodds.answers.checks.overall import overall_of
from tests.published.data import births

EVENTS = [0, 2, 6, 1, 7, 7, 6, 7, 10, 13]
EXPECTED = [1.2, 2.0, 3.2, 4.3, 4.9, 5.6, 6.5, 8.2, 10.3, 12.8]


@pytest.fixture(scope="module")
def result():
    formula = "low ~ age + lwt + race + smoke + ptl + ht + ui"
    return smf.logit(formula, births()).fit(disp=0, tol=1e-12)


@pytest.fixture(scope="module")
def model(result):
    return po.FittedLogit(result).model


def written_out(chance, low):
    """Ten groups by quantiles of the chance, all rows at a quantile in the lower group."""
    cuts = np.quantile(chance, np.arange(1, 10) / 10, method="averaged_inverted_cdf")
    group = np.searchsorted(cuts, chance, side="left")
    cases, events, expected = (
        np.bincount(group, each) for each in (np.ones(len(chance)), low, chance)
    )
    others = cases - expected
    return float(np.sum((events - expected) ** 2 * (1 / expected + 1 / others)))


@pytest.mark.parametrize(
    ("formula", "digits"),
    [
        ("low ~ age + lwt + race + smoke + ptl + ht + ui", 9.65),
        ("low ~ age + lwt + race + ftv", None),
    ],
)
def test_the_statistic_is_the_published_one_and_that_of_a_direct_calculation(formula, digits):
    mothers = births()
    fitted = smf.logit(formula, mothers).fit(disp=0, tol=1e-12)
    evidence = overall_of(po.FittedLogit(fitted).model).evidence
    direct = written_out(fitted.predict(), mothers.low)
    assert evidence.statistic == pytest.approx(direct, rel=1e-8)
    assert evidence.p_value == pytest.approx(chi2.sf(direct, 8))
    if digits:
        assert evidence.statistic == pytest.approx(digits, abs=5e-3)
        assert evidence.p_value == pytest.approx(0.2904, abs=2e-4)


def test_the_ten_groups_are_the_published_ones(model):
    bins = calibration_of(model, 0.95).evidence.bins
    assert [each.events for each in bins] == EVENTS
    assert [each.cases for each in bins] == [19] * 9 + [18]
    assert [each.cases * each.expected for each in bins] == pytest.approx(EXPECTED, abs=0.051)


def test_c_and_the_brier_score_are_sklearns(result, model):
    low = births().low
    assert discrimination_of(model, 0.95).evidence.c.estimate == pytest.approx(
        roc_auc_score(low, result.predict())
    )
    assert calibration_of(model, 0.95).evidence.brier == pytest.approx(
        brier_score_loss(low, result.predict())
    )


def test_mcfaddens_is_the_results_own(result, model):
    assert overall_of(model).evidence.mcfadden == pytest.approx(result.prsquared)
