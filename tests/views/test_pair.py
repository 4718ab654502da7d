"""PairView: two predictors, the switch of scales, and what goes when a predictor is changed."""

import re
import threading
from dataclasses import replace

import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.pair import PairQuestion
from plainodds.phrases.numbers import chance, percentage_points, ratio
from plainodds.views import pair, sketched
from plainodds.views.pair_table import effect_table, interaction_table, pair_table
from plainodds.views.stage import Shot, Stage
from tests.views.frontend import control_of, text_of
from tests.views.test_curve import choose
from tests.views.test_profile import cells


@pytest.fixture(scope="module")
def additive(mains):
    """No two predictors share a term."""
    formula = "burst ~ material + lined + past_repairs + age_years"
    return po.FittedLogit(smf.logit(formula, mains).fit(disp=0))


@pytest.fixture(scope="module")
def of_levels(mains):
    return po.FittedLogit(smf.logit("burst ~ material * lined + soil", mains).fit(disp=0))


@pytest.fixture(scope="module")
def case_control(mains):
    result = smf.logit("burst ~ age_years * material + lined", mains).fit(disp=0)
    return po.FittedLogit(result, sampling="case-control")


@pytest.fixture
def undrawn(monkeypatch):
    """Where a test is about questions there is no need to draw, which takes most of the time."""
    shot = Shot(b"", "a picture", 590, 400)
    monkeypatch.setattr(Stage, "taken", lambda stage, answer: shot)


def turn(page, view, field, value):
    """Turn a switch."""
    control = control_of(view, field)
    page.change(control.widget, index=control._values.index(value))


def is_shown(view, field):
    """Whether a control is in the page."""
    wanted = control_of(view, field).widget
    found, waiting = False, [view]
    while waiting:
        widget = waiting.pop()
        found |= widget is wanted
        waiting += getattr(widget, "children", ())
    return found


def changes_shown(view):
    """The controls of two values that are in the page, by role."""
    return {
        role: view.changes[role, name]
        for role, name in view.changes
        if view._titled[role, name] in view._changes_place.children
    }


# where it starts


def test_it_starts_with_a_number_and_a_category_that_share_a_term(fit, page):
    view = po.PairView(fit)
    assert view.question == PairQuestion("age_years", "material")
    assert view.answer == fit.pair("age_years", "material")


@pytest.mark.usefixtures("undrawn")
def test_without_a_category_two_numbers_that_share_a_term_come_first(two_numbers, page):
    question = po.PairView(two_numbers).question
    assert {question.a, question.b} == {"age_years", "pressure_m"}


@pytest.mark.usefixtures("undrawn")
def test_two_categories_that_share_a_term_come_before_numbers_that_do_not(of_levels, page):
    assert po.PairView(of_levels).question == PairQuestion("material", "lined")


@pytest.mark.usefixtures("undrawn")
def test_without_shared_terms_it_starts_with_the_first_number(additive, page):
    assert po.PairView(additive).question == PairQuestion("past_repairs", "material")


def test_a_single_predictor_is_refused_with_the_way_out(mains, page):
    with pytest.raises(po.QuestionRefused, match=r"single predictor.*CurveView"):
        po.PairView(smf.logit("burst ~ age_years", mains).fit(disp=0))


@pytest.mark.usefixtures("undrawn")
def test_a_question_of_another_kind_is_refused(fit, page):
    with pytest.raises(po.QuestionRefused, match="edits a PairQuestion"):
        po.PairView(fit, fit.odds().question)


# the two predictors


@pytest.mark.usefixtures("undrawn")
def test_the_button_exchanges_the_two_with_their_values(fit, page):
    asked = fit.pair("age_years", "material", a_values=(20, 70), b_values=("PVC", "ductile iron"))
    view = po.PairView(fit, asked.question)
    page.press(view._exchange)
    assert view.answer == fit.pair(
        "material", "age_years", a_values=("PVC", "ductile iron"), b_values=(20, 70)
    )
    assert changes_shown(view)["a"].value == ("PVC", "ductile iron")
    assert changes_shown(view)["b"].value == (20, 70)
    page.press(view._exchange)
    assert view.question == asked.question


