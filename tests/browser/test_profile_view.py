"""ProfileView in real JupyterLab: what it shows is what statsmodels says of the same profile."""

import pandas as pd
import pytest
from playwright.sync_api import expect
from scipy.special import expit

from tests.browser.models import TESSEL_BAY, fitted
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import chance_in, eventually, numbers_in, rows_of
from tests.browser.timing import burst_of_keys
from tests.browser.views import ViewOnPage

NUMBERS = ("age_years", "pressure_m", "diameter_mm", "past_repairs")
CATEGORIES = ("material", "soil")


@pytest.fixture(scope="module")
def result():
    return fitted(TESSEL_BAY)


@pytest.fixture(scope="module")
def notebook(browser, lab):
    path = put_notebook(lab, TESSEL_BAY, "view = po.ProfileView(fit)\nview")
    with opened(browser, lab, path) as shown:
        shown.run_all()
        shown.folder = path.parent
        yield shown


@pytest.fixture
def view(notebook):
    """The view as it is at the start, whatever the test before has done."""
    found = ViewOnPage(notebook.page, "profile")
    if found.button("Remove the pin").is_visible():
        found.button("Remove the pin").click()
        expect(found.button("Remove the pin")).to_be_hidden()
    if found.button("Back to typical").is_enabled():
        found.button("Back to typical").click()
        expect(found.button("Back to typical")).to_be_disabled()
    if found.chosen("level") != "95%":
        found.choose("level", "95%")
    expect(found.words).to_contain_text("For a typical")
    expect(found.words).to_contain_text("95% interval")
    return found


def profile_in_controls(view):
    numbers = {name: float(view.box(name).input_value()) for name in NUMBERS}
    levels = {name: view.chosen(name) for name in CATEGORIES}
    return numbers | levels


def chance_by_statsmodels(result, profile, alpha=0.05):
    """The chance, and the interval of the linear predictor carried over."""
    predicted = result.get_prediction(pd.DataFrame([profile]), which="linear")
    ends = predicted.conf_int(alpha=alpha)[0]
    return expit(predicted.predicted[0]), expit(ends[0]), expit(ends[1])


def shows_what_statsmodels_says(view, result, alpha=0.05):
    """Wait until the words and the ledger show the chance of the profile in the controls."""

    def check():
        exact = chance_by_statsmodels(result, profile_in_controls(view), alpha)
        shown = chance_in(view.words.inner_text())
        assert all(each.stands_for(value) for each, value in zip(shown, exact, strict=True)), (
            shown,
            exact,
        )
        total = rows_of(view.table)["This profile"]
        assert numbers_in(total[-1])[0].stands_for(exact[0])

    eventually(view.page, check)


def test_at_the_start_it_shows_the_typical_profile(view, result):
    shows_what_statsmodels_says(view, result)


def test_keys_move_a_slider(notebook, view, result):
    before = float(view.box("age_years").input_value())
    notebook.press(view.handle("age_years"), "ArrowRight", times=7)
    expect(view.box("age_years")).to_have_value(f"{before + 7:g}")
    shows_what_statsmodels_says(view, result)


def test_the_mouse_drags_a_slider(notebook, view, result):
    before = float(view.box("pressure_m").input_value())
    notebook.drag(view.handle("pressure_m"), by_px=60)
    eventually(
        notebook.page, lambda: exceeds(float(view.box("pressure_m").input_value()), before + 10)
    )
    shows_what_statsmodels_says(view, result)


def exceeds(number, least):
    assert number > least


def test_a_number_can_be_typed(view, result):
    view.enter("age_years", "93")
    expect(view.words).to_contain_text("93 years")
    shows_what_statsmodels_says(view, result)


def test_a_level_can_be_chosen(view, result):
    view.choose("material", "cast iron")
    expect(view.words).to_contain_text("cast iron")
    shows_what_statsmodels_says(view, result)


def test_another_confidence_level_gives_another_interval(view, result):
    view.choose("level", "80%")
    expect(view.words).to_contain_text("80% interval")
    shows_what_statsmodels_says(view, result, alpha=0.2)


def test_a_profile_can_be_pinned_and_compared_with_the_next(view, result):
    view.choose("material", "cast iron")
    view.enter("age_years", "40")
    expect(view.words).to_contain_text("40 years")
    pinned = profile_in_controls(view)
    view.button("Pin this profile").click()
    expect(view.button("Remove the pin")).to_be_visible()
    view.enter("age_years", "90")
    expect(view.words).to_contain_text("90 years")
    shows_what_statsmodels_says(view, result)

    then = chance_by_statsmodels(result, pinned)[0]
    now = chance_by_statsmodels(result, profile_in_controls(view))[0]
    start = rows_of(view.table)["Pinned profile (start)"]
    assert numbers_in(start[-1])[0].stands_for(then)
    said = numbers_in(view.words.inner_text())
    odds_ratio = now / (1 - now) / (then / (1 - then))
    for exact in (now / then, odds_ratio, 100 * (now - then)):
        assert any(each.stands_for(exact) and "." in each.written for each in said), exact


