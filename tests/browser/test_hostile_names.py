"""Names that are HTML are shown as what they are, and nothing in them is carried out."""

import pytest
from playwright.sync_api import expect

from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.views import ViewOnPage

MODEL = """
import numpy as np
import pandas as pd
import statsmodels.formula.api as smf

import plainodds as po

BAD = "<img src=x onerror=window.hacked=1>"
random = np.random.default_rng(5)
frame = pd.DataFrame(
    {
        BAD: random.normal(50, 10, 400),
        "group": random.choice(["a", BAD, "<script>window.hacked=2</script>"], 400),
    }
)
frame["y"] = (random.logistic(size=400) < 0.05 * (frame[BAD] - 60)).astype(int)
result = smf.logit(f"y ~ Q('{BAD}') * group", frame).fit(disp=False)
fit = po.FittedLogit(
    result,
    predictors={BAD: po.Predictor(unit=BAD), "group": po.Predictor(label=BAD + " group")},
    outcome=po.Outcome(event=BAD, case=BAD, cases=BAD),
)
"""

VIEWS = {
    "odds": "po.OddsView(fit)",
    "curve": "po.CurveView(fit)",
    "profile": "po.ProfileView(fit)",
    "effects": "po.EffectsView(fit)",
    "change": "po.ChangeView(fit, fit.change('group', BAD, 'a').question)",
    "pair": "po.PairView(fit, fit.pair(BAD, 'group', a_values=(40.0, 60.0)).question)",
    "soundness": "po.SoundnessView(fit, fit.soundness(show='influence').question)",
}


@pytest.fixture(scope="module")
def notebook(browser, lab):
    answers = "fit.profile({'group': BAD}, against={'group': 'a'})"
    with opened(browser, lab, put_notebook(lab, MODEL, *VIEWS.values(), answers)) as shown:
        shown.run_all()
        shown.wait_until_drawn()
        yield shown


def nothing_was_carried_out(notebook):
    assert notebook.page.evaluate("window.hacked") is None
    assert notebook.page.locator('img[src="x"]').count() == 0
    assert notebook.panel.locator(".jp-OutputArea-output script").count() == 0


@pytest.mark.parametrize("kind", VIEWS)
def test_a_view_shows_the_names_and_carries_nothing_out(notebook, kind):
    view = ViewOnPage(notebook.page, kind)
    for part in (view.words, view.table):
        expect(part).to_contain_text("<img src=x onerror=window.hacked=1>")
    assert "<img src=x" in view.picture.get_attribute("alt")
    nothing_was_carried_out(notebook)


def test_choosing_such_a_level_carries_nothing_out(notebook):
    view = ViewOnPage(notebook.page, "profile")
    for place in range(3):
        view.control("group").locator("select").select_option(index=place)
        view.button("Pin this profile").click()
        expect(view.root.locator(".plainodds-pinned")).not_to_have_text("")
    nothing_was_carried_out(notebook)


@pytest.mark.parametrize("kind", VIEWS)
def test_the_code_shows_the_names_and_carries_nothing_out(notebook, kind):
    view = ViewOnPage(notebook.page, kind)
    view.button("Show the code").click()
    expect(view.code).to_contain_text("<img src=x onerror=window.hacked=1>")
    nothing_was_carried_out(notebook)


def test_an_answer_at_the_end_of_a_cell_carries_nothing_out(notebook):
    expect(notebook.outputs.last).to_contain_text("<img src=x onerror=window.hacked=1>")
    nothing_was_carried_out(notebook)
