"""Pictures of checks in German: no English is left, nothing meets, and figures have their names."""

import re
from dataclasses import replace

import pytest

import plainodds as po
from plainodds.answers.checks.finding import CONCERNS, TOPICS
from plainodds.drawings import Picture
from plainodds.drawings.draw import draw, figure_for, height_for
from plainodds.drawings.soundness import SoundnessDrawing
from plainodds.drawings.theme import theme_of
from plainodds.phrases.checks import finding_figures, finding_words
from plainodds.phrases.checks.headings import concern_label, finding_heading, topic_label
from plainodds.phrases.german.checks.finding_words import finding_words as german_words
from plainodds.phrases.languages import spoken_now
from tests.drawings import made_findings as made
from tests.drawings.seen import assert_readable, words_on
from tests.phrases.german.reading import with_german_labels
from tests.phrases.made_findings import answer_of, everything

LEVEL = 0.95
ALL = everything()
SUBJECT = with_german_labels(answer_of()).subject

LABELS = {
    "age_years": {"label": "Rohralter", "unit": "Jahre"},
    "material": {"label": "Werkstoff", "level_labels": ("Grauguss", "Duktilguss", "PVC")},
    "soil": {"label": "Boden", "level_labels": ("mild", "mäßig", "scharf")},
    "pressure_m": {"label": "Druck"},
    "diameter_mm": {"label": "Durchmesser"},
    "past_repairs": {"label": "frühere Reparaturen"},
    "lined": {"label": "Auskleidung"},
}
# columns and levels that the made findings name as a table of coefficients would
OWN = re.compile(
    r"„[^“]*“|\w+\[T\.\w+\]|\bage_years\b|Intercept|level \d+|`[^`]*`|cov_type=\S+|data="
)
ENGLISH = re.compile(
    r"\b(the|of|and|with|without|is|are|to|per|than|rather|chances?|intervals?|percentage|points?|"
    r"more|less|few|too|rows?|not|known|where|which|there|each|other|others|at|for|from|by|about|"
    r"standard errors?|estimates?|among|these|data|model|lines?|this|that|one|no|yes|or|either|"
    r"way|against|average|cases?|below|above|over|under|but|if|its?|their|has|have|all|none|only|"
    r"shown|coefficients?|columns?|levels?|groups?|beneath|dots|share|number|odds ratio|log odds|"
    r"end|open|upper|lower|left|out|used|missing|tied|exactly|condition|index|wide|usual|"
    r"times|strangers|counting|taking|bootstrap samples|corrected|slope|score \(|best|right|test|"
    r"measure|figures?|df|p-value|keep in mind|nothing|explain|shape|along|happened|smoothed)\b"
)


def german(answer):
    """The same answer as a German analyst would have labelled it."""
    predictors = tuple(replace(facts, **LABELS[facts.name]) for facts in answer.subject.predictors)
    outcome = replace(
        answer.subject.outcome, event="Rohrbruch in diesem Winter", case="Rohr", cases="Rohre"
    )
    return replace(answer, subject=replace(answer.subject, predictors=predictors, outcome=outcome))


def english_in(text):
    """The English words of a text, but for what the made data themselves are called."""
    return [each.group() for each in ENGLISH.finditer(OWN.sub("x", " ".join(text.split())))]


@pytest.mark.parametrize("name", [name for name in made.FINDINGS if "nasty" not in name])
@pytest.mark.parametrize("width", [380, 640])
def test_a_picture_says_nothing_in_english_and_stays_readable(name, width):
    with po.writing("de"):
        picture = Picture("screen", width)
        picture.show(german(made.FINDINGS[name]()))
        assert_readable(picture.figure)
    assert {text: found for text in words_on(picture.figure) if (found := english_in(text))} == {}


@pytest.mark.parametrize("name", [name for name in made.FINDINGS if "nasty" in name])
def test_nothing_meets_however_long_labels_are(name):
    with po.writing("de"):
        picture = Picture("screen", 300)
        picture.show(made.FINDINGS[name]())
        assert_readable(picture.figure)


