"""Labels say the same in sentences and in pictures, for any text that people put in them."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.model.predictors import OutcomeFacts
from plainodds.phrases import labels
from tests.phrases.made import (
    AGE,
    LINED,
    MATERIAL,
    REPAIRS,
    curve_answer,
    level_facts,
    number_facts,
    odds_row,
    subject,
)

PRESSURE = number_facts("pressure", label="BP at entry", unit="mmHg")
SHARE = number_facts("share", label="wet share", unit="%")


def test_a_predictor_is_called_by_its_label():
    assert labels.predictor_label(AGE) == "Pipe age"
    assert labels.predictor_label(REPAIRS) == "Past repairs"
    assert labels.predictor_name(AGE) == "pipe age"
    assert labels.predictor_name(PRESSURE) == "BP at entry"
    assert labels.predictor_label(number_facts(label="pH of soil")) == "pH of soil"


def test_a_predictor_without_a_label_is_called_by_its_name():
    assert labels.predictor_label(number_facts("x1", label=" ")) == "x1"
    assert labels.predictor_name(number_facts("x1", label="")) == "x1"


def test_an_axis_names_the_unit():
    assert labels.axis_title(AGE) == "Pipe age (years)"
    assert labels.axis_title(REPAIRS) == "Past repairs"
    assert labels.axis_title(MATERIAL) == "Material"


@pytest.mark.parametrize(
    ("facts", "value", "text"),
    [
        (AGE, 40.0, "40 years"),
        (AGE, 1, "1 year"),
        (AGE, 0.30000000000000004, "0.3 years"),
        (PRESSURE, 1.0, "1 mmHg"),
        (SHARE, 40.0, "40%"),
        (REPAIRS, 2.0, "2"),
        (MATERIAL, "CI", "cast iron"),
        (MATERIAL, "unknown", "unknown"),
        (LINED, True, "yes"),
        (LINED, 0, "no"),
        (AGE, "forty", "forty"),
        (MATERIAL, " ", "(blank)"),
    ],
)
def test_values_are_written_as_people_say_them(facts, value, text):
    assert labels.value_label(facts, value) == text


def test_what_stands_alone_beside_a_line_explains_itself():
    assert labels.line_label(AGE, 40.0) == "40 years"
    assert labels.line_label(MATERIAL, "PVC") == "PVC"
    assert labels.line_label(REPAIRS, 2.0) == "past repairs: 2"
    assert labels.line_label(LINED, True) == "lined: yes"


@pytest.mark.parametrize(
    ("facts", "row", "text"),
    [
        (AGE, odds_row(start=40.0, end=41.0), "per year more"),
        (AGE, odds_row(start=40.0, end=50.0), "per 10 years more"),
        (AGE, odds_row(start=40.0, end=30.0), "per 10 years less"),
        (AGE, odds_row(start=0.1, end=0.30000000000000004), "per 0.2 years more"),
        (AGE, odds_row(start=20.0, end=60.0, per_step=False), "from 20 to 60 years"),
        (AGE, odds_row(start=1.0, end=60.0, per_step=False), "from 1 to 60 years"),
        (AGE, odds_row(start=0.0, end=1.0, per_step=False), "from 0 to 1 year"),
        (PRESSURE, odds_row(start=100.0, end=101.0), "per 1 mmHg more"),
        (SHARE, odds_row(start=40.0, end=50.0), "per 10 percentage points more"),
        (SHARE, odds_row(start=40.0, end=50.0, per_step=False), "from 40% to 50%"),
        (REPAIRS, odds_row(start=0.0, end=1.0), "per unit more"),
        (REPAIRS, odds_row(start=0.0, end=2.0, per_step=False), "from 0 to 2"),
        (MATERIAL, odds_row("material", "CI", "PVC"), "PVC against cast iron"),
        (LINED, odds_row("lined", False, True), "yes against no"),
    ],
)
def test_a_change_names_its_size_and_direction(facts, row, text):
    assert labels.change_label(facts, row) == text


def test_a_row_says_what_it_is_given():
    row = odds_row(given=(("material", "CI"), ("past_repairs", 2.0)))
    assert labels.row_label(subject(), row) == (
        "Pipe age, per 10 years more; material cast iron, past repairs 2"
    )
    assert labels.row_label(subject(), odds_row()) == "Pipe age, per 10 years more"
    assert (
        labels.given_clause(subject(), row.given) == "given material cast iron and past repairs 2"
    )
    assert labels.given_clause(subject(), ()) == ""


@pytest.mark.parametrize(
    ("scale", "others", "title"),
    [
        ("probability", "typical", "Chance of burst this winter"),
        ("probability", "observed", "Average chance of burst this winter"),
        ("odds", "typical", "Odds of burst this winter"),
        ("odds", "observed", "Odds matching the average chance of burst this winter"),
        ("linear_predictor", "typical", "Log odds of burst this winter"),
        (
            "slope",
            "typical",
            "Chance of burst this winter: percentage points per year more",
        ),
    ],
)
def test_a_scale_names_the_event_and_its_unit(scale, others, title):
    assert labels.scale_title(curve_answer(scale=scale, others=others)) == title


def test_the_outcome_is_named():
    outcome = OutcomeFacts("y", "burst this\n winter", "pipe", "pipes", 1, 0.1)
    assert labels.chance_of(outcome) == "Chance of burst this winter"
    assert labels.odds_of_event(outcome) == "Odds of burst this winter"


def test_lists_read_as_in_speech():
    assert labels.listed([]) == ""
    assert labels.listed(["a"]) == "a"
    assert labels.listed(["a", "b"]) == "a and b"
    assert labels.listed(["a", "b", "c"]) == "a, b and c"


@given(st.text(), st.text(), st.text())
def test_any_text_may_be_a_label(label, unit, level):
    number = number_facts(label=label, unit=unit)
    category = level_facts(label=label, levels=(level,), level_labels=(level,), level_counts=(3,))
    texts = [
        labels.predictor_label(number),
        labels.predictor_name(number),
        labels.axis_title(number),
        labels.value_label(number, 40.0),
        labels.line_label(number, 40.0),
        labels.change_label(number, odds_row()),
        labels.value_label(category, level),
        labels.line_label(category, level),
    ]
    assert all(text == " ".join(text.split()) for text in texts)
    assert all(texts)
