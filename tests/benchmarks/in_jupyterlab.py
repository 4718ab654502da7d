"""From a key press to the painted picture in real JupyterLab, against a bare slider.

    python -m tests.benchmarks.in_jupyterlab

The bare slider redraws a one-line matplotlib figure in an `Image`, in the same page.
"""

import tempfile
from pathlib import Path

from playwright.sync_api import sync_playwright

from tests.browser import chromium
from tests.browser.bare import BARE, ms_beside_bare
from tests.browser.lab import LabServer
from tests.browser.notebooks import put_notebook
from tests.browser.page import NotebookPage, opened
from tests.browser.views import ViewOnPage

__all__ = ["measured"]

TARGET = 1.5
_ROUNDS = 10
_ROOT = Path(__file__).parents[2]

_MODEL = f"""
import sys
sys.path.insert(0, {str(_ROOT)!r})

import plainodds as po
from tests.benchmarks.models import fit_of_27_columns

fit = fit_of_27_columns()
"""

# one slider of each view, and the question that it edits
_CELLS = {
    "profile": "po.ProfileView(fit)",
    "curve": (
        "po.CurveView(fit, fit.curve('age_years', by='material', "
        "others={'pressure_m': 60.0}).question)"
    ),
}
_FIELDS = {"profile": "age_years", "curve": "held-pressure_m"}


def measured(shown: NotebookPage, kind: str) -> tuple[float, float]:
    """Median milliseconds of the bare slider and of a view's."""
    view = ViewOnPage(shown.page, kind)
    place = view.root.locator(".plainodds-picture")
    return ms_beside_bare(shown, view.handle(_FIELDS[kind]), place, _ROUNDS)


def main() -> None:
    """Measure both views that have sliders and print the ratios."""
    with (
        tempfile.TemporaryDirectory() as folder,
        LabServer(Path(folder) / "home") as lab,
        sync_playwright() as playwright,
    ):
        browser = chromium.launch(playwright)
        path = put_notebook(lab, _MODEL, BARE, *_CELLS.values())
        with opened(browser, lab, path, pixel_ratio=2) as shown:
            shown.run_all()
            shown.wait_until_drawn()
            for kind in _CELLS:
                bare, live = measured(shown, kind)
                print(
                    f"{kind}: key to picture {live:.0f} ms; bare slider {bare:.0f} ms, "
                    f"ratio {live / bare:.2f} (target {TARGET})"
                )
        browser.close()


if __name__ == "__main__":
    main()
