"""Words about real fits are well made, and their figures are those of the table."""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.phrases import alternative, words
from plainodds.phrases.pair_corners import corners
from tests.phrases.reading import faults, figures, says

PIPES = po.demo.tessel_bay().iloc[:2500]


@pytest.fixture(scope="module")
def fit():
    formula = "burst ~ age_years * material + soil + bs(pressure_m, df=4) + past_repairs"
    return po.FittedLogit(
        smf.logit(formula, PIPES).fit(disp=False),
        predictors={
            "age_years": po.Predictor(label="Pipe age", unit="years", step=10),
            "pressure_m": po.Predictor(label="Pressure", unit="metres of head"),
        },
        outcome=po.Outcome(event="a burst this winter", case="pipe", cases="pipes"),
    )


QUESTIONS = {
    "odds": lambda fit: fit.odds(),
    "odds against another level": lambda fit: fit.odds("soil", references={"soil": "high"}),
    "odds between two values": lambda fit: fit.odds(between={"pressure_m": (40, 60)}),
    "curve": lambda fit: fit.curve("age_years", by="material"),
    "curve by a number": lambda fit: fit.curve("age_years", by="past_repairs"),
    "curve averaged": lambda fit: fit.curve("age_years", others="observed"),
    "curve of few points": lambda fit: fit.curve("age_years", at=[20, 40, 60]),
    "curve of levels": lambda fit: fit.curve("soil", by="material"),
    "curve of odds": lambda fit: fit.curve("pressure_m", scale="odds"),
    "curve of the linear predictor": lambda fit: fit.curve(
        "past_repairs", scale="linear_predictor", others={"material": "PVC"}
    ),
    "slope": lambda fit: fit.curve("age_years", by="material", scale="slope"),
    "slope averaged": lambda fit: fit.curve("pressure_m", scale="slope", others="observed"),
    "typical profile": lambda fit: fit.profile(),
    "profile": lambda fit: fit.profile({"age_years": 80, "material": "PVC"}),
    "profile against another": lambda fit: fit.profile({"age_years": 80}, against={"soil": "high"}),
    "odds by likelihood": lambda fit: fit.odds("past_repairs", interval="likelihood"),
    "change": lambda fit: fit.change("age_years", 20, 60),
    "change of several": lambda fit: fit.change(
        {"age_years": (60, 0), "material": ("cast iron", "PVC")}, where={"soil": ("low", "high")}
    ),
    "shift": lambda fit: fit.change(
        "age_years", po.Shift(by=-10, lowest=0), where=(PIPES["age_years"] > 30).to_numpy()
    ),
    "change at a profile": lambda fit: fit.change(
        "past_repairs", 0, 2, others={"material": "PVC"}, level=0.9
    ),
    "change beyond the data": lambda fit: fit.change("age_years", 20, 300, sample="drawn"),
    "effects": lambda fit: fit.effects(),
    "effects by levels": lambda fit: fit.effects(by="material", where={"age_years": (20, 60)}),
    "effects of steps": lambda fit: fit.effects(["age_years", "past_repairs"], number="step"),
    "effects at the typical profile": lambda fit: fit.effects(others="typical"),
    "effects at a profile": lambda fit: fit.effects(others={"soil": "high"}, by="material"),
    "pair of levels": lambda fit: fit.pair("material", "soil", b_values=("low", "high")),
    "pair averaged": lambda fit: fit.pair("soil", "age_years", others="observed"),
    "pair of a number and a level": lambda fit: fit.pair("age_years", "material"),
    "pair on the odds scale": lambda fit: fit.pair(
        "material", "age_years", scale="odds", test="likelihood_ratio"
    ),
    "pair of slopes": lambda fit: fit.pair("age_years", "pressure_m", number="slope"),
    "pair of slopes averaged": lambda fit: fit.pair(
        "past_repairs", "pressure_m", number="slope", others="observed", scale="odds"
    ),
    "pair as a map": lambda fit: fit.pair(
        "age_years", "pressure_m", shape="map", others={"soil": "high"}
    ),
    "pair of stated values": lambda fit: fit.pair(
        "age_years", "past_repairs", a_values=(60, 20), b_values=(0, 3), level=0.9
    ),
    "profile beyond the data": lambda fit: fit.profile({"age_years": 300}),
}


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize("question", QUESTIONS)
def test_sentences_are_well_made(fit, question, audience):
    answer = QUESTIONS[question](fit)
    said = words(answer, audience)
    assert said.sentences
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_each_odds_ratio_of_the_table_is_said_with_its_interval(fit):
    answer = fit.odds()
    table = po.table(answer)
    told = words(answer, "technical").sentences
    for sentence, (_, row) in zip(told, table.iterrows(), strict=False):
        for number in (row.estimate, row.lower, row.upper):
            assert says(sentence, number)


def test_the_curves_ends_are_those_of_the_table(fit):
    answer = fit.curve("past_repairs")
    table = po.table(answer)
    told = words(answer).sentences[0]
    supported = table[table.supported]
    for row in (supported.iloc[0], supported.iloc[-1]):
        assert says(told, row.estimate, 100)


