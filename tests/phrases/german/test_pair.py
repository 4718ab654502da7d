"""Two predictors together in German: the same figures, nothing English, nothing overstated."""

from dataclasses import replace

import pytest

import plainodds as po
from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import AdditiveInteraction
from plainodds.answers.stretches import EffectAlong, Stretch
from plainodds.answers.surface import Surface
from plainodds.phrases import alternative, words
from tests.phrases.german.reading import faults, unaccounted, with_german_labels
from tests.phrases.made import NAN
from tests.phrases.made_pairs import pair_answer
from tests.phrases.test_pair import GRID, made, numbers_of, with_stretches

ALONG_AGE = {"a": "material", "b": "age_years"}
FIVE = (0.0, 25.0, 50.0, 75.0, 110.0)


def german(**stated):
    return with_german_labels(pair_answer(**stated))


def plain(text):
    return text.replace("\u00a0", " ")


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("pair", "shape", "others", "number", "scale"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_german(
    pair, shape, others, number, scale, audience
):
    answer = with_german_labels(made(pair, shape, others, number, scale))
    if "no_interval" in shape:
        answer = replace(answer, subject=replace(answer.subject, no_interval="Keine Matrix"))
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer), po.caption(answer)):
        assert faults(sentence) == []
    with po.writing("en"):
        english = words(answer, audience)
    assert len(said.sentences) == len(english.sentences)
    meaning = [each for each in said.cautions if each.startswith("Chance (Odds) heißt")]
    assert len(said.cautions) == len(english.cautions) + len(meaning)


def test_chances_come_first_then_differences_then_odds():
    told = [plain(each) for each in words(german()).sentences]
    assert told[:5] == [
        "Für einen typischen Fall (Rohr): bei Auskleidung = nein beträgt die Wahrscheinlichkeit "
        "für „Rohrbruch in diesem Winter“ 8,3 % mit Werkstoff = Grauguss und 18 % mit Werkstoff = "
        "PVC, das sind 8 und 18 von 100; bei Auskleidung = ja beträgt sie 23 % und 53 %, das sind "
        "23 und 53 von 100.",
        "Mit Werkstoff = PVC statt Grauguss sind das 10 mehr je 100 bei Auskleidung = nein und 30 "
        "mehr bei Auskleidung = ja: bei Auskleidung = ja 20 mehr je 100 als bei nein "
        "(95-%-Intervall 16 bis 24 mehr).",
        "Gemittelt über 6.000 Zeilen, jeder Fall (Rohr) mit seinen eigenen Werten in allem "
        "anderen, ergibt derselbe Vergleich: 14 Prozentpunkte höher (95-%-Intervall 10 bis 18 "
        "höher).",
        "Auf der Skala der Odds wird, mit Werkstoff = PVC statt Grauguss, die Chance (Odds) für "
        "„Rohrbruch in diesem Winter“ bei Auskleidung = nein mit 2,46 (95-%-Intervall 1,66 bis "
        "3,64) und bei Auskleidung = ja mit 3,79 (2,56 bis 5,61) multipliziert: das Verhältnis der "
        "Odds Ratios ist 1,54 (1,04 bis 2,28).",
        "Bei Auskleidung = nein (25 % der Fälle) und ja (25 %) liegt die Wahrscheinlichkeit mit "
        "Werkstoff = PVC höher als mit Grauguss, und zwar im ganzen Intervall.",
    ]


@pytest.mark.parametrize(("apart_se", "told"), [(0.02, False), (0.2, True)])
def test_an_interval_that_holds_no_difference_leaves_the_direction_open(apart_se, told):
    sentences = words(german(apart_se=apart_se)).sentences
    assert sentences[1].endswith("; offen bleibt, ob es mehr oder weniger sind.") is told
    assert sentences[2].endswith("; offen bleibt, ob mehr oder weniger.") is told


