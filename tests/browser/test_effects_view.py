"""EffectsView in real JupyterLab: its table is what statsmodels finds where that is right."""

import re

import pytest
from playwright.sync_api import expect

from tests.browser.models import PLAIN, TESSEL_BAY, named
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, numbers_in, rows_of
from tests.browser.views import ViewOnPage


@pytest.fixture(scope="module")
def result():
    return named(PLAIN, "result")[0]


@pytest.fixture(scope="module")
def fit():
    return named(TESSEL_BAY, "fit")[0]


@pytest.fixture(scope="module")
def plain(browser, lab):
    with opened(browser, lab, put_notebook(lab, PLAIN, "po.EffectsView(result)")) as shown:
        shown.run_all()
        yield ViewOnPage(shown.page, "effects")


@pytest.fixture(scope="module")
def notebook(browser, lab):
    with opened(browser, lab, put_notebook(lab, TESSEL_BAY, "po.EffectsView(fit)")) as shown:
        shown.run_all()
        yield shown


@pytest.fixture
def view(notebook):
    """A view of its own for each test."""
    notebook.run_last_cell_again()
    return ViewOnPage(notebook.page, "effects")


def stands_for(cells, *exact):
    """Whether an effect and its interval are written as they are in percentage points."""
    # what is too small to be written out is written as lying between two figures
    pieces = re.findall(r"between \S+ and \S+|[^\s]*\d[^\s]*", " ".join(cells))
    written = [numbers_in(piece) for piece in pieces]
    return len(written) == len(exact) and all(
        found[0].stands_for(100 * each)
        if len(found) == 1
        else found[0].value <= 100 * each <= found[1].value
        for found, each in zip(written, exact, strict=True)
    )


def test_averages_of_a_plain_model_are_those_of_statsmodels(plain, result):
    margins = result.get_margeff(at="overall")
    found, ends = margins.summary_frame(), margins.conf_int()
    mains = result.model.data.frame

    def check():
        rows = rows_of(plain.table)
        for place, name in enumerate(found.index):
            if name in ("age_years", "past_repairs"):
                title = name.replace("_", " ").capitalize()
                cells = rows[f"{title}, per additional unit"][:2]
                assert stands_for(cells, found.loc[name, "dy/dx"], *ends[place]), cells
        # get_margeff takes dummies one by one, so levels are compared by what is predicted
        for column, level, first in (("soil", "high", "low"), ("material", "PVC", "cast iron")):
            there, here = (
                result.predict(mains.assign(**{column: each})).mean() for each in (level, first)
            )
            (shown,) = numbers_in(rows[f"{column.capitalize()}, {level} against {first}"][0])
            assert shown.stands_for(100 * (there - here))

    eventually(plain.page, check)


def shows(view, answer):
    """Wait until the table and the picture's text show an answer."""

    def check():
        rows = list(rows_of_all(view.table))
        assert len(rows) == len(answer.rows)
        for cells, row in zip(rows, answer.rows, strict=True):
            effect = row.effect
            assert stands_for(cells[1:3], effect.estimate, effect.lower, effect.upper), cells
        highest = max(row.effect.estimate for row in answer.rows)
        said = numbers_in(view.picture.get_attribute("alt"))
        assert any(each.stands_for(100 * highest) for each in said), said

    eventually(view.page, check)


def rows_of_all(table):
    """Every row with figures, headings of groups left out."""
    cells = table.evaluate(
        """table => [...table.querySelectorAll('tbody tr')].map(
            row => [...row.querySelectorAll('th, td')].map(cell => cell.innerText))"""
    )
    return [row for row in cells if len(row) > 1]


def test_at_the_start_effects_are_averaged_over_all_rows(view, fit):
    expect(view.words).to_contain_text("averaged over the 3,000 rows")
    shows(view, fit.effects())


def test_effects_at_the_typical_profile_and_at_a_stated_one(view, fit):
    view.choose("others", "held at typical values")
    expect(view.table).not_to_contain_text("average chance")
    shows(view, fit.effects(others="typical"))
    view.choose("others", "held at values I choose")
    view.enter("held-age_years", "80")
    view.choose("held-soil", "high")
    shows(view, fit.effects(others={"age_years": 80, "soil": "high"}))


def test_effects_in_groups_among_some_rows(view, fit):
    view.choose("by", "Material")
    shows(view, fit.effects(by="material"))
    expect(view.table.locator(".plainodds-group")).to_have_count(3)
    high = fit.effects(by="material", where={"soil": "high"})
    view.choose("where", f"Soil high ({sum(high.counted)} rows)")
    shows(view, high)


def test_a_whole_step_instead_of_a_slope(view, fit):
    boxes = view.control("predictors").locator("label:has(input[type=checkbox])")
    boxes.filter(has_text="Pressure").locator("input").uncheck()
    expect(view.table).not_to_contain_text("Pressure")
    view.choose("number", "of one step more")
    expect(view.table).to_contain_text("Age, per 10 years more")
    names = [facts.name for facts in fit.subject.predictors if facts.name != "pressure_m"]
    shows(view, fit.effects(names, number="step"))


def test_rows_as_drawn_from_many_more_give_wider_intervals(view, fit):
    view.choose("sample", "as drawn from many more")
    shows(view, fit.effects(sample="drawn"))
    view.choose("level", "99%")
    shows(view, fit.effects(sample="drawn", level=0.99))


def test_a_step_that_cannot_be_computed_is_refused_and_the_table_stays(view, fit):
    view.choose("number", "of one step more")
    expect(view.problem).to_contain_text("one step of")
    assert view.chosen("number") == "its slope, per unit"
    shows(view, fit.effects())


def test_every_control_has_a_name(view):
    for field in ("predictors", "others", "where", "by", "number", "sample", "level"):
        control = view.control(field).locator("input, select").first
        name = control.evaluate("each => each.labels[0]?.innerText ?? each.ariaLabel ?? ''")
        assert name.strip(), field


def test_nothing_sticks_out_of_a_narrow_page(notebook, view):
    notebook.hide_sidebar()
    notebook.set_notebook_width(430)
    try:
        assert notebook.overflowing(view.root) == []
    finally:
        notebook.set_notebook_width(1000)
