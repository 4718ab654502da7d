"""A control for one of a few things, all of them in sight: a switch."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import ipywidgets as widgets

from plainodds.views.controls import Edited

__all__ = ["EitherControl"]


class EitherControl:
    """One round button for each of a few values, with a name before them.

    Parameters
    ----------
    label : str
    options : sequence of (label, value)
        Their labels differ.
    value : any
        The value chosen at the start.
    """

    def __init__(self, label: str, options: Sequence[tuple[str, Any]], value: Any) -> None:
        self._values = [held for _, held in options]
        self.widget = widgets.RadioButtons(
            options=[name for name, _ in options],
            index=self._values.index(value),
            description=label,
            orientation="horizontal",
        )
        self.widget.add_class("plainodds-either")

    @property
    def value(self) -> Any:
        """The value chosen."""
        return self._values[self.widget.index]

    def on_edit(self, callback: Edited) -> None:
        """Call back on each choice."""
        self.widget.observe(lambda change: callback(self, change.owner), "index")

    def take(self, source: widgets.Widget) -> str:
        """Whatever is chosen can be had."""
        return ""

    def show(self, value: Any) -> None:
        """Show a value."""
        self.widget.index = self._values.index(value)
