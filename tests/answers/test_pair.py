"""Two predictors together: what is settled, what is refused, and what stays the same."""

import dataclasses
import json
import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from hypothesis import given, settings
from hypothesis import strategies as st

import plainodds as po
from plainodds.answers.pair import PairQuestion
from tests.model.made import cases, formula_engine, gee, glm, logit

FORMULA = "burst ~ age_years * material + bs(pressure_m, df=4) * soil + past_repairs"

ASKED = {
    "a number and levels": {"a": "age_years", "b": "material"},
    "levels and a number": {"a": "material", "b": "age_years"},
    "two numbers": {"a": "age_years", "b": "pressure_m"},
    "two numbers on a map": {"a": "age_years", "b": "pressure_m", "shape": "map"},
    "two slopes": {"a": "age_years", "b": "pressure_m", "number": "slope"},
    "two categories": {"a": "material", "b": "soil"},
    "averaged": {"a": "age_years", "b": "material", "others": "observed"},
    "averaged slopes": {
        "a": "age_years",
        "b": "pressure_m",
        "others": "observed",
        "number": "slope",
    },
    "odds": {"a": "soil", "b": "pressure_m", "scale": "odds", "level": 0.9},
    "averaged odds": {"a": "soil", "b": "pressure_m", "scale": "odds", "others": "observed"},
    "stated": {
        "a": "age_years",
        "b": "past_repairs",
        "a_values": np.array([10, 60]),
        "b_values": [0, 3],
        "others": {"soil": "high"},
        "test": "likelihood_ratio",
    },
}


@pytest.fixture(scope="module")
def result(pipes):
    return smf.logit(FORMULA, pipes).fit(disp=0)


@pytest.fixture(scope="module")
def fit(result):
    return po.FittedLogit(result)


@pytest.fixture(params=ASKED)
def asked(request):
    return ASKED[request.param]


def numbers(answer):
    return po.table(answer)[["estimate", "se", "lower", "upper"]].to_numpy()


# What is settled


def test_a_number_goes_from_quartile_to_quartile_and_levels_from_the_reference(fit, pipes):
    answer = fit.pair("age_years", "material")
    low, _, high = fit.subject.predictor("age_years").quartiles
    assert answer.a_change == (low, high)
    others = pipes.material[pipes.material != "cast iron"]
    assert answer.b_change == ("cast iron", others.value_counts().idxmax())
    assert answer.sloped == ()
    assert [name for name, _ in answer.held] == ["soil", "pressure_m", "past_repairs"]
    assert answer.counted == len(pipes)


def test_where_both_quartiles_are_one_value_a_number_goes_from_lowest_to_highest():
    frame = cases()
    frame["rare"] = np.where(np.arange(len(frame)) % 9 == 0, 1.0 + np.arange(len(frame)) % 4, 0.0)
    fit = po.FittedLogit(logit("left ~ rare + age", frame).fit(disp=0))
    assert fit.pair("rare", "age").a_change == (0.0, frame.rare.max())


def test_a_yes_or_no_goes_from_no_to_yes():
    frame = cases()
    fit = po.FittedLogit(logit("left ~ C(flag, Treatment(True)) * dummy", frame).fit(disp=0))
    answer = fit.pair("flag", "dummy")
    assert (answer.a_change, answer.b_change) == ((False, True), (0, 1))


def test_another_reference_is_the_fits_own():
    fit = po.FittedLogit(logit("left ~ C(site, Treatment('c')) + age", cases()).fit(disp=0))
    assert fit.pair("site", "age").a_change[0] == "c"


def test_a_slope_goes_one_step_from_the_typical_value(fit):
    answer = fit.pair("age_years", "material", number="slope")
    facts = fit.subject.predictor("age_years")
    assert answer.sloped == ("age_years",)
    assert answer.a_change == (facts.typical, facts.typical + facts.step)
    ratio = fit.odds(
        "age_years",
        between={"age_years": answer.a_change},
        given={"material": list(answer.b_change)},
    )
    one, other = (row.log_odds_ratio.estimate for row in ratio.rows)
    assert answer.interaction.log_ratio.estimate == pytest.approx(other - one)


