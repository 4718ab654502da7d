"""Answers are immutable, compare by value, go to JSON and back, and become tidy tables."""

import dataclasses
import json

import numpy as np
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.questions import Question

ASKED = {
    "odds": lambda fit: fit.odds(
        steps={"age_years": 10}, references={"soil": "high"}, given={"material": ["PVC"]}
    ),
    "odds by size": lambda fit: fit.odds(["soil", "pressure_m"], order="size", level=0.9),
    "curve": lambda fit: fit.curve("age_years", by="material"),
    "curve, observed": lambda fit: fit.curve("soil", others="observed"),
    "curve, slope": lambda fit: fit.curve(
        "age_years", "material", scale="slope", others={"soil": "low"}, at=np.arange(3)
    ),
    "profile": lambda fit: fit.profile({"age_years": np.int64(40), "material": "PVC"}),
    "profile against": lambda fit: fit.profile({"age_years": 80.5}, against={}),
}


@pytest.fixture(params=ASKED)
def answer(request, fit):
    return ASKED[request.param](fit)


def test_an_answer_goes_to_json_and_back(answer):
    text = po.to_json(answer)
    json.loads(text, parse_constant=pytest.fail)
    assert po.from_json(text) == answer
    assert po.from_json(po.to_json(answer.question)) == answer.question


def test_asking_the_question_again_gives_an_equal_answer(fit, answer):
    assert fit.ask(answer.question) == answer


def test_an_answer_is_immutable_and_hashable(answer):
    with pytest.raises(dataclasses.FrozenInstanceError):
        answer.question = None
    assert isinstance(hash(answer), int)
    assert isinstance(hash(answer.question), int)


def test_an_answer_holds_plain_values_only(answer):
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


def test_every_table_has_estimate_and_interval(answer):
    table = po.table(answer)
    assert {"estimate", "se", "lower", "upper"} <= set(table.columns)
    assert (table.lower <= table.estimate).all()
    assert (table.estimate <= table.upper).all()


def test_a_curves_columns_are_named_after_its_predictors(fit):
    table = po.table(fit.curve("age_years", by="material", at=[20, 40]))
    assert list(table.columns[:2]) == ["age_years", "material"]
    assert list(table.age_years) == [20, 40] * 3


def test_the_ledgers_table_adds_up(fit):
    answer = fit.profile({"age_years": 80})
    rows = po.ledger(answer)
    assert rows.estimate.sum() == pytest.approx(answer.point.linear_predictor.estimate)


def test_without_a_covariance_every_answer_says_why_and_draws_no_interval(pipes):
    fit = po.FittedLogit(
        smf.logit("burst ~ age_years * material", pipes).fit_regularized(alpha=1.0, disp=0)
    )
    for ask in (
        fit.odds,
        lambda: fit.curve("age_years", others="observed"),
        lambda: fit.curve("age_years", scale="slope"),
        lambda: fit.profile({"age_years": 50}, against={}),
    ):
        answer = ask()
        assert "penalised" in answer.subject.no_interval
        table = po.table(answer)
        assert table.estimate.notna().all()
        assert table[["se", "lower", "upper"]].isna().all(axis=None)
        assert po.from_json(po.to_json(answer)) == answer


def test_a_question_of_another_kind_is_refused(fit):
    class Foreign(Question):
        pass

    with pytest.raises(po.QuestionRefused, match="Foreign"):
        fit.ask(Foreign())
