"""Odds ratios of stated changes."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from hypothesis import given
from hypothesis import strategies as st

import plainodds as po


@pytest.fixture(scope="module")
def plain(pipes):
    return smf.logit("burst ~ age_years + material + pressure_m", pipes).fit(disp=0)


def rows_of(answer, predictor):
    return [row for row in answer.rows if row.predictor == predictor]


def test_a_linear_numbers_row_is_statsmodels_coefficient_times_the_step(plain):
    (row,) = po.FittedLogit(plain).odds("age_years", steps={"age_years": 10}).rows
    low, high = np.exp(10 * plain.conf_int().loc["age_years"])
    assert row.odds_ratio.estimate == pytest.approx(np.exp(10 * plain.params["age_years"]))
    assert (row.odds_ratio.lower, row.odds_ratio.upper) == pytest.approx((low, high))
    assert row.p_value == pytest.approx(plain.pvalues["age_years"])
    assert row.per_step


def test_the_odds_ratios_standard_error_is_the_delta_methods(plain):
    (row,) = po.FittedLogit(plain).odds("age_years").rows
    assert row.odds_ratio.se == pytest.approx(row.odds_ratio.estimate * row.log_odds_ratio.se)


def test_another_reference_needs_no_new_fit(plain, pipes):
    answer = po.FittedLogit(plain).odds("material", references={"material": "PVC"})
    refitted = smf.logit("burst ~ age_years + C(material, Treatment('PVC')) + pressure_m", pipes)
    params = refitted.fit(disp=0)
    for row in answer.rows:
        name = f"C(material, Treatment('PVC'))[T.{row.end}]"
        assert row.start == "PVC"
        assert row.log_odds_ratio.estimate == pytest.approx(params.params[name], abs=1e-6)
        assert row.log_odds_ratio.se == pytest.approx(params.bse[name], rel=1e-5)


def test_the_reference_is_the_codings_own_unless_another_is_named(pipes):
    coded = smf.logit("burst ~ C(material, Treatment('ductile iron'))", pipes).fit(disp=0)
    assert {row.start for row in po.FittedLogit(coded).odds().rows} == {"ductile iron"}


def test_the_reference_of_a_sum_coding_is_its_first_level(pipes):
    coded = smf.logit("burst ~ C(material, Sum)", pipes).fit(disp=0)
    treated = smf.logit("burst ~ material", pipes).fit(disp=0)
    ours, theirs = po.FittedLogit(coded).odds(), po.FittedLogit(treated).odds()
    for one, other in zip(ours.rows, theirs.rows, strict=True):
        assert (one.start, one.end) == (other.start, other.end)
        assert one.odds_ratio.estimate == pytest.approx(other.odds_ratio.estimate, rel=1e-5)


def test_a_curved_number_goes_from_its_lower_to_its_upper_quartile(fit, pipes):
    (row,) = fit.odds("pressure_m").rows
    assert (row.start, row.end) == pytest.approx(tuple(np.quantile(pipes.pressure_m, [0.25, 0.75])))
    assert not row.per_step


def test_a_curved_number_compares_the_two_values_asked_for(fit, result, pipes):
    (row,) = fit.odds("pressure_m", between={"pressure_m": (40, 70)}).rows
    typical = dict(fit.model.typical)
    at = [{**typical, "pressure_m": p} for p in (40, 70)]
    eta = [result.predict(po_frame(each), which="linear")[0] for each in at]
    assert row.log_odds_ratio.estimate == pytest.approx(eta[1] - eta[0])


def po_frame(values):
    import pandas as pd

    return pd.DataFrame([values])


def test_an_interacting_predictor_has_a_row_for_each_value_of_its_modifier(fit, result):
    rows = rows_of(fit.odds(steps={"age_years": 1}), "age_years")
    assert [dict(row.given)["material"] for row in rows] == ["cast iron", "ductile iron", "PVC"]
    params = result.params
    expected = [
        params["age_years"],
        params["age_years"] + params["age_years:material[T.ductile iron]"],
        params["age_years"] + params["age_years:material[T.PVC]"],
    ]
    assert [row.log_odds_ratio.estimate for row in rows] == pytest.approx(expected)


def test_the_product_terms_own_exponent_is_no_row(fit, result):
    product = np.exp(result.params["age_years:material[T.PVC]"])
    found = [row.odds_ratio.estimate for row in fit.odds(steps={"age_years": 1}).rows]
    assert not np.isclose(found, product, rtol=1e-9).any()


def test_modifiers_are_held_where_they_are_asked_to_be(fit):
    rows = fit.odds("material", given={"age_years": [20, 60]}).rows
    assert [row.given for row in rows] == [(("age_years", a),) for a in (20, 60)] * 2


def test_rows_can_be_ordered_by_size(fit):
    sizes = [abs(row.log_odds_ratio.estimate) for row in fit.odds(order="size").rows]
    assert sizes == sorted(sizes, reverse=True)


@given(step=st.floats(0.01, 100), scale=st.floats(0.01, 100))
def test_turning_the_change_round_inverts_the_odds_ratio(fit, step, scale):
    there = fit.odds("age_years", between={"age_years": (20, 20 + step)}).rows[0].odds_ratio
    back = fit.odds("age_years", between={"age_years": (20 + step, 20)}).rows[0].odds_ratio
    assert there.estimate == pytest.approx(1 / back.estimate)
    assert (there.lower, there.upper) == pytest.approx((1 / back.upper, 1 / back.lower))
    assert there.lower <= there.estimate <= there.upper


def test_units_do_not_matter(pipes, plain):
    months = smf.logit(
        "burst ~ months + material + pressure_m", pipes.assign(months=pipes.age_years * 12)
    ).fit(disp=0)
    in_years = po.FittedLogit(plain).odds("age_years", steps={"age_years": 10}).rows[0].odds_ratio
    in_months = po.FittedLogit(months).odds("months", steps={"months": 120}).rows[0].odds_ratio
    assert in_months.estimate == pytest.approx(in_years.estimate, rel=1e-5)
    assert in_months.lower == pytest.approx(in_years.lower, rel=1e-5)


def test_models_side_by_side_speak_of_the_same_change(pipes, plain):
    young = pipes[pipes.age_years < 50]
    other = smf.logit("burst ~ age_years + np.log(pressure_m)", young).fit(disp=0)
    answer = po.odds_of({"all": plain, "young": other}, ["age_years", "material"])
    ages = rows_of(answer, "age_years")
    assert [row.model for row in ages] == ["all", "young"]
    assert ages[0].end - ages[0].start == ages[1].end - ages[1].start
    assert {row.model for row in rows_of(answer, "material")} == {"all"}


def test_a_t_interval_is_used_where_the_result_uses_it(pipes):
    fitted = smf.glm("burst ~ age_years", pipes, family=sm.families.Binomial()).fit(
        cov_type="cluster", cov_kwds={"groups": pipes.district.astype(str)}, use_t=True
    )
    (row,) = po.FittedLogit(fitted).odds("age_years", steps={"age_years": 1}).rows
    low, high = fitted.conf_int().loc["age_years"]
    assert (row.log_odds_ratio.lower, row.log_odds_ratio.upper) == pytest.approx((low, high))
    assert row.p_value == pytest.approx(fitted.pvalues["age_years"])


@pytest.mark.parametrize(
    ("asked", "words"),
    [
        ({"predictors": "colour"}, ["no predictor 'colour'", "age_years"]),
        ({"steps": {"pressure_m": 5}}, ["pressure_m", "along a curve", "between="]),
        ({"steps": {"material": 1}}, ["material", "no step", "references="]),
        ({"steps": {"age_years": 0}}, ["age_years", "step=0"]),
        ({"steps": {"age_years": "ten"}}, ["age_years", "'ten'"]),
        ({"between": {"age_years": (20, 20)}}, ["age_years", "no change"]),
        ({"between": {"age_years": (20,)}}, ["age_years", "two values"]),
        ({"between": {"pressure_m": (1, 900)}}, ["pressure_m", "spline"]),
        ({"references": {"material": "lead"}}, ["material", "'lead'", "'PVC'"]),
        ({"references": {"age_years": 5}}, ["age_years", "between="]),
        ({"given": {"soil": ["low"]}}, ["soil", "shares no term"]),
        ({"given": {"material": ["lead"]}}, ["material", "'lead'"]),
        ({"order": "random"}, ["order='random'", "'size'"]),
        ({"level": 95}, ["level=95", "0.95"]),
    ],
)
def test_what_cannot_be_answered_is_refused_with_the_way_out(fit, asked, words):
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.odds(**asked)
    for word in words:
        assert word in str(refusal.value)


def test_many_ends_without_a_finite_estimate_are_left_out_unless_asked_for(monkeypatch):
    rng = np.random.default_rng(3)
    place = np.repeat([f"p{i}" for i in range(8)], 15)
    x = rng.normal(size=len(place))
    y = (rng.uniform(size=len(place)) < 0.4).astype(int)
    y[np.isin(place, ["p1", "p2"])] = 1
    data = pd.DataFrame({"x": x, "place": place, "y": y})
    result = smf.glm("y ~ x + place", data, family=sm.families.Binomial()).fit()

    def row(answer, level):
        return next(each for each in answer.rows if each.end == level)

    told = row(po.FittedLogit(result).odds(), "p1")
    assert told.odds_ratio.estimate == np.inf
    assert 1 < told.odds_ratio.lower < np.inf
    monkeypatch.setattr("plainodds.answers.bounded._DEAREST", 10.0)
    fit = po.FittedLogit(result)
    left_out = row(fit.odds(), "p1")
    assert left_out.odds_ratio.estimate == np.inf
    assert (left_out.odds_ratio.lower, left_out.p_value) == (None, None)
    assert "finite end is missing" in str(po.words(fit.odds()))
    assert row(fit.odds(interval="likelihood"), "p1").odds_ratio.lower == pytest.approx(
        told.odds_ratio.lower, rel=1e-6
    )
    po.draw(fit.odds())
