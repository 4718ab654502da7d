"""An answer at the end of a cell shows its picture and its words."""

from base64 import b64decode

import IPython.core.interactiveshell
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds import display


@pytest.fixture(scope="module")
def fit():
    mains = po.demo.tessel_bay(rows=600)
    return po.FittedLogit(smf.logit("burst ~ age_years + material", mains).fit(disp=0))


@pytest.fixture(params=["odds", "curve", "profile"])
def answer(fit, request):
    return fit.curve("age_years") if request.param == "curve" else getattr(fit, request.param)()


def test_an_answer_has_a_picture_and_words_for_every_taste(answer):
    data, metadata = display.bundle(answer)
    png = b64decode(data["image/png"])
    assert png.startswith(b"\x89PNG")
    assert data["text/plain"] == str(po.words(answer))
    assert f'alt="{po.alternative(answer)}"' in data["text/html"]
    size = metadata["image/png"]
    # twice as fine as it is shown, to the pixel that rounding takes
    assert int.from_bytes(png[16:20], "big") == pytest.approx(2 * size["width"], abs=1)
    assert f'width="{size["width"]}"' in data["text/html"]


def test_a_running_shell_shows_answers_so(fit, monkeypatch):
    shell = IPython.core.interactiveshell.InteractiveShell()
    monkeypatch.setattr(display, "get_ipython", lambda: shell)
    display.register()
    data, _ = shell.display_formatter.format(fit.profile())
    assert sorted(data) == ["image/png", "text/html", "text/plain"]


def test_without_a_shell_nothing_is_registered(monkeypatch):
    monkeypatch.setattr(display, "get_ipython", lambda: None)
    display.register()
    shell = IPython.core.interactiveshell.InteractiveShell()
    data, _ = shell.display_formatter.format(po.Outcome())
    assert sorted(data) == ["text/plain"]
