"""Profiles in German: both sides of the chance, what differs, and how familiar it is."""

from itertools import product

import pytest

from plainodds.phrases import alternative, words
from tests.phrases.german.reading import UNSEEN, faults, unaccounted, with_german_labels
from tests.phrases.made import profile_answer
from tests.phrases.test_profile import AGAINST, PAIRS, numbers_of

GRID = list(product(PAIRS, AGAINST, (0.2, None)))


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("etas", "against", "se"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_german(etas, against, se, audience):
    answer = profile_answer(eta=etas[0], start=etas[1], against=against, se=se)
    answer = with_german_labels(answer)
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_a_profile_says_its_chance_from_both_sides():
    told = words(with_german_labels(profile_answer())).sentences
    assert [each.replace("\u00a0", " ") for each in told] == [
        "Für einen Fall (Rohr) mit Rohralter = 60 Jahre und sonst typischen Werten beträgt die "
        "Wahrscheinlichkeit für „Rohrbruch in diesem Winter“ 18 % (95-%-Intervall 13 % bis 25 %), "
        "das sind 18 von 100, mit einem Bereich von 13 bis 25 von 100.",
        "Die Wahrscheinlichkeit, dass dies nicht eintritt, beträgt 82 %, das sind 82 von 100.",
        "Ausgehend von einem typischen Fall (Rohr) mit einer Wahrscheinlichkeit von 8,3 %: der "
        "Anstieg der Chance (Odds) geht einher mit Rohralter (60 Jahre), mit 2,46 (95-%-Intervall "
        "1,66 bis 3,64) multipliziert.",
        "Unter 6.000 Zeilen gibt es 120 Zeilen, die diesem Profil sehr ähneln.",
    ]


def test_rises_and_falls_are_told_the_larger_one_first():
    adds = [(("age_years",), 0.5), (("material",), -0.9), (("lined",), 0.2)]
    told = words(profile_answer(eta=-2.6, start=-2.4, adds=adds)).sentences[2]
    assert told.index("größte Rückgang") < told.index("größte Anstieg")


@pytest.mark.parametrize("reason", UNSEEN)
@pytest.mark.parametrize("against", AGAINST)
def test_each_reason_to_be_careful_has_its_caution(reason, against):
    unseen = UNSEEN[reason]
    answer = profile_answer(familiarity=unseen, start_familiarity=unseen, against=against)
    familiar, said = profile_answer(against=against), words(with_german_labels(answer))
    added = [each for each in said.cautions if each not in words(familiar).cautions]
    assert len(added) == (1 if against is None else 2)
    assert all(faults(each) == [] for each in added)
    assert not any("sehr ähneln" in each for each in said.sentences)


def test_values_outside_are_named_with_the_datas_range():
    answer = profile_answer(values=(("age_years", 140.0),), familiarity=UNSEEN["outside"])
    caution = words(with_german_labels(answer)).cautions[0]
    assert "Rohralter = 140 Jahre (in den Daten 0 bis 110 Jahre)" in caution
    assert "außerhalb der Daten" in caution
