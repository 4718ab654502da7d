"""Effects in German: one sentence for each predictor, in percentage points, for whom."""

from dataclasses import replace

import pytest

from plainodds.answers.where import Mask
from plainodds.phrases import alternative, words
from tests.phrases.german.reading import faults, unaccounted, with_german_labels
from tests.phrases.made_changes import effect_row, effects_answer, level_row
from tests.phrases.test_effects import GRID, numbers_of, rows_of


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("value", "se", "others", "by"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_german(value, se, others, by, audience):
    counted = (6000,) if by is None else (3600, 2400)
    answer = effects_answer(*rows_of(value, se, by), others=others, by=by, counted=counted)
    answer = with_german_labels(answer)
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_nothing_is_called_an_effect_in_plain_words():
    said = words(effects_answer(effect_row(), level_row()))
    assert "effekt" not in str(said).lower()
    assert "wirkung" not in str(said).lower()


def test_each_predictor_has_its_sentence():
    answer = effects_answer(
        effect_row(), level_row("DI", -0.002, 0.003), level_row("PVC"),
        level_row(True, -0.01, 0.004, "lined", start=False),
    )  # fmt: skip
    told = words(with_german_labels(answer)).sentences
    assert [each.replace("\u00a0", " ") for each in told[:4]] == [
        "In den Daten insgesamt beträgt der Anteil mit „Rohrbruch in diesem Winter“ 10 %, das sind "
        "10 von 100.",
        "Je Jahr mehr (Rohralter) liegt die mittlere Wahrscheinlichkeit für „Rohrbruch in diesem "
        "Winter“ etwa 0,14 Prozentpunkte höher (95-%-Intervall 0,10 bis 0,18 höher).",
        "Verglichen mit Werkstoff = Grauguss liegt die mittlere Wahrscheinlichkeit 0,20 "
        "Prozentpunkte niedriger (95-%-Intervall 0,8 niedriger bis 0,4 höher) bei Duktilguss und "
        "0,50 Prozentpunkte niedriger (0,1 bis 0,9 niedriger) bei PVC.",
        "Bei Auskleidung = ja statt nein liegt die mittlere Wahrscheinlichkeit 1,0 Prozentpunkte "
        "niedriger (95-%-Intervall 0,2 bis 1,8 niedriger).",
    ]


@pytest.mark.parametrize(
    "where", [None, (("material", "PVC"),), (("material", ("CI", "PVC")),), Mask("a" * 64, 120)]
)
@pytest.mark.parametrize("sample", ["fixed", "drawn"])
def test_rows_chosen_and_drawn_are_said(where, sample):
    answer = effects_answer(effect_row(), where=where, counted=(120,), sample=sample)
    answer = with_german_labels(answer)
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert all(faults(each) == [] for each in (*said.sentences, *said.cautions))
    assert "120 Zeilen" in str(words(answer))
    assert ("gezogen" in str(words(answer))) == (sample == "drawn")


def test_a_guarded_count_is_told_as_a_limit():
    answer = effects_answer(effect_row(), where=(("material", "PVC"),), counted=(4,))
    guarded = replace(answer, subject=replace(answer.subject, smallest_cell=10))
    assert "über höchstens 10 Zeilen mit" in str(words(guarded))
