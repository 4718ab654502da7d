"""Small widgets that every view is put together from, each with a class of its own."""

from __future__ import annotations

from collections.abc import Sequence

import ipywidgets as widgets

from plainodds.views import markup

__all__ = ["block", "fill", "html", "titled"]


def html(name: str) -> widgets.HTML:
    """An empty place for markup."""
    place = widgets.HTML()
    place.add_class(f"plainodds-{name}")
    return place


def block(*children: widgets.Widget, name: str = "block") -> widgets.VBox:
    """Widgets one beneath the other."""
    box = widgets.VBox(children)
    box.add_class(f"plainodds-{name}")
    return box


def fill(place: widgets.Box, children: Sequence[widgets.Widget]) -> None:
    """Put widgets into a place; the same ones change nothing."""
    if tuple(place.children) != tuple(children):
        place.children = tuple(children)


def titled(title: str, *children: widgets.Widget, name: str = "block") -> widgets.VBox:
    """Widgets under a title of their own."""
    heading = html("title")
    heading.value = markup.element("span", title)
    return block(heading, *children, name=name)
