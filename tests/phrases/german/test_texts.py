"""Cautions, captions, notes on methods and alternative texts in German, for every answer."""

import math
from dataclasses import replace
from typing import get_args

import pytest

import plainodds as po
from plainodds.model.predictors import Predictor, Setting, Stakes
from plainodds.phrases.german import GERMAN
from plainodds.phrases.lexicon import ENGLISH_LEXICON
from plainodds.phrases.numbers import ENGLISH_WORDING
from plainodds.phrases.references import REFERENCES
from tests.phrases import made, made_changes
from tests.phrases.german.reading import faults, with_german_labels

ANSWERS = {
    name: with_german_labels(answer)
    for name, answer in {
        "odds": made.odds_answer(
            made.odds_row(log=0.7), made.odds_row("material", "CI", "PVC"), typical=0.23
        ),
        "odds given": made.odds_answer(made.odds_row(given=(("material", "PVC"),))),
        "curve": made.curve_answer(),
        "curve by": made.curve_answer(by="lined", by_values=(False, True), unsupported=(0.0,)),
        "curve averaged": made.curve_answer(others="observed"),
        "curve of levels": made.curve_answer(
            lambda x, b: -2.0, "material", ("CI", "DI", "PVC"), unsupported=("PVC",)
        ),
        "slope": made.curve_answer(lambda x, b: 0.004, scale="slope", se=0.001),
        "profile": made.profile_answer(),
        "profiles": made.profile_answer(against=(("age_years", 20.0),)),
        "effects": made_changes.effects_answer(made_changes.effect_row()),
        "effects drawn": made_changes.effects_answer(
            made_changes.effect_row(by=False),
            made_changes.effect_row(by=True),
            by="lined",
            counted=(3600, 2400),
            sample="drawn",
        ),
        "effects held": made_changes.effects_answer(
            made_changes.effect_row(step=10.0), others="typical"
        ),
        "change": made_changes.change_answer(),
        "change drawn": made_changes.change_answer(sample="drawn"),
        "change held": made_changes.change_answer(others=(("lined", True),)),
    }.items()
}
SUBJECTS = {
    "plain": {},
    "no interval": {"no_interval": "Die Anpassung ist bestraft"},
    "offset": {"offset": 1234.5},
    "case-control": {"sampling": "case-control"},
    "prevalence": {"sampling": "case-control", "prevalence": 0.021},
    "notices": {"notices": ("Eine Anmerkung",)},
    "robust": {"covariance_kind": "HC3"},
    "cluster": {"covariance_kind": "cluster"},
    "other covariance": {"covariance_kind": "jackknife"},
    "causal": {"setting": Setting(causal=True, reason="das Los entschied.")},
    "typical": {"setting": Setting(predictors=(("lined", Predictor(typical=True)),))},
}
EVERY = pytest.mark.parametrize("name", ANSWERS)
AUDIENCES = pytest.mark.parametrize("audience", ["plain", "technical"])


def of(name, stated="plain"):
    answer = ANSWERS[name]
    return replace(answer, subject=replace(answer.subject, **SUBJECTS[stated]))


@AUDIENCES
@pytest.mark.parametrize("stated", SUBJECTS)
@EVERY
def test_whatever_the_fit_is_its_words_are_german(name, stated, audience):
    said = po.words(of(name, stated), audience)
    for sentence in (*said.sentences, *said.cautions):
        assert faults(sentence) == []


@pytest.mark.parametrize("stated", SUBJECTS)
@EVERY
def test_captions_and_alternatives_are_german(name, stated):
    answer = of(name, stated)
    for told in (po.caption(answer), po.alternative(answer)):
        assert faults(told) == []
        assert "Rohrbruch in diesem Winter" in told
    assert "logistische Regression" in po.caption(answer)
    assert "6.000 Fälle (Rohre)" in po.caption(answer)


@pytest.mark.parametrize("stated", SUBJECTS)
@EVERY
def test_notes_are_german_and_cite_what_the_english_ones_cite(name, stated):
    answer = of(name, stated)
    note = po.methods_note(answer)
    for sentence in note.sentences[:-1]:
        assert faults(sentence) == []
    assert note.sentences[-1].startswith("Berechnet mit plainodds ")
    with po.writing("en"):
        english = po.methods_note(answer)
    assert note.references == english.references
    assert len(note.sentences) == len(english.sentences)
    assert set(note.references) <= set(REFERENCES.values())


