"""EffectsView: whose effects, averaged or at a profile, in which groups."""

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.effects import EffectsQuestion
from plainodds.views.effects import effects_table
from tests.views.frontend import control_of, text_of
from tests.views.test_curve import choose, labels
from tests.views.test_profile import cells


def test_it_starts_with_every_predictor_averaged_over_all_rows(fit, page):
    view = po.EffectsView(fit)
    assert view.question == EffectsQuestion()
    assert view.answer == fit.effects()


def test_each_choice_edits_its_part_of_the_question(fit, page):
    names = ("material", "age_years")
    view = po.EffectsView(fit, EffectsQuestion(predictors=names))
    choose(page, control_of(view, "number"), "step")
    choose(page, control_of(view, "by"), "material")
    choose(page, control_of(view, "where"), (("lined", True),))
    choose(page, control_of(view, "sample"), "drawn")
    choose(page, control_of(view, "level"), 0.9)
    assert view.problem is None
    assert view.question == EffectsQuestion(
        names, number="step", by="material", where=(("lined", True),), sample="drawn", level=0.9
    )
    assert view.answer == fit.effects(
        names, number="step", by="material", where={"lined": True}, sample="drawn", level=0.9
    )


def test_predictors_can_be_left_out_but_for_the_last(fit, page):
    view = po.EffectsView(fit, EffectsQuestion(predictors=("lined", "material")))
    ticks = control_of(view, "predictors")
    place = [facts.name for facts in fit.subject.predictors].index("material")
    page.change(ticks.boxes[place], value=False)
    assert view.question.predictors == ("lined",)
    assert {row.predictor for row in view.answer.rows} == {"lined"}
    box = next(box for box in ticks.boxes if box.value)
    page.change(box, value=False)
    assert "Keep at least one predictor" in text_of(view._messages.value)
    assert view.question.predictors == ("lined",)


def test_at_a_profile_there_are_no_rows_to_choose_or_to_draw(fit, page):
    asked = fit.effects(where={"lined": True}, sample="drawn").question
    view = po.EffectsView(fit, asked)
    assert view._among.place.children
    assert view._sample_place.children
    choose(page, control_of(view, "others"), "typical")
    assert view.problem is None
    assert view.question == EffectsQuestion(others="typical")
    assert view._among.place.children == ()
    assert view._sample_place.children == ()


def test_effects_can_be_stated_at_chosen_values(fit, page):
    view = po.EffectsView(fit)
    choose(page, control_of(view, "others"), "held")
    page.change(view._others.held["age_years"].slider, value=80.0)
    assert view.answer == fit.effects(others={"age_years": 80})


def test_only_levels_make_groups_and_a_group_is_not_held(fit, page):
    view = po.EffectsView(fit, fit.effects(others={"material": "PVC"}).question)
    assert labels(control_of(view, "by")) == ["no predictor, all together", "Material", "Lined"]
    choose(page, control_of(view, "by"), "material")
    assert view.problem is None
    assert view.question == EffectsQuestion(others=(), by="material")
    held = [
        name
        for name, each in view._others.held.items()
        if each.widget in view._others.place.children
    ]
    assert "material" not in held


@pytest.mark.parametrize(
    "question",
    [
        EffectsQuestion(predictors=("lined", "age_years"), number="step", level=0.99),
        EffectsQuestion(others="typical", by="lined"),
        EffectsQuestion(others=(("age_years", 80), ("lined", True))),
        EffectsQuestion(where=(("material", "PVC"),), sample="drawn"),
    ],
)
def test_controls_show_the_question_that_is_set(fit, page, question):
    view = po.EffectsView(fit)
    view.question = question
    for binding in view._bindings.values():
        shown = binding.control.value
        assert shown == binding.read(question)
        again = fit.ask(binding.write(question, shown))
        assert again.rows == view.answer.rows


def test_a_step_out_of_range_is_refused_and_the_picture_stays(mains, page):
    # a step further than the spline's last knot cannot be computed
    fit = po.FittedLogit(smf.logit("burst ~ bs(pressure_m, df=4) + lined", mains).fit(disp=0))
    view = po.EffectsView(fit)
    before = view._stage.place.value
    choose(page, control_of(view, "number"), "step")
    assert "one step of" in text_of(view._messages.value)
    assert view._stage.place.value == before
    assert control_of(view, "number").value == "slope"


def test_a_model_without_numbers_or_without_levels_offers_what_it_has(mains, page):
    numbers = po.EffectsView(smf.logit("burst ~ age_years", mains).fit(disp=0))
    assert not any(
        control_of(numbers, "by").widget in box.children
        for box in numbers.children[-1].children
    )  # fmt: skip
    levels = po.EffectsView(smf.logit("burst ~ material", mains).fit(disp=0))
    controls = levels.children[-1].children[1].children
    assert control_of(levels, "by").widget in controls
    assert control_of(levels, "number").widget not in controls


def test_the_table_has_effect_interval_and_p_value(fit):
    answer = fit.effects("past_repairs")
    ((label, effect, interval, p),) = cells(effects_table(answer))
    row = answer.rows[0]
    assert label == "Past repairs, per additional unit"
    assert float(effect.lstrip("+")) == pytest.approx(100 * row.effect.estimate, abs=0.06)
    low, high = (float(each.replace("−", "-")) for each in interval.split(" to "))
    assert low == pytest.approx(100 * row.effect.lower, abs=0.06)
    assert high == pytest.approx(100 * row.effect.upper, abs=0.06)
    assert p == po.phrases.numbers.p_value(row.p_value)


def test_groups_stand_under_headings(fit):
    rows = cells(effects_table(fit.effects("age_years", by="material")))
    assert [row[0] for row in rows[::2]] == [
        "Material cast iron", "Material ductile iron", "Material PVC",
    ]  # fmt: skip
    assert all(row[0] == "Pipe age, per additional year" for row in rows[1::2])


def test_without_intervals_there_are_no_columns_for_them(mains, page):
    formula = "burst ~ I(age_years / 100) + past_repairs"
    view = po.EffectsView(smf.logit(formula, mains).fit_regularized(disp=0, alpha=0.1))
    assert all(len(row) == 2 for row in cells(effects_table(view.answer)))
    assert view._sample_place.children == ()
