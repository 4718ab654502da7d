"""What odds ratios, curves, effects and changes hang on, in German: few cases, one outcome."""

import math
import re
from dataclasses import replace

import pytest

import plainodds as po
from plainodds.answers.estimate import Estimate
from plainodds.answers.joined import JoinedTest
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.phrases import words
from tests.phrases import made, made_changes
from tests.phrases.german.reading import faults, with_german_labels

UP = Estimate(math.inf, None, 0.83, math.inf)
DOWN = Estimate(-math.inf, None, -math.inf, -0.87)
PVC = made.odds_row("material", "CI", "PVC", log=0.7)


def counted(answer, events=(87.0, 50.0, 3.0), cases=(311.0, 200.0, 14.0)):
    predictors = tuple(
        replace(each, level_events=events, level_cases=cases) if each.name == "material" else each
        for each in answer.subject.predictors
    )
    answer = replace(answer, subject=replace(answer.subject, predictors=predictors))
    return with_german_labels(answer)


def unbounded(log, row=PVC):
    odds = Estimate(math.exp(log.estimate), None, None, None)
    odds = replace(
        odds,
        lower=None if log.lower is None else math.exp(log.lower),
        upper=None if log.upper is None else math.exp(log.upper),
    )
    return replace(row, log_odds_ratio=log, odds_ratio=odds, p_value=None)


def alike_in_number(answer, audience):
    said = words(answer, audience)
    with po.writing("en"):
        english = words(answer, audience)
    meaning = [each for each in said.cautions if each.startswith("Chance (Odds) heißt")]
    assert len(said.sentences) == len(english.sentences)
    assert len(said.cautions) == len(english.cautions) + len(meaning)
    for each in (*said.sentences, *said.cautions, po.alternative(answer), po.caption(answer)):
        assert faults(re.sub("`[^`]*`", "x", each)) == [], each
    return said


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(
    ("log", "events", "why", "interval"),
    [
        (UP, 14.0, "alle 14 Fälle (Rohre) mit Werkstoff = PVC hatten das Ereignis",
         "reicht von 2,29 ohne Ende nach oben"),
        (DOWN, 0.0, "keiner der 14 Fälle (Rohre) mit Werkstoff = PVC hatte das Ereignis",
         "reicht von 0,42 nach unten bis 0"),
        (Estimate(math.inf, None, None, None), 7.0,
         "in diesen Daten legt Werkstoff, allein oder mit anderen Merkmalen, das Ergebnis mancher "
         "Fälle (Rohre) ausnahmslos fest", ""),
    ],
)  # fmt: skip
def test_an_odds_ratio_without_a_finite_estimate_says_why(log, events, why, interval, audience):
    answer = counted(made.odds_answer(unbounded(log)), (87.0, 50.0, events))
    said = alike_in_number(answer, audience)
    assert any("Ein endliches Chancenverhältnis (Odds Ratio) gibt es nicht bei Werkstoff" in each
               for each in said.cautions)  # fmt: skip
    if audience == "plain":
        assert why in said.sentences[-1]
        assert interval in said.sentences[-1]
    else:
        assert "kein " in said.sentences[0]


def test_an_odds_ratio_that_the_data_leave_open_is_said_to_be():
    nan = Estimate(math.nan, math.nan, math.nan, math.nan)
    answer = counted(made.odds_answer(replace(PVC, log_odds_ratio=nan, odds_ratio=nan)))
    said = alike_in_number(answer, "plain")
    assert "nicht bekannt: die Daten lassen es offen" in said.sentences[-1]


@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_odds_ratios_that_hang_on_few_cases_say_so(audience):
    said = alike_in_number(counted(made.odds_answer(PVC)), audience)
    assert (
        "Odds Ratios, die von Werkstoff = PVC (3 Ereignisse bei 14 Fällen (Rohre)) sprechen, "
        "hängen an wenigen Fällen eines der beiden Ergebnisse."
    ) in said.cautions


def test_odds_ratios_beyond_the_data_say_so():
    answer = counted(made.odds_answer(made.odds_row(start=0.0, end=200.0)))
    said = alike_in_number(answer, "plain")
    assert any(
        "Rohralter je 200 Jahre mehr (in den Daten 0 bis 110 Jahre)" in each
        for each in said.cautions
    )


@pytest.mark.parametrize(
    ("events", "told"),
    [
        (3.0, "Zahlen, die von Werkstoff = PVC (3 Ereignisse"),
        (0.0, "Keiner der 14 Fälle (Rohre) mit Werkstoff = PVC hatte das Ereignis: was das"),
    ],
)
@pytest.mark.parametrize(
    "answer",
    [
        made.curve_answer(lambda x, b: -2.0, "material", ("CI", "DI", "PVC")),
        made_changes.effects_answer(
            made_changes.effect_row(predictor="material", start="CI", end="PVC")
        ),
    ],
    ids=["curve", "effects"],
)
def test_figures_that_hang_on_few_cases_say_so(answer, events, told):
    said = alike_in_number(counted(answer, (87.0, 50.0, events)), "plain")
    assert any(each.startswith(told) for each in said.cautions)


@pytest.mark.parametrize(
    ("limit", "told"),
    [
        (math.inf, "hatten alle Fälle (Rohre), die das Modell nicht von diesem Profil"),
        (-math.inf, "hatte keiner der Fälle (Rohre), die das Modell"),
        (math.nan, "lassen die Wahrscheinlichkeit für „Rohrbruch in diesem Winter“ für dieses"),
    ],
)
@pytest.mark.parametrize("against", [None, (("age_years", 20.0),)])
def test_a_chance_without_an_estimate_short_of_certainty_is_cautioned_against(limit, told, against):
    answer = made.profile_answer(eta=22.0, against=against)
    answer = replace(answer, point=replace(answer.point, limit=limit))
    said = alike_in_number(with_german_labels(answer), "plain")
    assert told in said.cautions[0]


@pytest.mark.parametrize("kind", ["wald", "likelihood_ratio"])
def test_interactions_of_odds_ratios_are_tested_by_name(kind):
    test = JoinedTest(kind, 7.25, 2, None, 0.027)
    row = made.odds_row(given=(("material", "PVC"),))
    answer = with_german_labels(made.odds_answer(row))
    answer = replace(answer, interactions=(InteractionTest("age_years", "material", test),))
    told = alike_in_number(answer, "technical").sentences[1]
    assert told.endswith(
        "-Test darauf, dass kein Term Rohralter und Werkstoff verbindet: χ² = 7,25 bei 2 "
        "Freiheitsgraden, p-Wert 0,027."
    )
    with po.writing("en"):
        english = po.methods_note(answer)
    assert len(po.methods_note(answer).sentences) == len(english.sentences)
