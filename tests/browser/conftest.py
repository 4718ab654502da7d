"""A browser and a JupyterLab for all browser tests; each test opens pages of its own."""

from pathlib import Path

import pytest
from playwright.sync_api import expect, sync_playwright

from tests.browser import chromium
from tests.browser.lab import LabServer

HERE = Path(__file__).parent

# a busy machine may be slow: what is tested is what appears, not how soon
expect.set_options(timeout=20_000)


def pytest_collection_modifyitems(items):
    for item in items:
        if HERE in item.path.parents:
            item.add_marker(pytest.mark.browser)


@pytest.fixture(scope="session")
def browser():
    if chromium.find() is None:
        (pytest.fail if chromium.REQUIRED else pytest.skip)(chromium.MISSING)
    with sync_playwright() as playwright:
        started = chromium.launch(playwright)
        yield started
        started.close()


@pytest.fixture(scope="session")
def lab(browser, tmp_path_factory):
    with LabServer(tmp_path_factory.mktemp("lab") / "home") as running:
        yield running