def test_a_profiles_figures_are_those_of_the_table(fit):
    answer = fit.profile({"age_years": 80}, against={"age_years": 20})
    table = po.table(answer).set_index(["profile", "scale"])
    told = " ".join(words(answer).sentences)
    for profile in ("profile", "against"):
        assert says(told, table.loc[(profile, "probability"), "estimate"], 100)
    for measure, unit in (("risk_difference", 100), ("risk_ratio", 1), ("odds_ratio", 1)):
        assert says(told, abs(table.loc[("profile against", measure), "estimate"]), unit)


def test_beyond_the_data_comes_first_among_the_cautions(fit):
    answer = fit.profile({"age_years": 300})
    highest = PIPES["age_years"].max()
    caution = words(answer).cautions[0]
    assert caution.startswith("This profile lies beyond the data: pipe age 300 years")
    assert says(caution, highest)


def test_chances_from_odds_ratios_are_those_of_the_model(fit):
    """The words turn odds ratios into chances; the model must give the same chances."""
    for row, sentence in zip(
        fit.odds("past_repairs").rows, words(fit.odds("past_repairs")).sentences[1:], strict=True
    ):
        start = dict(fit.profile().point.values)["past_repairs"]
        size = row.end - row.start
        after = fit.profile({"past_repairs": start + size}).point.probability.estimate
        assert says(sentence, after, 100)


def test_chances_at_another_reference_are_those_of_the_model(fit):
    told = words(fit.odds("soil", references={"soil": "high"})).sentences[1:]
    for sentence in told:
        assert "rather than" in sentence
    before = fit.profile({"soil": "high"}).point.probability.estimate
    rather = [figures(sentence.split("rather than")[2])[0] for sentence in told]
    assert len(rather) == 2
    assert all(abs(value - 100 * before) <= half * 1.001 for value, half in rather)


def test_numbers_of_numpy_make_no_difference(fit):
    one, other = fit.profile({"age_years": 80}), fit.profile({"age_years": np.int64(80)})
    assert str(words(one)) == str(words(other))


def test_a_changes_figures_are_those_of_the_table(fit):
    answer = fit.change("age_years", 20, 60)
    table = po.table(answer).set_index("measure")
    for audience in ("plain", "technical"):
        told = " ".join(words(answer, audience).sentences)
        for measure in ("from", "to", "risk_difference"):
            for number in table.loc[measure, ["estimate", "lower", "upper"]]:
                assert says(told, number, 100)
        for measure in ("risk_ratio", "odds_ratio", "per_1000"):
            for number in table.loc[measure, ["estimate", "lower", "upper"]]:
                assert says(told, number)
        assert says(told, table.loc["number_needed", "estimate"])


def test_each_effect_of_the_table_is_said_with_its_interval(fit):
    answer = fit.effects()
    plain = " ".join(words(answer).sentences)
    technical = words(answer, "technical").sentences
    for sentence, (_, row) in zip(technical, po.table(answer).iterrows(), strict=False):
        for number in (row.estimate, row.lower, row.upper):
            assert says(sentence, abs(number), 100) or says(sentence, number, 100)
            assert says(plain, abs(number), 100)


def test_the_four_chances_are_those_of_the_profiles(fit):
    answer = fit.pair("age_years", "material", a_values=(20, 60), b_values=("cast iron", "PVC"))
    told = words(answer).sentences[0]
    for material in ("cast iron", "PVC"):
        for age in (20, 60):
            profile = fit.profile({"age_years": age, "material": material})
            assert says(told, profile.point.probability.estimate, 100)


@pytest.mark.parametrize(
    "names",
    [("material", "pressure_m"), ("pressure_m", "material"), ("pressure_m", "past_repairs")],
)
@pytest.mark.parametrize("others", ["typical", "observed"])
@pytest.mark.parametrize("scale", ["probability", "odds"])
def test_the_four_chances_lie_on_the_lines_and_cross_to_the_interaction(fit, names, others, scale):
    answer = fit.pair(*names, others=others, scale=scale)
    first, second = corners(answer).differences
    found = answer.interaction
    wanted = found.at_profile if others == "typical" else found.averaged
    assert second - first == pytest.approx(wanted.estimate, abs=1e-12)
    assert "intervals of the four chances" in str(words(answer))


def test_the_four_averages_are_those_of_the_changes(fit):
    answer = fit.pair("soil", "past_repairs", others="observed", b_values=(0, 2))
    told = words(answer).sentences
    assert answer.a_change == ("low", "moderate")
    for repairs in (0, 2):
        change = fit.change({"soil": ("low", "moderate"), "past_repairs": (repairs, repairs)})
        for chance in (change.start, change.end):
            assert says(told[0], chance.estimate, 100)
        assert says(told[1], abs(change.comparison.risk_difference.estimate), 1000)