@pytest.mark.parametrize(
    ("ratio", "apart", "told"),
    [
        ((0.8, 0.5, 0.9), (0.1, 0.05, 0.15), "Die beiden Skalen weisen in entgegengesetzte"),
        ((1.5, 0.9, 2.5), (0.1, 0.05, 0.15), "In Wahrscheinlichkeiten ist es also klar"),
        ((1.5, 1.2, 1.9), (0.1, -0.05, 0.25), "Auf der Skala der Odds ist es also klar"),
        ((1.5, 1.2, 1.9), (0.1, 0.05, 0.15), ""),
    ],
)
def test_scales_that_tell_different_things_are_said_to_and_why(ratio, apart, told):
    found = [Estimate(each[0], None, *each[1:]) for each in (ratio, apart)]
    answer = german()
    interaction = replace(answer.interaction, ratio=found[0], at_profile=found[1])
    said = [
        each
        for each in words(replace(answer, interaction=interaction)).sentences
        if "derselbe Faktor" in each
    ]
    assert [each.startswith(told) for each in said] == ([True] if told else [])


def test_without_a_shared_term_it_is_an_assumption_that_odds_ratios_are_alike():
    told = words(german(times=0.0)).sentences
    assert told[3].startswith("Das Modell hat keinen Term, der Werkstoff und Auskleidung verbindet")
    assert told[4].startswith("In Wahrscheinlichkeiten unterscheidet es sich dennoch, denn")
    assert "genau 1" in str(words(german(times=0.0), "technical"))


def test_stretches_are_told_with_their_share():
    answer = with_stretches(
        german(**ALONG_AGE),
        Stretch(0.0, 12.2, "open", 0.2),
        Stretch(12.2, 68.4, "above", 0.71),
        Stretch(68.4, 90.0, "open", 0.06),
        Stretch(90.0, 90.1, "below", 0.0),
    )
    assert (
        "Bei Rohralter von 12 bis 68 Jahre (71 % der Fälle) liegt die Wahrscheinlichkeit mit "
        "Werkstoff = PVC höher als mit Grauguss, und zwar im ganzen Intervall; bei Rohralter = 90 "
        "Jahre (keine Fälle) liegt sie niedriger, und zwar im ganzen Intervall; bei Rohralter von "
        "0 bis 12 Jahre (20 % der Fälle) und von 68 bis 90 Jahre (6,0 %) enthält das Intervall "
        "auch, dass es keinen Unterschied gibt, sodass die Daten die Richtung offen lassen."
    ) in [plain(each) for each in words(answer).sentences]


def test_many_stretches_are_cut_short_and_the_technical_words_tell_all():
    stretches = [
        Stretch(10.0 * x, 10.0 * x + 10, sign, 0.01 * (x + 1))
        for x, sign in enumerate(["above", "open"] * 5)
    ]
    answer = with_stretches(german(**ALONG_AGE), *stretches)
    short = next(each for each in words(answer).sentences if "im ganzen Intervall" in each)
    assert short.count("und 2 weiteren Stellen") == 2
    technical = str(words(answer, "technical"))
    assert "von 0 bis 10 Jahre" not in short
    assert "von 0 bis 10 Jahre" in technical
    assert "weiteren Stellen" not in technical


@pytest.mark.parametrize(
    ("effects", "turns", "told"),
    [
        ((1, 3, 5, 4, 2), (50.0,), "steigt dieser Unterschied zuerst und fällt ab 50 Jahre;"),
        (
            (1, 3, 1, 3, 5),
            (25.0, 50.0),
            "steigt dieser Unterschied zuerst, fällt ab 25 Jahre und steigt ab 50 Jahre;",
        ),
        ((1, 1, 1, 1, 1), (25.0,), "wendet sich dieser Unterschied bei 25 Jahre; dort"),
    ],
)
def test_where_the_effect_turns_is_told_with_its_direction(effects, turns, told):
    along = EffectAlong(
        FIVE, tuple(x / 100 for x in effects), None, None, None, (True,) * 5, (), turns
    )
    answer = replace(german(**ALONG_AGE), effect=along)
    said = str(words(answer))
    assert f"Entlang Rohralter {told}" in said
    assert "wechselt die Wechselwirkung ihr Vorzeichen" in said