@pytest.mark.usefixtures("undrawn")
@pytest.mark.parametrize(("field", "name"), [("a", "material"), ("b", "age_years")])
def test_choosing_the_other_one_exchanges_them_too(fit, page, field, name):
    view = po.PairView(fit)
    choose(page, control_of(view, field), name)
    assert (view.question.a, view.question.b) == ("material", "age_years")
    assert [control_of(view, each).value for each in "ab"] == ["material", "age_years"]
    assert view.problem is None


@pytest.mark.usefixtures("undrawn")
def test_another_predictor_lets_go_of_values_map_and_what_held_it(fit, page):
    question = fit.pair(
        "age_years", "pressure_m", a_values=(20, 70), b_values=(40.0, 60.0), shape="map",
        others={"material": "PVC", "past_repairs": 2}, scale="odds", level=0.9,
    ).question  # fmt: skip
    view = po.PairView(fit, question)
    choose(page, control_of(view, "b"), "material")
    assert view.question == replace(
        question, b="material", b_values=(), shape="lines", others=(("past_repairs", 2),)
    )
    assert view.problem is None
    choose(page, control_of(view, "a"), "lined")
    assert view.question.a_values == ()


@pytest.mark.usefixtures("undrawn")
def test_without_a_number_there_is_no_slope(fit, page):
    view = po.PairView(fit, fit.pair("age_years", "material", number="slope").question)
    choose(page, control_of(view, "a"), "past_repairs")
    assert view.question.number == "slope"
    choose(page, control_of(view, "a"), "lined")
    assert view.question.number == "change"
    assert not is_shown(view, "number")


# their two values


@pytest.mark.usefixtures("undrawn")
def test_each_has_its_two_values(fit, page):
    view = po.PairView(fit)
    shown = changes_shown(view)
    assert shown["a"].value == view.answer.a_change
    assert shown["b"].value == view.answer.b_change
    page.change(shown["a"].slider, value=[20.0, 70.0])
    choose(page, shown["b"].choices[1], "ductile iron")
    assert view.answer == fit.pair(
        "age_years", "material", a_values=(20, 70), b_values=("cast iron", "ductile iron")
    )


@pytest.mark.usefixtures("undrawn")
def test_a_number_goes_from_quartile_to_quartile_as_the_answer_does(fit, page):
    view = po.PairView(fit, fit.pair("pressure_m", "past_repairs").question)
    assert changes_shown(view)["a"].value == view.answer.a_change
    assert changes_shown(view)["b"].value == view.answer.b_change


@pytest.mark.usefixtures("undrawn")
def test_a_slider_that_finds_its_round_place_states_no_values(fit, page):
    view = po.PairView(fit, fit.pair("pressure_m", "material").question)
    shown = changes_shown(view)["a"]
    low, high = (round(each) for each in shown.value)
    assert (low, high) != shown.value
    page.change(shown.slider, value=[float(low), float(high)])
    assert view.question.a_values == ()
    assert shown.value == view.answer.a_change


def test_from_a_value_to_itself_is_refused_and_the_picture_stays(fit, page):
    view = po.PairView(fit)
    before, shown = view._stage.place.value, changes_shown(view)["a"]
    start, end = shown.value
    page.forget()
    page.change(shown.boxes[1], value=float(start))
    assert "is no change" in text_of(view._messages.value)
    assert 'role="alert"' in view._messages.value
    assert view._stage.place.value == before
    assert page.updates(view._stage.place) == []
    assert shown.value == (start, end)
    page.change(shown.boxes[1], value=float(end + 1))
    assert view._messages.value == ""
    assert view.answer.a_change == (start, end + 1)


@pytest.mark.filterwarnings("ignore:The design matrix is rank-deficient")
def test_a_level_that_nobody_has_is_refused_and_the_picture_stays(mains, page):
    marsh = mains.assign(soil=mains["soil"].cat.add_categories("marsh"))
    family = sm.families.Binomial()
    fit = po.FittedLogit(smf.glm("burst ~ age_years + soil", marsh, family=family).fit())
    view = po.PairView(fit, fit.pair("age_years", "soil").question)
    before, shown = view._stage.place.value, changes_shown(view)["b"]
    choose(page, shown.choices[1], "marsh")
    assert "marsh" in text_of(view._messages.value)
    assert view._stage.place.value == before
    assert view.question.b_values == ()
    assert shown.value == view.answer.b_change


