"""Several answers in one figure, and parts of answers, in German."""

import pytest

import plainodds as po
from tests.phrases import made, made_changes
from tests.phrases.german.reading import faults, with_german_labels
from tests.phrases.made_findings import MADE, answer_of
from tests.phrases.made_pairs import pair_answer

EVERY = [
    with_german_labels(each)
    for each in (
        made.odds_answer(made.odds_row(log=0.7), typical=0.23),
        made.curve_answer(),
        made.profile_answer(),
        made_changes.effects_answer(made_changes.effect_row()),
        made_changes.change_answer(),
        pair_answer(),
        answer_of(*MADE),
    )
]
TOGETHER = po.panels(*EVERY)


def test_panels_tell_what_their_answers_tell_each_with_its_letter():
    said = po.words(TOGETHER)
    assert said.sentences[0] == f"A: {po.words(EVERY[0]).sentences[0]}"
    assert f"F: {po.words(EVERY[5]).sentences[0]}" in said.sentences
    assert po.alternative(TOGETHER).startswith(f"Teilbild A: {po.alternative(EVERY[0])}")
    notes = {each for answer in EVERY for each in po.methods_note(answer).sentences}
    assert set(po.methods_note(TOGETHER).sentences) == notes


def test_the_end_that_all_captions_share_is_told_once():
    both = po.panels(EVERY[2], EVERY[4])
    told = po.caption(both)
    assert told.count("Grundlage: logistische Regression") == 1
    assert told.startswith("A: Die Wahrscheinlichkeit für")


@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_nothing_of_it_is_english(audience):
    both = po.panels(*EVERY[:6])
    said = po.words(both, audience)
    for text in (*said.sentences, *said.cautions, po.alternative(both), po.caption(both)):
        assert faults(text) == [], text


@pytest.mark.parametrize(
    ("place", "part", "told"),
    [
        (2, "ruler", "drei aneinander ausgerichteten Skalen"),
        (2, "ledger", "zum linearen Prädiktor beiträgt"),
        (4, "marks", "Jedes Zeichen ist ein Fall"),
    ],
)
def test_a_part_is_told_as_its_answer_and_has_a_caption_of_its_own(place, part, told):
    alone = po.excerpt(EVERY[place], part)
    assert po.words(alone) == po.words(EVERY[place])
    assert po.alternative(alone) == po.alternative(EVERY[place])
    assert po.methods_note(alone) == po.methods_note(EVERY[place])
    caption = po.caption(alone)
    assert told in caption
    assert caption.split(". ")[0] == po.caption(EVERY[place]).split(". ")[0]
    assert faults(caption) == []
    assert ("Konfidenzintervalle" in caption) == (part == "ruler")