def test_where_the_data_have_no_rows_is_named():
    supported = tuple(x not in (0, 5, 10) for x in range(11))
    answer = german(**ALONG_AGE, supported=(*supported, True))
    answer = replace(answer, lines=None)
    assert any("Rohralter unter 10 Jahre" in each for each in words(answer).cautions)
    level = german(a="age_years", b="material", supported=(True, False, True))
    assert any("Werkstoff = Duktilguss" in each for each in words(level).cautions)


def test_a_map_says_what_its_hatching_means():
    supported = ((True, True), (True, False))
    grid = ((0.1, 0.2), (0.3, 0.4))
    shown = Surface((0.0, 1.0), (0.0, 1.0), grid, grid, supported)
    answer = replace(german(a="age_years", b="past_repairs"), surface=shown, lines=None)
    told = words(answer).cautions[0]
    assert "schraffiert" in told
    for each in (told, alternative(answer), po.caption(answer)):
        assert faults(each) == []
    assert "Eine Karte von" in alternative(answer)


def test_a_sample_that_tells_no_chances_is_told_in_odds_alone():
    answer = german(scale="odds", sampling="case-control")
    told = " ".join(words(answer).sentences)
    assert "Wahrscheinlichkeit" not in told
    assert "Vielfachen der Chance (Odds) mit" in told
    cautions = words(answer).cautions
    assert any("aus Odds Ratios gebildet" in each for each in cautions)
    for each in (*cautions, po.caption(answer), *po.methods_note(answer).sentences[:-1]):
        assert faults(each) == []


def test_a_recoded_reference_and_empty_combinations_are_named():
    said = words(german(alone=(-1.0, 1.0), times=0.8, rows=(0.0, 9.0, 3.0, 80.0)))
    told = " ".join(said.cautions)
    assert "zählt ab Werkstoff = PVC und Auskleidung = nein" in told
    assert "keine Fälle (Rohre) mit Werkstoff = PVC und Auskleidung = nein;" in told
    assert "sowie mit Werkstoff = PVC und Auskleidung = ja gibt es kein Ereignis" in told


def test_what_the_rows_leave_open_altogether_is_said_to_be():
    answer, unknown = german(), Estimate(NAN, None, None, None)
    measures = AdditiveInteraction(unknown, unknown, None)
    table = replace(
        answer.joint,
        cells=tuple(
            replace(cell, chance=unknown, odds_ratio=unknown) for cell in answer.joint.cells
        ),
        multiplicative=unknown,
        additive_by_odds=measures,
        additive_by_chances=measures,
    )
    found = replace(answer.interaction, at_profile=unknown, ratio=unknown, log_ratio=unknown)
    answer = replace(answer, joint=table, interaction=found)
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []
        assert any("Synergie-Index gibt es nicht, da die Daten" in each for each in said.cautions)
    assert "lassen die Daten ganz offen" in str(words(answer))


@pytest.mark.parametrize(
    ("parts", "told"),
    [
        ({}, "Wald-Test darauf, dass kein Term Werkstoff und Auskleidung verbindet: χ² = 7,25 bei "
             "1 Freiheitsgrad, p-Wert 0,007."),
        ({"freedom": 2, "denominator": 5987.0}, "F = 7,25 bei 2 und 5.987 Freiheitsgraden"),
        ({"test": "likelihood_ratio"}, "Likelihood-Quotienten-Test darauf"),
    ],
)  # fmt: skip
def test_the_test_is_named_with_its_degrees_of_freedom(parts, told):
    answer = german(**parts)
    assert told in plain(str(words(answer, "technical")))
    terms = "aller 2 Terme" if "freedom" in parts else "des einen Terms"
    assert terms in str(po.methods_note(answer))
