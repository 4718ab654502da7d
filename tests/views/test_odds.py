"""OddsView: which predictors, which changes, given what, in which order."""

import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.odds import OddsQuestion
from plainodds.drawings.odds_table import OddsTableDrawing
from plainodds.views.odds import odds_table
from tests.views.frontend import control_of, text_of
from tests.views.test_curve import choose, labels
from tests.views.test_profile import cells


def controls_of(view, field):
    """The controls of this field that are in the page."""
    return [
        binding.control
        for binding in view._bindings.values()
        if f"plainodds-control-{field}" in binding.control.widget._dom_classes
        and binding.control.widget in view._settings.children
    ]


def open_settings(view, page, name):
    choose(page, view._chosen, name)


def test_it_starts_with_every_predictor(fit, page):
    view = po.OddsView(fit)
    assert view.question == OddsQuestion()
    assert {row.predictor for row in view.answer.rows} == {
        facts.name for facts in fit.subject.predictors
    }


def test_a_straight_number_has_a_step(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "past_repairs")
    (step,) = controls_of(view, "step")
    assert step.value == fit.subject.predictor("past_repairs").step
    page.change(step.widget, value=3.0)
    assert view.question.steps == (("past_repairs", 3.0),)
    row = next(row for row in view.answer.rows if row.predictor == "past_repairs")
    assert row.end - row.start == 3


def test_a_step_of_nothing_is_refused_and_goes_back(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "past_repairs")
    (step,) = controls_of(view, "step")
    before = step.value
    page.change(step.widget, value=0.0)
    assert "not a number other than 0" in text_of(view._messages.value)
    assert step.value == before
    assert view.question == OddsQuestion()


def test_a_curved_number_has_two_values(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "pressure_m")
    (start,), (end,) = controls_of(view, "from"), controls_of(view, "to")
    low, _, high = fit.subject.predictor("pressure_m").quartiles
    assert (start.value, end.value) == (low, high)
    page.change(start.widget, value=30.0)
    assert view.question.between == (("pressure_m", (30.0, high)),)
    page.change(end.widget, value=80.0)
    assert view.question.between == (("pressure_m", (30.0, 80.0)),)


def test_a_category_has_a_reference(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "material")
    (reference,) = controls_of(view, "reference")
    assert reference.value == "cast iron"
    choose(page, reference, "PVC")
    assert view.question.references == (("material", "PVC"),)
    rows = [row for row in view.answer.rows if row.predictor == "material"]
    assert {row.start for row in rows} == {"PVC"}


def test_what_an_odds_ratio_depends_on_can_be_stated(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "material")
    (ages,) = controls_of(view, "given-age_years")
    page.change(ages.widget, value="20, 80")
    assert view.question.given == (("age_years", (20.0, 80.0)),)
    open_settings(view, page, "age_years")
    (materials,) = controls_of(view, "given-material")
    page.change(materials.boxes[0], value=False)
    given = {row.given for row in view.answer.rows if row.predictor == "age_years"}
    assert given == {(("material", "ductile iron"),), (("material", "PVC"),)}


def test_a_modifier_is_shown_alike_wherever_it_can_be_set(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "material")
    view.question = OddsQuestion(given=(("age_years", (20.0, 80.0)),))
    (ages,) = controls_of(view, "given-age_years")
    assert ages.widget.value == "20, 80"


def test_the_default_values_of_a_modifier_are_those_of_the_rows(fit, page):
    view = po.OddsView(fit)
    open_settings(view, page, "material")
    (ages,) = controls_of(view, "given-age_years")
    shown = {float(each) for each in ages.widget.value.split(",")}
    used = {
        float(dict(row.given)["age_years"])
        for row in view.answer.rows
        if row.predictor == "material"
    }
    assert shown == used


def test_predictors_can_be_left_out(fit, page):
    view = po.OddsView(fit)
    ticks = control_of(view, "predictors")
    for box, facts in zip(ticks.boxes, fit.subject.predictors, strict=True):
        if facts.name not in ("pressure_m", "past_repairs"):
            page.change(box, value=False)
    assert view.question.predictors == ("pressure_m", "past_repairs")
    assert {row.predictor for row in view.answer.rows} == {"pressure_m", "past_repairs"}


def test_settings_of_a_predictor_that_is_not_shown_say_so(fit, page):
    view = po.OddsView(fit, OddsQuestion(predictors=("lined",)))
    assert controls_of(view, "reference")
    # what is offered stays as it is: a choice that is under way must not meet another list
    assert len(labels(view._chosen)) == len(fit.subject.predictors)
    open_settings(view, page, "pressure_m")
    assert not controls_of(view, "from")
    (said,) = view._settings.children
    assert "Not among the predictors shown" in text_of(said.value)
    view.question = OddsQuestion(predictors=("lined", "pressure_m"))
    assert controls_of(view, "from")


def test_the_last_predictor_stays(fit, page):
    view = po.OddsView(fit, OddsQuestion(predictors=("lined",)))
    ticks = control_of(view, "predictors")
    box = next(box for box in ticks.boxes if box.value)
    page.change(box, value=False)
    assert "Keep at least one predictor" in text_of(view._messages.value)
    assert box.value is True
    assert view.question.predictors == ("lined",)


def test_values_of_what_nothing_shown_depends_on_are_dropped(fit, page):
    view = po.OddsView(fit, OddsQuestion(given=(("age_years", (20.0,)),)))
    ticks = control_of(view, "predictors")
    place = [facts.name for facts in fit.subject.predictors].index("material")
    page.change(ticks.boxes[place], value=False)
    assert view.question.given == ()
    assert view.problem is None