@pytest.mark.usefixtures("undrawn")
def test_numbers_by_their_slope_let_go_of_their_values(fit, page):
    asked = fit.pair("age_years", "material", a_values=(20, 70), b_values=("PVC", "cast iron"))
    view = po.PairView(fit, asked.question)
    choose(page, control_of(view, "number"), "slope")
    assert view.answer == fit.pair(
        "age_years", "material", b_values=("PVC", "cast iron"), number="slope"
    )
    assert view.answer.sloped == ("age_years",)
    assert set(changes_shown(view)) == {"b"}
    choose(page, control_of(view, "number"), "change")
    assert set(changes_shown(view)) == {"a", "b"}


@pytest.mark.usefixtures("undrawn")
def test_a_number_whose_values_are_stated_is_shown_as_a_change(fit, page):
    question = fit.pair("age_years", "material", a_values=(20, 70), number="slope").question
    view = po.PairView(fit, question)
    assert control_of(view, "number").value == "change"
    assert changes_shown(view)["a"].value == (20, 70)


# the switches


def test_the_switch_of_scales_keeps_everything_else(fit, page):
    question = fit.pair(
        "age_years", "pressure_m", a_values=(20, 70), b_values=(40.0, 60.0), shape="map",
        others={"material": "PVC"}, level=0.9,
    ).question  # fmt: skip
    view = po.PairView(fit, question)
    wanted = {
        id(each): each.control.value
        for each in view._bindings.values()
        if each.control is not control_of(view, "scale")
    }
    size = view._stage.shot.width, view._stage.shot.height
    places = [each.children for each in (view._changes_place, view._others.place)]
    turn(page, view, "scale", "odds")
    assert view.question == replace(question, scale="odds")
    assert view.answer == fit.ask(view.question)
    assert wanted == {
        id(each): each.control.value
        for each in view._bindings.values()
        if each.control is not control_of(view, "scale")
    }
    assert [each.children for each in (view._changes_place, view._others.place)] == places
    assert (view._stage.shot.width, view._stage.shot.height) == size
    turn(page, view, "scale", "probability")
    assert view.question == question


def test_a_turn_of_the_switch_is_one_render_and_is_not_sent_back(fit, page):
    view = po.PairView(fit)
    page.forget()
    turn(page, view, "scale", "odds")
    assert len(page.updates(view._stage.place)) == 1
    assert page.updates(control_of(view, "scale").widget, "index") == []


def test_a_map_is_offered_of_two_numbers_only(fit, page):
    view = po.PairView(fit)
    assert not is_shown(view, "shape")
    choose(page, control_of(view, "b"), "pressure_m")
    assert is_shown(view, "shape")
    turn(page, view, "shape", "map")
    assert view.answer == fit.pair("age_years", "pressure_m", shape="map")
    assert view.answer.surface is not None
    page.press(view._exchange)
    assert view.question.shape == "map"


def test_a_case_control_sample_is_told_in_odds_with_a_remark(case_control, page):
    view = po.PairView(case_control)
    assert view.question.scale == "odds"
    assert view.answer.lines is None
    assert view.problem is None
    read = " ".join(
        text_of(each.value) for each in view._switches.children if hasattr(each, "value")
    )
    assert "Told in odds alone" in read
    assert "prevalence" in read
    assert not any(b.read(view.question) == "odds" for b in view._bindings.values())
    with pytest.raises(po.QuestionRefused, match="case-control"):
        view.question = replace(view.question, scale="probability")
    assert view.question.scale == "odds"


def test_others_as_observed_are_refused_of_a_case_control_sample(case_control, page):
    view = po.PairView(case_control)
    before = view._stage.place.value
    choose(page, control_of(view, "others"), "observed")
    assert "case-control" in text_of(view._messages.value)
    assert view._stage.place.value == before
    assert control_of(view, "others").value == "typical"


@pytest.mark.usefixtures("undrawn")
def test_with_the_populations_share_chances_are_told_again(mains, page):
    result = smf.logit("burst ~ age_years * material", mains).fit(disp=0)
    fit = po.FittedLogit(result, sampling="case-control", prevalence=0.02)
    view = po.PairView(fit)
    assert view.question.scale == "probability"
    turn(page, view, "scale", "odds")
    assert view.question.scale == "odds"


# the others, the test, the level


