"""Controls take what people enter, and show what they are told to."""

import pytest

from plainodds.model.predictors import PredictorFacts
from plainodds.views.controls import (
    BoxControl,
    ChoiceControl,
    NumberControl,
    SwitchControl,
    limits,
    predictor_control,
    slider_range,
    slug,
)

INFINITE = (float("-inf"), float("inf"))


def number(kind="number", offered=(20.3, 97.1), step=10.0, typical=57.0, allowed=INFINITE):
    return PredictorFacts(
        name="pressure_m", label="Pressure", unit="m", kind=kind, levels=(), level_labels=(),
        level_counts=(), minimum=offered[0], maximum=offered[1], quartiles=(40.0, 57.0, 65.0),
        offered=offered, allowed=allowed, typical=typical, step=step, linear=True, modifiers=(),
    )  # fmt: skip


def levels(kind="category", names=("cast iron", "PVC"), labels=None):
    nan = float("nan")
    return PredictorFacts(
        name="material", label="Material", unit="", kind=kind, levels=names,
        level_labels=labels or tuple(str(each) for each in names), level_counts=(5, 7),
        minimum=nan, maximum=nan, quartiles=(nan,) * 3, offered=(nan,) * 2, allowed=(nan,) * 2,
        typical=names[1], step=nan, linear=True, modifiers=(),
    )  # fmt: skip


def test_a_slider_goes_over_round_values_within_the_data():
    assert slider_range(number()) == (21.0, 97.0, 1.0)
    assert slider_range(number(offered=(0.0, 1.0), step=0.1)) == (0.0, 1.0, 0.01)


def test_a_slider_for_whole_numbers_goes_in_whole_steps():
    assert slider_range(number("whole number", (1.0, 108.0), 10.0)) == (1.0, 108.0, 1.0)
    assert slider_range(number("whole number", (0.0, 8.0), 1.0)) == (0.0, 8.0, 1.0)
    assert slider_range(number("whole number", (80.0, 500.0), 20.0)) == (80.0, 500.0, 2.0)


def test_a_slider_is_finer_than_the_step_of_an_odds_ratio():
    for step in (0.5, 2.0, 10.0):
        facts = number(offered=(0.0, 20 * step), step=step)
        assert slider_range(facts)[2] == pytest.approx(step / 10)


def test_a_range_narrower_than_the_step_still_has_room_to_move():
    low, high, step = slider_range(number(offered=(20.1, 20.4), step=10.0))
    assert (low, high) == (20.1, 20.4)
    assert (high - low) / step == pytest.approx(100)


def test_a_slider_stays_where_the_formula_can_be_computed():
    facts = number(offered=(-5.0, 100.0), allowed=(0.5, 90.0))
    assert limits(facts) == (0.5, 90.0)
    assert slider_range(facts) == (1.0, 90.0, 1.0)


def test_the_number_box_has_the_name_and_the_unit():
    control = NumberControl(number())
    assert control.box.description == "Pressure (m)"
    assert control.slider.readout is False


def test_box_and_slider_follow_each_other():
    control = NumberControl(number())
    control.slider.value = 60.0
    assert control.take(control.slider) == ""
    assert control.box.value == 60.0
    control.box.value = 45.5
    assert control.take(control.box) == ""
    assert control.slider.value == 45.5


def test_a_slider_that_is_moved_is_not_moved_back_by_the_kernel():
    # 0.1 + 0.2 as a slider counts its steps
    control = NumberControl(number(offered=(0.0, 1.0), step=0.1, typical=0.5))
    control.slider.value = 0.30000000000000004
    control.take(control.slider)
    assert control.value == 0.3
    assert control.slider.value == 0.30000000000000004


