"""The chance over two numbers: its values, where it bends which way, and where the data are."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po

FORMULA = "burst ~ age_years * material + bs(pressure_m, df=4) + age_years:pressure_m + soil"


@pytest.fixture(scope="module")
def result(pipes):
    return smf.logit(FORMULA, pipes).fit(disp=0)


@pytest.fixture(scope="module")
def fit(result):
    return po.FittedLogit(result)


def mapped(fit, **settings):
    return fit.pair("age_years", "pressure_m", shape="map", **settings)


def at(answer, i, j):
    return {"age_years": answer.surface.a_at[i], "pressure_m": answer.surface.b_at[j]}


PLACES = [(0, 0), (59, 59), (0, 59), (17, 40)]


def test_a_map_holds_what_a_plain_prediction_gives(fit, result):
    answer = mapped(fit, others={"soil": "high"})
    surface = answer.surface
    assert len(surface.estimate) == len(surface.b_at) == 60
    assert len(surface.estimate[0]) == len(surface.a_at) == 60
    for i, j in PLACES:
        frame = pd.DataFrame([dict(answer.held) | at(answer, i, j)])
        assert surface.estimate[j][i] == pytest.approx(float(result.predict(frame).iloc[0]))


def test_an_averaged_map_holds_the_plain_averages(fit, result, pipes):
    answer = mapped(fit, others="observed")
    for i, j in PLACES:
        expected = result.predict(pipes.assign(**at(answer, i, j))).mean()
        assert answer.surface.estimate[j][i] == pytest.approx(expected, abs=1e-10)


@pytest.mark.parametrize("others", ["typical", "observed"])
def test_on_the_odds_scale_a_map_holds_odds(fit, others):
    chances = np.array(mapped(fit, others=others).surface.estimate)
    odds = np.array(mapped(fit, others=others, scale="odds").surface.estimate)
    np.testing.assert_allclose(odds, chances / (1 - chances), rtol=1e-9)


def test_the_map_covers_what_is_offered_and_can_be_computed(fit, pipes):
    surface = mapped(fit).surface
    assert surface.a_at[0] == fit.subject.predictor("age_years").offered[0]
    assert surface.b_at[0] >= pipes.pressure_m.min()
    assert surface.b_at[-1] <= pipes.pressure_m.max()
    assert np.all(np.diff(surface.a_at) > 0)
    # an age is a whole number of years
    assert all(float(age).is_integer() for age in surface.a_at)


def test_the_sign_of_the_local_interaction_is_that_of_the_cross_partial(pipes):
    fit = po.FittedLogit(smf.logit("burst ~ age_years * pressure_m + soil", pipes).fit(disp=0))
    surface = mapped(fit).surface
    crossing = np.array(surface.crossing)
    agree = 0
    for i, j in [(10, 10), (30, 45), (50, 20), (55, 55), (5, 50)]:
        stated = {
            name: po.Predictor(typical=float(value))
            for name, value in (
                ("age_years", surface.a_at[i]),
                ("pressure_m", surface.b_at[j]),
            )
        }
        there = po.FittedLogit(
            smf.logit("burst ~ age_years * pressure_m + soil", pipes).fit(disp=0),
            predictors=stated,
        )
        slope = there.pair("age_years", "pressure_m", number="slope").interaction.at_profile
        assert np.sign(crossing[j, i]) == np.sign(slope.estimate)
        assert crossing[j, i] == pytest.approx(slope.estimate, rel=0.05, abs=2e-6)
        agree += 1
    assert agree == 5


def test_straight_log_odds_have_no_local_interaction_and_chances_have(pipes):
    fit = po.FittedLogit(smf.logit("burst ~ age_years + pressure_m", pipes).fit(disp=0))
    assert not np.any(mapped(fit, scale="odds").surface.crossing)
    assert np.count_nonzero(mapped(fit).surface.crossing) > 3000


def test_a_product_bends_log_odds_by_as_much_everywhere(pipes):
    result = smf.logit("burst ~ age_years * pressure_m", pipes).fit(disp=0)
    crossing = mapped(po.FittedLogit(result), scale="odds").surface.crossing
    np.testing.assert_allclose(crossing, result.params["age_years:pressure_m"], rtol=1e-6)


def test_points_without_rows_near_by_are_not_supported():
    rng = np.random.default_rng(5)
    x = rng.uniform(0, 1, 4000)
    # rows lie along a diagonal: two corners of the map are nobody's
    z = np.clip(x + rng.normal(0, 0.04, 4000), 0, 1)
    y = (rng.uniform(size=4000) < 0.3).astype(int)
    fit = po.FittedLogit(smf.logit("y ~ x + z", pd.DataFrame({"x": x, "z": z, "y": y})).fit(disp=0))
    surface = fit.pair("x", "z", shape="map").surface
    supported = np.array(surface.supported)
    a, b = np.meshgrid(surface.a_at, surface.b_at)
    assert not supported[np.abs(a - b) > 0.35].any()
    assert supported[(np.abs(a - b) < 0.04) & (a > 0.05) & (a < 0.95)].all()


def test_beyond_the_data_no_point_is_supported(pipes):
    result = smf.logit("burst ~ age_years + pressure_m", pipes).fit(disp=0)
    fit = po.FittedLogit(result, predictors={"age_years": po.Predictor(range=(-50, 200))})
    surface = mapped(fit).surface
    supported, ages = np.array(surface.supported), np.array(surface.a_at)
    beyond = (ages < pipes.age_years.min()) | (ages > pipes.age_years.max())
    assert beyond.any()
    assert not supported[:, beyond].any()
    assert supported[:, ~beyond].any()


def test_a_map_of_levels_is_refused_with_the_way_out(fit):
    with pytest.raises(po.QuestionRefused, match=r"material has levels.*shape='lines'"):
        fit.pair("age_years", "material", shape="map")
    assert fit.pair("age_years", "pressure_m").surface is None
