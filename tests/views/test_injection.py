"""A column and a level named like HTML execute nothing, wherever they are shown."""

from html.parser import HTMLParser

import ipywidgets as widgets
import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.display import bundle
from plainodds.views.style import KEYS

HOSTILE = "<img src=x onerror=alert(1)>"
OWN = {"div", "p", "ul", "li", "h4", "strong", "span", "b", "style", "pre", "code", "a", "img"}
VIEWS = [
    po.OddsView,
    po.CurveView,
    po.ProfileView,
    po.EffectsView,
    po.ChangeView,
    po.PairView,
    po.SoundnessView,
]
FOLDED = {"details", "summary"}
TABLE = {"table", "caption", "thead", "tbody", "tr", "th", "td"}


class Found(HTMLParser):
    """What a browser would make of markup."""

    def __init__(self, text):
        super().__init__()
        self.elements, self.text = [], ""
        self.feed(text)

    def handle_starttag(self, tag, attributes):
        self.elements.append((tag, dict(attributes)))

    def handle_data(self, data):
        self.text += data


@pytest.fixture(scope="module")
def fit():
    random = np.random.default_rng(1)
    data = pd.DataFrame(
        {
            "y": random.integers(2, size=300),
            HOSTILE: random.choice([HOSTILE, "other", "third"], size=300),
            "x": random.normal(size=300),
        }
    )
    result = smf.logit(f"y ~ Q('{HOSTILE}') * x", data).fit(disp=0)
    return po.FittedLogit(
        result,
        predictors={"x": po.Predictor(label=f"x {HOSTILE}", unit=HOSTILE)},
        outcome=po.Outcome(event=HOSTILE, case=HOSTILE, cases=HOSTILE),
    )


def widgets_of(view):
    found, waiting = [], [view]
    while waiting:
        widget = waiting.pop()
        found.append(widget)
        waiting += getattr(widget, "children", ())
    return found


def is_harmless(markup):
    for tag, attributes in Found(markup).elements:
        assert tag in OWN | TABLE | FOLDED
        scripts = {name: held for name, held in attributes.items() if name.startswith("on")}
        assert scripts == {} or (tag == "style" and scripts == {"onload": KEYS})
        if tag == "img":
            assert attributes["src"].startswith("data:image/png;base64,")


def opened(fit, kind):
    """A view with everything open that it can show."""
    view = kind(fit)
    if kind is po.CurveView:
        view.question = fit.curve("x", by=HOSTILE, others={}).question
    if kind is po.ProfileView:
        view.question = fit.profile({"x": 40.0, HOSTILE: HOSTILE}, against={"x": 1.0}).question
    if kind is po.EffectsView:
        view.question = fit.effects(by=HOSTILE, where={HOSTILE: HOSTILE}).question
    if kind is po.ChangeView:
        view.question = fit.change({HOSTILE: (HOSTILE, "other"), "x": (0.0, 1.0)}).question
        view.question = fit.change(HOSTILE, HOSTILE, "other", others={}).question
    if kind is po.PairView:
        levels = (HOSTILE, "other")
        view.question = fit.pair("x", HOSTILE, a_values=(0.0, 1.0), b_values=levels).question
    if kind is po.SoundnessView:
        for card in view._list.cards:
            card.button.click()
        view.question = fit.soundness(show="levels", groups=HOSTILE).question
    view._extras.code_button.click()
    return view


@pytest.mark.parametrize("kind", VIEWS)
def test_nothing_in_a_view_executes(fit, kind, page):
    view = opened(fit, kind)
    places = [each for each in widgets_of(view) if isinstance(each, widgets.HTML)]
    for place in places:
        is_harmless(place.value)
    read = " ".join(Found(place.value).text for place in places)
    assert HOSTILE in read


@pytest.mark.parametrize("kind", VIEWS)
def test_names_of_controls_are_text(fit, kind, page):
    described = [each for each in widgets_of(opened(fit, kind)) if getattr(each, "description", "")]
    assert any(HOSTILE in each.description for each in described)
    assert not any(getattr(each, "description_allow_html", False) for each in described)
    for each in widgets_of(opened(fit, kind)):
        assert not any("<" in name or " " in name for name in each._dom_classes)


@pytest.mark.parametrize("kind", VIEWS)
def test_a_saved_view_executes_nothing(fit, kind, page):
    is_harmless(opened(fit, kind)._repr_mimebundle_()["text/html"])


def test_an_error_about_it_executes_nothing(fit, page):
    view = po.ProfileView(fit)
    page.change(view.controls["x"].box, value=5000.0)
    assert HOSTILE in Found(view._messages.value).text
    is_harmless(view._messages.value)


@pytest.mark.parametrize("ask", ["odds", "profile", "effects", "soundness"])
def test_an_answer_in_a_cell_executes_nothing(fit, ask):
    data, _ = bundle(getattr(fit, ask)())
    is_harmless(data["text/html"])
    assert HOSTILE in Found(data["text/html"]).text
