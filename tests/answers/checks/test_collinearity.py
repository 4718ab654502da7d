"""Ties between columns: constructed ones, and figures by numpy's decompositions."""

import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm

import plainodds as po
from plainodds.answers.checks.collinearity import collinearity_of
from tests.model import made

FRAME = made.cases()

pytestmark = pytest.mark.filterwarnings("ignore")


def found(formula, frame=FRAME, **settings):
    return collinearity_of(po.FittedLogit(made.glm(formula, frame, **settings).fit()).model)


def near_copy(noise, seed=0):
    draw = np.random.default_rng(seed)
    return FRAME.assign(copy=FRAME["age"] + noise * draw.normal(size=len(FRAME)))


def weighted_and_centred(formula, frame=FRAME):
    """The design without its intercept, its columns weighted, taken from their means, scaled."""
    result = made.glm(formula, frame).fit()
    matrix, weights = np.asarray(result.model.exog)[:, 1:], result.mu * (1 - result.mu)
    centred = matrix - np.average(matrix, axis=0, weights=weights)
    scaled = centred * np.sqrt(weights)[:, None]
    return scaled / np.linalg.norm(scaled, axis=0)


def test_ordinary_columns_are_not_tied():
    finding = found("left ~ age + depth + site + visits")
    assert (finding.concern, finding.reasons, finding.about) == ("nothing found", (), ())
    evidence = finding.evidence
    assert evidence.rank == evidence.columns == 6
    assert evidence.tied == ()
    assert {name for name, _ in evidence.inflation} == {"age", "depth", "site", "visits"}
    assert all(1 <= stretch < 1.2 for _, stretch in evidence.inflation)


@pytest.mark.parametrize("formula", ["left ~ age + depth + visits", "left ~ age + year + site"])
def test_the_condition_number_is_that_of_the_singular_values(formula):
    values = np.linalg.svd(weighted_and_centred(formula), compute_uv=False)
    assert found(formula).evidence.condition_number == pytest.approx(values[0] / values[-1])


def test_without_an_intercept_columns_are_taken_as_they_are():
    result = made.glm("left ~ age + depth - 1", FRAME).fit()
    scaled = np.asarray(result.model.exog) * np.sqrt(result.mu * (1 - result.mu))[:, None]
    values = np.linalg.svd(scaled / np.linalg.norm(scaled, axis=0), compute_uv=False)
    evidence = found("left ~ age + depth - 1").evidence
    assert evidence.condition_number == pytest.approx(values[0] / values[-1])


def test_inflation_of_a_number_is_the_root_of_its_variance_inflation_factor():
    frame = near_copy(1.0)
    scaled = weighted_and_centred("left ~ age + copy + depth", frame)
    expected = np.sqrt(np.diag(np.linalg.inv(scaled.T @ scaled)))
    inflation = dict(found("left ~ age + copy + depth", frame).evidence.inflation)
    np.testing.assert_allclose(list(inflation.values()), expected)


def test_inflation_of_a_category_is_of_all_its_columns_at_once():
    """Fox & Monette 1992: the factor by which the region's volume grows, per column."""
    scaled = weighted_and_centred("left ~ site + age + depth")
    R = scaled.T @ scaled
    volume = np.linalg.det(R[:2, :2]) * np.linalg.det(R[2:, 2:]) / np.linalg.det(R)
    inflation = dict(found("left ~ site + age + depth").evidence.inflation)
    assert inflation["site"] == pytest.approx(volume ** (1 / 4))


def test_a_near_copy_is_named():
    finding = found("left ~ age + copy + depth", near_copy(0.1))
    assert (finding.concern, finding.reasons) == ("keep in mind", ("tied",))
    assert finding.about == ("age", "copy")
    (tie,) = finding.evidence.tied
    assert set(tie.columns) == {"age", "copy"}
    assert tie.condition_index > 30


@pytest.mark.parametrize(("noise", "concern"), [(3.0, "nothing found"), (0.3, "keep in mind")])
def test_a_copy_counts_from_a_variance_inflated_tenfold(noise, concern):
    finding = found("left ~ age + copy", near_copy(noise))
    assert finding.concern == concern
    assert (max(stretch for _, stretch in finding.evidence.inflation) ** 2 > 10) == (
        concern != "nothing found"
    )


EXACT = {
    "a sum": ("left ~ age + depth + total + visits", {"age", "depth", "total"}),
    "a multiple": ("left ~ age + depth + double", {"age", "double"}),
    "two apart": ("left ~ age + double + depth + tenth", {"age", "double", "depth", "tenth"}),
}


@pytest.mark.parametrize("what", EXACT)
def test_columns_that_follow_from_others_are_named(what):
    formula, tied = EXACT[what]
    frame = FRAME.assign(
        total=FRAME["age"] + FRAME["depth"], double=2 * FRAME["age"], tenth=FRAME["depth"] / 10
    )
    finding = found(formula, frame)
    evidence = finding.evidence
    assert (finding.concern, finding.reasons) == ("don't explain yet", ("rank",))
    assert evidence.rank == evidence.columns - (2 if what == "two apart" else 1)
    assert evidence.rank == np.linalg.matrix_rank(made.glm(formula, frame).exog)
    assert math.isinf(evidence.condition_number)
    assert set(finding.about) == tied
    assert {column for tie in evidence.tied for column in tie.columns} == tied
    assert len(evidence.tied) == (2 if what == "two apart" else 1)
    free = dict(evidence.inflation)
    assert all(math.isinf(free[name]) == (name in tied) for name in free)


def test_a_column_of_noughts_is_no_column():
    finding = found("left ~ age + nothing", FRAME.assign(nothing=0.0))
    assert finding.reasons == ("rank",)
    assert [tie.columns for tie in finding.evidence.tied] == [("nothing",)]


def test_a_second_constant_is_tied_to_the_intercept():
    finding = found("left ~ age + same", FRAME.assign(same=4.0))
    assert finding.reasons == ("rank",)
    assert {c for tie in finding.evidence.tied for c in tie.columns} == {"Intercept", "same"}
    assert finding.about == ("same",)


QUIET = {
    "years, far from 0": "left ~ age + year",
    "a parabola of years": "left ~ age + year + I(year ** 2)",
    "a spline": "left ~ bs(age, df=5) + depth",
    "an interaction of numbers far from 0": "left ~ year * money + depth",
    "an interaction with a category": "left ~ year * site",
}


@pytest.mark.parametrize("what", QUIET)
def test_ties_within_what_is_told_together_do_not_count(what):
    finding = found(QUIET[what])
    assert (finding.concern, finding.evidence.tied) == ("nothing found", ())


def test_two_numbers_far_from_0_are_not_tied_for_that():
    frame = FRAME.assign(height=5_000.0 + FRAME["depth"])
    assert found("left ~ year + height", frame).concern == "nothing found"


def test_without_rows_of_an_outcome_ties_are_known_all_the_same():
    frame = near_copy(0.1)
    result = made.glm("left ~ age + copy", frame).fit()
    result.remove_data()
    finding = collinearity_of(po.FittedLogit(result, data=frame).model)
    assert finding.about == ("age", "copy")


def test_a_gee_and_arrays_are_looked_at_too():
    frame = near_copy(0.1)
    gee = collinearity_of(po.FittedLogit(made.gee("left ~ age + copy", frame).fit()).model)
    assert gee.about == ("age", "copy")
    X = sm.add_constant(pd.DataFrame({"age": frame["age"], "copy": frame["copy"]}))
    arrays = collinearity_of(po.FittedLogit(sm.Logit(frame["left"], X).fit(disp=0)).model)
    assert arrays.about == ("age", "copy")
