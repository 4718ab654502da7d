"""Odds ratios in German: chances first, every figure from the answer, wholly German."""

import math
from dataclasses import replace
from itertools import product

import pytest

from plainodds.answers.estimate import Estimate
from plainodds.answers.odds import OddsQuestion
from plainodds.phrases import alternative, words
from tests.phrases.german.reading import faults, unaccounted, with_german_labels
from tests.phrases.made import odds_answer, odds_row
from tests.phrases.test_odds import LOGS, numbers_of, rows_of

GRID = list(product(LOGS, (0.0003, 0.08, 0.23, 0.97), (0.15, None)))


@pytest.mark.parametrize(("log", "typical", "se"), GRID)
@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_every_figure_is_the_answers_own_and_sentences_are_german(log, typical, se, audience):
    answer = with_german_labels(odds_answer(*rows_of(log, se), typical=typical))
    known, said = [*numbers_of(answer), len(answer.rows)], words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_the_chance_comes_before_the_ratio():
    told = words(with_german_labels(odds_answer(odds_row(log=0.7), typical=0.23))).sentences
    assert [each.replace("\u00a0", " ") for each in told] == [
        "Für einen typischen Fall (Rohr), jedes Merkmal auf seinem Median oder seiner häufigsten "
        "Stufe, beträgt die Wahrscheinlichkeit für „Rohrbruch in diesem Winter“ 23 %, das sind 23 "
        "von 100.",
        "Je 10 Jahre mehr (Rohralter) beträgt die Wahrscheinlichkeit für einen typischen Fall "
        "(Rohr) 38 % statt 23 %, das sind 38 statt 23 von 100; die Chance (Odds) wird mit 2,01 "
        "(95-%-Intervall 1,66 bis 2,45) multipliziert, ist also höher.",
    ]


def test_odds_are_kept_apart_from_chances():
    answer = with_german_labels(odds_answer(odds_row(log=0.7), typical=0.23))
    cautions = " ".join(words(answer).cautions)
    assert "das ist nicht die Wahrscheinlichkeit selbst" in cautions
    assert "(Odds Ratio) ist kein Verhältnis von Wahrscheinlichkeiten" in cautions


def test_an_open_interval_leaves_the_side_open_and_another_does_not():
    wide, narrow = (odds_answer(odds_row(log=0.1, se=se)) for se in (0.2, 0.01))
    assert "offen bleibt" in words(wide).sentences[1]
    assert "offen bleibt" not in words(narrow).sentences[1]
    assert "ist also höher" in words(narrow).sentences[1]


def test_an_end_that_does_not_exist_is_said_to_be_none():
    row = odds_row(log=2.5)
    row = replace(
        row,
        odds_ratio=replace(row.odds_ratio, lower=1.42, upper=math.inf),
        log_odds_ratio=replace(row.log_odds_ratio, lower=math.log(1.42), upper=math.inf),
    )
    answer = odds_answer(row, question=OddsQuestion(interval="likelihood"))
    answer = with_german_labels(answer)
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert "(95-%-Intervall ab 1,42, ohne obere Grenze)" in " ".join(said.sentences)
        assert "Es gibt keine obere Grenze bei Rohralter" in " ".join(said.cautions)
        assert all(faults(each) == [] for each in (*said.sentences, *said.cautions))


def test_models_side_by_side_and_what_is_not_known():
    unknown = Estimate(math.nan, math.nan, math.nan, math.nan)
    rows = (
        odds_row(model="A"),
        odds_row(model="B", odds_ratio=unknown, log_odds_ratio=unknown, p_value=math.nan),
    )
    answer = with_german_labels(odds_answer(*rows, question=OddsQuestion(models=("A", "B"))))
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert all(faults(each) == [] for each in (*said.sentences, *said.cautions))
    assert "nicht bekannt: die Daten lassen es offen" in words(answer).sentences[2]
    assert "Im Modell „B“ gilt: " in words(answer).sentences[2]


@pytest.mark.parametrize("typical", [0.02, 0.3])
def test_a_case_control_sample_tells_no_chances(typical):
    answer = odds_answer(odds_row(log=0.7), typical=typical, sampling="case-control")
    said = words(with_german_labels(answer))
    assert len(said.sentences) == 1
    assert "Wahrscheinlichkeit" not in said.sentences[0]
    assert any("aber keine Wahrscheinlichkeiten" in each for each in said.cautions)
