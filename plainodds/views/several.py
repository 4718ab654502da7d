"""Controls for several values at once: boxes to tick, or numbers in a line of text."""

from __future__ import annotations

import re
from collections.abc import Callable, Sequence
from typing import Any

import ipywidgets as widgets

from plainodds.errors import QuestionRefused
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.labels import predictor_name, value_label
from plainodds.values import Scalar
from plainodds.views.controls import Control, Edited
from plainodds.views.parts import titled

__all__ = ["NumbersControl", "TicksControl", "values_control"]


class TicksControl:
    """One box to tick for each of several things; all of them count as none chosen.

    Parameters
    ----------
    title : str
    options : sequence of (label, value)
    none : str
        What is said where nothing is left ticked.
    """

    def __init__(self, title: str, options: Sequence[tuple[str, Any]], none: str) -> None:
        self._values = [value for _, value in options]
        self._none = none
        self.boxes = [
            widgets.Checkbox(value=True, description=label, indent=False) for label, _ in options
        ]
        ticks = widgets.HBox(self.boxes)
        ticks.add_class("plainodds-ticks")
        self.widget = titled(title, ticks)

    @property
    def value(self) -> tuple[Any, ...]:
        """The values ticked; empty where all are."""
        ticked = [value for box, value in zip(self.boxes, self._values, strict=True) if box.value]
        return () if len(ticked) == len(self.boxes) else tuple(ticked)

    def on_edit(self, callback: Edited) -> None:
        """Call back on each tick."""
        for box in self.boxes:
            box.observe(lambda change: callback(self, change.owner), "value")

    def take(self, source: widgets.Widget) -> str:
        """Refuse to be left with nothing."""
        if not any(box.value for box in self.boxes):
            raise QuestionRefused(self._none)
        return ""

    def show(self, value: Sequence[Any]) -> None:
        """Tick these values, or all where there are none."""
        for box, held in zip(self.boxes, self._values, strict=True):
            box.value = not value or held in value


class NumbersControl:
    """A line of text for several numbers.

    Parameters
    ----------
    label : str
    default : sequence of numbers
        Shown where no values are asked for.
    """

    def __init__(self, label: str, default: Sequence[float]) -> None:
        self._default = tuple(float(each) for each in default)
        self.widget = widgets.Text(
            value=_listed(default), description=label, continuous_update=False
        )
        self.widget.add_class("plainodds-text")

    @property
    def value(self) -> tuple[float, ...]:
        """The numbers entered; empty where they are the default."""
        numbers = _numbers(self.widget.value)
        return () if numbers == self._default else numbers

    def on_edit(self, callback: Edited) -> None:
        """Call back on each change."""
        self.widget.observe(lambda change: callback(self, change.owner), "value")

    def take(self, source: widgets.Widget) -> str:
        """Refuse what is not a number; an empty line is the default again."""
        numbers = _numbers(self.widget.value) or self._default
        self.widget.value = _listed(numbers)
        return ""

    def show(self, value: Sequence[Scalar]) -> None:
        """Show numbers, or the default where there are none."""
        self.widget.value = _listed([float(each) for each in value] or self._default)


def _listed(numbers: Sequence[float]) -> str:
    return ", ".join(f"{float(each):.10g}" for each in numbers)


def _numbers(text: str) -> tuple[float, ...]:
    pieces = [piece for piece in re.split(r"[,;\s]+", text.replace("−", "-")) if piece]
    numbers = []
    for piece in pieces:
        try:
            numbers.append(float(piece))
        except ValueError:
            raise QuestionRefused(
                f"“{piece}” is not a number. Write numbers with commas between them: 20, 40.5, 60."
            ) from None
    return tuple(dict.fromkeys(numbers))


def values_control(
    facts: PredictorFacts, title: Callable[[str], str], default: Sequence[Scalar]
) -> Control:
    """The control for several values of one predictor.

    Parameters
    ----------
    facts : PredictorFacts
    title : callable
        Makes a title of the predictor's name.
    default : sequence
        The values shown where none are asked for; of levels that is always all.
    """
    if facts.is_number:
        unit = f" ({facts.unit})" if facts.unit else ""
        label = f"{title(predictor_name(facts))}{unit}"
        return NumbersControl(label, [float(each) for each in default])
    options = [(value_label(facts, level), level) for level in facts.levels]
    none = f"Keep at least one value of {predictor_name(facts)}."
    return TicksControl(title(predictor_name(facts)), options, none)
