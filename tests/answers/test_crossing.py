"""The interaction on the probability scale: differences and partials, at a profile and averaged."""

from dataclasses import replace

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.averaging import Exact
from plainodds.answers.crossing import averaged_crossing, crossing_at_profile
from plainodds.answers.pair_settled import settled
from plainodds.answers.population import everyone

JOINED = "burst ~ age_years * material + bs(pressure_m, df=4) * age_years + soil + past_repairs"

PAIRS = {
    "two changes of numbers": {"a": "age_years", "b": "pressure_m"},
    "a number and levels": {"a": "material", "b": "age_years", "b_values": (10, 80)},
    "two levels": {"a": "material", "b": "soil", "a_values": ("PVC", "ductile iron")},
    "two slopes": {"a": "age_years", "b": "pressure_m", "number": "slope"},
    "a slope and a change": {"a": "age_years", "b": "material", "number": "slope"},
    "a change and a slope": {"a": "soil", "b": "pressure_m", "number": "slope"},
    "a slope and a number's change": {
        "a": "past_repairs",
        "b": "age_years",
        "b_values": (20, 60),
        "number": "slope",
    },
    "at another profile": {"a": "material", "b": "pressure_m", "others": {"age_years": 90}},
}


@pytest.fixture(scope="module")
def joined(pipes):
    return smf.logit(JOINED, pipes).fit(disp=0)


@pytest.fixture(scope="module")
def fit(joined):
    return po.FittedLogit(joined)


def moved_means(result, frame, answer):
    """The four means of plain predictions: both changed, a, b, neither."""
    a, b = answer.question.a, answer.question.b
    means = {}
    for i in (0, 1):
        for j in (0, 1):
            moved = frame.assign(**{a: answer.a_change[i], b: answer.b_change[j]})
            means[i, j] = float(result.predict(moved).mean())
    return means


def profile_frame(answer):
    subject = answer.subject
    values = {f.name: f.typical for f in subject.predictors} | dict(answer.held)
    return pd.DataFrame([values])


@pytest.mark.parametrize("scale", ["profile", "rows"])
@pytest.mark.parametrize("name", ["two changes of numbers", "a number and levels", "two levels"])
def test_a_cross_difference_is_that_of_four_plain_predictions(fit, joined, pipes, name, scale):
    answer = fit.pair(**PAIRS[name])
    frame = pipes if scale == "rows" else profile_frame(answer)
    p = moved_means(joined, frame, answer)
    found = answer.interaction.averaged if scale == "rows" else answer.interaction.at_profile
    assert found.estimate == pytest.approx(p[1, 1] - p[1, 0] - p[0, 1] + p[0, 0], rel=1e-9)


def second_difference(result, frame, a, b, step):
    def mean(i, j):
        return result.predict(frame.assign(**{a: frame[a] + i * step, b: frame[b] + j * step}))

    corners = mean(1, 1) - mean(1, -1) - mean(-1, 1) + mean(-1, -1)
    return float(corners.mean()) / (4 * step**2)


@pytest.mark.parametrize("scale", ["profile", "rows"])
def test_a_cross_partial_is_the_second_difference_of_plain_predictions(joined, fit, pipes, scale):
    # a spline cannot be left at its ends, so those rows take no part
    answer = fit.pair(**PAIRS["two slopes"])
    if scale == "profile":
        expected = second_difference(joined, profile_frame(answer), "age_years", "pressure_m", 0.02)
        assert answer.interaction.at_profile.estimate == pytest.approx(expected, rel=1e-4)
        return
    plain = smf.logit("burst ~ age_years * pressure_m + material", pipes).fit(disp=0)
    answer = po.FittedLogit(plain).pair("age_years", "pressure_m", number="slope")
    expected = second_difference(plain, pipes, "age_years", "pressure_m", 0.02)
    assert answer.interaction.averaged.estimate == pytest.approx(expected, rel=1e-5)


@pytest.mark.parametrize("scale", ["profile", "rows"])
def test_a_difference_of_slopes_is_that_of_plain_predictions(fit, joined, pipes, scale):
    answer = fit.pair(**PAIRS["a slope and a change"])
    frame = pipes if scale == "rows" else profile_frame(answer)

    def slope(level, step=1e-3):
        frames = [
            frame.assign(material=level, age_years=frame.age_years + side * step)
            for side in (-1, 1)
        ]
        low, high = (joined.predict(each).mean() for each in frames)
        return float(high - low) / (2 * step)

    expected = slope(answer.b_change[1]) - slope(answer.b_change[0])
    found = answer.interaction.averaged if scale == "rows" else answer.interaction.at_profile
    assert answer.sloped == ("age_years",)
    assert found.estimate == pytest.approx(expected, rel=1e-6)


