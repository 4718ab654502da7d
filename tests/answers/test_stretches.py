"""Where an effect differs from nothing: bounds at which the interval's end is exactly there."""

import itertools

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf
from scipy.optimize import brentq

import plainodds as po
from plainodds.answers.delta import Intervals
from plainodds.answers.stretches import bounds_along, turns_along

Z = 1.959963984540054


@pytest.fixture(scope="module")
def waves():
    """Data in which the effect of x depends on z so much that it changes its side."""
    rng = np.random.default_rng(17)
    n = 4000
    x, z = rng.normal(size=n), rng.uniform(-3, 3, n)
    w = rng.choice(["u", "v"], n)
    eta = -0.4 + 0.15 * x + 0.5 * x * z + 0.4 * z + 0.6 * (w == "v")
    y = (rng.uniform(size=n) < 1 / (1 + np.exp(-eta))).astype(int)
    return pd.DataFrame({"x": x, "z": z, "w": w, "y": y})


@pytest.fixture(scope="module")
def straight(waves):
    return smf.logit("y ~ x * z + w", waves).fit(disp=0)


@pytest.fixture(scope="module")
def bent(waves):
    return smf.logit("y ~ x * bs(z, df=5) + w", waves).fit(disp=0)


ASKED = {
    "chances, held": {},
    "chances, averaged": {"others": "observed"},
    "chances at another profile": {"others": {"w": "v"}},
    "odds": {"scale": "odds"},
    "chances at 80 %": {"level": 0.8},
}


@pytest.mark.parametrize("model", ["straight", "bent"])
@pytest.mark.parametrize("asked", ASKED)
def test_at_each_bound_an_end_of_the_interval_is_no_effect(request, model, asked):
    result = request.getfixturevalue(model)
    fit = po.FittedLogit(result)
    answer = fit.pair("x", "z", **ASKED[asked])
    stretches = answer.effect.stretches
    assert len(stretches) >= 3
    assert {s.sign for s in stretches} == {"above", "below", "open"}
    for stretch in stretches[1:]:
        ends = interval_at(fit, answer, stretch.start)
        assert min(abs(end) for end in ends) < 1e-8


def interval_at(fit, answer, z):
    """The effect's interval at one value of z, from the model's parts."""
    model, question = fit.model, answer.question
    start, end = answer.a_change
    stated = dict(answer.held) | {"z": z}
    if question.scale == "odds":
        rows = model.rows([model.completed({**stated, "x": x}) for x in (start, end)])
        gradient = rows[1] - rows[0]
        value = gradient @ model.coefficients
    elif question.others == "observed":
        X = {
            x: model.design.rows(
                {
                    **model.sample.columns,
                    "x": np.full(model.sample.rows, float(x)),
                    "z": np.full(model.sample.rows, float(z)),
                }
            )
            for x in (start, end)
        }
        p = {x: 1 / (1 + np.exp(-X[x] @ model.coefficients)) for x in X}
        value = (p[end] - p[start]).mean()
        gradient = np.mean(
            [
                (p[end] * (1 - p[end]))[:, None] * X[end]
                - (p[start] * (1 - p[start]))[:, None] * X[start]
            ],
            axis=1,
        )[0]
    else:
        rows = model.rows([model.completed({**stated, "x": x}) for x in (start, end)])
        p = 1 / (1 + np.exp(-rows @ model.coefficients))
        value = p[1] - p[0]
        gradient = p[1] * (1 - p[1]) * rows[1] - p[0] * (1 - p[0]) * rows[0]
    se = np.sqrt(gradient @ model.covariance @ gradient)
    z_of_level = {0.95: Z, 0.8: 1.2815515655446004}[question.level]
    return value - z_of_level * se, value + z_of_level * se


@pytest.mark.parametrize("asked", ASKED)
def test_within_a_stretch_every_point_is_on_its_side(bent, asked):
    fit = po.FittedLogit(bent)
    answer = fit.pair("x", "z", **ASKED[asked])
    for stretch in answer.effect.stretches:
        for share in (0.02, 0.5, 0.98):
            z = stretch.start + share * (stretch.end - stretch.start)
            low, high = interval_at(fit, answer, z)
            side = "above" if low > 0 else "below" if high < 0 else "open"
            assert side == stretch.sign


def test_stretches_cover_the_range_and_their_shares_the_rows(bent, waves):
    answer = po.FittedLogit(bent).pair("x", "z")
    stretches, at = answer.effect.stretches, answer.effect.at
    assert (stretches[0].start, stretches[-1].end) == (at[0], at[-1])
    for one, following in itertools.pairwise(stretches):
        assert one.end == following.start
        assert one.sign != following.sign
    assert sum(s.share for s in stretches) == pytest.approx(1)
    for stretch in stretches:
        inside = waves.z.between(stretch.start, stretch.end).mean()
        assert stretch.share == pytest.approx(inside, abs=1e-12)


def test_where_log_odds_are_straight_the_bounds_are_the_textbooks_roots(straight):
    # Johnson & Neyman: (b₁ + b₃ z)² = 1.96² (v₁₁ + 2 z v₁₃ + z² v₃₃)
    answer = po.FittedLogit(straight).pair("x", "z", scale="odds")
    b, V = straight.params, straight.cov_params()
    square = b["x:z"] ** 2 - Z**2 * V.loc["x:z", "x:z"]
    linear = 2 * (b["x"] * b["x:z"] - Z**2 * V.loc["x", "x:z"])
    constant = b["x"] ** 2 - Z**2 * V.loc["x", "x"]
    roots = np.sort(np.roots([square, linear, constant]))
    bounds = [s.start for s in answer.effect.stretches[1:]]
    assert bounds == pytest.approx(roots, rel=1e-11)
    assert answer.effect.turns == ()


