"""Whether a fit is fit to be explained: all checks together, the heaviest finding first."""

import dataclasses
import json
from collections import Counter

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.checks.finding import CONCERNS, TOPICS
from plainodds.answers.progress import Stopped
from plainodds.answers.soundness import SoundnessQuestion, answer_soundness, shown_finding
from tests.answers.checks.fits import binomial, invented, model_of

DATA = invented(500)
FORMULA = "y ~ x + w + count + group"


def fitted(formula=FORMULA, frame=DATA, **stated):
    return po.FittedLogit(smf.logit(formula, frame).fit(disp=0), **stated)


@pytest.fixture(scope="module")
def fit():
    return fitted()


@pytest.fixture(scope="module")
def answer(fit):
    return fit.soundness()


def of_topic(answer, topic):
    return [each for each in answer.findings if each.topic == topic]


# --- all of them -------------------------------------------------------------------


def test_every_topic_is_looked_at(answer):
    counted = Counter(each.topic for each in answer.findings)
    assert set(counted) == set(TOPICS)
    assert {topic for topic, n in counted.items() if n > 1} == {"shape"}
    assert {each.about for each in of_topic(answer, "shape")} == {("x",), ("w",), ("count",)}


@pytest.mark.parametrize("rare", [0, 3, 12])
@pytest.mark.filterwarnings("ignore")
def test_the_heaviest_come_first_and_those_of_one_weight_in_the_order_of_topics(rare):
    few = DATA.head(25).assign(group="rare", y=(np.arange(25) < rare).astype(int))
    found = fitted(frame=pd.concat([DATA, few], ignore_index=True)).soundness().findings
    keys = [(-each.weight, TOPICS.index(each.topic)) for each in found]
    assert keys == sorted(keys)
    heaviest = {0: "don't explain yet", 3: "keep in mind", 12: "not known"}[rare]
    assert found[0].concern == heaviest


def test_a_reason_is_given_where_there_is_a_concern_and_nowhere_else(answer):
    separated = fitted(frame=DATA.assign(y=(DATA.x > 55).astype(int)), formula="y ~ w + count")
    for each in (*answer.findings, *separated.soundness().findings):
        assert bool(each.reasons) == (CONCERNS.index(each.concern) >= 2)
        assert (each.concern == "not known") <= bool(each.unknown)


def test_on_ordinary_data_few_findings_raise_a_concern():
    counted = Counter()
    for seed in range(20):
        counted.update(
            each.topic
            for each in fitted(frame=invented(500, seed=100 + seed)).soundness().findings
            if each.weight >= CONCERNS.index("keep in mind")
        )
    # 280 findings, of which one in twenty would be too many
    assert counted.total() <= 10, counted


def test_shown_is_the_heaviest_finding_that_has_evidence():
    answer = fitted().soundness()
    first = shown_finding(answer)
    assert first.evidence is not None
    assert first.weight == max(each.weight for each in answer.findings if each.evidence)


def test_where_nothing_weighs_calibration_is_shown():
    answer = fitted().soundness()
    light = tuple(dataclasses.replace(each, concern="nothing found") for each in answer.findings)
    assert shown_finding(dataclasses.replace(answer, findings=light)).topic == "calibration"


def test_shown_is_what_was_asked_for(fit):
    assert shown_finding(fit.soundness(show="influence")).topic == "influence"
    shown = shown_finding(fit.soundness(show="shape", predictor="w"))
    assert (shown.topic, shown.about) == ("shape", ("w",))
    with pytest.raises(po.QuestionRefused, match="group"):
        shown_finding(fit.soundness(show="shape", predictor="group"))


# --- a value like every answer -----------------------------------------------------


def test_it_goes_to_json_and_back_and_is_asked_again(fit, answer):
    json.loads(po.to_json(answer), parse_constant=pytest.fail)
    again = fit.ask(answer.question)
    # nan is not equal to itself, so texts are compared
    assert po.to_json(po.from_json(po.to_json(answer))) == po.to_json(answer) == po.to_json(again)
    assert isinstance(hash(answer), int)


