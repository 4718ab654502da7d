"""CurveView: along which predictor, by which, what the others do, on which scale."""

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.curve import CurveQuestion
from plainodds.views.curve import curve_table
from tests.views.frontend import control_of, text_of
from tests.views.test_profile import cells


def choose(page, control, value):
    places = [place for place, (_, held) in enumerate(control._options) if held == value]
    page.change(control.widget, index=places[0])


def labels(control):
    return [label for label, _ in control._options]


def test_it_starts_along_a_number_by_a_category_that_it_depends_on(fit, page):
    assert po.CurveView(fit).question == CurveQuestion("age_years", by="material")


def test_without_numbers_it_starts_along_the_first_predictor(mains, page):
    view = po.CurveView(smf.logit("burst ~ material + lined", mains).fit(disp=0))
    assert view.question.predictor == "material"
    assert view.question.by is None


def test_each_choice_edits_its_part_of_the_question(fit, page):
    view = po.CurveView(fit)
    choose(page, control_of(view, "predictor"), "pressure_m")
    choose(page, control_of(view, "by"), "lined")
    choose(page, control_of(view, "scale"), "odds")
    choose(page, control_of(view, "others"), "observed")
    choose(page, control_of(view, "level"), 0.9)
    assert view.question == CurveQuestion(
        "pressure_m", by="lined", others="observed", scale="odds", level=0.9
    )
    assert view.problem is None


def test_a_predictor_cannot_be_drawn_by_itself(fit, page):
    view = po.CurveView(fit)
    choose(page, control_of(view, "predictor"), "material")
    assert view.question.by is None
    assert control_of(view, "by").value is None
    assert "Material" not in labels(control_of(view, "by"))
    assert view.problem is None


def test_along_levels_there_is_no_slope_to_choose(fit, page):
    view = po.CurveView(fit)
    choose(page, control_of(view, "scale"), "slope")
    choose(page, control_of(view, "predictor"), "material")
    assert view.question.scale == "probability"
    assert "slope of the chance" not in labels(control_of(view, "scale"))
    choose(page, control_of(view, "predictor"), "age_years")
    assert "slope of the chance" in labels(control_of(view, "scale"))
    assert view.problem is None


def test_one_choice_is_one_render(fit, page):
    view = po.CurveView(fit)
    page.forget()
    choose(page, control_of(view, "predictor"), "material")
    assert len(page.updates(view._stage.place)) == 1


def test_lines_can_be_left_out(fit, page):
    view = po.CurveView(fit)
    page.change(control_of(view, "by_values").boxes[1], value=False)
    assert view.question.by_values == ("cast iron", "PVC")
    assert [line.by for line in view.answer.lines] == ["cast iron", "PVC"]


def test_lines_of_a_number_stand_at_the_numbers_typed(two_numbers, page):
    view = po.CurveView(two_numbers, CurveQuestion("age_years", by="pressure_m"))
    page.change(control_of(view, "by_values").widget, value="40, 60")
    assert view.question.by_values == (40.0, 60.0)
    page.change(control_of(view, "by_values").widget, value="forty")
    assert "“forty” is not a number" in text_of(view._messages.value)
    assert view.question.by_values == (40.0, 60.0)
    assert control_of(view, "by_values").widget.value == "40, 60"


def test_another_by_starts_with_all_its_values(fit, page):
    view = po.CurveView(fit)
    page.change(control_of(view, "by_values").boxes[1], value=False)
    choose(page, control_of(view, "by"), "lined")
    assert view.question.by_values == ()
    choose(page, control_of(view, "by"), "material")
    assert [box.value for box in control_of(view, "by_values").boxes] == [True, True, True]


def test_others_can_be_held_at_values_of_ones_own(fit, page):
    view = po.CurveView(fit)
    assert view._others.place.children == ()
    choose(page, control_of(view, "others"), "held")
    assert view.question.others == ()
    assert len(view._others.place.children) == 3
    page.change(view._others.held["past_repairs"].slider, value=2.0)
    assert view.question.others == (("past_repairs", 2),)
    assert dict(view.answer.held)["past_repairs"] == 2
    choose(page, control_of(view, "others"), "typical")
    assert view.question.others == "typical"
    assert view._others.place.children == ()


def test_what_the_curve_moves_is_not_held(fit, page):
    view = po.CurveView(fit, CurveQuestion("age_years", others=(("pressure_m", 70.0),)))
    choose(page, control_of(view, "predictor"), "pressure_m")
    assert view.question.others == ()
    assert view.problem is None
    names = [
        name
        for name, held in view._others.held.items()
        if held.widget in view._others.place.children
    ]
    assert "pressure_m" not in names


@pytest.mark.parametrize(
    "question",
    [
        CurveQuestion("age_years"),
        CurveQuestion("material", by="lined", others="observed", level=0.8),
        CurveQuestion("age_years", by="material", by_values=("PVC",), scale="slope"),
        CurveQuestion("pressure_m", by="age_years", by_values=(20, 90), scale="linear_predictor"),
        CurveQuestion("age_years", others=(("lined", True), ("past_repairs", 3))),
    ],
)
def test_controls_show_the_question_that_is_set(fit, page, question):
    view = po.CurveView(fit)
    view.question = question
    assert view.question == question
    controls = [control_of(view, field) for field in ("predictor", "by", "others", "scale")]
    controls.append(control_of(view, "level"))
    if question.by is not None:
        controls.append(view._by_values[question.by])
        assert view._by_place.children == (view._by_values[question.by].widget,)
    for control in controls:
        binding = view._bindings[id(control)]
        assert control.value == binding.read(question)
    # to choose another predictor, line or way to hold the others starts these afresh
    for control in controls[3:]:
        assert view._bindings[id(control)].write(question, control.value) == question
    for name, value in () if isinstance(question.others, str) else question.others:
        assert view._others.held[name].value == value


def test_the_table_has_a_column_for_each_line_and_says_how_many_points_it_leaves_out(fit):
    answer = fit.curve("age_years", by="material")
    table = curve_table(answer)
    rows = cells(table)
    assert len(rows) == 11
    assert rows[0][0] == po.phrases.numbers.quantity(answer.lines[0].at[0])
    assert rows[-1][0] == po.phrases.numbers.quantity(answer.lines[0].at[-1])
    assert f"11 of {len(answer.lines[0].at)} points" in text_of(table)
    assert "cast iron" in text_of(table.partition("<tbody>")[0])


def test_figures_where_there_are_no_data_are_starred(fit):
    answer = fit.curve("age_years", by="material")
    table = curve_table(answer)
    assert "* no rows of the data near by" in text_of(table)
    first, *_, last = cells(table)
    for row, place in ((first, 0), (last, -1)):
        for cell, line in zip(row[1:], answer.lines, strict=True):
            assert ("*" in cell) != line.supported[place]
    supported = curve_table(fit.curve("age_years", at=[40, 50]))
    assert "*" not in text_of(supported)


@pytest.mark.parametrize("scale", ["probability", "slope", "odds", "linear_predictor"])
def test_each_cell_holds_an_estimate_and_its_interval(fit, scale):
    for row in cells(curve_table(fit.curve("age_years", scale=scale))):
        assert row[1].endswith(")")
        assert "(" in row[1]
        assert "percentage points" not in row[1]


def test_a_file_is_named_after_what_it_shows(fit, page):
    assert po.CurveView(fit)._stem() == "curve-age_years-by-material"
    assert po.CurveView(fit, CurveQuestion("lined"))._stem() == "curve-lined"
