"""Where a reading can hurt, and what may be called an effect."""

from dataclasses import replace
from typing import get_args

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.model.predictors import Stakes
from tests.phrases import made, made_changes

ANSWERS = {
    "odds": made.odds_answer(made.odds_row()),
    "curve": made.curve_answer(),
    "profile": made.profile_answer(),
    "effects": made_changes.effects_answer(made_changes.effect_row()),
    "change": made_changes.change_answer(),
}
EVERYONE = pytest.mark.parametrize("answer", ANSWERS.values(), ids=ANSWERS)
AUDIENCES = pytest.mark.parametrize("audience", ["plain", "technical"])


def with_stakes(answer, stakes):
    outcome = replace(answer.subject.outcome, stakes=stakes)
    return replace(answer, subject=replace(answer.subject, outcome=outcome))


def with_reason(answer, reason):
    setting = replace(answer.subject.setting, causal=True, reason=reason)
    return replace(answer, subject=replace(answer.subject, setting=setting))


@pytest.mark.parametrize("stakes", get_args(Stakes))
@AUDIENCES
@EVERYONE
def test_stakes_bring_two_cautions_to_every_answer(answer, audience, stakes):
    plain, told = po.words(answer, audience), po.words(with_stakes(answer, stakes), audience)
    assert told.sentences == plain.sentences
    added = [each for each in told.cautions if each not in plain.cautions]
    assert len(added) == 2
    assert "never which" in added[0]
    assert "pipes" in added[0]


def test_each_kind_of_stakes_names_who_decides():
    said = {s: po.words(with_stakes(ANSWERS["odds"], s)).cautions[-1] for s in get_args(Stakes)}
    assert "licensed practitioners" in said["health"]
    assert "licensed engineers" in said["safety"]
    assert "law" in said["money"]
    assert "law" in said["rights"]
    assert len(set(said.values())) == len(said)


@AUDIENCES
@EVERYONE
def test_association_is_said_unless_the_design_allows_more(answer, audience):
    plain = str(po.words(answer, audience))
    causal = str(po.words(with_reason(answer, "pipes were relined by lot."), audience))
    assert "what goes with what" in plain
    assert "by lot" not in plain
    assert "what goes with what" not in causal
    assert "for this reason: pipes were relined by lot. The model" in causal


@pytest.fixture(scope="module")
def result():
    return smf.logit("burst ~ age_years", po.demo.tessel_bay(rows=600)).fit(disp=0)


def test_stakes_and_reason_are_stated_with_the_fit_and_in_its_code(result):
    fit = po.FittedLogit(
        result,
        outcome=po.Outcome(event="a burst", stakes="safety"),
        causal=True,
        reason="mains were\nchosen by lot",
    )
    answer = fit.odds()
    assert "a low chance is no clearance" in str(po.words(answer))
    assert "mains were chosen by lot" in str(po.words(answer))
    scope = {"result": result}
    exec(po.code(answer), scope)
    assert scope["answer"] == answer


@pytest.mark.parametrize(
    ("stated", "message"),
    [
        ({"causal": True}, "needs a reason"),
        ({"causal": True, "reason": " \n"}, "needs a reason"),
        ({"reason": "by lot"}, "goes with causal=True"),
        ({"causal": "by lot"}, "in words"),
        ({"outcome": po.Outcome(stakes="honour")}, "'health', 'safety', 'money', 'rights'"),
    ],
)
def test_half_a_statement_is_refused_with_the_way_out(result, stated, message):
    with pytest.raises(po.FitRefused, match=message):
        po.FittedLogit(result, **stated)
