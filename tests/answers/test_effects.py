"""Marginal effects: averaged, at a profile, among some."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po

PLAIN = "burst ~ age_years + pressure_m + past_repairs"


@pytest.fixture(scope="module")
def plain(pipes):
    return smf.logit(PLAIN, pipes).fit(disp=0)


def effect_of(answer, predictor, end=None, by=None):
    (row,) = [
        row for row in answer.rows if row.predictor == predictor and row.end == end and row.by == by
    ]
    return row.effect


@pytest.mark.parametrize(("at", "others"), [("overall", "observed"), ("mean", "means")])
def test_where_statsmodels_margins_are_right_they_are_ours(plain, pipes, at, others):
    theirs = plain.get_margeff(at=at).summary_frame()
    # at the means every predictor must be able to take its mean
    fit = po.FittedLogit(plain)
    if others == "means":
        others = pipes[["age_years", "pressure_m", "past_repairs"]].mean().to_dict()
    ours = fit.effects(others=others)
    for name in ("age_years", "pressure_m", "past_repairs"):
        effect = effect_of(ours, name)
        assert effect.estimate == pytest.approx(theirs.loc[name, "dy/dx"], rel=1e-8)
        assert effect.se == pytest.approx(theirs.loc[name, "Std. Err."], rel=1e-6)
        assert effect.lower == pytest.approx(theirs.loc[name, "Conf. Int. Low"], rel=1e-6)


@pytest.mark.parametrize("name", ["age_years", "pressure_m", "past_repairs"])
def test_an_averaged_slope_is_the_numeric_derivative_of_the_plain_average(fit, result, pipes, name):
    inner = pipes[pipes.pressure_m.between(*np.quantile(pipes.pressure_m, [0.01, 0.99]))]
    mask = pipes.index.isin(inner.index)
    h = 1e-4
    up = result.predict(inner.assign(**{name: inner[name] + h})).mean()
    down = result.predict(inner.assign(**{name: inner[name] - h})).mean()
    found = effect_of(fit.effects(name, where=mask), name).estimate
    assert found == pytest.approx((up - down) / (2 * h), rel=1e-6)


def test_levels_are_compared_by_the_plain_loop(fit, result, pipes):
    answer = fit.effects("material")
    means = {
        level: result.predict(pipes.assign(material=level)).mean()
        for level in ("cast iron", "ductile iron", "PVC")
    }
    for level in ("ductile iron", "PVC"):
        expected = means[level] - means["cast iron"]
        assert effect_of(answer, "material", level).estimate == pytest.approx(expected)


def test_the_averages_standard_errors_are_the_numeric_delta_methods(fit, result, pipes):
    from dataclasses import replace

    from plainodds.answers.effects import EffectsQuestion, answer_effects

    question = EffectsQuestion()
    found = np.array([row.effect.se for row in fit.effects().rows])

    def values(coefficients):
        model = replace(fit.model, coefficients=coefficients)
        return np.array([row.effect.estimate for row in answer_effects(model, question).rows])

    beta = fit.model.coefficients
    columns = []
    for j, b in enumerate(beta):
        step = np.zeros(len(beta))
        step[j] = 1e-5 * max(1.0, abs(b))
        columns.append((values(beta + step) - values(beta - step)) / (2 * step[j]))
    gradient = np.stack(columns, axis=1)
    variance = np.einsum("ij,jk,ik->i", gradient, fit.model.covariance, gradient)
    assert found == pytest.approx(np.sqrt(variance), rel=1e-5)


def test_one_step_is_the_plain_difference(pipes):
    result = smf.logit("burst ~ age_years * material", pipes).fit(disp=0)
    fit = po.FittedLogit(result, predictors={"age_years": po.Predictor(step=5)})
    expected = (
        result.predict(pipes.assign(age_years=pipes.age_years + 5)) - result.predict(pipes)
    ).mean()
    (row,) = fit.effects("age_years", number="step").rows
    assert row.step == 5
    assert row.effect.estimate == pytest.approx(expected)


def test_by_and_where_average_among_those_rows(fit, result, pipes):
    by_soil = fit.effects("material", by="soil")
    high = pipes[pipes.soil == "high"]
    expected = (
        result.predict(high.assign(material="PVC"))
        - result.predict(high.assign(material="cast iron"))
    ).mean()
    assert effect_of(by_soil, "material", "PVC", by="high").estimate == pytest.approx(expected)
    for where in ({"soil": "high"}, pipes.soil == "high", (pipes.soil == "high").to_numpy()):
        among = fit.effects("material", where=where)
        assert effect_of(among, "material", "PVC").estimate == pytest.approx(expected)
        assert among.counted == (len(high),)


def test_where_takes_a_range_and_several_levels(fit, pipes):
    answer = fit.effects("material", where={"age_years": (20, 60), "soil": ["low", "high"]})
    chosen = pipes.age_years.between(20, 60) & pipes.soil.isin(["low", "high"])
    assert answer.counted == (int(chosen.sum()),)


def test_a_mask_is_not_kept_with_the_question(fit, pipes):
    answer = fit.effects("material", where=pipes.soil == "high")
    assert po.from_json(po.to_json(answer)) == answer
    with pytest.raises(po.QuestionRefused, match="mask over again"):
        fit.ask(answer.question)


def test_drawn_rows_add_their_variance(fit, result, pipes):
    fixed = effect_of(fit.effects("material"), "material", "PVC")
    drawn = effect_of(fit.effects("material", sample="drawn"), "material", "PVC")
    own = result.predict(pipes.assign(material="PVC")) - result.predict(
        pipes.assign(material="cast iron")
    )
    expected = fixed.se**2 + own.var(ddof=0) / len(pipes)
    assert drawn.estimate == fixed.estimate
    assert drawn.se**2 == pytest.approx(expected, rel=1e-8)


def test_frequency_weights_draw_as_rows_written_out(pipes):
    weights = np.arange(len(pipes)) % 3 + 1
    family = sm.families.Binomial()
    weighted = smf.glm("burst ~ age_years * soil", pipes, family=family, freq_weights=weights).fit()
    written_out = pipes.loc[pipes.index.repeat(weights)].reset_index(drop=True)
    repeated = smf.glm("burst ~ age_years * soil", written_out, family=family).fit()
    for sample in ("fixed", "drawn"):
        one = po.FittedLogit(weighted).effects(sample=sample)
        other = po.FittedLogit(repeated).effects(sample=sample)
        for mine, theirs in zip(one.rows, other.rows, strict=True):
            assert mine.effect.estimate == pytest.approx(theirs.effect.estimate, rel=1e-7)
            assert mine.effect.se == pytest.approx(theirs.effect.se, rel=1e-6)


def test_the_reference_is_the_codings_own(pipes):
    coded = smf.logit("burst ~ C(material, Treatment('PVC'))", pipes).fit(disp=0)
    assert {row.start for row in po.FittedLogit(coded).effects().rows} == {"PVC"}


def test_a_table_of_a_million_slopes_is_exact():
    # more rows than a table is made for, a spline and a kink
    rng = np.random.default_rng(5)
    n = 30_000
    x = rng.uniform(0, 100, n)
    data = pd.DataFrame({"x": x, "z": rng.normal(size=n)})
    data["y"] = (rng.uniform(size=n) < 1 / (1 + np.exp(2 - 0.03 * x))).astype(int)
    result = smf.logit("y ~ bs(x, df=6) + np.maximum(x - 37.5, 0) * z", data).fit(disp=0)
    fit = po.FittedLogit(result)
    few = slice(0, 2_000)
    whole = fit.model.design.row_derivatives("x", fit.model.sample.columns)[few]
    part = fit.model.design.row_derivatives(
        "x", {name: column[few] for name, column in fit.model.sample.columns.items()}
    )
    scale = np.abs(whole).max(axis=0) + 1e-300
    assert np.abs((whole - part) / scale).max() < 1e-7


@pytest.mark.parametrize(
    ("asked", "words"),
    [
        ({"predictors": "colour"}, ["no predictor 'colour'"]),
        ({"where": {"soil": "sand"}}, ["soil", "'sand'"]),
        ({"where": {"age_years": (500, 600)}}, ["No row has", "age_years"]),
        ({"where": np.array([True, False])}, ["where= has 2 rows", "1,500"]),
        ({"where": np.arange(1500)}, ["boolean mask"]),
        ({"by": "age_years"}, ["by='age_years'", "where="]),
        ({"number": "unit"}, ["number='unit'", "'slope'"]),
        ({"number": "step", "predictors": "pressure_m"}, ["pressure_m", "one step", "slope"]),
        ({"sample": "random"}, ["sample='random'"]),
        ({"others": "typical", "sample": "drawn"}, ["sample='drawn'", "observed"]),
        ({"others": "typical", "where": {"soil": "low"}}, ["where=", "observed"]),
        ({"others": "mean"}, ["others='mean'", "'typical'"]),
    ],
)
def test_what_cannot_be_answered_is_refused_with_the_way_out(fit, asked, words):
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.effects(**asked)
    for word in words:
        assert word in str(refusal.value)
