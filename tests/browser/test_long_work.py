"""Long work in real JupyterLab: it can be stopped, and the page stays alive meanwhile."""

import pytest
from playwright.sync_api import expect

from tests.browser.models import MANY, named
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, numbers_in, rows_of
from tests.browser.views import ViewOnPage

LONG_MS = 120_000


@pytest.fixture(scope="module")
def result():
    return named(MANY, "result")[0]


@pytest.fixture(scope="module")
def notebook(browser, lab):
    cells = ("po.OddsView(result)", "po.ChangeView(result)")
    with opened(browser, lab, put_notebook(lab, MANY, *cells)) as shown:
        shown.run_all()
        yield shown


@pytest.fixture
def odds(notebook):
    return ViewOnPage(notebook.page, "odds")


@pytest.fixture
def change(notebook):
    return ViewOnPage(notebook.page, "change")


def working(view):
    return view.root.locator(".plainodds-work")


def test_refitting_is_stopped_while_it_goes_on(odds):
    before = odds.picture.get_attribute("src")
    odds.choose("interval", "the likelihood")
    expect(working(odds)).to_contain_text("Refitting for likelihood intervals")
    odds.button("Stop").click()
    expect(odds.problem).to_contain_text("Stopped")
    expect(working(odds)).to_have_count(1)
    expect(working(odds)).to_be_hidden()
    assert odds.chosen("interval") == "standard errors (Wald)"
    assert odds.picture.get_attribute("src") == before


def test_meanwhile_another_view_answers_and_then_the_intervals_come(odds, change, result):
    odds.choose("interval", "the likelihood")
    expect(working(odds)).to_be_visible()
    change.enter("to", "90")
    expect(change.words).to_contain_text("age years 90 rather than")
    expect(odds.words).to_contain_text("likelihood intervals", timeout=LONG_MS)
    expect(working(odds)).to_be_hidden()
    assert odds.chosen("interval") == "the likelihood"
    (ratio, _, _) = rows_of(odds.table)["high against low"]
    (shown,) = numbers_in(ratio)
    assert shown.value == pytest.approx(2.718281828 ** result.params["soil[T.high]"], abs=0.006)


def test_a_slider_over_many_rows_moves_the_picture_and_the_table_is_asked_for(
    notebook, change, result
):
    expect(change.table).to_contain_text("summary of the 150,000 rows")
    start, end = (float(change.box(each).input_value()) for each in ("from", "to"))
    notebook.press(change.handle("ends").nth(0), "ArrowRight", times=3)
    expect(change.box("from")).to_have_value(f"{start + 3:g}")
    expect(change.words).to_contain_text(f"{end:g} rather than {start + 3:g}")
    change.button("Compute the exact table").click()
    expect(change.table.locator("table")).to_be_visible()
    expect(change.button("Compute the exact table")).to_be_hidden()

    mains = result.model.data.frame
    for age in (start + 3, end):
        exact = result.predict(mains.assign(age_years=age)).mean()
        (shown,) = numbers_in(rows_of(change.table)[f"Age years {age:g}"][0])
        assert shown.stands_for(exact)

    notebook.press(change.handle("ends").nth(0), "ArrowLeft")
    expect(change.table.locator("table")).to_have_count(0)
    expect(change.button("Compute the exact table")).to_be_visible()


def test_other_rows_are_set_up_beside_the_page(change):
    option = change.control("where").locator("option", has_text="Soil high").inner_text()
    change.choose("where", option)
    expect(change.words).to_contain_text("soil high")
    eventually(change.page, lambda: expect(working(change)).to_be_hidden())