@pytest.mark.parametrize(("typed", "taken"), [(5000.0, 97.1), (-3.0, 20.3)])
def test_a_number_outside_the_range_becomes_the_nearest_and_that_is_said(typed, taken):
    control = NumberControl(number())
    control.box.value = typed
    said = control.take(control.box)
    assert control.value == taken
    assert "20.3 to 97.1 m" in said
    assert said.endswith(f"was set to {taken:g}.")


def test_the_ends_of_the_data_can_be_typed_although_the_slider_is_rounder():
    control = NumberControl(number())
    control.box.value = 20.3
    assert control.take(control.box) == ""
    assert control.value == 20.3


def test_a_fraction_of_a_whole_number_is_rounded_and_that_is_said():
    control = NumberControl(number("whole number", (0.0, 8.0), 1.0, typical=2))
    control.box.value = 2.6
    assert "whole numbers" in control.take(control.box)
    assert control.value == 3
    assert isinstance(control.value, int)


def test_a_number_asked_for_in_python_widens_the_range():
    control = NumberControl(number())
    control.show(130.0)
    assert control.value == 130.0
    assert control.slider.value == 130.0
    control.box.value = 120.0
    assert control.take(control.box) == ""


def test_equal_looking_values_of_different_kinds_are_different_choices():
    control = ChoiceControl("Level", [("yes", True), ("one", 1)], 1)
    assert control.widget.index == 1
    assert control.value is not True
    control.show(True)
    assert control.widget.index == 0


def test_choices_with_the_same_label_can_be_told_apart():
    control = ChoiceControl("Level", [("a", "x"), ("a", "y")], "y")
    assert control.value == "y"


def test_a_choice_that_is_not_on_offer_joins_the_others():
    control = ChoiceControl("Intervals", [("90%", 0.9), ("95%", 0.95)], 0.95)
    control.show(0.8)
    assert control.value == 0.8
    control.show(0.9)
    assert control.value == 0.9


def test_an_offer_of_the_same_values_does_not_undo_what_was_just_chosen():
    options = [("chance", "probability"), ("odds", "odds")]
    control = ChoiceControl("Shown as", options, "probability")
    control.widget.index = 1
    control.offer(options, "probability")
    assert control.value == "odds"


def test_an_offer_of_other_values_shows_the_one_asked_for():
    control = ChoiceControl("Shown as", [("chance", "probability"), ("odds", "odds")], "odds")
    control.offer([("chance", "probability"), ("slope", "slope")], "slope")
    assert control.value == "slope"


def test_a_box_alone_gives_its_number():
    control = BoxControl("Step", 10)
    control.show(5)
    assert control.value == 5.0
    assert control.widget.description == "Step"


def test_each_kind_of_predictor_has_its_control():
    assert isinstance(predictor_control(number()), NumberControl)
    assert isinstance(predictor_control(levels()), ChoiceControl)
    yes_no = levels("yes/no", (False, True), ("no", "yes"))
    assert isinstance(predictor_control(yes_no), SwitchControl)
    # where the analyst has named the two, their names are shown
    named = levels("yes/no", (0, 1), ("untreated", "treated"))
    assert isinstance(predictor_control(named), ChoiceControl)


def test_a_switch_gives_the_levels_of_the_data():
    control = SwitchControl(levels("yes/no", (0, 1), ("no", "yes")))
    assert control.value == 1
    control.show(0)
    assert control.value == 0
    assert control.widget.value is False


def test_a_whole_number_given_as_a_number_is_shown_whole():
    control = NumberControl(number("whole number", (0.0, 8.0), 1.0, typical=2))
    control.show(4.0)
    assert control.value == 4
    assert isinstance(control.value, int)


@pytest.mark.parametrize(
    ("name", "expected"),
    [("age_years", "age_years"), ("a b", "a-b"), ("<img>", "img"), ("??", "predictor")],
)
def test_a_name_becomes_part_of_a_class(name, expected):
    assert slug(name) == expected


def test_names_that_look_alike_get_classes_of_their_own():
    assert slug("a b", taken=["a-b", "a-b-2"]) == "a-b-3"