@pytest.mark.parametrize("name", made.FINDINGS)
def test_nothing_meets_on_a_page(name):
    theme, width, answer = theme_of("page"), 504.0, made.FINDINGS[name]()
    with po.writing("de"):
        height = height_for(SoundnessDrawing, answer, theme, width)
        assert_readable(figure_for(SoundnessDrawing, answer, theme, width, height)[0])


@pytest.mark.parametrize("topic", TOPICS)
def test_what_is_not_known_is_told_in_german(topic):
    answer = german(made.answer(made.not_known(topic)))
    with po.writing("de"):
        words = words_on(draw(answer))
    assert {text: found for text in words if (found := english_in(text))} == {}
    assert any(text.startswith("Das lässt sich hier nicht sagen:") for text in words)


@pytest.mark.parametrize("found", ALL)
def test_figures_have_german_names_and_the_same_order(found):
    english = finding_figures(found, SUBJECT, LEVEL)
    with po.writing("de"), spoken_now():
        figures = finding_figures(found, SUBJECT, LEVEL)
    assert len(figures) == len(english)
    for pair in figures:
        for text in pair:
            assert english_in(text) == [], text
            assert not re.search(r"(?<![\d.,])1 (Fälle|Ereignisse|Gruppen)\b", text), text


@pytest.mark.parametrize("found", ALL)
def test_a_finding_is_told_in_the_language_that_is_spoken(found):
    english = finding_words(found, SUBJECT, LEVEL)
    assert finding_words.__wrapped__(found, SUBJECT, LEVEL) == english
    with po.writing("de"):
        # marks of numbers are German already, but no words
        plain = finding_words.__wrapped__(found, SUBJECT, LEVEL)
        assert finding_words(found, SUBJECT, LEVEL) == plain
        with spoken_now():
            told = finding_words(found, SUBJECT, LEVEL)
            assert told == german_words(found, SUBJECT, LEVEL)
            assert told.heading == finding_heading(found, SUBJECT)
    assert english_in(f"{told.heading} {told.what} {told.why} {told.next_step}") == []


def test_headings_and_weights_are_german_only_where_german_is_spoken():
    english = [*map(topic_label, TOPICS), *map(concern_label, CONCERNS)]
    with po.writing("de"):
        assert [*map(topic_label, TOPICS), *map(concern_label, CONCERNS)] == english
        with spoken_now():
            said = [*map(topic_label, TOPICS), *map(concern_label, CONCERNS)]
    assert len(set(said)) == len(said)
    assert not set(said) & set(english)
    assert said[-len(CONCERNS) :] == [
        "nichts gefunden", "nicht bekannt", "zu bedenken", "noch nicht erklären",
    ]  # fmt: skip


@pytest.mark.parametrize(
    ("name", "told"),
    [
        (
            "amount",
            "Fälle (Rohre) mit „Rohrbruch in diesem Winter“ je Koeffizient (8 Koeffizienten)",
        ),
        ("levels", "Anzahl der Fälle (Rohre)"),
        ("influence", "Odds Ratio mit diesen Zeilen und ohne"),
        ("separation", "beiderseits offen"),
        ("missing", "Ausgelassene Zeilen, Ergebnis bekannt: 60"),
        ("dependence", "6.000 Zeilen in 42 Gruppen nach „district“, höchstens 310 je Gruppe."),
        ("standard errors, usual", "der größte: 0,30"),
        ("overall", "9,65 (Freiheitsgrade: 8), p-Wert 0,29"),
    ],
)
def test_fixed_texts_stand_in_german_with_german_marks(name, told):
    with po.writing("de"):
        words = words_on(draw(german(made.FINDINGS[name]())))
    assert told in " ".join(" ".join(words).split())


def test_another_german_finding_of_the_topic_moves_the_artists():
    answer = german(made.FINDINGS["influence"]())
    with po.writing("de"):
        picture = Picture("screen", 600, 700)
        picture.show(answer)
        first = words_on(picture.figure)
        picture.show(german(made.answer(made.influence((), "nothing found", others=20))))
        picture.show(answer)
    assert picture.rebuilt == 1
    assert words_on(picture.figure) == first
