"""The demo notebook in real JupyterLab, light and dark, wide and narrow, fine and coarse."""

import shutil
from pathlib import Path

import pytest
from playwright.sync_api import expect

from tests.browser.page import opened
from tests.browser.views import ViewOnPage

DEMO = Path(__file__).parents[2] / "notebooks" / "tessel_bay.ipynb"
KINDS = ("odds", "curve", "profile")

# contrast ratio of WCAG 2 for each text in a view against what is painted behind it
_CONTRASTS = """root => {
    const channels = colour => colour.match(/[\\d.]+/g).map(Number);
    const light = colour => {
        const [r, g, b] = channels(colour).slice(0, 3).map(each => each / 255).map(
            each => each <= 0.03928 ? each / 12.92 : ((each + 0.055) / 1.055) ** 2.4);
        return 0.2126 * r + 0.7152 * g + 0.0722 * b;
    };
    const behind = element => {
        for (let each = element; each; each = each.parentElement) {
            const colour = getComputedStyle(each).backgroundColor;
            const alpha = channels(colour)[3] ?? 1;
            if (alpha > 0.99) return colour;
        }
        return 'rgb(255, 255, 255)';
    };
    const said = [...root.querySelectorAll('*')].filter(each =>
        each.checkVisibility() && !each.disabled && !each.closest(':disabled')
        && [...each.childNodes].some(node => node.nodeType === 3 && node.data.trim()));
    return said.map(each => {
        const [ink, paper] = [light(getComputedStyle(each).color), light(behind(each))];
        const ratio = (Math.max(ink, paper) + 0.05) / (Math.min(ink, paper) + 0.05);
        return [each.innerText.slice(0, 40), Math.round(ratio * 100) / 100];
    });
}"""


@pytest.fixture(scope="module", params=["light", "dark"])
def shown(request, browser, lab):
    lab.use_theme(request.param)
    path = lab.root / f"{request.param}.ipynb"
    shutil.copy(DEMO, path)
    try:
        with opened(browser, lab, path, pixel_ratio=2) as notebook:
            notebook.run_all()
            notebook.wait_until_drawn()
            yield notebook
    finally:
        lab.use_theme("light")


@pytest.mark.parametrize("kind", KINDS)
def test_each_view_shows_its_picture_words_and_table(shown, kind):
    view = ViewOnPage(shown.page, kind)
    expect(view.picture).to_be_visible()
    expect(view.words).to_contain_text("a burst this winter")
    assert view.table.locator("tbody tr").count() > 3
    expect(view.problem).to_have_text("")


@pytest.mark.parametrize("kind", KINDS)
def test_text_stands_out_from_its_background(shown, kind):
    contrasts = ViewOnPage(shown.page, kind).root.evaluate(_CONTRASTS)
    assert len(contrasts) > 10
    assert [each for each in contrasts if each[1] < 4.5] == []


@pytest.mark.parametrize("kind", KINDS)
def test_the_picture_has_two_dots_for_each_pixel(shown, kind):
    picture = ViewOnPage(shown.page, kind).picture
    dots, pixels = picture.evaluate(
        "each => [each.naturalWidth, each.getBoundingClientRect().width]"
    )
    assert dots >= 2 * pixels - 2


@pytest.mark.parametrize("width", [430, 700, 1100])
def test_nothing_is_cut_off(shown, width):
    shown.hide_sidebar()
    shown.set_notebook_width(width)
    for kind in KINDS:
        root = ViewOnPage(shown.page, kind).root
        cell = shown.page.locator(".jp-OutputArea-output", has=root)
        assert shown.overflowing(root) == [], (kind, width)
        assert shown.overflowing(cell) == [], (kind, width)
        hidden = root.evaluate(
            """root => [...root.querySelectorAll('*')].filter(each => {
                const style = getComputedStyle(each);
                return each.checkVisibility() && style.overflowX !== 'visible'
                    && !['SELECT', 'INPUT', 'PRE'].includes(each.tagName)
                    && each.scrollWidth > each.clientWidth + 1;
            }).map(each => each.className)"""
        )
        assert hidden == [], (kind, width)
