"""PairView in real JupyterLab: two predictors, two scales, and statsmodels' own chances."""

import numpy as np
import pytest
from playwright.sync_api import expect

from tests.browser.models import TESSEL_BAY, named
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, numbers_in, rows_of
from tests.browser.views import ViewOnPage

LONG = "A name as long as the one that somebody once gave to a column and nobody dared to shorten"

MODEL = TESSEL_BAY.replace(
    "age_years * material + soil", "age_years * material + lined * soil"
).replace("result = smf", 'mains["lined"] = mains["diameter_mm"] > 150\nresult = smf')
NAMED_AT_LENGTH = f'''
long = po.FittedLogit(result, predictors={{
    "age_years": po.Predictor(label="{LONG}", unit="years since they were laid, by the books"),
    "material": po.Predictor(label="{LONG}"),
}})
'''


@pytest.fixture(scope="module")
def model():
    return named(MODEL, "fit", "result", "mains")


@pytest.fixture(scope="module")
def notebook(browser, lab):
    path = put_notebook(lab, MODEL, NAMED_AT_LENGTH, "po.PairView(long)", "po.PairView(fit)")
    with opened(browser, lab, path) as shown:
        shown.run_all()
        shown.folder = path.parent
        yield shown


@pytest.fixture
def view(notebook):
    """A view of its own for each test."""
    notebook.run_last_cell_again()
    return ViewOnPage(notebook.page, "pair", occurrence=1)


def switch(view, field, label):
    """The round button of a switch that has this label."""
    return view.control(field).get_by_label(label, exact=True)


def interaction(view):
    """The interaction as the table tells it: figures by their row's heading."""
    rows = rows_of(view.table)
    return {title: numbers_in(" ".join(cells)) for title, cells in rows.items() if cells}


def shows(view, answer, at="At typical values"):
    """Wait until table and picture show an answer's interaction on both scales."""
    found = answer.interaction
    figures = {at: (found.at_profile, 100), "Ratio of odds ratios": (found.ratio, 1)}

    def check():
        shown = interaction(view)
        for title, (estimate, unit) in figures.items():
            assert title in shown
            exact = [unit * each for each in (estimate.estimate, estimate.lower, estimate.upper)]
            pairs = zip(shown[title][:3], exact, strict=True)
            assert all(each.stands_for(value) for each, value in pairs), (title, shown, exact)

    eventually(view.page, check)


def test_its_difference_of_differences_is_what_statsmodels_predicts(view, model):
    fit, result, mains = model
    answer = fit.pair("age_years", "material")
    low, high = answer.a_change
    row = mains.iloc[[0]].assign(soil=mains["soil"].mode()[0], lined=False)
    for name in ("pressure_m", "diameter_mm", "past_repairs"):
        row[name] = mains[name].median()

    def effect(material):
        chances = [
            result.predict(row.assign(age_years=age, material=material)).iloc[0]
            for age in (low, high)
        ]
        return chances[1] - chances[0]

    predicted = effect(answer.b_change[1]) - effect(answer.b_change[0])
    assert answer.interaction.at_profile.estimate == pytest.approx(predicted, rel=1e-9)
    shows(view, answer)


def test_a_key_on_another_predictors_slider_moves_words_picture_and_interaction(
    notebook, view, model
):
    view.choose("others", "held at values I choose")
    expect(view.control("held-past_repairs")).to_be_visible()
    shows(view, model[0].pair("age_years", "material", others={}), "At typical values")
    said, shown = view.words.inner_text(), view.picture.get_attribute("src")
    notebook.press(view.handle("held-past_repairs"), "ArrowRight", times=3)
    expect(view.box("held-past_repairs")).to_have_value("3")
    expect(view.words).to_contain_text("past repairs 3")
    answer = model[0].pair("age_years", "material", others={"past_repairs": 3})
    shows(view, answer, "At the values held")
    assert view.words.inner_text() != said
    assert view.picture.get_attribute("src") != shown
    # no term joins it to the two, so the odds know nothing of it
    before = model[0].pair("age_years", "material").interaction
    assert answer.interaction.ratio == before.ratio
    assert not np.isclose(
        answer.interaction.at_profile.estimate, before.at_profile.estimate, rtol=0.1
    )


def test_the_switch_of_scales_keeps_everything_else(notebook, view, model):
    view.choose("b", "Pressure")
    switch(view, "shape", "a map").click()
    view.choose("others", "held at values I choose")
    view.choose("held-material", "cast iron")
    view.choose("level", "80%")
    from_box = view.control("a_values").locator("input[type=number]").first
    from_box.fill("30")
    from_box.press("Enter")
    expect(view.words).to_contain_text("30 years")
    expect(view.words).to_contain_text("80% interval")

    def state():
        controls = view.root.locator(".plainodds-controls :is(input, select)")
        values = controls.evaluate_all("all => all.map(each => each.value)")
        size = view.picture.evaluate("each => [each.width, each.height]")
        return values, size, switch(view, "shape", "a map").is_checked()

    before, shown = state(), view.picture.get_attribute("src")
    notebook.press(switch(view, "scale", "odds"), "Space")
    expect(switch(view, "scale", "odds")).to_be_checked()
    expect(switch(view, "scale", "chances")).not_to_be_checked()
    eventually(view.page, lambda: differs(view.picture.get_attribute("src"), shown))
    assert state() == before
    expect(view.table).to_contain_text("odds ratio")
    notebook.press(switch(view, "scale", "chances"), "Space")
    expect(view.table).to_contain_text("change of the chance")
    assert state() == before


def differs(one, other):
    assert one != other