def test_an_interactions_figures_are_those_of_the_answer_on_both_scales(fit):
    answer = fit.pair("age_years", "material", a_values=(20, 60), b_values=("cast iron", "PVC"))
    found = answer.interaction
    plain, technical = (" ".join(words(answer, each).sentences) for each in ("plain", "technical"))
    for number in (found.at_profile.estimate, found.at_profile.lower, found.at_profile.upper):
        assert says(plain, abs(number), 1000)
        assert says(technical, number, 100)
    for number in (found.averaged.estimate, found.averaged.lower, found.averaged.upper):
        assert says(plain, abs(number), 100)
        assert says(technical, number, 100)
    for told in (plain, technical):
        for number in (found.ratio.estimate, found.ratio.lower, found.ratio.upper):
            assert says(told, number)
    odds = fit.odds("age_years", between={"age_years": (20, 60)})
    for row in odds.rows:
        if dict(row.given)["material"] in ("cast iron", "PVC"):
            assert says(plain, row.odds_ratio.estimate)
            assert says(plain, row.odds_ratio.lower)


def test_an_interaction_of_a_case_control_sample_is_told_in_odds(fit):
    result = smf.logit("burst ~ age_years * soil", PIPES).fit(disp=False)
    sampled = po.FittedLogit(result, sampling="case-control")
    for audience in ("plain", "technical"):
        said = words(sampled.pair("soil", "age_years", scale="odds"), audience)
        told = " ".join(said.sentences).replace("of chances on the logit scale", "")
        assert "chance" not in told
        assert "ratio of odds ratios" in told.lower()
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []


def test_a_case_control_sample_tells_no_chances_unless_the_populations_share_is_stated(fit):
    result = smf.logit("burst ~ age_years + soil", PIPES).fit(disp=False)
    sampled = po.FittedLogit(result, sampling="case-control")
    for audience in ("plain", "technical"):
        said = words(sampled.odds(), audience)
        assert "%" not in " ".join(said.sentences).replace("95% interval", "")
        assert any("odds ratios but no chances" in caution for caution in said.cautions)
    stated = po.FittedLogit(result, prevalence=0.004)
    said = words(stated.odds())
    assert says(said.sentences[0], stated.profile().point.probability.estimate, 100)
    assert any("in the population of 0.4%" in caution for caution in said.cautions)


def test_an_open_end_of_a_likelihood_interval_is_said_to_be_open():
    separated = PIPES.assign(bad=(PIPES["burst"] == 1) & (PIPES["age_years"] > 60))
    result = smf.glm("burst ~ bad + past_repairs", separated, family=sm.families.Binomial()).fit()
    answer = po.FittedLogit(result).odds("bad", interval="likelihood")
    said = words(answer)
    assert "no upper end)" in words(answer, "technical").sentences[0]
    assert "There is no upper end for bad: the data do not rule out any larger value." in (
        said.cautions
    )
    for sentence in (*said.sentences, *said.cautions):
        assert faults(sentence) == []


@pytest.mark.parametrize("interval", ["wald", "likelihood"])
def test_an_odds_ratio_without_a_finite_estimate_says_whose_outcome_never_varies(interval):
    separated = PIPES.assign(bad=(PIPES["burst"] == 1) & (PIPES["age_years"] > 60))
    result = smf.glm("burst ~ bad + past_repairs", separated, family=sm.families.Binomial()).fit()
    answer = po.FittedLogit(result).odds(interval=interval)
    said = words(answer)
    told = f"has no finite estimate: all {separated['bad'].sum()} cases with bad yes had the event"
    (about_bad,) = [sentence for sentence in said.sentences if told in sentence]
    assert "95% interval goes from " in about_bad
    assert about_bad.endswith(" upwards without an end.")
    assert any("no finite odds ratio for bad: " in caution for caution in said.cautions)
    technical = words(answer, "technical")
    assert any("no finite value (95% interval from " in each for each in technical.sentences)
    for sentence in (*said.sentences, *said.cautions, *technical.sentences, *technical.cautions):
        assert faults(sentence) == []
    assert faults(alternative(answer)) == []


def test_an_odds_ratio_of_nought_is_said_to_have_no_end_below():
    spared = PIPES.assign(spared=(PIPES["burst"] == 0) & (PIPES["age_years"] > 60))
    result = smf.glm("burst ~ spared", spared, family=sm.families.Binomial()).fit()
    said = words(po.FittedLogit(result).odds())
    told = f"none of the {spared['spared'].sum()} cases with spared yes had the event"
    assert told in said.sentences[-1]
    assert said.sentences[-1].endswith(" downwards to 0.")


def test_a_change_that_the_data_leave_open_is_said_to_be_not_known():
    doubled = PIPES.assign(months=12 * PIPES["age_years"])
    result = smf.glm("burst ~ age_years + months", doubled, family=sm.families.Binomial()).fit()
    said = words(po.FittedLogit(result).odds())
    assert all("not known" in sentence for sentence in said.sentences[1:])
    assert any("left open by the data" in caution for caution in said.cautions)
    for sentence in (*said.sentences, *said.cautions):
        assert faults(sentence) == []