def test_a_model_without_a_product_has_one_stretch_on_the_odds_scale(waves):
    fit = po.FittedLogit(smf.logit("y ~ x + z + w", waves).fit(disp=0))
    effect = fit.pair("x", "z", scale="odds").effect
    assert len(effect.stretches) == 1
    assert effect.turns == ()
    assert np.ptp(effect.estimate) < 1e-12


def test_the_effects_turns_are_where_its_slope_is_nothing(bent):
    fit = po.FittedLogit(bent)
    answer = fit.pair("x", "z")
    assert answer.effect.turns
    start, end = answer.a_change

    def effect(z):
        profiles = [
            fit.model.completed({**dict(answer.held), "x": x, "z": z}) for x in (start, end)
        ]
        p = 1 / (1 + np.exp(-fit.model.rows(profiles) @ fit.model.coefficients))
        return p[1] - p[0]

    def slope(z, step=1e-3):
        return effect(z + step) - effect(z - step)

    for turn in answer.effect.turns:
        assert turn == pytest.approx(brentq(slope, turn - 0.05, turn + 0.05), abs=1e-4)


def test_without_a_product_chances_turn_where_the_curve_is_steepest(waves):
    # x moves the log odds by as much everywhere: the difference is largest around one half
    result = smf.logit("y ~ x + z", waves).fit(disp=0)
    fit = po.FittedLogit(result)
    answer = fit.pair("x", "z", a_values=(-0.5, 0.5))
    expected = -result.params["Intercept"] / result.params["z"]
    assert answer.effect.turns == pytest.approx((expected,), abs=1e-7)


def test_each_level_of_a_category_has_its_own_stretch(waves):
    effect = po.FittedLogit(smf.logit("y ~ x * w + z", waves).fit(disp=0)).pair("x", "w").effect
    assert [s.start for s in effect.stretches] == ["u", "v"]
    assert [s.start for s in effect.stretches] == [s.end for s in effect.stretches]
    shares = waves.w.value_counts(normalize=True)
    assert [s.share for s in effect.stretches] == pytest.approx([shares["u"], shares["v"]])
    for stretch, low, high in zip(effect.stretches, effect.lower, effect.upper, strict=True):
        assert stretch.sign == ("above" if low > 0 else "below" if high < 0 else "open")


def test_without_a_covariance_there_are_no_stretches(waves):
    fit = po.FittedLogit(smf.logit("y ~ x * z", waves).fit_regularized(alpha=1.0, disp=0))
    for asked in ({}, {"scale": "odds"}, {"others": "observed"}):
        effect = fit.pair("x", "z", **asked).effect
        assert effect.stretches == ()
        assert (effect.se, effect.lower, effect.upper) == (None, None, None)


def measured_by(estimate, reach=0.0):
    def measured(x):
        value = estimate(x)
        return Intervals(value, np.full(len(x), reach), value - reach, value + reach)

    return measured


@pytest.mark.parametrize("where", [0.5, 0.5035, 0.5049, 0.002, 0.9984])
def test_two_crossings_within_one_cell_of_the_grid_are_both_found(where):
    grid = np.linspace(0, 1, 101)
    half = 1e-3

    def dip(x):
        return 30 * ((x - where) ** 2 - half**2)

    measured = measured_by(dip)
    found = bounds_along(measured, grid, measured(grid))
    np.testing.assert_allclose(found, [where - half, where + half], rtol=0, atol=1e-12)


def test_a_dip_that_stays_above_is_no_bound():
    grid = np.linspace(0, 1, 101)
    measured = measured_by(lambda x: (x - 0.5035) ** 2 + 1e-9)
    assert len(bounds_along(measured, grid, measured(grid))) == 0


@pytest.mark.parametrize("where", [0.5, 0.5035, 0.5071])
def test_a_kink_that_stays_above_is_no_bound_and_one_that_goes_below_is_two(where):
    grid = np.linspace(0, 1, 101)
    above = measured_by(lambda x: np.abs(x - where) + 1e-5)
    assert len(bounds_along(above, grid, above(grid))) == 0
    through = measured_by(lambda x: np.abs(x - where) - 1e-3)
    found = bounds_along(through, grid, through(grid))
    np.testing.assert_allclose(found, [where - 1e-3, where + 1e-3], atol=1e-13)


def test_an_interval_that_jumps_from_above_to_below_within_a_cell_has_two_bounds():
    grid = np.linspace(0, 1, 11)
    measured = measured_by(lambda x: 1 - 2 * x, reach=0.02)
    found = bounds_along(measured, grid, measured(grid))
    np.testing.assert_allclose(found, [0.49, 0.51], atol=1e-14)


def test_turns_of_rounding_are_none():
    grid = np.linspace(0, 1, 101)

    def flat(x):
        return 0.3 + 1e-13 * np.sin(40 * x)

    assert turns_along(measured_by(flat), grid, flat(grid)) == ()

    def rising(x):
        return x + 1e-12 * np.sin(9e4 * x)

    assert turns_along(measured_by(rising), grid, rising(grid)) == ()


def test_every_turn_of_a_wave_is_found():
    grid = np.linspace(0, 1, 101)

    def wave(x):
        return np.sin(20 * x)

    expected = (np.arange(6) + 0.5) * np.pi / 20
    assert turns_along(measured_by(wave), grid, wave(grid)) == pytest.approx(expected, abs=1e-8)
