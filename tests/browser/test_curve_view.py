"""CurveView in real JupyterLab: its table is what statsmodels predicts."""

import pytest
from playwright.sync_api import expect
from scipy.special import expit

from tests.browser.models import TESSEL_BAY, fitted
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, numbers_in, rows_of
from tests.browser.views import ViewOnPage

MATERIALS = ("cast iron", "ductile iron", "PVC")


@pytest.fixture(scope="module")
def result():
    return fitted(TESSEL_BAY)


@pytest.fixture(scope="module")
def notebook(browser, lab):
    path = put_notebook(lab, TESSEL_BAY, "view = po.CurveView(fit)\nview")
    with opened(browser, lab, path) as shown:
        shown.run_all()
        yield shown


@pytest.fixture
def view(notebook):
    """The view along age by material, the others typical, whatever the test before has done."""
    found = ViewOnPage(notebook.page, "curve")
    for field, label in (
        ("predictor", "Age"),
        ("by", "Material"),
        ("others", "held at typical values"),
        ("scale", "chance"),
        ("level", "95%"),
    ):
        if found.chosen(field) != label:
            found.choose(field, label)
    expect(columns(found).first).to_have_text("Age (years)")
    if columns(found).count() != 4:
        # a predictor chosen anew has all its values again
        found.choose("by", "one line only")
        expect(columns(found)).to_have_count(2)
        found.choose("by", "Material")
    expect(columns(found)).to_have_text(["Age (years)", *MATERIALS])
    expect(found.words).to_contain_text("held at their typical values")
    expect(found.words).to_contain_text("95% interval")
    return found


def columns(view):
    return view.table.locator("thead th")


def table_of(view):
    """The table as {age: (shown numbers of each material)}."""
    return {
        float(age): [numbers_in(cell) for cell in cells]
        for age, cells in rows_of(view.table).items()
    }


def typical(result):
    """One row with every predictor at its median or most frequent level."""
    frame = result.model.data.frame
    row = frame.iloc[[0]].copy()
    for name in ("pressure_m", "diameter_mm", "past_repairs"):
        row[name] = frame[name].median()
    row["soil"] = frame["soil"].mode()[0]
    return row


def linear_predictor(result, row, age, material, alpha=0.05):
    moved = row.assign(age_years=age, material=material)
    predicted = result.get_prediction(moved, which="linear")
    return (predicted.predicted[0], *predicted.conf_int(alpha=alpha)[0])


def shows(view, exact_of):
    """Wait until every cell of the table shows what `exact_of` an age and a material gives."""

    def check():
        table = table_of(view)
        assert len(table) > 5
        for age, cells in table.items():
            for material, shown in zip(MATERIALS, cells, strict=True):
                exact = exact_of(age, material)
                pairs = zip(shown[: len(exact)], exact, strict=True)
                assert all(each.stands_for(value) for each, value in pairs), (age, shown, exact)

    eventually(view.page, check)


def test_at_the_start_it_shows_chances_at_the_typical_profile(view, result):
    row = typical(result)
    shows(view, lambda age, material: expit(linear_predictor(result, row, age, material)))


def test_another_confidence_level_gives_other_intervals(view, result):
    view.choose("level", "80%")
    row = typical(result)
    shows(view, lambda age, material: expit(linear_predictor(result, row, age, material, 0.2)))


def test_averaged_chances_are_those_of_every_row_moved(view, result):
    view.choose("others", "as observed, averaged")
    frame = result.model.data.frame

    def averaged(age, material):
        return [result.predict(frame.assign(age_years=age, material=material)).mean()]

    shows(view, averaged)


def test_others_can_be_held_at_chosen_values(view, result):
    view.choose("others", "held at values I choose")
    view.choose("held-soil", "high")
    row = typical(result).assign(soil="high")
    shows(view, lambda age, material: expit(linear_predictor(result, row, age, material)))
    view.choose("held-soil", "low")


def test_the_slope_is_what_one_more_year_adds_in_percentage_points(view, result):
    view.choose("scale", "slope of the chance")
    row = typical(result)
    tiny = 1e-4

    def slope(age, material):
        after = expit(linear_predictor(result, row, age + tiny, material)[0])
        before = expit(linear_predictor(result, row, age - tiny, material)[0])
        return [100 * (after - before) / (2 * tiny)]

    shows(view, slope)


def test_levels_can_be_left_out(view):
    boxes = view.control("by_values").locator("input[type=checkbox]")
    boxes.nth(1).uncheck()
    expect(columns(view)).to_have_text(["Age (years)", "cast iron", "PVC"])
    expect(view.words).not_to_contain_text("ductile iron")
    boxes.nth(1).check()
    expect(columns(view)).to_have_text(["Age (years)", *MATERIALS])


def test_the_last_level_cannot_be_left_out_and_the_picture_stays(view):
    boxes = view.control("by_values").locator("input[type=checkbox]")
    boxes.nth(0).uncheck()
    boxes.nth(1).uncheck()
    expect(columns(view)).to_have_text(["Age (years)", "PVC"])
    boxes.nth(2).click()
    expect(view.problem).to_contain_text("Keep at least one")
    expect(boxes.nth(2)).to_be_checked()
    expect(columns(view)).to_have_text(["Age (years)", "PVC"])
    for place in (0, 1):
        boxes.nth(place).check()
    expect(columns(view)).to_have_text(["Age (years)", *MATERIALS])
    expect(view.problem).to_have_text("")


def test_another_predictor_gives_another_picture(view):
    before = view.picture.get_attribute("alt")
    view.choose("predictor", "Pressure")
    expect(columns(view).first).to_have_text("Pressure (m)")
    expect(view.words).to_contain_text("pressure")
    eventually(view.page, lambda: differs(view.picture.get_attribute("alt"), before))


def differs(one, other):
    assert one != other


def test_one_line_only(view):
    view.choose("by", "one line only")
    expect(columns(view)).to_have_count(2)


def test_keys_choose_in_a_drop_down_and_leave_the_cells_alone(notebook, view):
    cells = notebook.panel.locator(".jp-CodeCell")
    before = cells.count()
    select = view.control("scale").locator("select")
    notebook.press(select, "ArrowDown")
    eventually(view.page, lambda: differs(view.chosen("scale"), "chance"))
    # two of these delete a cell where JupyterLab gets them
    notebook.press(select, "d", times=2)
    expect(cells).to_have_count(before)
    expect(select).to_be_focused()


def test_jupyterlabs_own_shortcuts_work_from_a_control(notebook, view):
    sidebar = notebook.page.locator("#jp-left-stack")
    was_visible = sidebar.is_visible()
    notebook.press(view.control("scale").locator("select"), "Control+b")
    expect(sidebar).to_be_visible(visible=not was_visible)
    notebook.press(view.control("scale").locator("select"), "Control+b")
    expect(sidebar).to_be_visible(visible=was_visible)
