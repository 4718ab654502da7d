"""What is left of a view when its kernel is gone: its picture and its words."""

import subprocess
import sys

import pytest
from playwright.sync_api import expect

from tests.browser.models import TESSEL_BAY
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.views import ViewOnPage

CELLS = (
    TESSEL_BAY,
    "po.OddsView(fit)",
    "po.CurveView(fit)",
    "po.ProfileView(fit, fit.profile({'age_years': 77}).question)",
)
KINDS = ("odds", "curve", "profile")


@pytest.fixture(scope="module")
def saved(browser, lab):
    """A notebook that was run and saved, and the texts of its pictures."""
    path = put_notebook(lab, *CELLS)
    with opened(browser, lab, path) as shown:
        shown.run_all()
        shown.wait_until_drawn()
        texts = [ViewOnPage(shown.page, kind).picture.get_attribute("alt") for kind in KINDS]
        expect(shown.panel.get_by_role("img", name=texts[0])).to_have_count(1)
        shown.save()
    return path, texts


def test_jupyterlab_shows_them_when_the_notebook_is_opened_again(browser, lab, saved):
    path, texts = saved
    with opened(browser, lab, path) as shown:
        for text in texts:
            picture = shown.panel.get_by_role("img", name=text)
            expect(picture).to_be_visible()
            assert picture.evaluate("each => each.decode().then(() => each.naturalWidth)") > 300
        expect(shown.panel).to_contain_text("For a main with age 77 years")
        complaints = shown.panel.get_by_text("model not found")
        expect(complaints.filter(visible=True)).to_have_count(0)


def test_a_page_made_of_the_notebook_shows_them_once(browser, saved):
    path, texts = saved
    page_file = path.with_suffix(".html")
    subprocess.run(
        [sys.executable, "-m", "nbconvert", "--to", "html", "--no-input", str(path)],
        check=True,
        capture_output=True,
    )
    # without scripts, as a mail program or a browser without a network shows it
    context = browser.new_context(java_script_enabled=False)
    try:
        page = context.new_page()
        page.goto(page_file.as_uri())
        for text in texts:
            expect(page.get_by_role("img", name=text)).to_have_count(1)
            expect(page.get_by_role("img", name=text)).to_be_visible()
        expect(page.get_by_text("For a main with age 77 years").first).to_be_visible()
    finally:
        context.close()
