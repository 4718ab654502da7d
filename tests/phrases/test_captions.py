"""What stands beneath a figure, and how its numbers were computed."""

from dataclasses import replace

import pytest

import plainodds as po
from plainodds.phrases.references import REFERENCES
from tests.phrases import made, made_changes

ANSWERS = {
    "odds": made.odds_answer(made.odds_row()),
    "curve": made.curve_answer(),
    "curve, observed": made.curve_answer(others="observed"),
    "profile": made.profile_answer(),
    "effects": made_changes.effects_answer(made_changes.effect_row()),
    "change": made_changes.change_answer(),
}


def without_interval(answer):
    return replace(answer, subject=replace(answer.subject, no_interval="The fit is penalised."))


@pytest.fixture(params=ANSWERS)
def answer(request):
    return ANSWERS[request.param]


def test_a_caption_says_what_whose_intervals_and_from_how_many(answer):
    told = po.caption(answer)
    assert "burst this winter" in told
    assert "95% confidence interval" in told
    assert "6,000 pipes" in told
    assert "logistic regression" in told


def test_a_caption_is_whole_sentences_without_gaps(answer):
    told = po.caption(answer)
    assert told.endswith(".")
    assert "  " not in told
    assert ".." not in told
    assert all(part[:1] == part[:1].upper() for part in told.split(". "))


def test_a_caption_does_not_speak_of_intervals_that_are_not_there(answer):
    told = po.caption(without_interval(answer))
    assert "95%" not in told
    assert "No intervals can be given: The fit is penalised." in told


def test_every_work_that_a_note_cites_is_listed_and_no_other(answer):
    note = po.methods_note(answer)
    text = " ".join(note.sentences)
    cited = {full for short, full in REFERENCES.items() if short in text}
    assert set(note.references) == cited
    assert cited
    assert list(note.references) == sorted(note.references)


def test_a_note_names_model_intervals_and_versions(answer):
    text = str(po.methods_note(answer))
    assert "logistic regression" in text
    assert "95% confidence intervals are" in text
    assert "Computed with plainodds " in text
    assert "statsmodels " in text
    assert "No intervals are given" in str(po.methods_note(without_interval(answer)))


def test_a_note_says_what_the_question_asked_for():
    odds = made.odds_answer(made.odds_row())
    by_likelihood = replace(odds, question=replace(odds.question, interval="likelihood"))
    assert "Venzon" not in str(po.methods_note(odds))
    assert "Venzon" in str(po.methods_note(by_likelihood))
    effects = ANSWERS["effects"]
    drawn = replace(effects, question=replace(effects.question, sample="drawn"))
    assert "Dowd" not in str(po.methods_note(effects))
    assert "Dowd" in str(po.methods_note(drawn))
    assert "averaged" in str(po.methods_note(ANSWERS["curve, observed"]))
    assert "averaged" not in str(po.methods_note(ANSWERS["curve"]))


def test_a_corrected_case_control_sample_is_named():
    answer = ANSWERS["change"]
    corrected = replace(
        answer, subject=replace(answer.subject, sampling="case-control", prevalence=0.02)
    )
    assert "King" in str(po.methods_note(corrected))
    assert "2%" in str(po.methods_note(corrected))
    assert "case-control" in po.caption(corrected)


@pytest.mark.parametrize("tell", [po.caption, po.methods_note])
def test_what_is_no_answer_has_none(tell):
    with pytest.raises(TypeError):
        tell("an answer")
