"""OddsView in real JupyterLab: its table is what statsmodels estimates."""

import numpy as np
import pytest
from playwright.sync_api import expect

from tests.browser.models import PLAIN, fitted
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, numbers_in, rows_of
from tests.browser.views import ViewOnPage


@pytest.fixture(scope="module")
def result():
    return fitted(PLAIN)


@pytest.fixture(scope="module")
def notebook(browser, lab):
    with opened(browser, lab, put_notebook(lab, PLAIN, "po.OddsView(result)")) as shown:
        shown.run_all()
        yield shown


@pytest.fixture
def view(notebook):
    """A view of its own for each test: what can be set has no way back of one click."""
    notebook.run_last_cell_again()
    return ViewOnPage(notebook.page, "odds")


def shows(view, heading, log_odds_ratio, alpha_ends):
    """Wait until a row shows an odds ratio and its interval."""

    def check():
        rows = rows_of(view.table)
        assert heading in rows
        ratio, interval, *_ = rows[heading]
        shown = [*numbers_in(ratio), *numbers_in(interval)]
        exact = np.exp([log_odds_ratio, *alpha_ends])
        assert all(each.stands_for(value) for each, value in zip(shown, exact, strict=True))

    eventually(view.page, check)


def test_it_shows_what_statsmodels_estimates(view, result):
    ends = result.conf_int()
    names = {
        "Past repairs, per unit more": "past_repairs",
        "moderate against low": "soil[T.moderate]",
        "high against low": "soil[T.high]",
        "ductile iron against cast iron": "material[T.ductile iron]",
        "PVC against cast iron": "material[T.PVC]",
    }
    for heading, name in names.items():
        shows(view, heading, result.params[name], ends.loc[name])
    age = "age_years"
    shows(view, "Age years, per 10 units more", 10 * result.params[age], 10 * ends.loc[age])


def test_a_step_a_level_and_an_order_can_be_set(view, result):
    view.choose("chosen", "Age years")
    view.enter("step", "25")
    age, ends = result.params["age_years"], result.conf_int().loc["age_years"]
    shows(view, "Age years, per 25 units more", 25 * age, 25 * ends)

    view.choose("level", "99%")
    ends = result.conf_int(alpha=0.01).loc["age_years"]
    shows(view, "Age years, per 25 units more", 25 * age, 25 * ends)

    view.choose("order", "largest first")

    def largest_first():
        ratios = [numbers_in(cells[0])[0].value for cells in rows_of(view.table).values() if cells]
        size = np.abs(np.log(ratios))
        assert list(size) == sorted(size, reverse=True)

    eventually(view.page, largest_first)


def test_a_reference_can_be_chosen_without_refitting(view, result):
    view.choose("chosen", "Soil")
    view.choose("reference", "high")
    high, ends = result.params["soil[T.high]"], result.conf_int().loc["soil[T.high]"]
    shows(view, "low against high", -high, -ends[::-1])


def test_predictors_can_be_left_out(view):
    boxes = view.control("predictors").locator("label:has(input[type=checkbox])")
    boxes.filter(has_text="Past repairs").locator("input").uncheck()
    expect(view.table).not_to_contain_text("Past repairs")
    expect(view.table).to_contain_text("Soil")


def test_a_step_of_zero_is_refused_and_the_table_stays(view):
    view.choose("chosen", "Age years")
    view.enter("step", "0")
    expect(view.problem).not_to_have_text("")
    expect(view.table).to_contain_text("per 10 units more")
    expect(view.box("step")).to_have_value("10")
