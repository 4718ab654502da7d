"""Words about real fits are well made, and their figures are those of the table."""

import numpy as np
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.phrases import alternative, words
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