def test_a_step_stays_within_what_can_be_computed():
    frame = cases()
    fit = po.FittedLogit(
        logit("left ~ bs(age, df=4) + depth", frame).fit(disp=0),
        predictors={"age": po.Predictor(typical=float(frame.age.max()) - 0.1, step=1)},
    )
    start, end = fit.pair("age", "depth", number="slope").a_change
    assert end == pytest.approx(fit.subject.predictor("age").allowed[1])
    assert end - start == pytest.approx(1)


def test_two_stated_values_are_a_change_also_beside_slopes(fit):
    answer = fit.pair("age_years", "pressure_m", a_values=(20, 60), number="slope")
    assert answer.sloped == ("pressure_m",)
    assert answer.a_change == (20, 60)


def test_lines_run_along_the_number_by_the_other(fit):
    lines = fit.pair("material", "age_years").lines
    assert (lines.question.predictor, lines.question.by) == ("age_years", "material")
    both = fit.pair("age_years", "pressure_m").lines
    assert (both.question.predictor, both.question.by) == ("age_years", "pressure_m")
    assert tuple(line.by for line in both.lines) == fit.subject.predictor("pressure_m").quartiles
    stated = fit.pair("age_years", "pressure_m", b_values=(40, 60)).lines
    assert [line.by for line in stated.lines] == [40, 60]
    categories = fit.pair("material", "soil").lines
    assert (categories.question.predictor, categories.question.by) == ("material", "soil")


@pytest.mark.parametrize("others", ["typical", "observed", {"soil": "high"}])
@pytest.mark.parametrize("scale", ["probability", "odds"])
def test_lines_are_those_of_a_curve(fit, others, scale):
    lines = fit.pair("age_years", "material", others=others, scale=scale).lines
    at = lines.question.at
    assert lines == fit.curve("age_years", by="material", others=others, scale=scale, at=at)
    plain = fit.curve("age_years", by="material", others=others, scale=scale)
    assert set(plain.lines[0].at) <= set(at)


def test_the_four_chances_that_are_compared_lie_on_the_lines(fit):
    answer = fit.pair("age_years", "material", a_values=(17.5, 60))
    assert {17.5, 60} <= set(answer.lines.lines[0].at)
    assert list(answer.lines.lines[0].at) == sorted(answer.lines.lines[0].at)
    four = {
        (line.by, x): chance
        for line in answer.lines.lines
        for x, chance in zip(line.at, line.estimate, strict=True)
    }
    (x0, x1), (b0, b1) = answer.a_change, answer.b_change
    crossed = four[b1, x1] - four[b1, x0] - four[b0, x1] + four[b0, x0]
    assert answer.interaction.at_profile.estimate == pytest.approx(crossed)


def test_a_joint_table_needs_two_levels_or_two_stated_values(fit):
    assert fit.pair("material", "soil").joint is not None
    assert fit.pair("material", "age_years").joint is None
    assert fit.pair("material", "age_years", b_values=(20, 60)).joint is not None
    assert fit.pair("age_years", "pressure_m", a_values=(20, 60)).joint is None


# The effect along the second predictor


