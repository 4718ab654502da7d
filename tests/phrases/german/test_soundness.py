"""Findings in German: every figure the evidence's own, nothing English, nothing left out."""

import re
from dataclasses import replace

import pytest

import plainodds as po
from plainodds.phrases import alternative, words
from plainodds.phrases.checks import finding_words as english_words
from plainodds.phrases.german.checks.finding_words import evidence_words, finding_words
from plainodds.phrases.german.checks.parts import short_list
from plainodds.phrases.german.checks.pictures import picture_words
from plainodds.phrases.german.checks.plainly import plain_sentences
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.languages import telling_in
from plainodds.phrases.lexicon import speaking
from plainodds.phrases.numbers import worded
from tests.phrases.checks.test_finding_words import known_numbers
from tests.phrases.german.reading import faults, unaccounted, with_german_labels
from tests.phrases.made_findings import MADE, UNKNOWN, answer_of, everything, finding

LEVEL = 0.95
ALL = everything()
SUBJECT = with_german_labels(answer_of()).subject
NAMED = re.compile(r"„[^“]*“|ΔX²|χ²|R²|Δβ|`[^`]*`")


@pytest.fixture(autouse=True)
def small_phrases():
    """Parts of texts are asked for here outside of the text that would choose them."""
    with telling_in(GERMAN), worded(GERMAN.wording), speaking(GERMAN.lexicon):
        yield


def sentences_of(found):
    said = finding_words(found, SUBJECT, LEVEL)
    plain = plain_sentences(found, SUBJECT, LEVEL)
    return [said.what, said.why, said.next_step, *plain, picture_words(found, SUBJECT, LEVEL)]


@pytest.mark.parametrize("found", ALL)
def test_sentences_are_german_and_every_figure_is_the_evidences_own(found):
    # a limit of what is called few, and the example of a chance that comes true
    known = [*known_numbers(found), 20.0]
    for sentence in (NAMED.sub("x", each) for each in sentences_of(found)):
        assert faults(sentence) == [], sentence
        assert unaccounted(sentence, known) == [], sentence


@pytest.mark.parametrize("found", ALL)
def test_every_finding_has_all_its_words_and_each_is_one_sentence(found):
    said = finding_words(found, SUBJECT, LEVEL)
    assert not said.heading.endswith(".")
    for text in (said.what, said.why, said.next_step):
        assert len(text.split()) > 3
        assert not re.search(r"[.!?] [A-ZÄÖÜ]", text), text


@pytest.mark.parametrize("found", ALL)
def test_what_english_tells_apart_german_tells_apart(found):
    """Two findings of a topic with other English sentences have other German ones."""
    english = {each: english_words(each, SUBJECT, LEVEL) for each in ALL}
    german = finding_words(found, SUBJECT, LEVEL)
    for other in ALL:
        if other.topic == found.topic and english[other].what != english[found].what:
            assert finding_words(other, SUBJECT, LEVEL).what != german.what
        if other.topic == found.topic and english[other].next_step != english[found].next_step:
            assert finding_words(other, SUBJECT, LEVEL).next_step != german.next_step


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize("found", ALL)
def test_an_answers_texts_are_german_and_leave_nothing_out(found, audience):
    answer = with_german_labels(answer_of(found, notices=("Eine Anmerkung",)))
    said = words(answer, audience)
    for text in (*said.sentences, *said.cautions, alternative(answer), po.caption(answer)):
        assert faults(NAMED.sub("x", text)) == [], text
    note = po.methods_note(answer)
    with po.writing("en"):
        english, methods = words(answer, audience), po.methods_note(answer)
    assert len(said.sentences) == len(english.sentences)
    assert len(said.cautions) == len(english.cautions)
    assert len(note.sentences) == len(methods.sentences)
    assert note.references == methods.references
    assert all(faults(each) == [] for each in note.sentences[:-1])


FINE = next(each for each in MADE if each.concern == "nothing found")
MIND = next(each for each in MADE if each.concern == "keep in mind")
HEAVY = next(each for each in MADE if each.concern == "don't explain yet")
OPEN = finding("dependence", "not known", None, unknown="no groups named")


@pytest.mark.parametrize(
    ("findings", "told"),
    [
        (
            (HEAVY, MIND, OPEN, FINE),
            "Diese Anpassung sollte noch nicht erklärt werden; von 4 Prüfungen: 1 spricht dagegen, "
            "1 ist zu bedenken und 1 blieb offen.",
        ),
        (
            (MIND, MIND, FINE),
            "Von 3 Prüfungen: 2 sind zu bedenken; nichts, was geprüft wurde, spricht dagegen, "
            "diese Anpassung zu erklären.",
        ),
        (
            (FINE,),
            "Von 1 Prüfung: bei allen nichts zu bedenken; nichts, was geprüft wurde, spricht "
            "dagegen, diese Anpassung zu erklären.",
        ),
        (
            (OPEN, OPEN),
            "Keine der Prüfungen war möglich, daher ist nicht bekannt, ob diese Anpassung erklärt "
            "werden sollte.",
        ),
    ],
)
def test_the_first_sentence_says_whether_to_explain_the_fit(findings, told):
    answer = answer_of(*findings)
    assert words(answer).sentences[0] == told
    assert words(answer, "technical").sentences[0] == told


@pytest.mark.parametrize(("heavy", "told"), [(3, ""), (4, "1 weiterer"), (6, "3 weitere")])
def test_at_most_three_findings_are_told_and_how_many_are_left(heavy, told):
    last = words(answer_of(*[HEAVY] * heavy)).sentences[-1]
    assert ("in den Worten für Auswertende" in last) == bool(told)
    assert last.startswith(told)


@pytest.mark.parametrize("unknown", UNKNOWN)
def test_why_something_is_not_known_is_said(unknown):
    said = finding_words(replace(OPEN, unknown=unknown), SUBJECT, LEVEL)
    assert said.what.startswith("Das lässt sich hier nicht sagen: ")


def test_long_lists_are_cut_short():
    assert short_list(list("abcdef")) == "a, b, c, d und 2 weitere"
    assert short_list(list("abcde")) == "a, b, c, d und e"


def test_evidence_of_no_known_kind_has_no_words():
    with pytest.raises(TypeError, match="no German words for str"):
        evidence_words("evidence", FINE, SUBJECT, LEVEL)


def test_labels_of_rows_are_for_the_analyst_only():
    found = next(each for each in MADE if each.topic == "influence" and each.reasons)
    plain, technical = (str(words(answer_of(found), each)) for each in ("plain", "technical"))
    assert "„r12“" in technical
    assert "„r12“" not in plain
