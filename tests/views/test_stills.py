"""What a saved notebook keeps of a view."""

import io
from base64 import b64decode

import IPython.core.interactiveshell
import pytest
from PIL import Image

import plainodds as po
from plainodds.views.stills import on_paper
from tests.views.frontend import text_of

WIDGET = "application/vnd.jupyter.widget-view+json"
VIEWS = [po.OddsView, po.CurveView, po.ProfileView]


@pytest.mark.parametrize("kind", VIEWS)
def test_a_view_is_live_and_also_a_picture_with_words(kind, fit, page):
    view = kind(fit)
    data = view._repr_mimebundle_()
    assert data[WIDGET]["model_id"] == view.model_id
    assert b64decode(data["image/png"]).startswith(b"\x89PNG")
    assert f'src="data:image/png;base64,{data["image/png"]}"' in data["text/html"]
    assert data["text/plain"].startswith(f"<{kind.__name__}: Chance of a burst")
    assert "The chance" in text_of(data["text/html"]) or "chance of a burst" in text_of(
        data["text/html"]
    )


def test_the_still_says_that_it_does_not_follow(fit, page):
    data = po.CurveView(fit)._repr_mimebundle_()
    assert "As it was when the cell was run" in text_of(data["text/html"])


def test_the_still_has_white_paper_and_fewer_bytes(fit, page):
    view = po.CurveView(fit)
    png = view._stage.shot.png
    still = on_paper(png)
    assert len(still) < 0.6 * len(png)
    shown, before = Image.open(io.BytesIO(still)), Image.open(io.BytesIO(png))
    assert shown.size == before.size
    assert before.getpixel((0, 0))[3] == 0
    assert shown.convert("RGB").getpixel((0, 0)) == (255, 255, 255)


def test_a_cell_shows_the_view_and_keeps_a_still_out_of_sight(fit, page, monkeypatch):
    shown = []
    monkeypatch.setattr("plainodds.views.base.display", lambda data, raw: shown.append((data, raw)))
    po.ProfileView(fit)._ipython_display_()
    (live, _), (still, raw) = shown
    assert raw is True
    assert WIDGET in live
    assert WIDGET not in still
    assert "display:none" in still["text/html"]
    assert "display: block !important" in still["text/html"]


def test_ipython_has_no_other_way_to_show_it(fit, page):
    shell = IPython.core.interactiveshell.InteractiveShell()
    view = po.ProfileView(fit)
    assert shell.display_formatter.ipython_display_formatter(view) is True
