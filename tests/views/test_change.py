"""ChangeView: what changes, from where to where, for whom."""

from dataclasses import replace

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.change import ChangeQuestion
from plainodds.answers.moves import Move
from plainodds.phrases.numbers import chance, percentage_points
from plainodds.views.change_table import change_table
from tests.views.frontend import control_of, text_of
from tests.views.test_curve import choose, labels
from tests.views.test_profile import cells


def ends_of(view):
    """The control of from and to that is in the page."""
    (found,) = [
        control
        for control in view._ends.values()
        if control.widget in view._ends_place.children
    ]  # fmt: skip
    return found


def move_of(view):
    ((name, move),) = view.question.moves
    return name, move.start, move.end


def test_it_starts_with_a_number_from_quartile_to_quartile_as_observed(fit, page):
    view = po.ChangeView(fit)
    low, _, high = fit.subject.predictor("age_years").quartiles
    name, start, end = move_of(view)
    assert (name, start, end) == ("age_years", round(low), round(high))
    assert view.question.others == "observed"
    assert view.answer == fit.change("age_years", start, end)


def test_without_numbers_it_starts_with_the_first_predictor(mains, page):
    view = po.ChangeView(smf.logit("burst ~ material + lined", mains).fit(disp=0))
    assert move_of(view) == ("material", "cast iron", "PVC")


def test_handles_move_both_ends(fit, page):
    view = po.ChangeView(fit)
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    assert move_of(view) == ("age_years", 20, 70)
    assert [box.value for box in ends_of(view).boxes] == [20.0, 70.0]
    assert view.answer == fit.change("age_years", 20, 70)


def test_numbers_are_typed_and_may_go_downwards(fit, page):
    view = po.ChangeView(fit)
    start, end = ends_of(view).boxes
    page.change(start, value=90.0)
    page.change(end, value=30.0)
    assert move_of(view) == ("age_years", 90, 30)
    assert ends_of(view).slider.value == (30.0, 90.0)


def test_swapping_turns_the_change_round_and_handles_keep_its_direction(fit, page):
    view = po.ChangeView(fit)
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    page.press(view._swap)
    assert move_of(view) == ("age_years", 70, 20)
    assert [box.value for box in ends_of(view).boxes] == [70.0, 20.0]
    page.change(ends_of(view).slider, value=[30.0, 70.0])
    assert move_of(view) == ("age_years", 70, 30)


def test_levels_have_two_lists(fit, page):
    view = po.ChangeView(fit)
    choose(page, control_of(view, "predictor"), "material")
    assert move_of(view) == ("material", "cast iron", "PVC")
    choose(page, ends_of(view).choices[1], "ductile iron")
    assert move_of(view) == ("material", "cast iron", "ductile iron")
    page.press(view._swap)
    assert [each.value for each in ends_of(view).choices] == ["ductile iron", "cast iron"]
    assert view.answer == fit.change("material", "ductile iron", "cast iron")


def test_from_where_it_already_is_is_refused_and_the_picture_stays(fit, page):
    view = po.ChangeView(fit)
    before, shown = view._stage.place.value, move_of(view)
    page.forget()
    page.change(ends_of(view).boxes[0], value=float(shown[2]))
    assert "is no change" in text_of(view._messages.value)
    assert 'role="alert"' in view._messages.value
    assert view._stage.place.value == before
    assert move_of(view) == shown
    assert ends_of(view).value == shown[1:]
    assert page.updates(view._stage.place) == []
    page.change(ends_of(view).boxes[0], value=10.0)
    assert view._messages.value == ""


def test_levels_that_are_the_same_are_refused_too(fit, page):
    view = po.ChangeView(fit)
    choose(page, control_of(view, "predictor"), "material")
    choose(page, ends_of(view).choices[0], "PVC")
    assert "is no change" in text_of(view._messages.value)
    assert ends_of(view).value == ("cast iron", "PVC")


def test_a_number_out_of_range_is_set_to_the_nearest_and_says_so(fit, page):
    view = po.ChangeView(fit)
    choose(page, control_of(view, "predictor"), "pressure_m")
    page.forget()
    page.change(ends_of(view).boxes[1], value=5000.0)
    high = ends_of(view)._high
    assert move_of(view)[2] == high
    assert "5000 m was set to" in text_of(view._messages.value)
    assert len(page.updates(view._stage.place)) == 1


def test_one_message_of_the_slider_is_one_render(fit, page):
    view = po.ChangeView(fit)
    slider = ends_of(view).slider
    page.forget()
    page.change(slider, value=[20.0, 60.0])
    assert len(page.updates(view._stage.place)) == 1
    # the slider's own value comes from the page and is not sent back
    assert page.updates(slider) == []


def test_others_can_be_held(fit, page):
    view = po.ChangeView(fit)
    choose(page, control_of(view, "others"), "typical")
    assert view.answer.question.others == "typical"
    choose(page, control_of(view, "others"), "held")
    held = view._others.held
    assert set(held) == {"material", "pressure_m", "past_repairs", "lined"}
    page.change(held["past_repairs"].slider, value=2.0)
    name, start, end = move_of(view)
    assert view.answer == fit.change(name, start, end, others={"past_repairs": 2})


def test_what_is_held_is_let_go_when_it_changes_itself(fit, page):
    view = po.ChangeView(fit, fit.change("age_years", 20, 60, others={"material": "PVC"}).question)
    choose(page, control_of(view, "predictor"), "material")
    assert view.question.others == ()
    assert view.problem is None