def test_rows_can_go_by_size(fit, page):
    view = po.OddsView(fit)
    choose(page, control_of(view, "order"), "size")
    sizes = [abs(row.log_odds_ratio.estimate) for row in view.answer.rows]
    assert sizes == sorted(sizes, reverse=True)


def test_choosing_a_predictor_changes_no_question_and_draws_nothing(fit, page):
    view = po.OddsView(fit)
    page.forget()
    open_settings(view, page, "pressure_m")
    assert view.question == OddsQuestion()
    assert page.updates(view._stage.place) == []


def test_many_rows_are_told_one_predictor_at_a_time(fit, page):
    view = po.OddsView(fit)
    assert len(view.answer.rows) > 8
    open_settings(view, page, "pressure_m")
    assert "Pressure, in words" in text_of(view._words.value)
    assert "past repairs" not in text_of(view._words.value)
    view.question = OddsQuestion(predictors=("lined", "past_repairs"))
    assert "in words" not in text_of(view._words.value)
    assert "past repairs" in text_of(view._words.value)


@pytest.mark.parametrize(
    "question",
    [
        OddsQuestion(predictors=("material", "lined"), order="size", level=0.9),
        OddsQuestion(steps=(("past_repairs", 2.0),), references=(("material", "PVC"),)),
        OddsQuestion(between=(("pressure_m", (30.0, 80.0)),)),
        OddsQuestion(given=(("material", ("PVC",)), ("age_years", (20.0, 50.0)))),
    ],
)
def test_controls_show_the_question_that_is_set(fit, page, question):
    view = po.OddsView(fit)
    for facts in fit.subject.predictors:
        open_settings(view, page, facts.name)
    view.question = question
    for binding in view._bindings.values():
        assert binding.control.value == binding.read(question)
        # writing what is shown already states it, and asks for nothing else
        again = fit.ask(binding.write(question, binding.control.value))
        assert again.rows == view.answer.rows


def test_rows_of_one_change_stand_under_one_heading(fit):
    answer = fit.odds(["age_years", "pressure_m", "lined"])
    rows = cells(odds_table(answer))
    assert rows[0] == ["Pipe age, per 10 years more"]
    assert [row[0] for row in rows[1:4]] == [
        "material cast iron", "material ductile iron", "material PVC",
    ]  # fmt: skip
    assert rows[4][0].startswith("Pressure, from ")
    assert rows[5][0] == "Lined, yes against no"


def test_levels_stand_under_their_predictor(fit):
    rows = cells(odds_table(fit.odds("material", given={"age_years": 40})))
    assert rows[0][0].startswith("Material, ductile iron against cast iron")


def test_each_row_has_ratio_interval_and_p_value(fit):
    answer = fit.odds("past_repairs")
    ((label, ratio, interval, p),) = cells(odds_table(answer))
    row = answer.rows[0].odds_ratio
    assert ratio == f"{row.estimate:.2f}"
    assert interval == f"{row.lower:.2f} to {row.upper:.2f}"
    assert label == "Past repairs, per unit more"
    assert p == po.phrases.numbers.p_value(answer.rows[0].p_value)


def test_without_intervals_there_are_no_columns_for_them(mains):
    formula = "burst ~ I(age_years / 100) + past_repairs"
    result = smf.logit(formula, mains).fit_regularized(disp=0, alpha=0.1)
    table = odds_table(po.FittedLogit(result).odds())
    assert "interval" not in text_of(table)
    assert all(len(row) == 2 for row in cells(table))


def test_an_odds_ratio_without_a_finite_estimate_has_no_figure_in_the_table(mains):
    separated = mains.assign(bad=(mains["burst"] == 1) & (mains["age_years"] > 60))
    result = smf.glm("burst ~ bad", separated, family=sm.families.Binomial()).fit()
    ((_, figure, interval, _),) = cells(odds_table(po.FittedLogit(result).odds()))
    assert figure == "no finite value"
    assert interval.endswith(" or more")
    robust = smf.glm("burst ~ bad", separated, family=sm.families.Binomial()).fit(cov_type="HC1")
    ((_, figure, interval, _),) = cells(odds_table(po.FittedLogit(robust).odds()))
    assert (figure, interval) == ("no finite value", "not known")


def test_the_picture_may_be_the_printed_table(fit, page):
    view = po.OddsView(fit)
    built = view._stage._picture.structure
    choose(page, control_of(view, "layout"), "table")
    assert view.question == OddsQuestion(layout="table")
    assert view._stage._picture.structure[0] is OddsTableDrawing
    assert view._stage._picture.structure != built
    assert view.answer.rows == po.FittedLogit.odds(fit).rows
    choose(page, control_of(view, "layout"), "changes")
    assert view.question == OddsQuestion()
    assert view._stage._picture.structure == built


def test_another_layout_needs_no_refit_of_likelihood_intervals(fit, page, monkeypatch):
    question = OddsQuestion(predictors=("past_repairs",), interval="likelihood")
    view = po.OddsView(fit, question)
    before = view.answer

    def refused(*_):
        raise AssertionError("it was refitted")

    monkeypatch.setattr("plainodds.views.odds.answer_odds", refused)
    choose(page, control_of(view, "layout"), "table")
    assert view.question.layout == "table"
    assert view.answer.rows == before.rows
    assert text_of(view._messages.value) == ""
