"""Whether standard errors are there, and not absurd."""

import math
from dataclasses import replace

import numpy as np
import pytest

import plainodds as po
from plainodds.answers.checks.standard_errors import standard_errors_of
from tests.model import made

FRAME = made.cases()

pytestmark = pytest.mark.filterwarnings("ignore")


def found(result):
    return standard_errors_of(po.FittedLogit(result).model)


def test_ordinary_standard_errors_are_nothing_to_speak_of():
    result = made.logit("left ~ age + depth + site", FRAME).fit(disp=0)
    finding = found(result)
    assert (finding.concern, finding.evidence.wide) == ("nothing found", ())
    spread = np.asarray(result.model.exog).std(axis=0)
    assert finding.evidence.largest_per_spread == pytest.approx((result.bse * spread).max())


def test_missing_standard_errors_name_their_columns():
    frame = FRAME.assign(total=FRAME["age"] + FRAME["depth"])
    finding = found(made.logit("left ~ age + depth + total", frame).fit(disp=0, method="newton"))
    assert (finding.concern, finding.reasons) == ("don't explain yet", ("missing",))
    assert "total" in finding.about
    assert all(math.isnan(each.se) for each in finding.evidence.wide)
    assert {"total"} <= {each.column for each in finding.evidence.wide}


def test_the_standard_error_of_a_runaway_coefficient_is_absurd():
    frame = FRAME.assign(always=np.where(FRAME["left"] == 1, FRAME["site"] == "a", False) * 1)
    finding = found(made.glm("left ~ age + always", frame).fit())
    assert (finding.concern, finding.reasons) == ("don't explain yet", ("absurd",))
    assert finding.about == ("always",)
    (wide,) = finding.evidence.wide
    assert (wide.column, wide.predictors) == ("always", ("always",))
    assert wide.se_per_spread == pytest.approx(wide.se * frame["always"].std(ddof=0))


def test_two_near_copies_are_wide():
    draw = np.random.default_rng(2)
    frame = FRAME.assign(copy=FRAME["age"] + 1e-2 * draw.normal(size=len(FRAME)))
    finding = found(made.glm("left ~ age + copy", frame).fit())
    assert finding.reasons == ("absurd",)
    assert finding.about == ("age", "copy")


def test_the_parts_of_one_curve_may_be_wide_where_the_curve_is_not():
    result = made.glm("left ~ age + year + I(year ** 2)", FRAME).fit()
    finding = found(result)
    assert finding.evidence.largest_per_spread > 4
    assert (finding.concern, finding.evidence.wide) == ("nothing found", ())


def test_a_penalised_fit_has_none_to_look_at():
    finding = found(made.logit("left ~ age", FRAME).fit_regularized(alpha=0.1, disp=0))
    assert (finding.concern, finding.unknown) == ("not known", "no covariance")


def test_without_data_spreads_are_those_of_the_data_handed_over():
    result = made.glm("left ~ age + depth", FRAME).fit()
    whole = found(result)
    result.remove_data()
    again = standard_errors_of(po.FittedLogit(result, data=FRAME).model)
    assert replace(again, evidence=None) == replace(whole, evidence=None)
    assert again.evidence.wide == whole.evidence.wide
    # sums in another order differ in the last digit on some machines
    assert again.evidence.largest_per_spread == pytest.approx(
        whole.evidence.largest_per_spread, rel=1e-12
    )


def test_weights_count_in_the_spread():
    result = made.glm("left ~ age", FRAME, freq_weights=FRAME["visits"] + 1).fit()
    spread = np.sqrt(np.cov(FRAME["age"], fweights=FRAME["visits"] + 1, ddof=0))
    assert found(result).evidence.largest_per_spread == pytest.approx(result.bse["age"] * spread)