def test_a_slider_of_another_predictor_moves_the_interaction_although_no_term_joins_it(fit, page):
    view = po.PairView(fit)
    choose(page, control_of(view, "others"), "held")
    assert set(view._others.held) == {"pressure_m", "past_repairs", "lined"}
    before = view.answer.interaction
    page.change(view._others.held["past_repairs"].slider, value=4.0)
    after = view.answer.interaction
    assert view.answer == fit.pair("age_years", "material", others={"past_repairs": 4})
    assert after.at_profile.estimate != pytest.approx(before.at_profile.estimate, rel=0.05)
    assert after.ratio == before.ratio


@pytest.mark.usefixtures("undrawn")
def test_others_can_be_as_observed(fit, page):
    view = po.PairView(fit)
    choose(page, control_of(view, "others"), "observed")
    assert view.answer == fit.pair("age_years", "material", others="observed")


@pytest.mark.usefixtures("undrawn")
def test_the_test_can_be_chosen_where_a_term_joins_the_two(fit, page):
    view = po.PairView(fit)
    choose(page, control_of(view, "test"), "likelihood_ratio")
    assert view.answer == fit.pair("age_years", "material", test="likelihood_ratio")
    assert "Likelihood-ratio test of all 2 coefficients" in text_of(view._table.value)
    choose(page, control_of(view, "b"), "past_repairs")
    assert not is_shown(view, "test")
    assert "No term of the model joins the two" in text_of(view._table.value)


@pytest.mark.usefixtures("undrawn")
def test_a_fit_without_a_likelihood_offers_no_test_by_it(mains, page):
    result = smf.logit("burst ~ age_years * lined", mains).fit(disp=0, cov_type="HC0")
    fit = po.FittedLogit(result)
    assert fit.model.no_likelihood
    assert not is_shown(po.PairView(fit), "test")


@pytest.mark.usefixtures("undrawn")
@pytest.mark.parametrize(
    "asked",
    [
        lambda fit: fit.pair("material", "age_years", level=0.8),
        lambda fit: fit.pair("pressure_m", "age_years", a_values=(41.25, 70.5), shape="map"),
        lambda fit: fit.pair("material", "lined", a_values=("PVC", "cast iron"), scale="odds"),
        lambda fit: fit.pair("age_years", "past_repairs", number="slope", others="observed"),
        lambda fit: fit.pair("age_years", "lined", a_values=(20, 30), number="slope"),
        lambda fit: fit.pair("age_years", "material", others={"lined": True}, test="wald"),
        lambda fit: fit.pair("age_years", "material", test="likelihood_ratio"),
    ],
)
def test_controls_show_the_question_that_is_set(fit, page, asked):
    answer = asked(fit)
    view = po.PairView(fit)
    view.question = answer.question
    assert view.answer == answer
    for binding in view._bindings.values():
        assert binding.control.value == binding.read(view.question)
    for field in ("a", "b", "scale", "shape", "number", "others", "test", "level"):
        binding = view._bindings[id(control_of(view, field))]
        assert binding.write(view.question, binding.control.value) == view.question
    assert po.from_json(po.to_json(view.question)) == view.question


# the tables


def test_the_effect_has_one_row_for_each_level(fit):
    answer = fit.pair("age_years", "material")
    found = {first: rest for first, *rest in cells(effect_table(answer))}
    assert list(found) == ["cast iron", "ductile iron", "PVC"]
    for level, estimate in zip(answer.effect.at, answer.effect.estimate, strict=True):
        written = percentage_points(estimate, sign=True).removesuffix(" percentage points")
        assert found[level][0].removesuffix(" *") == written
    assert all(interval.count(" to ") == 1 for _, interval in found.values())


def test_in_odds_the_effect_is_an_odds_ratio(fit):
    answer = fit.pair("material", "age_years", scale="odds")
    found = cells(effect_table(answer))
    assert len(found) == 11
    assert found[0][0] == f"{answer.effect.at[0]:g}"
    assert found[0][1].removesuffix(" *") == ratio(answer.effect.estimate[0])
    assert "odds ratio" in text_of(effect_table(answer)).lower()
    assert f"11 of {len(answer.effect.at)} points." in text_of(effect_table(answer))


def test_points_where_nobody_is_are_marked(fit):
    answer = fit.pair("material", "age_years")
    few = replace(answer, effect=replace(answer.effect, supported=(False,) * len(answer.effect.at)))
    assert all(row[1].endswith(" *") for row in cells(effect_table(few)))
    assert "* no mains in the data near by." in text_of(effect_table(few))