@AUDIENCES
@EVERY
def test_nothing_that_english_cautions_against_is_left_out(name, audience):
    for stated in SUBJECTS:
        answer = of(name, stated)
        german = po.words(answer, audience)
        with po.writing("en"):
            english = po.words(answer, audience)
        assert len(german.sentences) == len(english.sentences)
        # German says besides what odds are, whose everyday name is that of a chance
        meaning = [each for each in german.cautions if each.startswith("Chance (Odds) heißt")]
        assert len(meaning) <= 1
        assert len(german.cautions) == len(english.cautions) + len(meaning)


def test_no_interval_and_notices_are_handed_on_as_they_are():
    said = po.words(of("change", "no interval"))
    assert "Hinweis (englisch): Die Anpassung ist bestraft." in said.cautions
    assert "Konfidenzintervall" not in po.caption(of("change", "no interval"))
    assert "Hinweis (englisch): Eine Anmerkung." in po.words(of("odds", "notices")).cautions


@pytest.mark.parametrize("stakes", get_args(Stakes))
@EVERY
def test_stakes_bring_two_cautions(name, stakes):
    answer = ANSWERS[name]
    outcome = replace(answer.subject.outcome, stakes=stakes)
    said = po.words(replace(answer, subject=replace(answer.subject, outcome=outcome)))
    added = [each for each in said.cautions if each not in po.words(answer).cautions]
    assert len(added) == 2
    assert "nie welche" in added[0]
    assert all(faults(each) == [] for each in added)


@AUDIENCES
@EVERY
def test_association_is_said_unless_the_analyst_gave_a_reason(name, audience):
    plain, causal = (str(po.words(of(name, stated), audience)) for stated in ("plain", "causal"))
    assert "was in den Daten miteinander einhergeht" in plain
    assert "einhergeht" not in causal.replace("geht einher", "")
    assert "„das Los entschied“" in causal


def test_a_case_without_a_name_of_its_own_is_a_fall():
    answer = ANSWERS["change"]
    outcome = replace(answer.subject.outcome, case="case", cases="cases")
    nameless = replace(answer, subject=replace(answer.subject, outcome=outcome))
    said = f"{po.words(nameless)} {po.caption(nameless)}"
    assert "Auf je 10 verglichene Fälle kommt" in said
    assert "case" not in said


def test_own_labels_of_a_yes_no_are_left_as_they_are():
    answer = ANSWERS["change held"]
    facts = tuple(
        replace(each, level_labels=("aus", "an")) if each.name == "lined" else each
        for each in answer.subject.predictors
    )
    own = replace(answer, subject=replace(answer.subject, predictors=facts))
    assert "Auskleidung = aus" in str(po.words(own))
    assert "Auskleidung = nein" in str(po.words(answer))


def test_amounts_of_money_and_percent_stand_before_their_sign():
    cost = made.number_facts("age_years", label="Kosten", unit="€")
    share = made.number_facts("age_years", label="Anteil", unit="%")
    said = []
    for facts in (cost, share):
        answer = made.profile_answer((("age_years", 12500.0),), predictors=(facts,))
        answer = replace(answer, point=replace(answer.point, values=(("age_years", 12500.0),)))
        said.append(po.words(answer).sentences[0].replace("\u00a0", " "))
    assert "Kosten = 12.500 € beträgt" in said[0]
    assert "Anteil = 12.500 % beträgt" in said[1]


def test_an_odds_ratio_beyond_saying_has_its_limits_in_german_marks():
    answer = made.odds_answer(made.odds_row(log=math.log(5000)))
    cautions = " ".join(po.words(answer).cautions)
    assert "unter 0,001 oder über 1.000, wie bei Pipe age," in cautions


@pytest.mark.parametrize(
    ("german", "english"),
    [(GERMAN.lexicon, ENGLISH_LEXICON), (GERMAN.wording, ENGLISH_WORDING)],
    ids=["lexicon", "wording"],
)
def test_every_small_phrase_takes_what_the_english_one_takes(german, english):
    fills = {"name": "n", "cases": "c", "known": "k", "sign": "", "unit": "u", "figures": "1"}
    for name, phrase in vars(english).items():
        if not isinstance(phrase, str):
            continue
        told = vars(german)[name]
        assert told.count("{}") == phrase.count("{}")
        assert all("{" + each + "}" in phrase for each in fills if "{" + each + "}" in told)
        assert ("{known}" in told) == ("{known}" in phrase)
        told.format("1", "2", **fills)


@EVERY
def test_the_reader_would_notice_english_sentences(name):
    with po.writing("en"):
        english = [*po.words(ANSWERS[name]).sentences, po.caption(ANSWERS[name])]
    assert all(faults(each) for each in english)
