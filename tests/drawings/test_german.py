"""Pictures in German: no English is left but the analyst's own, and no text meets another."""

import re
from dataclasses import replace

import pytest
from matplotlib.figure import Figure

import plainodds as po
from plainodds.drawings.draw import draw, drawing_of, figure_for, height_for
from plainodds.drawings.theme import theme_of
from tests.drawings import made
from tests.drawings.conftest import ANSWERS
from tests.drawings.made_effects import CHANGES, EFFECTS
from tests.drawings.made_pairs import PAIRS
from tests.drawings.seen import assert_readable, words_on

THEME = theme_of("page")
EVERY = {name: make for kinds in (ANSWERS, EFFECTS, CHANGES, PAIRS) for name, make in kinds.items()}
# labels that are long, or no words at all, are tested for readability
PLAIN = {name: make for name, make in EVERY.items() if "nasty" not in name}
# what English pictures say and no made label does
ENGLISH = re.compile(
    r"\b(and|or|the|with|without|per|more|rather|than|against|from|to|at|of|by|averaged|chance|"
    r"chances|odds ratio|log odds|interval|intervals|line|beneath|few|none|there|where|beyond|"
    r"arrow|figures|axis|held|typical|higher|lower|change|changes|profile|points|percentage|"
    r"reference|events|p-value|not known|yes|no|estimate|scale|difference|slope|ratio)\b",
    re.IGNORECASE,
)

GERMAN = re.compile(r"Chancen? \(Odds\)|Odds Ratios?")


def labels_of(answer):
    """What is the analyst's own: labels, units, levels, what is counted, reasons."""
    subjects = [each.subject for each in getattr(answer, "answers", (answer,))]
    own = []
    for subject in subjects:
        outcome = subject.outcome
        own += [outcome.event, outcome.case, outcome.cases, subject.no_interval]
        for facts in subject.predictors:
            own += [facts.label, facts.name, facts.unit, *facts.level_labels]
            own += [word for word in re.split(r"\W+", f"{facts.label} {facts.unit}") if word]
    own += getattr(answer.question, "models", ())
    return sorted({each for each in own if each}, key=len, reverse=True)


def without_labels(text, answer):
    text = " ".join(text.split())
    for label in labels_of(answer):
        text = re.sub(re.escape(" ".join(label.split())), "~", text, flags=re.IGNORECASE)
    return text


def drawn(answer, width=504.0):
    height = height_for(drawing_of(answer), answer, THEME, width)
    return figure_for(drawing_of(answer), answer, THEME, width, height)[0]


@pytest.mark.parametrize("kind", PLAIN)
@pytest.mark.parametrize("width", [504.0, 250.0])
def test_pictures_speak_german(kind, width):
    answer = EVERY[kind]()
    with po.writing("de"):
        figure = drawn(answer, width)
    left = [
        told
        for text in words_on(figure)
        if ENGLISH.search(told := without_labels(GERMAN.sub("", text), answer))
    ]
    assert left == []


@pytest.mark.parametrize("kind", EVERY)
@pytest.mark.parametrize("width", [504.0, 360.0])
def test_german_texts_do_not_meet(kind, width):
    with po.writing("de"):
        figure = drawn(EVERY[kind](), width)
    assert_readable(figure)


def test_a_picture_keeps_its_language_when_it_is_drawn_again_later():
    figure = Figure()
    axes = figure.add_axes((0.1, 0.1, 0.8, 0.8))
    with po.writing("de"):
        draw(made.curve_alone(), ax=axes)
    before = words_on(figure)
    axes.set_position((0.1, 0.1, 0.7, 0.7))
    after = words_on(figure)
    assert any("Intervall" in each for each in before)
    assert [each for each in after if "Intervall" in each]
    assert not any("interval" in each for each in after)


def test_marks_are_kept_as_the_language_is():
    figure = Figure()
    axes = figure.add_axes((0.1, 0.1, 0.8, 0.8))
    with po.writing(decimal=","):
        draw(made.odds_answer(), ax=axes)
    axes.set_position((0.1, 0.1, 0.75, 0.75))
    told = words_on(figure)
    assert any(re.search(r"\d,\d", each) for each in told)
    assert not any(re.search(r"\d\.\d", each) for each in told)


@pytest.mark.parametrize("kind", PLAIN)
def test_cases_without_a_name_are_faelle(kind):
    answer = EVERY[kind]()
    outcome = replace(answer.subject.outcome, case="case", cases="cases")
    answer = replace(answer, subject=replace(answer.subject, outcome=outcome))
    with po.writing("de"):
        told = " ".join(words_on(drawn(answer)))
    assert not re.search(r"\bcases?\b", told)