def test_the_interaction_is_told_on_both_scales(fit):
    answer = fit.pair("age_years", "material")
    found = {first: rest for first, *rest in cells(interaction_table(answer)) if rest}
    averaged = found["Averaged over 900 mains"][0]
    written = percentage_points(answer.interaction.averaged.estimate, sign=True)
    assert f"{averaged} percentage points" == written
    assert found["Ratio of odds ratios"][0] == ratio(answer.interaction.ratio.estimate)
    assert "Wald test of all 2 coefficients that join the two" in text_of(interaction_table(answer))


def test_an_interaction_of_slopes_is_told_however_small_it_is(fit):
    answer = fit.pair("age_years", "pressure_m", number="slope")
    found = {first: rest for first, *rest in cells(interaction_table(answer)) if rest}
    assert 0 < abs(100 * answer.interaction.at_profile.estimate) < 0.01
    shown = float(found["At typical values"][0].replace("−", "-"))
    assert shown == pytest.approx(100 * answer.interaction.at_profile.estimate, rel=0.06)


def test_without_a_shared_term_there_is_no_ratio_to_test(additive):
    answer = additive.pair("age_years", "material")
    found = {first: rest for first, *rest in cells(interaction_table(answer)) if rest}
    assert found["Ratio of odds ratios"][:2] == ["1", "by the model"]
    assert found["At typical values"][1].count(" to ") == 1


def test_without_a_shared_term_the_joint_table_measures_no_ratio_either(additive):
    found = cells(pair_table(additive.pair("lined", "material")))
    (ratio_row,) = [row for row in found if row[0] == "Ratio of odds ratios (1: none)"]
    assert ratio_row[1:] == ["1", "by the model"]
    excess = [row for row in found if row[0] == "Relative excess risk (0: none)"]
    assert all(" to " in row[2] for row in excess)


def test_the_joint_table_has_each_combination_with_its_cases_and_chance(of_levels):
    answer = of_levels.pair("material", "lined")
    table = pair_table(answer).partition("</table>")[0]
    found = cells(table)
    counted = [row[1:3] for row in found if row[0].endswith("with / without it")]
    flat = [tuple(map(int, cell.replace(",", "").split(" / "))) for row in counted for cell in row]
    reference, a_alone, b_alone, both = answer.joint.cells
    assert flat == [
        (cell.events, cell.rows - cell.events) for cell in (reference, b_alone, a_alone, both)
    ]
    chances = [cell for row in found if row[0] == "Chance" for cell in row[1:3]]
    for cell, shown in zip((reference, b_alone, a_alone, both), chances, strict=False):
        assert shown.startswith(f"{chance(cell.chance.estimate)} (")
    odds = [cell for row in found if row[0] == "Odds ratio" for cell in row[1:3]]
    assert odds[0] == "1 (reference)"
    assert odds[3].startswith(f"{ratio(both.odds_ratio.estimate)} (")


def test_effects_within_strata_stand_in_the_margins(of_levels):
    answer = of_levels.pair("material", "lined")
    found = cells(pair_table(answer).partition("</table>")[0])
    odds = [row for row in found if row[0] == "Odds ratio"]
    reference, both = answer.joint.cells[0], answer.joint.cells[3]
    effects = {(each.predictor, each.within): each for each in answer.joint.strata}
    for row, within in zip(odds[:2], (reference.a, both.a), strict=True):
        told = effects["lined", within].odds_ratio.estimate
        assert row[3].startswith(f"× {ratio(told)} (")
    for cell, within in zip(odds[2][1:3], (reference.b, both.b), strict=True):
        told = effects["material", within].odds_ratio.estimate
        assert cell.startswith(f"× {ratio(told)} (")


def test_a_combination_without_cases_is_marked(of_levels):
    answer = of_levels.pair("material", "lined")
    first, *rest = answer.joint.cells
    empty = replace(first, rows=0.0, events=0.0)
    marked = replace(answer, joint=replace(answer.joint, cells=(empty, *rest)))
    table = pair_table(marked)
    counted = next(row for row in cells(table) if row[0].endswith("with / without it"))
    assert counted[1] == "none *"
    assert "* No cases in the data have this combination" in text_of(table)


