"""Units agree with their numbers, whatever the unit is."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.phrases import units


@pytest.mark.parametrize(
    ("plural", "singular"),
    [
        ("years", "year"),
        ("metres of head", "metre of head"),
        ("degrees Celsius", "degree Celsius"),
        ("litres per day", "litre per day"),
        ("visits/month", "visit/month"),
        ("days since repair", "day since repair"),
        ("square metres", "square metre"),
        ("standard deviations", "standard deviation"),
        ("inches", "inch"),
        ("boxes", "box"),
        ("batteries", "battery"),
        ("feet", "foot"),
        ("children", "child"),
        ("lbs", "lb"),
        ("doses", "dose"),
        ("US dollars", "US dollar"),
    ],
)
def test_a_plural_unit_has_its_singular(plural, singular):
    assert units.single(plural) == singular
    assert units.with_unit(1.0, plural) == f"1 {singular}"
    assert units.with_unit(2.0, plural) == f"2 {plural}"


@pytest.mark.parametrize(
    "unit",
    [
        "mmHg",
        "kg",
        "ms",
        "mm",
        "hertz",
        "siemens",
        "thousand dollars",
        "°C",
        "kg/m²",
        "series",
        "gas",
    ],
)
def test_a_unit_without_a_plural_stays(unit):
    assert units.single(unit) == unit


@pytest.mark.parametrize("number", [0, 0.5, 1.5, 2, -1, 10, 1e6])
def test_all_numbers_but_one_take_the_plural(number):
    assert units.with_unit(number, "years").endswith(" years")


@pytest.mark.parametrize(
    ("size", "unit", "text"),
    [
        (1, "years", "year"),
        (10, "years", "10 years"),
        (0.5, "years", "0.5 years"),
        (1, "mmHg", "1 mmHg"),
        (1, "", "unit"),
        (5, "", "5 units"),
        (1000, "£", "£1000"),
        (1, "%", "percentage point"),
        (10, "%", "10 percentage points"),
    ],
)
def test_a_step_reads_well_after_per(size, unit, text):
    assert units.step(size, unit) == text


def test_one_unit_reads_well_after_per():
    assert units.per_unit("years") == "year"
    assert units.per_unit("mmHg") == "mmHg"
    assert units.per_unit("£") == "£1"
    assert units.per_unit("") == "unit"


@given(st.text(), st.floats(allow_nan=False, allow_infinity=False))
def test_any_text_may_be_a_unit(unit, number):
    for text in (
        units.with_unit(number, unit),
        units.step(abs(number), unit),
        units.per_unit(unit),
    ):
        assert text
        assert text == " ".join(text.split())