def test_it_holds_plain_values_only(answer):
    def walk(item):
        if dataclasses.is_dataclass(item):
            for field in dataclasses.fields(item):
                walk(getattr(item, field.name))
        elif isinstance(item, tuple):
            for each in item:
                walk(each)
        else:
            assert item is None or type(item) in (bool, int, float, str)

    walk(answer)


def test_the_table_has_a_row_for_each_finding(answer):
    table = po.table(answer)
    assert list(table.columns) == ["topic", "concern", "about", "reasons", "figures", "unknown"]
    assert list(table.topic) == [each.topic for each in answer.findings]
    amount = table.set_index("topic").figures["amount"]
    (evidence,) = (each.evidence for each in of_topic(answer, "amount"))
    assert f"events = {evidence.events:g}" in amount
    assert "parameters = 5" in amount
    c = next(each.evidence.c for each in of_topic(answer, "discrimination"))
    assert f"c = {c.estimate:.4g} ({c.lower:.4g} to {c.upper:.4g})" in set(table.figures)


# --- groups ------------------------------------------------------------------------


def test_a_column_of_groups_is_read_again_when_asked_again(fit):
    frame = DATA.assign(clinic=DATA.index // 10)
    fit = fitted(frame=frame)
    answer = fit.soundness(groups="clinic")
    (found,) = of_topic(answer, "dependence")
    assert (found.evidence.name, found.evidence.groups) == ("clinic", 50)
    assert of_topic(fit.ask(answer.question), "dependence") == [found]


def test_values_of_groups_must_be_handed_over_again(fit):
    groups = DATA.index.to_numpy() // 10
    question = fit.soundness(groups=groups).question
    with pytest.raises(po.QuestionRefused, match=r"again.*groups=values"):
        fit.ask(question)
    again = answer_soundness(fit.model, question, groups)
    assert of_topic(again, "dependence") == of_topic(fit.soundness(groups=groups), "dependence")
    with pytest.raises(po.QuestionRefused, match="other rows together"):
        answer_soundness(fit.model, question, groups // 2)


# --- long work ---------------------------------------------------------------------


@pytest.mark.parametrize("optimism", ["none", "bootstrap"])
def test_progress_counts_checks_and_resamples(fit, optimism):
    told = []
    question = SoundnessQuestion(optimism=optimism, repeats=4)
    answer_soundness(fit.model, question, progress=lambda *each: told.append(each))
    parts = len(TOPICS) + (4 if optimism == "bootstrap" else 0)
    assert told == [(done, parts) for done in range(1, parts + 1)]


def test_it_is_stopped_by_whoever_is_told(fit):
    def enough(done, parts):
        if done == 3:
            raise Stopped

    with pytest.raises(Stopped):
        answer_soundness(fit.model, SoundnessQuestion(), progress=enough)


@pytest.mark.parametrize("way", ["bootstrap", "cross-validation"])
def test_optimism_is_off_until_it_is_asked_for(fit, answer, way):
    assert of_topic(answer, "calibration")[0].evidence.optimism is None
    asked = fit.soundness(optimism=way, repeats=3, seed=1)
    found = of_topic(asked, "calibration")[0].evidence.optimism
    assert (found.way, found.repeats + found.failed) == (way, 3)
    assert of_topic(fit.ask(asked.question), "calibration") == of_topic(asked, "calibration")


# --- whatever the fit --------------------------------------------------------------


def without_data():
    result = smf.glm(FORMULA, DATA, family=binomial()).fit()
    result.remove_data()
    return model_of(result, data=DATA)


def grouped():
    frame = DATA.groupby(["count", "group"]).y.agg(events="sum", all="size").reset_index()
    frame["others"] = frame["all"] - frame.events
    return model_of(smf.glm("events + others ~ count + group", frame, family=binomial()).fit())


def glm(formula=FORMULA, **stated):
    return model_of(smf.glm(formula, DATA, family=binomial(), **stated).fit())


FITS = {
    "grouped counts": grouped,
    "frequency weights": lambda: glm(freq_weights=DATA.index.to_numpy() % 3 + 1),
    "variance weights": lambda: glm(var_weights=np.linspace(0.5, 2, len(DATA))),
    "an offset": lambda: glm(offset=np.linspace(-1, 1, len(DATA))),
    "no intercept": lambda: glm("y ~ 0 + x + w"),
    "arrays": lambda: model_of(sm.Logit(DATA.y, sm.add_constant(DATA[["x", "w"]])).fit(disp=0)),
    "a GEE": lambda: model_of(
        smf.gee(FORMULA, DATA.index.to_numpy() // 5, DATA, family=binomial()).fit()
    ),
    "a robust covariance": lambda: model_of(smf.logit(FORMULA, DATA).fit(disp=0, cov_type="HC0")),
    "clusters": lambda: model_of(
        smf.logit(FORMULA, DATA).fit(
            disp=0, cov_type="cluster", cov_kwds={"groups": DATA.index.to_numpy() // 5}
        )
    ),
    "a penalty": lambda: model_of(smf.logit(FORMULA, DATA).fit_regularized(alpha=1.0, disp=0)),
    "no data": without_data,
    "a chosen sample": lambda: fitted(sampling="case-control").model,
    "a chosen sample of a known population": lambda: (
        fitted(sampling="case-control", prevalence=0.02).model
    ),
    "splines": lambda: glm("y ~ bs(x, df=5) * group + I(w**2) + w"),
    "one level only": lambda: glm("y ~ group"),
    "nine rows": lambda: model_of(smf.glm("y ~ w", DATA[9:18], family=binomial()).fit()),
    "separated outcomes": lambda: model_of(
        smf.glm("y ~ x + w", DATA.assign(y=(DATA.x > 50) * 1), family=binomial()).fit()
    ),
    "a column twice": lambda: model_of(
        smf.glm("y ~ x + twice", DATA.assign(twice=2 * DATA.x), family=binomial()).fit()
    ),
}


@pytest.mark.filterwarnings("ignore")
@pytest.mark.parametrize("kind", FITS)
def test_whatever_the_fit_every_topic_is_looked_at_or_says_why_not(kind):
    model = FITS[kind]()
    answer = answer_soundness(model, SoundnessQuestion())
    seen = {each.topic for each in answer.findings}
    numbers = any(facts.is_number for facts in model.subject.predictors)
    assert seen >= set(TOPICS) - (set() if numbers else {"shape"})
    for each in answer.findings:
        assert each.evidence is not None or each.unknown
    assert po.to_json(po.from_json(po.to_json(answer))) == po.to_json(answer)
    assert len(po.table(answer)) == len(answer.findings)


def test_without_data_only_what_can_be_known_is_said():
    answer = answer_soundness(without_data(), SoundnessQuestion())
    known = {each.topic for each in answer.findings if each.concern != "not known"}
    assert known <= {"convergence", "collinearity", "standard errors", "missing"}
    reasons = {each.topic: each.unknown for each in answer.findings}
    for topic in ("amount", "levels", "shape", "calibration", "influence", "separation"):
        assert reasons[topic] == "no outcome"


# --- what is refused ---------------------------------------------------------------


@pytest.mark.parametrize(
    ("asked", "words"),
    [
        ({"show": "vibes"}, ["show='vibes'", "'influence'"]),
        ({"predictor": "colour"}, ["'colour'", "count"]),
        ({"optimism": "jackknife"}, ["'jackknife'", "'bootstrap'"]),
        ({"optimism": "bootstrap", "repeats": 0}, ["repeats=0"]),
        ({"repeats": 2.5}, ["repeats=2.5"]),
        ({"seed": -1}, ["seed=-1"]),
        ({"level": 95}, ["level=95", "0.95"]),
        ({"groups": "clinic"}, ["'clinic'", "group"]),
    ],
)
def test_what_cannot_be_asked_is_refused_with_the_way_out(fit, asked, words):
    with pytest.raises(po.QuestionRefused) as refusal:
        fit.soundness(**asked)
    for word in words:
        assert word in str(refusal.value)


def test_an_optimism_that_cannot_be_had_is_refused():
    fit = po.FittedLogit(
        smf.gee("y ~ x", DATA.index.to_numpy() // 5, DATA, family=binomial()).fit()
    )
    with pytest.raises(po.QuestionRefused, match="optimism='bootstrap'"):
        fit.soundness(optimism="bootstrap", repeats=2)