@pytest.mark.parametrize("others", ["typical", "observed"])
@pytest.mark.parametrize("b", ["material", "pressure_m"])
def test_the_effect_is_the_plain_difference_of_predictions(fit, result, pipes, b, others):
    answer = fit.pair("age_years", b, others=others)
    frame = pipes
    if others == "typical":
        frame = pd.DataFrame([dict(fit.model.typical)])
    for place in {0, len(answer.effect.at) // 2, len(answer.effect.at) - 1}:
        start, end = (
            result.predict(frame.assign(**{"age_years": x, b: answer.effect.at[place]})).mean()
            for x in answer.a_change
        )
        assert answer.effect.estimate[place] == pytest.approx(end - start, abs=1e-12)


@pytest.mark.parametrize("others", ["typical", "observed"])
def test_intervals_of_the_effect_are_those_of_a_change(fit, others):
    answer = fit.pair("age_years", "soil", others=others)
    for place, level in enumerate(answer.effect.at):
        if others == "typical":
            change = fit.change("age_years", *answer.a_change, others={"soil": level})
        else:
            moves = {"age_years": answer.a_change, "soil": (level, level)}
            change = fit.change(moves)
        expected = change.comparison.risk_difference
        found = (
            answer.effect.estimate[place],
            answer.effect.se[place],
            answer.effect.lower[place],
            answer.effect.upper[place],
        )
        assert found == pytest.approx(dataclasses.astuple(expected), rel=1e-9)


def test_a_held_slope_along_the_other_is_that_of_effects(fit):
    answer = fit.pair("pressure_m", "age_years", number="slope")
    for place in (0, 40, 100):
        expected = (
            fit.effects("pressure_m", others={"age_years": answer.effect.at[place]}).rows[0].effect
        )
        assert answer.effect.estimate[place] == pytest.approx(expected.estimate, rel=1e-9)
        assert answer.effect.se[place] == pytest.approx(expected.se, rel=1e-9)


def test_an_averaged_slope_along_the_other_keeps_each_rows_own_value(fit, result, pipes):
    answer = fit.pair("age_years", "material", number="slope", others="observed")
    step = 1e-3
    for place, level in enumerate(answer.effect.at):
        frame = pipes.assign(material=level)
        high, low = (
            result.predict(frame.assign(age_years=frame.age_years + side * step)).mean()
            for side in (1, -1)
        )
        expected = (high - low) / (2 * step)
        assert answer.effect.estimate[place] == pytest.approx(expected, rel=1e-6)


def test_odds_ratios_along_the_other_are_those_of_odds(fit):
    answer = fit.pair("age_years", "material", scale="odds")
    rows = fit.odds(
        "age_years",
        between={"age_years": answer.a_change},
        given={"material": list(answer.effect.at)},
    ).rows
    for place, row in enumerate(rows):
        ratio = row.odds_ratio
        assert answer.effect.estimate[place] == pytest.approx(ratio.estimate)
        assert answer.effect.se[place] == pytest.approx(ratio.se)
        assert answer.effect.lower[place] == pytest.approx(ratio.lower)
        assert answer.effect.upper[place] == pytest.approx(ratio.upper)


def test_averaged_odds_ratios_are_those_of_averaged_chances(fit):
    answer = fit.pair("age_years", "soil", scale="odds", others="observed")
    for place, level in enumerate(answer.effect.at):
        moves = {"age_years": answer.a_change, "soil": (level, level)}
        ratio = fit.change(moves).comparison.odds_ratio
        assert answer.effect.estimate[place] == pytest.approx(ratio.estimate)
        assert answer.effect.lower[place] == pytest.approx(ratio.lower)


def test_a_difference_of_chances_stays_within_what_a_difference_can_be():
    x = np.repeat([0.0, 1.0, 2.0, 3.0], 4)
    y = np.array([0, 0, 1, 0, 0, 0, 0, 1, 0, 1, 1, 1, 1, 1, 0, 1])
    frame = pd.DataFrame({"x": x, "z": np.tile([0, 1], 8), "y": y})
    fit = po.FittedLogit(logit("y ~ x + z", frame).fit(disp=0))
    effect = fit.pair("x", "z", a_values=(0, 3), level=0.99999).effect
    assert max(effect.upper) == 1.0
    assert all(low >= -1 for low in effect.lower)


def test_support_says_where_rows_are(fit, pipes):
    answer = fit.pair("material", "age_years")
    ages = np.array(answer.effect.at)
    assert all(np.array(answer.effect.supported)[ages <= 60])
    wide = po.FittedLogit(
        smf.logit("burst ~ age_years * material", pipes).fit(disp=0),
        predictors={"age_years": po.Predictor(range=(0, 300))},
    ).pair("material", "age_years")
    assert not wide.effect.supported[-1]


# Values


def test_an_answer_goes_to_json_and_back_and_can_be_asked_again(fit, asked):
    answer = fit.pair(**asked)
    text = po.to_json(answer)
    json.loads(text, parse_constant=pytest.fail)
    assert po.from_json(text) == answer
    assert po.from_json(po.to_json(answer.question)) == answer.question
    assert fit.ask(answer.question) == answer
    assert isinstance(hash(answer), int)


def test_a_question_remembers_what_was_asked_and_not_what_was_settled(fit):
    question = fit.pair("age_years", "material").question
    assert question == PairQuestion("age_years", "material")
    assert question.a_values == ()


# Refusals


@pytest.mark.parametrize(
    ("stated", "message"),
    [
        ({"b": "age_years"}, "against itself"),
        ({"b": "colour"}, "no predictor 'colour'"),
        ({"a_values": (20,)}, r"a_values=\(20,\) is not two values"),
        ({"a_values": (20, 30, 40)}, "not two values"),
        ({"a_values": (20, 20)}, "no change"),
        ({"b_values": ("PVC", "wood")}, "no level 'wood'"),
        ({"b_values": ("PVC", "PVC")}, "no change"),
        ({"b_values": "PVC"}, "one text"),
        ({"a_values": ("young", "old")}, "is text"),
        ({"a_values": (float("nan"), 20)}, "missing value"),
        ({"others": {"age_years": 20}}, "others= holds 'age_years'"),
        ({"others": {"material": "PVC"}}, "others= holds 'material'"),
        ({"others": {"soil": "wet"}}, "no level 'wet'"),
        ({"others": "mean"}, "others='mean'"),
        ({"scale": "log"}, "scale='log'"),
        ({"shape": "heat"}, "shape='heat'"),
        ({"shape": "map"}, "material has levels"),
        ({"number": "step"}, "number='step'"),
        ({"test": "score"}, "test='score'"),
        ({"level": 95}, "level=95"),
    ],
)
def test_what_cannot_be_answered_is_refused_with_the_reason(fit, stated, message):
    with pytest.raises(po.QuestionRefused, match=message):
        fit.pair(**{"a": "age_years", "b": "material"} | stated)


@pytest.mark.filterwarnings("ignore:The design matrix is rank-deficient")
def test_a_level_that_nobody_has_is_refused_and_left_out():
    frame = cases()
    fit = po.FittedLogit(glm("left ~ C(spare) + age", frame).fit())
    with pytest.raises(po.QuestionRefused, match=r"No row has spare = 'w'.*'u', 'v'"):
        fit.pair("spare", "age", a_values=("u", "w"))
    answer = fit.pair("age", "spare")
    assert answer.b_change == ("u", "v")
    assert answer.effect.at == ("u", "v")
    assert [line.by for line in answer.lines.lines] == ["u", "v"]


@pytest.mark.filterwarnings("ignore:The design matrix is rank-deficient")
def test_a_combination_that_nobody_has_is_unknown_and_never_a_silent_number():
    frame = cases(900)
    frame = frame[~((frame.soil == "high") & (frame.site == "c"))].reset_index(drop=True)
    fit = po.FittedLogit(glm("left ~ C(soil) * C(site)", frame).fit())
    answer = fit.pair("soil", "site", a_values=("low", "high"), b_values=("a", "c"))
    found = answer.interaction
    assert math.isnan(found.at_profile.estimate)
    assert math.isnan(found.averaged.estimate)
    assert math.isnan(found.ratio.estimate)
    assert (found.at_profile_p_value, found.at_profile.se) == (None, None)
    assert [math.isnan(effect) for effect in answer.effect.estimate] == [False, False, True]
    assert [stretch.start for stretch in answer.effect.stretches] == ["a", "b"]
    assert [math.isnan(at) for at in po.table(answer).estimate[:3]] == [False, False, True]
    known = fit.pair("soil", "site", a_values=("low", "high"), b_values=("a", "b")).interaction
    assert np.isfinite(known.at_profile.se)


# Other kinds of fit


def test_a_case_control_sample_tells_odds_ratios_only():
    frame = cases(900)
    result = logit("left ~ age * site + depth", frame).fit(disp=0)
    fit = po.FittedLogit(result, sampling="case-control")
    for refused in (
        {"scale": "probability"},
        {"scale": "odds", "others": "observed"},
        {"scale": "odds", "b": "depth", "shape": "map"},
    ):
        with pytest.raises(
            po.QuestionRefused, match=r"case-control.*prevalence=0.02.*scale='odds'"
        ):
            fit.pair(**{"a": "age", "b": "site"} | refused)
    answer = fit.pair("age", "site", scale="odds")
    plain = po.FittedLogit(result).pair("age", "site", scale="odds")
    assert answer.lines is None
    assert (answer.interaction.at_profile, answer.interaction.averaged) == (None, None)
    assert answer.counted == 0
    assert answer.effect == plain.effect
    assert answer.interaction.ratio == plain.interaction.ratio
    assert answer.interaction.test == plain.interaction.test
    table = po.table(answer)
    assert "interaction_at_profile" not in set(table.measure)
    assert po.from_json(po.to_json(answer)) == answer


def test_with_a_prevalence_the_corrected_chances_are_crossed():
    frame = cases(900)
    result = logit("left ~ age * site", frame).fit(disp=0)
    answer = po.FittedLogit(result, prevalence=0.03).pair("age", "site")
    share = frame.left.mean()
    shift = -np.log((1 - 0.03) / 0.03 * share / (1 - share))
    weights = np.where(frame.left == 1, 0.03 / share, 0.97 / (1 - share))
    p = {}
    for i in (0, 1):
        for j in (0, 1):
            moved = frame.assign(age=answer.a_change[i], site=answer.b_change[j])
            eta = np.asarray(result.predict(moved, which="linear")) + shift
            p[i, j] = np.average(1 / (1 + np.exp(-eta)), weights=weights)
    expected = p[1, 1] - p[1, 0] - p[0, 1] + p[0, 0]
    assert answer.interaction.averaged.estimate == pytest.approx(expected, rel=1e-9)


def test_a_gee_is_answered_with_its_own_covariance():
    frame = cases(400)
    result = gee("left ~ age * site", frame).fit()
    answer = po.FittedLogit(result).pair("age", "site", scale="odds")
    name = f"age:site[T.{answer.b_change[1]}]"
    width = answer.a_change[1] - answer.a_change[0]
    found = answer.interaction.log_ratio
    assert found.estimate == pytest.approx(width * result.params[name], rel=1e-9)
    assert found.se == pytest.approx(width * result.bse[name], rel=1e-9)


def test_formulaic_gives_patsys_answers(asked):
    frame = po.demo.tessel_bay(rows=800)
    answers = []
    for engine in ("patsy", "formulaic"):
        with formula_engine(engine):
            answers.append(po.FittedLogit(logit(FORMULA, frame).fit(disp=0)).pair(**asked))
    one, other = answers
    assert numbers(other) == pytest.approx(numbers(one), rel=2e-5, abs=1e-8, nan_ok=True)
    assert one.a_change == other.a_change


def test_declared_columns_give_the_formulas_answers():
    frame = cases(600)
    formula = po.FittedLogit(logit("left ~ age * flag + depth", frame).fit(disp=0))
    columns = pd.DataFrame(
        {
            "age": frame.age,
            "yes": frame.flag.astype(float),
            "age_if_yes": frame.age * frame.flag,
            "depth": frame.depth,
        }
    )
    fit = po.FittedLogit(
        sm.Logit(frame.left, sm.add_constant(columns)).fit(disp=0),
        frame[["flag"]],
        derived={"yes": "flag", "age_if_yes": "age * flag"},
    )
    for settings_ in ({}, {"number": "slope"}, {"others": "observed"}, {"scale": "odds"}):
        mine, theirs = (each.pair("age", "flag", **settings_) for each in (formula, fit))
        assert numbers(theirs) == pytest.approx(numbers(mine), rel=1e-6, abs=1e-9, nan_ok=True)


# What does not matter


@pytest.fixture(scope="module")
def small():
    return po.FittedLogit(logit("left ~ age * site + depth * flag", cases(500)).fit(disp=0))


values = st.floats(1.5, 8.5).map(lambda x: round(x, 3))
depths = st.floats(-3, 3).map(lambda x: round(x, 3))
changes = {
    "age": st.tuples(values, values),
    "depth": st.tuples(depths, depths),
    "site": st.permutations(["a", "b", "c"]).map(lambda levels: tuple(levels[:2])),
    "flag": st.sampled_from([(False, True), (True, False)]),
}
pairs = (
    st.permutations(sorted(changes))
    .map(lambda names: names[:2])
    .flatmap(
        lambda names: st.tuples(st.just(tuple(names)), changes[names[0]], changes[names[1]]).filter(
            lambda drawn: drawn[1][0] != drawn[1][1] and drawn[2][0] != drawn[2][1]
        )
    )
)


def of(fit, names, one, other, **settings_):
    return fit.pair(*names, a_values=one, b_values=other, **settings_).interaction


def close(one, other, sign=1.0):
    assert sign * other.estimate == pytest.approx(one.estimate, rel=1e-8, abs=1e-12)
    assert other.se == pytest.approx(one.se, rel=1e-7, abs=1e-12)


@settings(max_examples=30, deadline=None)
@given(pairs)
def test_which_of_the_two_comes_first_does_not_matter(small, drawn):
    names, one, other = drawn
    mine, theirs = of(small, names, one, other), of(small, names[::-1], other, one)
    close(mine.at_profile, theirs.at_profile)
    close(mine.averaged, theirs.averaged)
    close(mine.log_ratio, theirs.log_ratio)
    assert mine.joined == theirs.joined
    if mine.test is not None:
        assert theirs.test.statistic == pytest.approx(mine.test.statistic, rel=1e-8)


@settings(max_examples=30, deadline=None)
@given(pairs)
def test_turning_a_change_round_turns_the_sign(small, drawn):
    names, one, other = drawn
    mine, theirs = of(small, names, one, other), of(small, names, one[::-1], other)
    close(mine.at_profile, theirs.at_profile, -1.0)
    close(mine.averaged, theirs.averaged, -1.0)
    close(mine.log_ratio, theirs.log_ratio, -1.0)
    assert theirs.ratio.estimate == pytest.approx(1 / mine.ratio.estimate)
    assert theirs.test == mine.test


@settings(max_examples=8, deadline=None)
@given(st.sampled_from(["a", "b", "c"]), st.sampled_from(["change", "slope"]))
def test_another_reference_level_changes_nothing(reference, number):
    frame = cases(500)
    plain = po.FittedLogit(logit("left ~ site * age", frame).fit(disp=0, tol=1e-12))
    recoded = po.FittedLogit(
        logit(f"left ~ C(site, Treatment({reference!r})) * age", frame).fit(disp=0, tol=1e-12)
    )
    one, other = (
        fit.pair("site", "age", a_values=("a", "c"), number=number).interaction
        for fit in (plain, recoded)
    )
    close(one.at_profile, other.at_profile)
    close(one.averaged, other.averaged)
    close(one.log_ratio, other.log_ratio)
    assert other.test.statistic == pytest.approx(one.test.statistic, rel=1e-7)


@settings(max_examples=8, deadline=None)
@given(st.sampled_from([-2.0, 0.5, 12.0, 365.25]), st.sampled_from([0.0, 20.0]))
def test_another_unit_changes_slopes_by_the_unit_and_nothing_else(unit, origin):
    frame = cases(500)
    frame["moved"] = frame.age * unit + origin
    one = po.FittedLogit(logit("left ~ age * depth", frame).fit(disp=0, tol=1e-12))
    other = po.FittedLogit(logit("left ~ moved * depth", frame).fit(disp=0, maxiter=200))
    ends = tuple(x * unit + origin for x in (2.0, 7.0))
    mine = one.pair("age", "depth", a_values=(2.0, 7.0)).interaction
    theirs = other.pair("moved", "depth", a_values=ends).interaction
    for name in ("at_profile", "averaged", "log_ratio"):
        assert getattr(theirs, name).estimate == pytest.approx(
            getattr(mine, name).estimate, rel=1e-5
        )
        assert getattr(theirs, name).se == pytest.approx(getattr(mine, name).se, rel=1e-5)
    assert theirs.test.statistic == pytest.approx(mine.test.statistic, rel=1e-5)
    slope = one.pair("age", "depth", number="slope").interaction.averaged
    per_unit = other.pair("moved", "depth", number="slope").interaction.averaged
    assert per_unit.estimate == pytest.approx(slope.estimate / unit, rel=1e-5)


def test_of_very_many_levels_those_compared_and_the_most_frequent_are_told(many_levels):
    fit, counts = many_levels
    answer = fit.pair("x", "place", b_values=("p29", "p00"))
    shown = [line.by for line in answer.lines.lines]
    assert len(shown) == 8
    assert {"p29", "p00"} <= set(shown)
    others = [level for level in shown if level not in ("p29", "p00")]
    left = counts.drop(labels=shown)
    assert counts[others].min() >= left.max()
    assert shown == sorted(shown), "in the order of the levels"
    assert len(answer.effect.at) == 16
    assert "30 values of place" in po.caption(answer)


@pytest.fixture(scope="module")
def many_levels():
    rng = np.random.default_rng(5)
    n = 3_000
    place = np.array([f"p{i:02d}" for i in range(30)])[rng.integers(0, 30, n) ** 2 // 30]
    place[:60] = np.repeat([f"p{i:02d}" for i in range(30)], 2)
    data = pd.DataFrame({"x": rng.normal(size=n), "place": place})
    data["y"] = (rng.uniform(size=n) < 1 / (1 + np.exp(-0.5 * data.x))).astype(int)
    result = smf.glm("y ~ x + place", data, family=sm.families.Binomial()).fit()
    return po.FittedLogit(result), data.place.value_counts()