def test_two_numbers_have_a_map_and_a_category_has_none(view):
    expect(view.control("shape")).to_have_count(0)
    view.choose("b", "Pressure")
    expect(view.control("shape")).to_be_visible()
    before = view.picture.get_attribute("src")
    switch(view, "shape", "a map").click()
    eventually(view.page, lambda: differs(view.picture.get_attribute("src"), before))
    expect(view.problem).to_have_text("")
    expect(view.words).to_contain_text("map")
    view.choose("b", "Material")
    expect(view.control("shape")).to_have_count(0)
    expect(view.words).not_to_contain_text("map")
    expect(view.problem).to_have_text("")


def test_the_two_are_exchanged_by_the_button_and_by_choosing_the_other(view):
    view.button("Exchange the two").click()
    eventually(view.page, lambda: same(both(view), ("Material", "Age")))
    view.choose("a", "Age")
    eventually(view.page, lambda: same(both(view), ("Age", "Material")))
    expect(view.problem).to_have_text("")


def both(view):
    return view.chosen("a"), view.chosen("b")


def same(one, other):
    assert one == other


def test_from_a_level_to_itself_is_refused_and_the_picture_stays(view, model):
    shows(view, model[0].pair("age_years", "material"))
    before = view.picture.get_attribute("src")
    select = view.control("b_values").locator("select").nth(1)
    wanted = select.input_value()
    select.select_option(label="cast iron")
    expect(view.problem).to_contain_text("is no change")
    expect(select).to_have_value(wanted)
    assert view.picture.get_attribute("src") == before
    select.select_option(label="ductile iron")
    expect(view.problem).to_have_text("")
    shows(view, model[0].pair("age_years", "material", b_values=("cast iron", "ductile iron")))


def test_two_factors_have_a_joint_table_of_the_rows(view, model):
    fit, _, mains = model
    view.choose("a", "Lined")
    view.choose("b", "Soil")
    joint = view.table.locator("table.plainodds-joint")
    expect(joint).to_contain_text("Soil low")
    answer = fit.pair("lined", "soil")
    cells = joint.locator("tr", has_text="with / without it").locator("td")
    shown = [each.inner_text() for each in cells.all() if each.inner_text().strip()]
    reference, a_alone, b_alone, both_changed = answer.joint.cells
    counted = []
    for cell in (reference, b_alone, a_alone, both_changed):
        chosen = mains[(mains["lined"] == cell.a) & (mains["soil"] == cell.b)]
        burst = int(chosen["burst"].sum())
        counted.append(f"{burst:,} / {len(chosen) - burst:,}")
    assert shown == counted


def test_the_test_can_be_one_by_the_likelihood(view, model):
    view.choose("test", "likelihood ratio")
    expect(view.table).to_contain_text("Likelihood-ratio test of all 2 coefficients")
    found = model[0].pair("age_years", "material", test="likelihood_ratio").interaction.test
    note = view.table.locator(".plainodds-note").last.inner_text()
    assert any(each.stands_for(found.statistic) for each in numbers_in(note))


def test_every_control_has_a_name_and_the_tab_key_reaches_it(notebook, view):
    view.choose("b", "Pressure")
    expect(view.control("shape")).to_be_visible()
    for field in ("a", "b", "a_values", "b_values", "number", "others", "level", "scale", "shape"):
        control = view.control(field).locator("input, select").first
        name = control.evaluate("each => each.labels[0]?.innerText ?? each.ariaLabel ?? ''")
        assert name.strip(), field
    wanted = view.root.locator(
        "input:visible, select:visible, button:enabled:visible, .noUi-handle"
    )
    wanted.first.focus()
    reached = set()
    for _ in range(2 * wanted.count()):
        reached.add(
            wanted.evaluate_all("all => all.findIndex(each => each === document.activeElement)")
        )
        notebook.page.keyboard.press("Tab")
    assert reached >= set(range(wanted.count()))


def test_the_code_gives_the_answer_again(view, model):
    fit, result, _ = model
    view.choose("b", "Pressure")
    switch(view, "scale", "odds").click()
    expect(view.table).to_contain_text("odds ratio")
    view.button("Show the code").click()
    expect(view.code).to_contain_text("fit.pair(")
    expect(view.code).to_contain_text('scale="odds"')
    names = {"result": result}
    exec(view.code.inner_text(), names)
    assert names["answer"] == fit.pair("age_years", "pressure_m", scale="odds")


@pytest.mark.parametrize("width", [430, 1000])
def test_nothing_sticks_out_of_the_page(notebook, view, width):
    view.choose("a", "Lined")
    view.choose("b", "Soil")
    expect(view.table.locator("table.plainodds-joint")).to_be_visible()
    notebook.hide_sidebar()
    notebook.set_notebook_width(width)
    try:
        assert notebook.overflowing(view.root) == []
        assert notebook.overflowing(ViewOnPage(notebook.page, "pair").root) == []
    finally:
        notebook.set_notebook_width(1000)


def test_a_long_label_is_shown_whole(notebook, view):
    long = ViewOnPage(notebook.page, "pair")
    expect(long.words).to_contain_text(LONG[2:])
    expect(long.table).to_contain_text(LONG[2:])
    expect(long.picture).to_be_visible()
    title = long.root.locator(".plainodds-set .plainodds-title").first
    expect(title).to_have_text(LONG)


def test_the_picture_is_saved_as_a_file_named_after_the_two(notebook, view):
    view.button("Save the picture").click()
    expect(view.saved).to_contain_text("pair-age_years-material.svg")
    saved = notebook.folder / "pair-age_years-material.svg"
    assert saved.read_bytes().startswith(b"<?xml")
