"""Changes in German: absolute before relative, both framings, for whom."""

import math
from dataclasses import replace

import pytest

from plainodds.answers.comparing import number_needed
from plainodds.answers.estimate import Estimate
from plainodds.answers.moves import Move, Shift
from plainodds.answers.where import Mask
from plainodds.phrases import alternative, words
from tests.phrases.german.reading import faults, unaccounted, with_german_labels
from tests.phrases.made_changes import AGE, change_answer
from tests.phrases.test_change import GRID, numbers_of


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("etas", "moves", "others", "se"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_german(
    etas, moves, others, se, audience
):
    answer = with_german_labels(change_answer(*etas, moves, se, others=others))
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_a_change_is_told_absolute_before_relative_and_from_both_sides():
    told = words(with_german_labels(change_answer())).sentences
    assert [each.replace("\u00a0", " ") for each in told] == [
        "Mit Rohralter = 60 statt 20 Jahre, alles andere wie es ist, beträgt die mittlere "
        "Wahrscheinlichkeit für „Rohrbruch in diesem Winter“ bei Fällen (Rohre) wie denen in den "
        "Daten 18 % statt 8,3 %, das sind 18 statt 8 von 100.",
        "Die 95-%-Intervalle der beiden sind 13 % bis 25 % und 6 % bis 12 %.",
        "Das sind 10 mehr je 100 (95-%-Intervall 8 bis 12 mehr), anders gesagt 9,9 Prozentpunkte "
        "höher (8,0 bis 11,9 höher).",
        "Die Wahrscheinlichkeit, dass dies nicht eintritt, beträgt 82 % statt 91,7 %, das sind 82 "
        "statt 92 von 100.",
        "Als Verhältnisse gesagt wird die mittlere Wahrscheinlichkeit mit 2,19 (95-%-Intervall "
        "1,48 bis 3,25) multipliziert und die Chance (Odds) mit 2,46 (95-%-Intervall 1,66 bis "
        "3,64).",
        "Auf je 10 verglichene Fälle (Rohre) kommt ein Ereignis mehr (95-%-Intervall 8,4 bis 13).",
        "Jeder Fall (Rohr) behält seine eigenen Werte der übrigen Merkmale; gemittelt werden die "
        "Wahrscheinlichkeiten über 6.000 Zeilen.",
    ]


@pytest.mark.parametrize(
    ("moves", "told"),
    [
        ((("age_years", Shift(by=-10, lowest=0)),),
         "Rohralter um 10 Jahre niedriger als jetzt (verschoben: nicht unter 0 Jahre)"),
        ((("age_years", Shift(times=3)),), "Rohralter mit 3 multipliziert,"),
        ((("age_years", Shift(times=0.9, by=1)),),
         "Rohralter um 10 % niedriger und dann um 1 Jahr höher als jetzt"),
        ((("age_years", Move(40.0, 40.0)),), "unverändert Rohralter = 40 Jahre"),
        ((("lined", Move(False, True)),), "Auskleidung = ja statt nein"),
    ],
)  # fmt: skip
def test_moves_are_told_without_inflecting_labels(moves, told):
    said = words(with_german_labels(change_answer(moves=moves))).sentences
    assert told in said[0].replace("\u00a0", " ")


def test_a_number_needed_with_no_difference_in_its_interval_has_two_pieces():
    answer = with_german_labels(change_answer(-2.35, -2.4))
    told = next(each for each in words(answer).sentences if each.startswith("Auf je"))
    assert "über unendlich (kein Unterschied) bis" in told
    assert "für eines mehr" in told
    assert "für eines weniger" in told


def test_no_difference_at_all_and_one_that_touches_nought():
    at_nought = Estimate(0.05, 0.02, 0.0, 0.1)
    for apart in (Estimate(0.0, 0.01, -0.02, 0.02), at_nought, Estimate(1.0, None, None, None)):
        answer = change_answer()
        compared = replace(answer.comparison, risk_difference=apart)
        answer = replace(answer, comparison=compared, number_needed=number_needed(apart))
        for audience in ("plain", "technical"):
            said = words(with_german_labels(answer), audience)
            assert all(faults(each) == [] for each in said.sentences)


def test_beyond_the_data_is_said():
    moves = (("age_years", Move(20.0, 140.0)), ("material", Move("CI", "PVC")))
    answer = with_german_labels(change_answer(moves=moves, beyond=("age_years",)))
    assert words(answer).cautions[0] == (
        "Diese Änderung geht über die Daten hinaus: Rohralter = 140 Jahre (in den Daten 0 bis 110 "
        "Jahre); dort spricht das Modell für sich allein."
    )


def test_rows_that_a_shift_takes_beyond_the_data_are_said():
    moves = (("age_years", Shift(by=100)),)
    answer = with_german_labels(change_answer(moves=moves, beyond=("age_years",)))
    caution = words(answer).cautions[0]
    assert (
        "Rohralter mancher Zeilen nach der Verschiebung (in den Daten 0 bis 110 Jahre)" in caution
    )
    assert faults(caution) == []


@pytest.mark.parametrize("where", [(("age_years", (60.0, math.inf)),), Mask("a" * 64, 120)])
@pytest.mark.parametrize("sample", ["fixed", "drawn"])
def test_rows_chosen_and_drawn_are_said(where, sample):
    answer = change_answer(moves=AGE, where=where, counted=120, sample=sample)
    answer = with_german_labels(answer)
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert all(faults(each) == [] for each in (*said.sentences, *said.cautions))
    assert faults(alternative(answer)) == []
    assert "120 Zeilen" in str(words(answer))
