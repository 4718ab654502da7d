"""German tests write German."""

import pytest

import plainodds as po


@pytest.fixture(autouse=True)
def german():
    with po.writing("de"):
        yield