@pytest.mark.parametrize("name", PAIRS)
def test_gradients_are_the_numeric_derivatives_in_the_coefficients(fit, name):
    model = fit.model
    question = fit.pair(**PAIRS[name]).question

    def values(coefficients):
        moved = replace(model, coefficients=coefficients)
        pair = settled(moved, question)
        averager = Exact(moved, everyone(moved))
        found = crossing_at_profile(moved, pair), averaged_crossing(moved, pair, averager)
        return np.concatenate([each.value for each in found]), found

    _, found = values(model.coefficients)
    for j, b in enumerate(model.coefficients):
        step = np.zeros(len(model.coefficients))
        step[j] = 1e-5 * max(abs(b), 1e-3)
        numeric = (values(model.coefficients + step)[0] - values(model.coefficients - step)[0]) / (
            2 * step[j]
        )
        for place, each in enumerate(found):
            size = np.abs(each.gradient).max()
            assert each.gradient[0, j] == pytest.approx(numeric[place], rel=1e-5, abs=1e-6 * size)


@pytest.mark.parametrize(("intercept", "sign"), [(-3.0, 1), (3.0, -1)])
def test_a_model_without_a_product_has_an_interaction_between_chances_and_none_between_odds(
    intercept, sign
):
    rng = np.random.default_rng(8)
    x, z = rng.uniform(-1, 1, (2, 3000))
    eta = intercept + x + z
    y = (rng.uniform(size=3000) < 1 / (1 + np.exp(-eta))).astype(int)
    fit = po.FittedLogit(smf.logit("y ~ x + z", pd.DataFrame({"x": x, "z": z, "y": y})).fit(disp=0))
    found = fit.pair("x", "z").interaction
    # it grows with the baseline chance, vanishes about one half, and turns beyond it
    assert sign * found.averaged.estimate > 0
    assert sign * found.at_profile.estimate > 0
    assert found.averaged_p_value < 1e-4
    assert (found.ratio.estimate, found.ratio.se, found.ratio.lower) == (1, 0, 1)
    assert found.log_ratio.estimate == 0
    assert not found.joined
    assert found.test is None


def counted(cells):
    """Rows of a two by two table from (a, b, events, cases)."""
    rows = [
        {"a": a, "b": b, "y": int(i < events)}
        for a, b, events, cases in cells
        for i in range(cases)
    ]
    return pd.DataFrame(rows)


CELLS = [("no", "no", 12, 80), ("no", "yes", 15, 60), ("yes", "no", 22, 70), ("yes", "yes", 40, 55)]


@pytest.mark.parametrize("others", ["typical", "observed"])
def test_a_saturated_model_gives_the_raw_difference_of_differences(others):
    fit = po.FittedLogit(smf.logit("y ~ a * b", counted(CELLS)).fit(disp=0, tol=1e-12))
    answer = fit.pair("a", "b", others=others)
    assert (answer.a_change, answer.b_change) == (("no", "yes"), ("no", "yes"))
    p = {(a, b): events / cases for a, b, events, cases in CELLS}
    n = {(a, b): cases for a, b, _, cases in CELLS}
    expected = p["yes", "yes"] - p["yes", "no"] - p["no", "yes"] + p["no", "no"]
    # four independent shares: the sum of their variances
    se = np.sqrt(sum(p[cell] * (1 - p[cell]) / n[cell] for cell in p))
    for found in (answer.interaction.at_profile, answer.interaction.averaged):
        assert found.estimate == pytest.approx(expected, abs=1e-9)
        assert found.se == pytest.approx(se, rel=1e-7)
        assert found.lower == pytest.approx(expected - 1.959963985 * se, abs=1e-8)
    odds = {cell: share / (1 - share) for cell, share in p.items()}
    ratio = odds["yes", "yes"] * odds["no", "no"] / (odds["yes", "no"] * odds["no", "yes"])
    assert answer.interaction.ratio.estimate == pytest.approx(ratio, rel=1e-8)
    woolf = np.sqrt(sum(1 / (n[cell] * p[cell]) + 1 / (n[cell] * (1 - p[cell])) for cell in p))
    assert answer.interaction.log_ratio.se == pytest.approx(woolf, rel=1e-7)


