"""Several values at once: ticks and numbers in a line."""

import pytest

from plainodds.errors import QuestionRefused
from plainodds.views.several import NumbersControl, TicksControl, values_control


def ticks():
    return TicksControl("Materials", [("cast iron", "ci"), ("PVC", "pvc")], "Keep one.")


def test_all_ticked_is_the_same_as_none_chosen():
    control = ticks()
    assert control.value == ()
    control.boxes[0].value = False
    assert control.value == ("pvc",)


def test_no_values_tick_all():
    control = ticks()
    control.show(("ci",))
    assert [box.value for box in control.boxes] == [True, False]
    control.show(())
    assert [box.value for box in control.boxes] == [True, True]


def test_the_last_tick_cannot_go():
    control = ticks()
    for box in control.boxes:
        box.value = False
    with pytest.raises(QuestionRefused, match="Keep one"):
        control.take(control.boxes[1])


@pytest.mark.parametrize("text", ["20, 40.5,60", " 20 40.5; 60 ", "20,40.5,60,20"])
def test_numbers_are_read_however_they_are_set_apart(text):
    control = NumbersControl("Values", [1, 2])
    control.widget.value = text
    control.take(control.widget)
    assert control.value == (20.0, 40.5, 60.0)
    assert control.widget.value == "20, 40.5, 60"


def test_a_true_minus_sign_is_a_minus_sign():
    control = NumbersControl("Values", [1])
    control.widget.value = "−3, -4"
    assert control.value == (-3.0, -4.0)


def test_an_empty_line_is_the_default_again():
    control = NumbersControl("Values", [23, 37, 60])
    assert control.value == ()
    control.widget.value = "5"
    control.take(control.widget)
    control.widget.value = " "
    control.take(control.widget)
    assert control.widget.value == "23, 37, 60"
    assert control.value == ()


def test_what_is_no_number_is_refused_by_name():
    control = NumbersControl("Values", [1])
    control.widget.value = "20, forty"
    with pytest.raises(QuestionRefused, match="“forty” is not a number"):
        control.take(control.widget)


def test_numbers_get_a_line_and_levels_get_ticks(fit):
    age = values_control(fit.subject.predictor("age_years"), lambda name: f"At {name}", (20, 40))
    assert isinstance(age, NumbersControl)
    assert age.widget.description == "At pipe age (years)"
    material = values_control(fit.subject.predictor("material"), lambda name: f"At {name}", ())
    assert [box.description for box in material.boxes] == ["cast iron", "ductile iron", "PVC"]