def test_exchanged_levels_are_told_of(of_levels):
    answer = of_levels.pair("material", "lined")
    told = replace(answer, joint=replace(answer.joint, recoded=("lined",)))
    assert "levels of lined are exchanged" in text_of(pair_table(told))
    assert "into its inverse" in text_of(pair_table(told))
    apart = replace(told, interaction=replace(told.interaction, joined=False))
    assert "into its inverse" not in text_of(pair_table(apart))
    kept = replace(answer, joint=replace(answer.joint, recoded=()))
    assert "exchanged" not in text_of(pair_table(kept))


def test_a_synergy_index_without_meaning_is_not_a_number(of_levels):
    answer = of_levels.pair("material", "lined")
    additive = replace(answer.joint.additive_by_odds, synergy_index=None)
    told = replace(answer, joint=replace(answer.joint, additive_by_odds=additive))
    rows = [row for row in cells(pair_table(told)) if row[0].startswith("Synergy index")]
    assert rows[0][1:] == ["not known", "not known"]


def test_a_case_control_sample_has_no_chances_in_its_tables(case_control):
    answer = case_control.pair("material", "lined", scale="odds")
    found = cells(pair_table(answer))
    assert not any(row[0] == "Chance" for row in found)
    assert not any("Averaged" in row[0] for row in found)
    assert any(row[0] == "Ratio of odds ratios" for row in found)


def test_without_intervals_there_is_no_column_for_them(mains):
    result = smf.logit("burst ~ lined * C(soil)", mains).fit_regularized(disp=0, alpha=0.1)
    answer = po.FittedLogit(result).pair("lined", "soil")
    table = pair_table(answer)
    assert "interval" not in text_of(table)
    assert " to " not in text_of(effect_table(answer))


# many rows


@pytest.fixture
def many(monkeypatch):
    """Few rows count as many."""
    for module in (sketched, pair):
        monkeypatch.setattr(module, "MANY_ROWS", 100)


@pytest.mark.usefixtures("undrawn")
def test_many_rows_are_answered_by_a_sketch(fit, page, many):
    view = po.PairView(fit)
    choose(page, control_of(view, "others"), "observed")
    view._work.wait()
    assert not view.is_exact
    exact = fit.ask(view.question)
    assert view.answer.effect.estimate == pytest.approx(exact.effect.estimate, abs=2e-6)
    found, wanted = view.answer.interaction.averaged, exact.interaction.averaged
    for name in ("estimate", "lower", "upper"):
        assert getattr(found, name) == pytest.approx(getattr(wanted, name), abs=2e-6)
    page.press(view._exact_button)
    view._work.wait()
    assert view.answer == exact
    assert "<table" in view._table.value


@pytest.mark.usefixtures("undrawn")
def test_what_cannot_be_sketched_is_averaged_beside_the_page(mains, page, many):
    # pressure, which age depends on, has more values than a sketch tells apart
    formula = "burst ~ age_years * pressure_m + age_years * material"
    view = po.PairView(smf.logit(formula, mains).fit(disp=0))
    asked, said = [], []
    view.observe(lambda change: asked.append(threading.current_thread()), "answer")
    view._work._said.observe(lambda change: said.append(text_of(change.new)), "value")
    choose(page, control_of(view, "others"), "observed")
    view._work.wait()
    assert any(re.search(r"all 900 rows, parts done: \d+ of 100", each) for each in said)
    assert view.is_exact
    assert view.question.others == "observed"
    assert asked != [threading.current_thread()]


@pytest.mark.usefixtures("undrawn")
def test_a_model_is_fitted_again_beside_the_page_and_once(fit, page, many):
    view = po.PairView(fit)
    asked = []
    view.observe(lambda change: asked.append(threading.current_thread()), "answer")
    choose(page, control_of(view, "test"), "likelihood_ratio")
    view._work.wait()
    assert view.answer == fit.pair("age_years", "material", test="likelihood_ratio")
    turn(page, view, "scale", "odds")
    here = threading.current_thread()
    assert [each is here for each in asked] == [False, True]


@pytest.mark.usefixtures("undrawn")
def test_files_are_named_after_the_two(fit, page):
    assert po.PairView(fit)._stem() == "pair-age_years-material"
    view = po.PairView(fit, fit.pair("age_years", "pressure_m", shape="map").question)
    assert view._stem() == "pair-age_years-pressure_m-map"