def test_the_sign_of_the_product_may_be_opposite_to_that_of_the_interaction():
    # far up the curve chances have no room left, whatever the product says
    rng = np.random.default_rng(3)
    x, z = rng.uniform(-1, 1, (2, 6000))
    eta = 3.0 + 1.2 * x + 1.2 * z + 0.35 * x * z
    y = (rng.uniform(size=6000) < 1 / (1 + np.exp(-eta))).astype(int)
    data = pd.DataFrame({"x": x, "z": z, "y": y})
    answer = po.FittedLogit(smf.logit("y ~ x * z", data).fit(disp=0)).pair("x", "z", number="slope")
    assert answer.interaction.log_ratio.estimate > 0
    assert answer.interaction.averaged.upper < 0


def test_weights_count_rows_as_rows_written_out(pipes):
    frame = pipes.head(600)
    weights = np.arange(len(frame)) % 3 + 1
    family = sm.families.Binomial()
    formula = "burst ~ age_years * pressure_m + soil"
    weighted = smf.glm(formula, frame, family=family, freq_weights=weights).fit()
    repeated = frame.loc[frame.index.repeat(weights)].reset_index(drop=True)
    written_out = smf.glm(formula, repeated, family=family).fit()
    for number in ("change", "slope"):
        one, other = (
            po.FittedLogit(each)
            .pair("age_years", "pressure_m", a_values=(), number=number)
            .interaction.averaged
            for each in (weighted, written_out)
        )
        assert one.estimate == pytest.approx(other.estimate, rel=1e-7)
        assert one.se == pytest.approx(other.se, rel=1e-6)


def test_each_rows_own_offset_counts_in_the_average_and_the_held_one_at_the_profile(pipes):
    frame = pipes.assign(exposure=np.linspace(-1, 1, len(pipes)))
    result = smf.glm(
        "burst ~ age_years * soil", frame, family=sm.families.Binomial(), offset=frame.exposure
    ).fit()
    answer = po.FittedLogit(result, offset=0.7).pair("soil", "age_years", b_values=(20, 70))
    x = {(i, j): None for i in (0, 1) for j in (0, 1)}
    for i, j in x:
        moved = frame.assign(soil=answer.a_change[i], age_years=answer.b_change[j])
        x[i, j] = (
            result.predict(moved, offset=frame.exposure).mean(),
            result.predict(moved.head(1), offset=[0.7]).iloc[0],
        )
    averaged, held = (x[1, 1][k] - x[1, 0][k] - x[0, 1][k] + x[0, 0][k] for k in (0, 1))
    assert answer.interaction.averaged.estimate == pytest.approx(averaged, rel=1e-9)
    assert answer.interaction.at_profile.estimate == pytest.approx(held, rel=1e-9)


def test_a_factor_that_reads_both_predictors_is_rebuilt(pipes):
    tangled = smf.logit("burst ~ np.log1p(age_years * past_repairs) + soil", pipes).fit(disp=0)
    fit = po.FittedLogit(tangled)
    answer = fit.pair("age_years", "past_repairs", a_values=(10, 60), b_values=(0, 2))
    p = moved_means(tangled, pipes, answer)
    expected = p[1, 1] - p[1, 0] - p[0, 1] + p[0, 0]
    assert answer.interaction.averaged.estimate == pytest.approx(expected, rel=1e-9)
    assert answer.interaction.joined
    slopes = fit.pair("age_years", "past_repairs", number="slope").interaction
    # log1p has no slope to the left of 0, so a step to the right of it
    frame = profile_frame(answer).assign(past_repairs=1.0)
    expected = second_difference(tangled, frame, "age_years", "past_repairs", 1e-2)
    held = fit.pair("age_years", "past_repairs", number="slope", others={"soil": "low"})
    assert np.isfinite(slopes.averaged.se)
    assert held.sloped == ("age_years", "past_repairs")
    at_one = po.FittedLogit(tangled, predictors={"past_repairs": po.Predictor(typical=1)})
    found = at_one.pair("age_years", "past_repairs", number="slope").interaction.at_profile
    assert found.estimate == pytest.approx(expected, rel=1e-4)
