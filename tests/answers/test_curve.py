"""Curves of the chance, its slope, the odds and η."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf
from hypothesis import given
from hypothesis import strategies as st

import plainodds as po


def typical_frame(fit, name, values):
    return pd.DataFrame([{**dict(fit.model.typical), name: v} for v in values])


def test_held_chances_are_statsmodels_predictions_with_their_intervals(fit, result):
    line = fit.curve("age_years").lines[0]
    frame = typical_frame(fit, "age_years", line.at)
    predicted = result.get_prediction(frame, which="mean").predicted
    eta = result.get_prediction(frame, which="linear")
    low, high = 1 / (1 + np.exp(-eta.conf_int().T))
    assert line.estimate == pytest.approx(predicted)
    assert line.lower == pytest.approx(low)
    assert line.upper == pytest.approx(high)


@pytest.mark.parametrize("others", ["typical", "observed", {"soil": "high"}])
@pytest.mark.parametrize("name", ["age_years", "pressure_m", "past_repairs"])
def test_slopes_are_the_chances_numeric_derivative(fit, name, others):
    low, _, high = fit.subject.predictor(name).quartiles
    at = [low + 0.37, (low + high) / 2 + 0.11]
    h = 1e-4
    slope = fit.curve(name, others=others, scale="slope", at=at).lines[0]
    up = fit.curve(name, others=others, at=[x + h for x in at]).lines[0]
    down = fit.curve(name, others=others, at=[x - h for x in at]).lines[0]
    numeric = (np.array(up.estimate) - np.array(down.estimate)) / (2 * h)
    assert slope.estimate == pytest.approx(numeric, rel=1e-6)


def test_a_derived_column_moves_the_slope_too(pipes):
    squared = pipes.assign(age_sq=pipes.age_years**2)
    declared = po.FittedLogit(
        smf.logit("burst ~ age_years + age_sq", squared).fit(disp=0),
        derived={"age_sq": "age_years ** 2"},
    )
    written = po.FittedLogit(smf.logit("burst ~ age_years + I(age_years**2)", pipes).fit(disp=0))
    at = [10, 40, 90]
    one = declared.curve("age_years", scale="slope", at=at).lines[0]
    other = written.curve("age_years", scale="slope", at=at).lines[0]
    assert one.estimate == pytest.approx(other.estimate, rel=1e-4)
    assert one.se == pytest.approx(other.se, rel=1e-4)


@pytest.mark.parametrize("others", ["typical", "observed"])
def test_odds_and_linear_predictor_are_the_same_answer_on_other_scales(fit, others):
    chance, odds, eta = (
        fit.curve("age_years", others=others, scale=scale, at=[5, 50]).lines[0]
        for scale in ("probability", "odds", "linear_predictor")
    )
    p = np.array(chance.estimate)
    assert odds.estimate == pytest.approx(p / (1 - p))
    assert eta.estimate == pytest.approx(np.log(p / (1 - p)))
    for end in ("lower", "upper"):
        q = np.array(getattr(chance, end))
        assert getattr(odds, end) == pytest.approx(q / (1 - q))
        assert getattr(eta, end) == pytest.approx(np.log(q / (1 - q)))


def test_an_observed_interval_is_the_delta_methods_on_the_logit_of_the_mean(fit, result, pipes):
    line = fit.curve("material", others="observed", at=["PVC"]).lines[0]
    moved = pipes.assign(material="PVC")
    chance = np.asarray(result.predict(moved))
    from patsy import dmatrix

    rows = np.asarray(dmatrix(result.model.data.model_spec, moved))
    gradient = (chance * (1 - chance)) @ rows / len(rows)
    se = np.sqrt(gradient @ np.asarray(result.cov_params()) @ gradient)
    mean = chance.mean()
    logit, reach = np.log(mean / (1 - mean)), 1.959963984540054 * se / (mean * (1 - mean))
    assert line.se[0] == pytest.approx(se)
    assert line.lower[0] == pytest.approx(1 / (1 + np.exp(reach - logit)))
    assert line.upper[0] == pytest.approx(1 / (1 + np.exp(-reach - logit)))


def test_by_a_number_takes_its_quartiles_or_the_values_asked_for(fit):
    quartiles = fit.subject.predictor("pressure_m").quartiles
    assert tuple(line.by for line in fit.curve("age_years", by="pressure_m").lines) == quartiles
    asked = fit.curve("age_years", by="pressure_m", by_values=[30, 60])
    assert [line.by for line in asked.lines] == [30, 60]


def test_a_categorys_curve_has_one_point_per_level(fit):
    line = fit.curve("soil").lines[0]
    assert line.at == ("low", "moderate", "high")


def test_support_counts_every_row_once(fit, pipes):
    answer = fit.curve("age_years", by="material")
    for line, support in zip(answer.lines, answer.support, strict=True):
        assert sum(support.counts) == (pipes.material == line.by).sum()
    by_number = fit.curve("age_years", by="pressure_m")
    assert sum(sum(each.counts) for each in by_number.support) == len(pipes)


def test_points_without_rows_are_marked(fit, pipes):
    line = next(li for li in fit.curve("age_years", by="material").lines if li.by == "PVC")
    oldest = pipes.age_years[pipes.material == "PVC"].max()
    beyond = [s for x, s in zip(line.at, line.supported, strict=True) if x > oldest + 10]
    assert beyond
    assert not any(beyond)
    assert any(line.supported)


def test_a_range_wider_than_the_data_is_drawn_and_marked(pipes):
    result = smf.logit("burst ~ age_years", pipes).fit(disp=0)
    wide = po.FittedLogit(result, predictors={"age_years": po.Predictor(range=(0, 200))})
    line = wide.curve("age_years").lines[0]
    assert line.at[-1] == 200
    assert not line.supported[-1]


@given(at=st.lists(st.integers(0, 100), min_size=1, max_size=8, unique=True))
def test_intervals_hold_the_estimate_and_stay_within_zero_and_one(fit, at):
    for others in ("typical", "observed"):
        line = fit.curve("age_years", others=others, at=at).lines[0]
        bounds = np.array([line.lower, line.estimate, line.upper])
        assert (np.diff(bounds, axis=0) >= 0).all()
        assert ((bounds >= 0) & (bounds <= 1)).all()


def test_the_reference_level_does_not_matter(pipes, fit):
    releveled = smf.logit(
        "burst ~ age_years * C(material, Treatment('PVC')) + bs(pressure_m, df=4) + soil "
        "+ past_repairs + I(past_repairs**2)",
        pipes,
    ).fit(disp=0)
    one = fit.curve("age_years", by="material", others="observed", at=[10, 70])
    other = po.FittedLogit(releveled).curve(
        "age_years", by="material", others="observed", at=[10, 70]
    )
    for mine, theirs in zip(one.lines, other.lines, strict=True):
        assert mine.by == theirs.by
        assert mine.estimate == pytest.approx(theirs.estimate, rel=1e-5)
        assert mine.lower == pytest.approx(theirs.lower, rel=1e-4)


@pytest.mark.parametrize(
    ("asked", "words"),
    [
        ({"predictor": "colour"}, ["no predictor 'colour'"]),
        ({"predictor": "material", "scale": "slope"}, ["material", "no slope", "probability"]),
        ({"predictor": "age_years", "by": "age_years"}, ["along itself", "by="]),
        ({"predictor": "age_years", "by_values": ["PVC"]}, ["by_values=", "by="]),
        ({"predictor": "age_years", "by": "material", "by_values": ["lead"]}, ["'lead'"]),
        ({"predictor": "age_years", "at": ["old"]}, ["age_years", "'old'", "text"]),
        ({"predictor": "age_years", "at": [float("nan")]}, ["age_years", "missing"]),
        ({"predictor": "pressure_m", "at": [5000]}, ["pressure_m", "5000", "spline"]),
        ({"predictor": "age_years", "others": "mean"}, ["others='mean'", "'observed'"]),
        ({"predictor": "age_years", "others": {"age_years": 3}}, ["age_years", "itself moves"]),
        ({"predictor": "age_years", "others": {"soil": "sand"}}, ["soil", "'sand'", "'low'"]),
        ({"predictor": "age_years", "scale": "logit"}, ["scale='logit'", "linear_predictor"]),
        ({"predictor": "age_years", "level": 1.0}, ["level=1.0"]),
    ],
)
def test_what_cannot_be_answered_is_refused_with_the_way_out(fit, asked, words):
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.curve(**asked)
    for word in words:
        assert word in str(refusal.value)
