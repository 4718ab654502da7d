"""SoundnessView in real JupyterLab: findings by keyboard, looking again, and stopping it."""

import re

import nbformat
import pytest
from playwright.sync_api import expect

from plainodds import words
from plainodds.phrases.checks import finding_figures, finding_words
from tests.browser.models import MANY, PLAIN, TESSEL_BAY, named
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.reading import eventually, rows_of
from tests.browser.views import ViewOnPage

LONG_MS = 120_000


@pytest.fixture(scope="module")
def fit():
    return named(TESSEL_BAY, "fit")[0]


@pytest.fixture(scope="module")
def notebook(browser, lab):
    with opened(browser, lab, put_notebook(lab, TESSEL_BAY, "po.SoundnessView(fit)")) as shown:
        shown.run_all()
        yield shown


@pytest.fixture
def view(notebook):
    """A view of its own for each test."""
    notebook.run_last_cell_again()
    return ViewOnPage(notebook.page, "soundness")


def card(view, heading):
    """A finding's button, by its heading."""
    return view.root.get_by_role("button", name=re.compile(rf"^\S\s{re.escape(heading)}:"))


def working(view):
    return view.root.locator(".plainodds-work")


def of(answer, topic):
    return next(each for each in answer.findings if each.topic == topic)


def said(fit, topic):
    answer = fit.soundness()
    return finding_words(of(answer, topic), answer.subject, 0.95)


def test_it_opens_with_one_sentence_and_a_card_for_each_topic(view, fit):
    answer = fit.soundness()
    expect(view.root.locator(".plainodds-summary")).to_have_text(words(answer).sentences[0])
    topics = {each.topic for each in answer.findings}
    expect(view.root.locator(".plainodds-finding")).to_have_count(len(topics))
    expect(view.root.locator(".plainodds-chosen")).to_have_count(1)


def test_a_finding_is_chosen_by_keyboard(notebook, view, fit):
    before = view.picture.get_attribute("src")
    first = card(view, "How the fit ended")
    first.focus()
    heading = said(fit, "separation").heading
    notebook.page.keyboard.press("Tab")
    expect(card(view, heading)).to_be_focused()
    notebook.page.keyboard.press("Enter")
    expect(view.words).to_contain_text(said(fit, "separation").what)
    expect(view.root.locator(".plainodds-chosen")).to_contain_text(heading)
    assert view.picture.get_attribute("src") != before
    assert said(fit, "separation").heading in view.picture.get_attribute("alt")
    # the focus stays where it was, for the next press
    expect(card(view, heading)).to_be_focused()
    notebook.page.keyboard.press("Tab")
    notebook.page.keyboard.press("Space")
    expect(view.words).to_contain_text(said(fit, "collinearity").what)
    expect(view.words).to_contain_text("Why it matters.")
    assert notebook.panel.locator(".jp-CodeCell").count() == 2


def test_a_click_anywhere_on_a_card_chooses_it(view, fit):
    heading = said(fit, "calibration").heading
    box = view.root.locator(".plainodds-finding").filter(has_text=heading).bounding_box()
    # its lower right corner, where there is no more text
    view.page.mouse.click(box["x"] + box["width"] - 4, box["y"] + box["height"] - 4)
    expect(view.words).to_contain_text(said(fit, "calibration").what)
    answer = fit.soundness()
    for label, figure in finding_figures(of(answer, "calibration"), answer.subject, 0.95):
        expect(view.table).to_contain_text(label)
        expect(view.table).to_contain_text(figure)


def test_the_shape_of_another_predictor_is_shown(view, fit):
    card(view, "Shape along 4 predictors").click()
    options = view.control("predictor").locator("option")
    expect(options).to_have_count(4)
    diameter = options.filter(has_text="Diameter").inner_text()
    view.choose("predictor", diameter)
    answer = fit.soundness(show="shape", predictor="diameter_mm")
    shape = next(each for each in answer.findings if each.about == ("diameter_mm",))
    expect(view.words).to_contain_text(finding_words(shape, answer.subject, 0.95).what)
    view.button("Show the code").click()
    expect(view.code).to_contain_text('fit.soundness(show="shape", predictor="diameter_mm")')


def test_naming_a_column_tells_which_rows_belong_together(view):
    card(view, "Rows that belong together").click()
    expect(view.words).to_contain_text("nobody has said")
    card(view, "How the fit ended").click()
    view.choose("groups", "by district")
    expect(view.words).to_contain_text("district")
    expect(view.words).not_to_contain_text("nobody has said")
    expect(view.table.locator("table")).to_have_count(1)


def test_cross_validation_runs_beside_the_page_to_its_end(view):
    card(view, "Chances against what happened").click()
    expect(view.table).to_contain_text("not asked for")
    card(view, "How the fit ended").click()
    view.choose("optimism", "by cross-validation")
    # so many that they are not done before the bar has been seen
    view.enter("repeats", "20000")
    expect(working(view)).to_contain_text(re.compile(r"cross-validation: \d+ of 20,?000"))
    expect(working(view).locator("progress")).to_be_visible()
    view.enter("repeats", "2")

    def check():
        assert rows_of(view.table).get("Repeats (cross-validation)") == ["2"]

    eventually(view.page, check)
    expect(view.table).to_contain_text("corrected for optimism")
    expect(working(view)).to_be_hidden()
    assert view.chosen("optimism") == "by cross-validation"


