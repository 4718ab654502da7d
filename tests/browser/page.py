"""One notebook open in JupyterLab, and what a person does with it."""

import re
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

from playwright.sync_api import Browser, Locator, Page, expect

from tests.browser.lab import LabServer

__all__ = ["TALL", "NotebookPage", "opened"]

TALL = 6000
"""Pixels of height: JupyterLab keeps only cells that can be seen in the page."""

_KERNEL_MS = 90_000
_RUN_MS = 180_000

# the indicator says "idle" too while there is no kernel yet, so its name is looked at as well
_KERNEL_IS_IDLE = """() => {
    const name = document.querySelector('.jp-KernelName');
    const state = document.querySelector('.jp-Notebook-ExecutionIndicator');
    return name && name.innerText && name.innerText !== 'No Kernel'
        && state && state.dataset.status === 'idle';
}"""

_RUN_HAS_ENDED = """() => {
    const cells = [...document.querySelectorAll('.jp-NotebookPanel .jp-CodeCell')];
    const ran = cell => /\\[\\d+\\]/.test(cell.querySelector('.jp-InputPrompt')?.innerText ?? '');
    const broken = document.querySelector('.jp-NotebookPanel')?.innerText.includes(
        'Traceback (most recent call last)');
    return broken || (cells.length > 0 && cells.every(ran));
}"""

_EVERYTHING_IS_DRAWN = """() => {
    const shown = document.querySelector('.jp-NotebookPanel');
    const pictures = [...shown.querySelectorAll('.jp-OutputArea-output img')];
    const views = [...shown.querySelectorAll('.jp-OutputArea-output')].filter(
        each => each.dataset.mimeType === 'application/vnd.jupyter.widget-view+json');
    return pictures.every(each => each.complete && each.naturalWidth > 0)
        && views.every(each => each.querySelector('.jupyter-widgets'));
}"""


