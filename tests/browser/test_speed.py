"""A view in JupyterLab answers a key nearly as fast as a slider that redraws one line.

What is promised, and how near it is, `python -m tests.benchmarks.in_jupyterlab` measures at
leisure. Here the machine may be busy, so the limit only finds what has become slow.
"""

from playwright.sync_api import expect

from tests.browser.bare import BARE, ms_beside_bare
from tests.browser.models import TESSEL_BAY
from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.views import ViewOnPage

SLOW = 2.5
"""Times what the bare slider takes."""


def test_from_key_to_picture(browser, lab):
    path = put_notebook(lab, TESSEL_BAY, BARE, "po.ProfileView(fit)")
    with opened(browser, lab, path) as shown:
        shown.run_all()
        shown.wait_until_drawn()
        view = ViewOnPage(shown.page, "profile")
        place = view.root.locator(".plainodds-picture")
        bare, live = ms_beside_bare(shown, view.handle("age_years"), place, rounds=4)
        expect(view.problem).to_have_text("")
    assert live <= SLOW * bare
