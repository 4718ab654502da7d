"""Which rows carry the result: Pregibon's measures, and odds ratios without a pattern."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from hypothesis import given
from hypothesis import strategies as st

from plainodds.answers.changes import OddsQuestion, changes_asked, contrasts_of
from plainodds.answers.checks.influence import influence_of
from plainodds.answers.checks.leaving_out import leaving_out
from plainodds.model.patterns import patterns_of
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of
from tests.published.data import births, spector

SMALL = invented(80, seed=4)
FORMULA = "y ~ x + w + group"


def small(formula=FORMULA, frame=SMALL):
    return smf.glm(formula, frame, family=binomial()).fit(tol=1e-12)


def log_ratios(model, coefficients):
    return contrasts_of(model, list(changes_asked(model, OddsQuestion()))) @ coefficients


# --- measures ----------------------------------------------------------------------


def test_single_rows_have_the_measures_of_statsmodels():
    result = small()
    theirs, ours = result.get_influence(), leaving_out(model_of(result)).measures
    assert ours.leverage == pytest.approx(theirs.hat_matrix_diag, rel=1e-7)
    assert ours.delta_chi2 == pytest.approx(theirs.resid_studentized**2, rel=1e-6)
    k = len(result.params)
    assert ours.delta_beta == pytest.approx(k * theirs.cooks_distance[0], rel=1e-6)
    d2, h = result.resid_deviance**2, ours.leverage
    assert ours.delta_deviance == pytest.approx(d2 + result.resid_pearson**2 * h / (1 - h))


def test_a_pattern_of_many_rows_is_measured_as_one_row_of_counts():
    frame = invented(400, seed=2).assign(x=lambda f: f.x.round(-1))
    counts = frame.groupby(["x", "count"]).y.agg(events="sum", all="size").reset_index()
    counts["others"] = counts["all"] - counts.events
    by_case = model_of(small("y ~ x + count", frame))
    by_count = small("events + others ~ x + count", counts)
    theirs = by_count.get_influence()
    ours, patterns = leaving_out(by_case).measures, patterns_of(by_case)
    place = {key: at for at, key in enumerate(zip(counts.x, counts["count"], strict=True))}
    held = by_case.sample.columns
    keys = zip(held["x"][patterns.first], held["count"][patterns.first], strict=True)
    at = [place[key] for key in keys]
    assert ours.leverage == pytest.approx(theirs.hat_matrix_diag[at], rel=1e-6)
    assert ours.delta_chi2 == pytest.approx(theirs.resid_studentized[at] ** 2, rel=1e-6)
    own = leaving_out(model_of(by_count)).measures
    assert ours.delta_deviance == pytest.approx(own.delta_deviance[at], rel=1e-6)
    d2 = by_count.resid_deviance[at] ** 2
    extra = by_count.resid_pearson[at] ** 2 * ours.leverage / (1 - ours.leverage)
    assert ours.delta_deviance == pytest.approx(d2 + extra, rel=1e-6)


def test_a_frequency_weight_repeats_a_row():
    often = SMALL.index % 3 + 1
    weighted = smf.glm(FORMULA, SMALL, family=binomial(), freq_weights=often).fit(tol=1e-12)
    repeated = small(frame=SMALL.loc[SMALL.index.repeat(often)])
    one, other = (leaving_out(model_of(each)).measures for each in (weighted, repeated))
    assert one.delta_beta == pytest.approx(other.delta_beta, rel=1e-6)
    assert one.delta_deviance == pytest.approx(other.delta_deviance, rel=1e-6)


def test_leverages_sum_to_the_number_of_coefficients():
    fit = leaving_out(model_of(small()))
    assert fit.measures.leverage.sum() == pytest.approx(5)


def test_delta_beta_is_the_largest_move_of_any_contrast():
    fit = leaving_out(model_of(small()))
    steps = fit.steps(np.arange(len(SMALL)))
    information = np.linalg.inv(fit.inverse)
    assert fit.measures.delta_beta == pytest.approx(
        np.einsum("ij,jk,ik->i", steps, information, steps), rel=1e-6
    )


@given(contrast=st.lists(st.integers(-3, 3), min_size=5, max_size=5).filter(any))
def test_no_contrast_moves_by_more_standard_errors_than_delta_beta_tells(contrast):
    fit = leaving_out(model_of(RESULT))
    steps = fit.steps(np.arange(len(SMALL))) @ contrast
    se = np.sqrt(np.array(contrast) @ fit.inverse @ contrast)
    assert ((steps / se) ** 2 <= fit.measures.delta_beta * (1 + 1e-6) + 1e-12).all()


RESULT = small()


def test_a_pattern_that_alone_carries_a_coefficient_cannot_be_left_out():
    frame = SMALL.assign(group=np.where(SMALL.index < 12, "lone", SMALL.group))
    frame.loc[frame.group == "lone", ["x", "w"]] = 50.0, 4.0
    frame.loc[frame.group == "lone", "y"] = np.arange(12) % 2
    model = model_of(small(frame=frame))
    fit = leaving_out(model)
    (lone,) = np.nonzero(fit.measures.alone)[0]
    assert patterns_of(model).cases[lone] == 12
    assert fit.measures.leverage[lone] == pytest.approx(1)
    assert fit.measures.delta_chi2[lone] == fit.measures.delta_beta[lone] == 0
    assert all(each.cases < 12 for each in influence_of(model).evidence.standing_out)


# --- odds ratios without a pattern -------------------------------------------------


@pytest.mark.parametrize("pattern", [0, 17, 55])
def test_a_refit_is_the_fit_without_the_rows(pattern):
    fit = leaving_out(model_of(small()))
    without = small(frame=SMALL.drop(index=pattern))
    assert fit.refitted(pattern) == pytest.approx(without.params.to_numpy(), abs=1e-7)
    inverse = fit.inverse_without(pattern, without.params.to_numpy())
    assert inverse == pytest.approx(without.cov_params().to_numpy(), rel=1e-5, abs=1e-9)


def test_one_step_is_one_step_of_newtons_method():
    result = small()
    fit = leaving_out(model_of(result))
    X, y, pi = fit.X[1:], SMALL.y.to_numpy()[1:], fit.probability[1:]
    step = np.linalg.solve(X.T @ (X * (pi * (1 - pi))[:, None]), X.T @ (y - pi))
    assert fit.steps(np.array([0]))[0] == pytest.approx(step, rel=1e-5)


def test_an_offset_stays_where_it_is_when_a_row_goes():
    offset = np.linspace(-2, 2, len(SMALL))
    result = smf.glm("y ~ x + w", SMALL, family=binomial(), offset=offset).fit(tol=1e-12)
    without = smf.glm("y ~ x + w", SMALL[1:], family=binomial(), offset=offset[1:]).fit(tol=1e-12)
    fit = leaving_out(model_of(result))
    assert fit.refitted(0) == pytest.approx(without.params.to_numpy(), abs=1e-7)


def test_without_an_intercept_it_is_the_same():
    fit = leaving_out(model_of(small("y ~ 0 + x + w")))
    without = small("y ~ 0 + x + w", SMALL[1:])
    assert fit.refitted(0) == pytest.approx(without.params.to_numpy(), abs=1e-7)


def test_the_odds_ratios_told_are_before_by_a_step_and_refitted():
    frame = spector()
    model = logit("GRADE ~ GPA + TUCE + PSI", frame)
    found = influence_of(model).evidence.standing_out[0]
    (label,) = found.labels
    without = logit("GRADE ~ GPA + TUCE + PSI", frame.drop(index=int(label)))
    changes = list(changes_asked(model, OddsQuestion()))
    fit = leaving_out(model)
    step = fit.steps(np.array([frame.index.get_loc(int(label))]))[0]
    told = {each.predictor: each for each in found.moved}
    assert len(told) == 3
    for change, before, stepped, refitted in zip(
        changes,
        np.exp(log_ratios(model, model.coefficients)),
        np.exp(log_ratios(model, model.coefficients + step)),
        np.exp(log_ratios(model, without.coefficients)),
        strict=True,
    ):
        moved = told[change.predictor]
        assert (moved.start, moved.end) == (change.start, change.end)
        assert moved.odds_ratio == pytest.approx(before)
        assert moved.one_step == pytest.approx(stepped)
        assert moved.refitted == pytest.approx(refitted, rel=1e-5)


def test_the_most_moving_of_all_patterns_come_first():
    model = logit("low ~ age + lwt + race + smoke + ui", births())
    fit = leaving_out(model)
    contrasts = contrasts_of(model, list(changes_asked(model, OddsQuestion())))
    se = np.sqrt(np.einsum("ij,jk,ik->i", contrasts, fit.inverse, contrasts))
    moves = np.abs(fit.steps(np.arange(len(fit.X))) @ contrasts.T / se).max(axis=1)
    expected = np.argsort(-moves)[:10]
    names = [str(births().index[patterns_of(model).first[at]]) for at in expected]
    assert [each.labels[0] for each in influence_of(model).evidence.standing_out] == names


def test_where_nothing_is_left_to_fit_there_is_no_refit():
    # one event at a level: without it the level has none
    frame = invented(300, seed=5)
    rare = frame.head(12).assign(group="rare", y=[1] + [0] * 11)
    model = logit("y ~ x + group", pd.concat([frame, rare], ignore_index=True))
    found = influence_of(model).evidence.standing_out[0]
    assert (found.labels, found.events) == (("300",), 1)
    assert found.moved[0].end == "rare"
    assert np.isnan(found.moved[0].refitted)
    assert found.moved[0].one_step < found.moved[0].odds_ratio


def test_a_pattern_is_told_by_its_labels_and_values():
    frame = SMALL.set_index(pd.Index([f"patient {at}" for at in range(len(SMALL))]))
    first = influence_of(logit("y ~ x + count + group", frame)).evidence.standing_out[0]
    row = frame.loc[first.labels[0]]
    assert dict(first.values) == {"x": row.x, "count": row["count"], "group": row.group}
    assert isinstance(dict(first.values)["count"], int)
    assert first.events == row.y


# --- concerns ----------------------------------------------------------------------


def test_five_hundred_ordinary_rows_raise_none():
    found = influence_of(logit(FORMULA, invented(500)))
    assert (found.concern, found.reasons, found.about) == ("nothing found", (), ())
    assert len(found.evidence.standing_out) == 10


def test_one_row_that_moves_an_odds_ratio_by_more_than_its_standard_error_raises_one():
    frame = invented(500)
    frame.loc[500] = {"x": 50.0, "w": 90.0, "count": 1, "group": "p", "y": 0}
    found = influence_of(logit(FORMULA, frame))
    assert (found.concern, found.reasons) == ("keep in mind", ("moves an odds ratio",))
    assert found.about == ("w",)
    assert found.evidence.standing_out[0].labels == ("500",)


def against_the_rest(rows):
    """Rows of one pattern, of a thousand, that turn the odds ratio of x round."""
    draw = np.random.default_rng(0)
    x = draw.normal(0, 0.3, 1000 - rows)
    y = (draw.uniform(size=len(x)) < 1 / (1 + np.exp(0.2 + 0.7 * x))).astype(int)
    one = pd.DataFrame({"x": np.full(rows, 12.0), "y": 1})
    return pd.concat([pd.DataFrame({"x": x, "y": y}), one], ignore_index=True)


def test_a_pattern_of_few_cases_that_turns_an_odds_ratio_forbids_explaining():
    found = influence_of(logit("y ~ x", against_the_rest(10)))
    assert found.concern == "don't explain yet"
    assert found.reasons == ("turns an odds ratio", "moves an odds ratio")
    moved = found.evidence.standing_out[0].moved[0]
    assert moved.odds_ratio > 1 > moved.refitted


def test_what_a_pattern_of_many_cases_says_is_a_result_and_no_concern():
    assert influence_of(logit("y ~ x", against_the_rest(40))).concern == "nothing found"


def test_categories_alone_raise_none():
    found = influence_of(logit("y ~ group + C(count)", invented(500)))
    assert found.concern == "nothing found"
    assert found.evidence.patterns == 12
    assert found.evidence.standing_out == ()


def test_rows_of_counts_are_looked_at_and_raise_none():
    frame = pd.DataFrame({"dead": [1, 4, 9, 13, 18, 20], "dose": range(6)})
    frame["alive"] = 20 - frame.dead
    found = influence_of(model_of(smf.glm("dead + alive ~ dose", frame, family=binomial()).fit()))
    assert found.concern == "nothing found"
    assert len(found.evidence.standing_out) == 6
    assert all(each.cases == 20 for each in found.evidence.standing_out)


def test_the_odds_ratio_of_a_chosen_sample_is_not_moved_by_its_prevalence():
    plain = influence_of(logit("y ~ x", SMALL))
    stated = influence_of(logit("y ~ x", SMALL, sampling="case-control", prevalence=0.01))
    assert plain == stated


# --- the picture -------------------------------------------------------------------


def test_up_to_two_thousand_patterns_are_pictured_with_all_that_stand_out():
    frame = invented(3000)
    found = influence_of(logit("y ~ x + w", frame)).evidence
    assert (found.patterns, found.thinned) == (3000, True)
    assert len(found.probability) == len(found.delta_chi2) == len(found.delta_beta) == 2000
    assert {each.delta_beta for each in found.standing_out} <= set(found.delta_beta)
    whole = leaving_out(logit("y ~ x + w", frame)).measures
    assert max(found.delta_beta) == whole.delta_beta.max()
    assert max(found.delta_chi2) == whole.delta_chi2.max()


def test_few_patterns_are_pictured_all():
    found = influence_of(logit("y ~ x + w", SMALL)).evidence
    assert (len(found.probability), found.thinned) == (80, False)


# --- what cannot be known ----------------------------------------------------------


def test_without_an_outcome_nothing_is_known():
    result = small()
    result.remove_data()
    found = influence_of(model_of(result, data=SMALL))
    assert (found.concern, found.unknown, found.evidence) == ("not known", "no outcome", None)


def test_of_a_penalised_fit_nothing_is_known():
    result = smf.logit(FORMULA, SMALL).fit_regularized(alpha=2.0, disp=0)
    found = influence_of(model_of(result))
    assert (found.concern, found.unknown) == ("not known", "no likelihood")


def test_a_gee_that_takes_rows_as_strangers_is_at_the_likelihoods_maximum():
    groups = np.arange(len(SMALL)) // 4
    alone = sm.cov_struct.Independence()
    result = smf.gee("y ~ x + w", groups, SMALL, family=binomial(), cov_struct=alone).fit()
    assert influence_of(model_of(result)).evidence.patterns == len(SMALL)


@pytest.mark.filterwarnings("ignore")
def test_where_every_outcome_is_told_without_fail_nothing_is_known():
    frame = SMALL.assign(y=(SMALL.x > SMALL.x.median()).astype(int))
    found = influence_of(model_of(small("y ~ x + w", frame)))
    assert (found.concern, found.unknown) == ("not known", "no likelihood")


@pytest.mark.filterwarnings("ignore")
def test_a_level_without_events_leaves_the_other_odds_ratios_to_their_rows():
    frame = SMALL.assign(y=SMALL.y.where(SMALL.group != "q", 0))
    with_level = influence_of(model_of(small(frame=frame))).evidence
    rest = frame[frame.group != "q"]
    without = influence_of(model_of(small(frame=rest))).evidence
    assert {moved.end for each in with_level.standing_out for moved in each.moved} >= {"r"}
    assert "q" not in {moved.end for each in with_level.standing_out for moved in each.moved}
    by_label = {each.labels: each for each in without.standing_out}
    for each in with_level.standing_out[:5]:
        other = by_label[each.labels]
        assert each.delta_beta == pytest.approx(other.delta_beta, rel=1e-3)
        told = {(moved.predictor, moved.end): moved for moved in other.moved}
        for moved in each.moved:
            if moved.predictor == "group":
                same = told[moved.predictor, moved.end]
                assert moved.refitted == pytest.approx(same.refitted, rel=1e-3)


def test_the_finding_goes_to_json_and_back():
    found = influence_of(logit(FORMULA, SMALL))
    assert from_json(to_json(found)) == found
