"""ChangeView in real JupyterLab: handles, numbers and levels, and the chances of statsmodels."""

import pytest
from playwright.sync_api import expect

from tests.browser.models import TESSEL_BAY, named
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, numbers_in, rows_of
from tests.browser.views import ViewOnPage


@pytest.fixture(scope="module")
def model():
    return named(TESSEL_BAY, "fit", "result", "mains")


@pytest.fixture(scope="module")
def notebook(browser, lab):
    path = put_notebook(lab, TESSEL_BAY, "view = po.ChangeView(fit)\nview")
    with opened(browser, lab, path) as shown:
        shown.run_all()
        shown.folder = path.parent
        yield shown


@pytest.fixture
def view(notebook):
    """A view of its own for each test."""
    notebook.run_last_cell_again()
    return ViewOnPage(notebook.page, "change")


def ends(view):
    """From where to where, as the boxes say."""
    return tuple(float(view.box(each).input_value()) for each in ("from", "to"))


def shows(view, answer, labels):
    """Wait until table, words and picture show an answer with its intervals."""
    eventually(view.page, lambda: shows_now(view, answer, labels))


def shows_now(view, answer, labels):
    figures = {
        labels[0]: (answer.start, 1),
        labels[1]: (answer.end, 1),
        "Difference, percentage points": (answer.comparison.risk_difference, 100),
        "Chances, as a ratio": (answer.comparison.risk_ratio, 1),
        "Odds, as a ratio": (answer.comparison.odds_ratio, 1),
    }
    rows = rows_of(view.table)
    for title, (estimate, unit) in figures.items():
        assert title in rows
        shown = [number for cell in rows[title] for number in numbers_in(cell)]
        exact = [unit * each for each in (estimate.estimate, estimate.lower, estimate.upper)]
        pairs = zip(shown, exact, strict=True)
        assert all(each.stands_for(value) for each, value in pairs), (title, rows[title], exact)
    for where in (view.words.inner_text(), view.picture.get_attribute("alt")):
        said = [each for each in numbers_in(where) if each.unit == 0.01]
        for estimate in (answer.start, answer.end):
            assert any(each.stands_for(estimate.estimate) for each in said), where


def shows_ages(view, fit, **asked):
    def check():
        # a handle that was dragged may still be on its way
        start, end = ends(view)
        labels = f"Age {start:g} years", f"Age {end:g} years"
        shows_now(view, fit.change("age_years", start, end, **asked), labels)

    eventually(view.page, check)


def test_its_chances_are_averages_of_what_statsmodels_predicts(view, model):
    fit, result, mains = model
    start, end = ends(view)
    answer = fit.change("age_years", start, end)
    for age, estimate in ((start, answer.start), (end, answer.end)):
        predicted = result.predict(mains.assign(age_years=age)).mean()
        assert estimate.estimate == pytest.approx(predicted, rel=1e-9)
    shows_ages(view, fit)


def test_the_mouse_drags_either_handle(notebook, view, model):
    before = ends(view)
    notebook.drag(view.handle("ends").nth(1), by_px=30)
    eventually(view.page, lambda: exceeds(ends(view)[1], before[1] + 5))
    assert ends(view)[0] == before[0]
    notebook.drag(view.handle("ends").nth(0), by_px=-25)
    eventually(view.page, lambda: exceeds(before[0] - 5, ends(view)[0]))
    shows_ages(view, model[0])


def exceeds(number, least):
    assert number > least


def test_keys_move_a_handle(notebook, view, model):
    start, end = ends(view)
    notebook.press(view.handle("ends").nth(0), "ArrowRight", times=4)
    expect(view.box("from")).to_have_value(f"{start + 4:g}")
    assert ends(view)[1] == end
    shows_ages(view, model[0])


def test_numbers_can_be_typed_and_swapped(view, model):
    view.enter("from", "25")
    view.enter("to", "85")
    expect(view.words).to_contain_text("85 rather than 25 years")
    shows_ages(view, model[0])
    view.button("Swap from and to").click()
    expect(view.box("from")).to_have_value("85")
    expect(view.box("to")).to_have_value("25")
    shows_ages(view, model[0])


def test_levels_can_be_chosen_among_some_rows(view, model):
    fit, _, mains = model
    view.choose("predictor", "Material")
    view.choose("to", "ductile iron")
    rows = (mains["soil"] == "high").sum()
    view.choose("where", f"Soil high ({rows} rows)")
    answer = fit.change("material", "cast iron", "ductile iron", where={"soil": "high"})
    assert answer.counted == rows
    shows(view, answer, ("Material cast iron", "Material ductile iron"))


def test_others_can_be_held_at_values(view, model):
    view.choose("others", "held at values I choose")
    view.choose("held-material", "cast iron")
    view.enter("held-past_repairs", "3")
    expect(view.words).to_contain_text("past repairs 3")
    shows_ages(view, model[0], others={"material": "cast iron", "past_repairs": 3})
    assert not view.control("where").is_visible()


def test_another_confidence_level_gives_other_intervals(view, model):
    view.choose("level", "80%")
    expect(view.words).to_contain_text("80% interval")
    shows_ages(view, model[0], level=0.8)


def test_from_a_value_to_itself_is_refused_and_the_picture_stays(view, model):
    start, end = ends(view)
    before = view.picture.get_attribute("alt")
    view.enter("to", f"{start:g}")
    expect(view.problem).to_contain_text("is no change")
    expect(view.box("to")).to_have_value(f"{end:g}")
    assert view.picture.get_attribute("alt") == before
    view.enter("to", f"{end + 1:g}")
    expect(view.problem).to_have_text("")
    shows_ages(view, model[0])


def test_every_control_has_a_name_and_the_tab_key_reaches_it(notebook, view):
    for field in ("predictor", "from", "to", "others", "where", "level"):
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
    view.enter("to", "90")
    expect(view.words).to_contain_text("90 rather than")
    view.button("Show the code").click()
    expect(view.code).to_contain_text("90")
    names = {"result": result}
    exec(view.code.inner_text(), names)
    assert names["answer"] == fit.change("age_years", int(ends(view)[0]), 90)


def test_nothing_sticks_out_of_a_narrow_page(notebook, view):
    notebook.hide_sidebar()
    notebook.set_notebook_width(430)
    try:
        assert notebook.overflowing(view.root) == []
    finally:
        notebook.set_notebook_width(1000)


def test_the_picture_is_saved_as_a_file_named_after_what_changes(notebook, view):
    view.choose("predictor", "Past repairs")
    expect(view.table).to_contain_text("Past repairs")
    view.button("Save the picture").click()
    expect(view.saved).to_contain_text("change-past_repairs.svg")
    assert (notebook.folder / "change-past_repairs.svg").read_bytes().startswith(b"<?xml")