class NotebookPage:
    """A notebook in a page of its own."""

    def __init__(self, page: Page) -> None:
        self.page = page

    @property
    def panel(self) -> Locator:
        """The notebook without JupyterLab's frame."""
        return self.page.locator(".jp-NotebookPanel:not(.lm-mod-hidden) .jp-WindowedPanel-outer")

    @property
    def outputs(self) -> Locator:
        """What the cells show, one output each."""
        return self.panel.locator(".jp-OutputArea-output")

    @property
    def tracebacks(self) -> Locator:
        """What cells that failed show."""
        return self.outputs.filter(has_text="Traceback (most recent call last)")

    def wait_for_kernel(self) -> None:
        """Wait until a kernel is connected and has nothing to do."""
        self.page.wait_for_function(_KERNEL_IS_IDLE, timeout=_KERNEL_MS)

    def menu(self, title: str, command: str) -> None:
        """Choose an entry of the menu bar."""
        bar = self.page.locator(".lm-MenuBar-itemLabel")
        bar.get_by_text(title, exact=True).click()
        self.page.locator(f'.lm-Menu-item[data-command="{command}"]').click()

    def run_all(self) -> None:
        """Run every cell and wait until the last has run; a traceback fails the test."""
        self.wait_for_kernel()
        self.menu("Run", "runmenu:run-all")
        self.page.wait_for_function(_RUN_HAS_ENDED, timeout=_RUN_MS)
        self.wait_for_kernel()
        tracebacks = self.tracebacks.all_inner_texts()
        if tracebacks:
            raise AssertionError("\n\n".join(tracebacks))

    def run_in_new_cell(self, source: str) -> None:
        """Add a cell at the end, run it and wait until it has run."""
        cells = self.panel.locator(".jp-CodeCell")
        count = cells.count()
        cells.last.locator(".jp-InputPrompt").click()
        self.page.keyboard.press("b")
        expect(cells).to_have_count(count + 1)
        cells.last.locator(".cm-content").click()
        self.page.keyboard.insert_text(source)
        self.page.keyboard.press("Control+Enter")
        expect(cells.last.locator(".jp-InputPrompt")).to_have_text(re.compile(r"\[\d+\]"))
        self.page.keyboard.press("Escape")

    def run_last_cell_again(self) -> None:
        """Run the last cell once more and wait until it has run."""
        prompt = self.panel.locator(".jp-CodeCell").last.locator(".jp-InputPrompt")
        before = prompt.inner_text()
        prompt.click()
        # by the menu, since the focus may be in a box of text that keeps its keys
        self.menu("Run", "notebook:run-cell")
        another = re.compile(rf"^(?!{re.escape(before)})\[\d+\]:?$")
        expect(prompt).to_have_text(another, timeout=_RUN_MS)
        self.wait_for_kernel()

    def wait_until_drawn(self) -> None:
        """Wait until every picture is loaded and no widget is still to come."""
        self.page.wait_for_function(_EVERYTHING_IS_DRAWN, timeout=_RUN_MS)

    def save(self) -> None:
        """Save the notebook and wait until its tab is clean."""
        self.menu("File", "docmanager:save")
        dirty = self.page.locator("#jp-main-dock-panel .lm-TabBar-tab.jp-mod-dirty")
        expect(dirty).to_have_count(0)

    def set_notebook_width(self, width_px: int) -> None:
        """Make the window as wide as leaves the notebook panel this width."""
        height = self._viewport()["height"]
        # JupyterLab's own frame changes with the width of the window, so look again
        for _ in range(4):
            now = self.page.locator(".jp-NotebookPanel:not(.lm-mod-hidden)").bounding_box()
            assert now is not None
            missing = width_px - round(now["width"])
            if missing == 0:
                return
            wanted = self._viewport()["width"] + missing
            self.page.set_viewport_size({"width": wanted, "height": height})
            self.page.wait_for_function(f"window.innerWidth === {wanted}")
            self.page.evaluate(
                "new Promise(done => requestAnimationFrame(() => requestAnimationFrame(done)))"
            )
        raise AssertionError(f"the notebook panel cannot be made {width_px} px wide")

    def hide_sidebar(self) -> None:
        """Give the file browser's room to the notebook."""
        sidebar = self.page.locator("#jp-left-stack")
        if sidebar.is_visible():
            self.page.keyboard.press("Control+b")
        expect(sidebar).to_be_hidden()

    def overflowing(self, inside: Locator) -> list[str]:
        """Descriptions of elements that stick out of `inside` to the right."""
        return list(
            inside.evaluate(
                """root => {
                    const right = root.getBoundingClientRect().right + 1;
                    const out = [...root.querySelectorAll('*')].filter(each => {
                        const box = each.getBoundingClientRect();
                        return box.width > 0 && box.height > 0 && box.right > right;
                    });
                    return out.map(each => each.tagName + '.' + each.getAttribute('class'));
                }"""
            )
        )

    def press(self, on: Locator, key: str, times: int = 1) -> None:
        """Put the focus on an element and press a key there."""
        on.focus()
        for _ in range(times):
            self.page.keyboard.press(key)

    def drag(self, handle: Locator, by_px: float) -> None:
        """Drag a slider's handle sideways with the mouse."""
        handle.scroll_into_view_if_needed()
        box = handle.bounding_box()
        assert box is not None
        x, y = box["x"] + box["width"] / 2, box["y"] + box["height"] / 2
        self.page.mouse.move(x, y)
        self.page.mouse.down()
        self.page.mouse.move(x + by_px / 2, y, steps=4)
        self.page.mouse.move(x + by_px, y, steps=4)
        self.page.mouse.up()

    def _viewport(self) -> dict[str, int]:
        size = self.page.viewport_size
        assert size is not None
        return {"width": size["width"], "height": size["height"]}


@contextmanager
def opened(
    browser: Browser,
    lab: LabServer,
    notebook: Path,
    *,
    width: int = 1280,
    pixel_ratio: float = 1,
) -> Iterator[NotebookPage]:
    """Open a notebook that lies in the server's root, and close it with its kernel."""
    context = browser.new_context(
        viewport={"width": width, "height": TALL}, device_scale_factor=pixel_ratio
    )
    try:
        page = context.new_page()
        page.goto(lab.url(notebook.relative_to(lab.root).as_posix()))
        shown = NotebookPage(page)
        shown.wait_for_kernel()
        yield shown
    finally:
        context.close()
        lab.stop_kernels()
