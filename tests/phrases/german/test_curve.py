"""Curves in German: every figure from the answer, wholly German, and where the data end."""

import pytest

from plainodds.phrases import alternative, words
from tests.phrases.german.reading import faults, unaccounted, with_german_labels
from tests.phrases.made import curve_answer
from tests.phrases.test_curve import ANSWERS, numbers_of


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize("name", ANSWERS)
def test_every_figure_is_the_answers_own_and_sentences_are_german(name, audience):
    answer = with_german_labels(ANSWERS[name])
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_a_rising_curve_is_told_by_its_ends():
    told = words(with_german_labels(curve_answer())).sentences
    assert [each.replace("\u00a0", " ") for each in told] == [
        "Entlang Rohralter (0 bis 110 Jahre) steigt die Wahrscheinlichkeit für „Rohrbruch in "
        "diesem Winter“ von 4,7 % (95-%-Intervall 3,3 % bis 6,9 %) auf 57 % (48 % bis 67 %), das "
        "sind 47 und 574 von 1.000.",
        "Die übrigen Merkmale stehen auf ihren typischen Werten: frühere Reparaturen = 0 und "
        "Auskleidung = nein.",
    ]


def test_falling_flat_and_turning_curves_are_told_apart():
    falling = words(curve_answer(lambda x, b: 1 - 0.03 * x)).sentences[0]
    flat = words(curve_answer(lambda x, b: -2.0)).sentences[0]
    arched = words(curve_answer(lambda x, b: -1 - ((x - 50) / 30) ** 2)).sentences[0]
    assert " fällt die Wahrscheinlichkeit" in falling
    assert " liegt die Wahrscheinlichkeit" in flat
    assert "am höchsten ist sie bei 50 years" in arched


def test_where_the_data_end_is_said():
    answer = with_german_labels(curve_answer(unsupported=(0.0, 10.0, 50.0, 110.0)))
    assert words(answer).cautions[0] == (
        "Wo eine Linie gestrichelt ist, haben die Daten keine Zeilen in der Nähe, und das Modell "
        "spricht für sich allein: Rohralter unter 20 Jahre, zwischen 40 Jahre und 60 Jahre und "
        "über 100 Jahre."
    )


def test_levels_without_rows_are_named():
    levels = ("CI", "DI", "PVC")
    answer = curve_answer(lambda x, b: -2.0, "material", levels, unsupported=("PVC",))
    assert "Werkstoff = PVC" in words(with_german_labels(answer)).cautions[0]