def test_rows_can_be_chosen_by_a_level(fit, page):
    view = po.ChangeView(fit)
    rows = control_of(view, "where")
    assert labels(rows)[0] == "all 900 rows"
    assert not any("age" in label for label in labels(rows))
    choose(page, rows, (("material", "PVC"),))
    name, start, end = move_of(view)
    assert view.answer == fit.change(name, start, end, where={"material": "PVC"})
    chosen = next(label for label, where in rows._options if where == (("material", "PVC"),))
    assert chosen == f"Material PVC ({view.answer.counted} rows)"


def test_where_nothing_is_averaged_there_are_no_rows_to_choose(fit, page):
    view = po.ChangeView(fit, fit.change("age_years", 20, 60, where={"lined": True}).question)
    assert view._among.place.children
    choose(page, control_of(view, "others"), "typical")
    assert view.question.where is None
    assert view._among.place.children == ()
    assert view.problem is None


def test_rows_without_which_a_change_has_nobody_are_refused(fit, page):
    view = po.ChangeView(fit)
    with pytest.raises(po.QuestionRefused, match="nobody to average over"):
        view.question = replace(view.question, where=(("age_years", (500.0, 600.0)),))
    assert view.question.where is None


@pytest.mark.parametrize(
    "asked",
    [
        lambda fit: fit.change("age_years", 60, 20, level=0.8),
        lambda fit: fit.change("pressure_m", 41.25, 70.5, others="typical"),
        lambda fit: fit.change("material", "PVC", "cast iron", where={"lined": True}),
        lambda fit: fit.change("lined", False, True, others={"age_years": 33, "material": "PVC"}),
        lambda fit: fit.change("age_years", 20, 60, where={"material": ("PVC", "cast iron")}),
        lambda fit: fit.change({"age_years": (60, 0), "material": ("cast iron", "PVC")}),
        lambda fit: fit.change("age_years", po.Shift(by=-10, lowest=0)),
    ],
)
def test_controls_show_the_question_that_is_set(fit, page, asked):
    answer = asked(fit)
    view = po.ChangeView(fit)
    view.question = answer.question
    assert view.answer == answer
    for binding in view._bindings.values():
        shown = binding.control.value
        assert shown == binding.read(view.question)
    for field in ("others", "where", "level"):
        binding = view._bindings[id(control_of(view, field))]
        assert binding.write(view.question, binding.control.value) == view.question
    assert po.from_json(po.to_json(view.question)) == view.question


def test_a_change_of_several_predictors_is_named_and_can_be_left(fit, page):
    view = po.ChangeView(fit)
    together = fit.change({"age_years": (60, 0), "material": ("cast iron", "PVC")}).question
    view.question = together
    shown = control_of(view, "predictor")
    assert labels(shown)[-1].startswith("Pipe age from 60 to 0 years; material PVC")
    assert [each is view._swap for each in view._ends_place.children] == [True]
    page.press(view._swap)
    assert view.question.moves[1] == ("material", Move("PVC", "cast iron"))
    choose(page, shown, "lined")
    assert move_of(view) == ("lined", False, True)


def test_a_question_of_another_kind_is_refused(fit, page):
    view = po.ChangeView(fit)
    with pytest.raises(po.QuestionRefused, match="edits a ChangeQuestion"):
        view.question = fit.odds().question


def test_the_table_has_every_figure_with_its_interval(fit):
    answer = fit.change("age_years", 20, 60)
    rows = {first: rest for first, *rest in cells(change_table(answer))}
    assert rows["Pipe age 20 years"][0] == chance(answer.start.estimate)
    assert rows["Pipe age 60 years"][0] == chance(answer.end.estimate)
    difference = answer.comparison.risk_difference.estimate
    points = percentage_points(difference, sign=True)
    assert f"{rows['Difference, percentage points'][0]} percentage points" == points
    assert rows["In 1,000 mains"][0] == f"{round(1000 * difference)} more"
    assert rows["Chances, as a ratio"][0] == f"{answer.comparison.risk_ratio.estimate:.2f}"
    assert rows["Odds, as a ratio"][0] == f"{answer.comparison.odds_ratio.estimate:.2f}"
    assert all(len(cells) == 2 and cells[1] for cells in rows.values())


def test_a_number_needed_has_two_pieces_where_no_difference_is_possible(fit):
    answer = fit.change("lined", False, True)
    needed = answer.number_needed
    assert needed.for_one_more
    assert needed.for_one_fewer
    (*_, (title, _, interval)) = cells(change_table(answer))
    side = "more" if needed.more else "fewer"
    other = "fewer" if needed.more else "more"
    assert title == f"Mains for one event {side}"
    assert interval.count("infinity") == 2
    assert interval.endswith(f"for one {other}")


def test_without_intervals_there_is_no_column_for_them(mains):
    result = smf.logit("burst ~ I(age_years / 100) + past_repairs", mains)
    answer = po.FittedLogit(result.fit_regularized(disp=0, alpha=0.1)).change("past_repairs", 0, 3)
    assert all(len(row) == 2 for row in cells(change_table(answer)))
    assert "interval" not in text_of(change_table(answer))


def test_files_are_named_after_what_changes(fit, page):
    view = po.ChangeView(fit, ChangeQuestion((("material", Move("PVC", "cast iron")),)))
    assert view._stem() == "change-material"