def test_the_ledger_sums_to_what_it_shows_as_the_total(view):
    view.choose("material", "cast iron")
    view.enter("age_years", "85")
    expect(view.words).to_contain_text("85 years")
    rows = list(rows_of(view.table).values())
    *adds, total = [round(100 * numbers_in(cells[1])[0].value) for cells in rows]
    assert len(adds) > 3
    assert sum(adds) == total


def test_a_profile_beyond_the_data_is_warned_of(view):
    warning = view.root.locator(".plainodds-warning")
    expect(warning).to_have_text("")
    view.choose("material", "PVC")
    view.enter("age_years", "105")
    expect(warning).to_contain_text("Beyond the data")


def test_a_number_beyond_what_is_offered_is_set_to_the_nearest_and_says_so(view, result):
    view.enter("pressure_m", "5000")
    expect(view.problem).to_contain_text("5000")
    shows_what_statsmodels_says(view, result)
    view.enter("pressure_m", "60")
    expect(view.problem).to_have_text("")


def test_after_a_burst_of_keys_the_last_value_is_what_is_shown(notebook, view, result):
    notebook.press(view.handle("age_years"), "Home")
    expect(view.words).to_contain_text("years")
    start = float(view.box("age_years").input_value())
    burst_of_keys(view.handle("age_years"), "ArrowRight", times=60, gap_ms=16)
    expect(view.box("age_years")).to_have_value(f"{start + 60:g}")
    shows_what_statsmodels_says(view, result)
    chance = chance_by_statsmodels(result, profile_in_controls(view))[0]
    alternative = numbers_in(view.picture.get_attribute("alt"))
    assert any(each.stands_for(chance) for each in alternative if each.unit == 0.01)


@pytest.mark.parametrize(
    ("kind", "begins"), [("SVG", b"<?xml"), ("PDF", b"%PDF"), ("PNG", b"\x89PNG")]
)
def test_the_picture_can_be_saved_as_a_file(notebook, view, kind, begins):
    before = set(notebook.folder.iterdir())
    # while an earlier change is on its way a choice waits for it, and a quick click overtakes it
    notebook.wait_for_kernel()
    view.save.locator("select").select_option(label=kind)
    view.button("Save the picture").click()
    expect(view.saved).to_contain_text(f".{kind.lower()}")
    (written,) = set(notebook.folder.iterdir()) - before
    assert written.suffix == f".{kind.lower()}"
    assert written.read_bytes().startswith(begins)
    assert written.name in view.saved.inner_text()


def test_the_code_gives_the_answer_again(view, result):
    view.choose("material", "cast iron")
    view.enter("age_years", "77")
    expect(view.words).to_contain_text("77 years")
    view.button("Show the code").click()
    expect(view.code).to_contain_text("77")
    names = {"result": result}
    exec(view.code.inner_text(), names)
    exact = chance_by_statsmodels(result, profile_in_controls(view))[0]
    assert names["answer"].point.probability.estimate == pytest.approx(exact)
    view.button("Hide the code").click()
    expect(view.code).to_have_count(0)


def test_every_control_has_a_name_and_the_picture_a_text(view):
    for field in (*NUMBERS, *CATEGORIES, "level"):
        control = view.control(field).locator("input, select").first
        name = control.evaluate("each => each.labels[0]?.innerText ?? each.ariaLabel ?? ''")
        assert name.strip(), field
    assert len(view.picture.get_attribute("alt")) > 40


def test_the_tab_key_reaches_every_control(notebook, view):
    wanted = view.root.locator(
        "input:visible, select:visible, button:enabled:visible, .noUi-handle"
    )
    count = wanted.count()
    assert count > 10
    wanted.first.focus()
    reached = set()
    for _ in range(2 * count):
        reached.add(
            wanted.evaluate_all("all => all.findIndex(each => each === document.activeElement)")
        )
        notebook.page.keyboard.press("Tab")
    assert reached >= set(range(count))


def test_an_error_is_shown_escaped_and_the_last_picture_stays(notebook, view):
    before = view.picture.get_attribute("alt")
    notebook.run_in_new_cell(
        "def broken(question):\n"
        "    raise RuntimeError('<img src=x onerror=window.hacked=1> broke')\n"
        "whole, view.fit.ask = view.fit.ask, broken"
    )
    view.enter("age_years", "50")
    expect(view.problem).to_contain_text("<img src=x onerror=window.hacked=1> broke")
    assert view.picture.get_attribute("alt") == before
    assert notebook.page.evaluate("window.hacked") is None
    notebook.run_in_new_cell("view.fit.ask = whole")
    view.enter("age_years", "51")
    expect(view.problem).to_have_text("")
    expect(view.words).to_contain_text("51 years")