def test_meanwhile_another_finding_can_be_read(view, fit):
    view.choose("optimism", "by bootstrap")
    # so many that they are not done before the finding has been read
    view.enter("repeats", "50000")
    expect(working(view)).to_contain_text(re.compile(r"bootstrap samples: \d+ of 50,?000"))
    card(view, said(fit, "amount").heading).click()
    expect(view.words).to_contain_text(said(fit, "amount").what)
    expect(working(view)).to_be_visible()
    view.button("Stop").click()
    expect(view.words).to_contain_text(said(fit, "amount").what)


def test_the_analyst_opens_all_findings_in_words(notebook, view, fit):
    fold = view.root.locator(".plainodds-analysts summary")
    fold.focus()
    notebook.page.keyboard.press("Enter")
    expect(view.root.locator(".plainodds-analysts details")).to_have_attribute("open", "")
    expect(view.root.locator(".plainodds-analysts")).to_contain_text(said(fit, "overall").what)


def test_every_control_has_a_name(view):
    for field in ("groups", "optimism", "level"):
        control = view.control(field).locator("select")
        name = control.evaluate("each => each.labels[0]?.innerText ?? each.ariaLabel ?? ''")
        assert name.strip(), field


@pytest.mark.parametrize("topic", ["shape", "influence", "levels", "overall"])
def test_nothing_sticks_out_of_a_narrow_page(notebook, view, fit, topic):
    notebook.hide_sidebar()
    notebook.set_notebook_width(430)
    heading = "Shape along 4 predictors" if topic == "shape" else said(fit, topic).heading
    try:
        card(view, heading).click()
        expect(view.root.locator(".plainodds-chosen")).to_contain_text(heading)
        assert notebook.overflowing(view.root) == []
        list_box, picture = (
            view.root.locator(each).bounding_box()
            for each in (".plainodds-findings", ".plainodds-picture")
        )
        assert list_box["y"] + list_box["height"] <= picture["y"]
    finally:
        notebook.set_notebook_width(1000)


def test_the_list_stands_beside_the_picture_where_there_is_room(view):
    list_box, picture = (
        view.root.locator(each).bounding_box()
        for each in (".plainodds-findings", ".plainodds-picture")
    )
    assert list_box["x"] + list_box["width"] <= picture["x"]


@pytest.fixture(scope="module")
def many_rows(browser, lab):
    """A notebook with a view of many rows, once they have been looked at."""
    path = put_notebook(lab, MANY, "po.SoundnessView(result)")
    with opened(browser, lab, path) as shown:
        shown.run_all()
        view = ViewOnPage(shown.page, "soundness")
        expect(view.root.locator(".plainodds-finding").first).to_be_visible(timeout=LONG_MS)
        expect(view.picture).to_be_visible()
        expect(working(view)).to_be_hidden()
        yield shown, view, path


def test_many_rows_are_looked_at_beside_the_page_and_a_saved_notebook_has_the_picture(many_rows):
    shown, view, path = many_rows
    expect(view.button("Look at the fit")).to_be_hidden()
    expect(view.root.locator(".plainodds-summary")).to_contain_text("checks")
    card(view, "How much data there is").click()
    expect(view.words).to_contain_text("for each")
    shown.save()
    live, beneath = nbformat.read(path, as_version=4).cells[-1].outputs
    assert live.data["image/png"]
    for each in (live, beneath):
        assert "<img " in each.data["text/html"]


def test_optimism_is_stopped_and_what_was_shown_stays(many_rows):
    _, view, _ = many_rows
    before = view.picture.get_attribute("src")
    view.choose("optimism", "by bootstrap")
    # of so many rows that it is not done before it is stopped
    expect(working(view)).to_contain_text(re.compile(r"bootstrap samples: \d+ of 200"))
    view.button("Stop").click()
    expect(view.problem).to_contain_text("Stopped")
    expect(working(view)).to_be_hidden()
    assert view.chosen("optimism") == "not looked at"
    assert view.picture.get_attribute("src") == before


def test_a_first_look_can_be_stopped_and_begun_again(browser, lab):
    cell = MANY.replace("rows=150_000", "rows=600_000")
    with opened(browser, lab, put_notebook(lab, cell, "po.SoundnessView(result)")) as shown:
        shown.run_all()
        view = ViewOnPage(shown.page, "soundness")
        expect(working(view)).to_contain_text("Looking at all 600,000 rows")
        view.button("Stop").click()
        expect(view.problem).to_contain_text("not been looked at yet")
        view.button("Look at the fit").click()
        expect(view.root.locator(".plainodds-finding").first).to_be_visible(timeout=LONG_MS)


def test_an_outcome_told_without_exception_comes_first(browser, lab):
    cell = PLAIN + (
        "\nnew = mains.head(40).assign(material='polyethylene', burst=0)"
        "\nimport pandas as pd, statsmodels.api as sm"
        "\nmore = pd.concat([mains.astype({'material': str}), new.astype({'material': str})])"
        "\nresult = smf.glm('burst ~ age_years + material', more,"
        " family=sm.families.Binomial()).fit()"
    )
    with opened(browser, lab, put_notebook(lab, cell, "po.SoundnessView(result)")) as shown:
        shown.run_all()
        view = ViewOnPage(shown.page, "soundness")
        first = view.root.locator(".plainodds-finding").first
        expect(first).to_contain_text("don't explain yet")
        expect(view.words).to_contain_text("polyethylene")
