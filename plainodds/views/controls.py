"""Controls, one class per kind of thing that is edited.

A control knows widgets and values, and nothing of questions. What a person does to it
arrives at `on_edit` callbacks; `take` then settles what was entered, and `show` puts a
value on display. Neither guards against the changes that it makes itself: the view that
owns the controls does that under its lock.
"""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Iterable, Sequence
from typing import Any, Protocol

import ipywidgets as widgets

from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.labels import axis_title, predictor_label, value_label
from plainodds.phrases.numbers import quantity
from plainodds.values import Scalar

__all__ = [
    "BoxControl",
    "ChoiceControl",
    "Control",
    "NumberControl",
    "SwitchControl",
    "cleaned",
    "limits",
    "predictor_control",
    "settled",
    "slider_range",
    "slug",
]

Edited = Callable[["Control", widgets.Widget], None]


class Control(Protocol):
    """What a view needs to know of a control."""

    widget: widgets.DOMWidget

    @property
    def value(self) -> Any:
        """What is entered."""

    def on_edit(self, callback: Edited) -> None:
        """Call back with the control and the widget that was changed."""

    def take(self, source: widgets.Widget) -> str:
        """Settle what was entered at one of the widgets; say what had to be changed."""

    def show(self, value: Any) -> None:
        """Put a value on display."""


def slug(name: str, taken: Iterable[str] = ()) -> str:
    """A name as part of a CSS class, different from those that are taken.

    Examples
    --------
    >>> slug("age_years"), slug("a b<c>"), slug("a b", taken=["a-b"])
    ('age_years', 'a-b-c', 'a-b-2')
    """
    used = set(taken)
    plain = re.sub(r"[^A-Za-z0-9_]+", "-", name).strip("-") or "predictor"
    found, number = plain, 1
    while found in used:
        number += 1
        found = f"{plain}-{number}"
    return found


def slider_range(facts: PredictorFacts) -> tuple[float, float, float]:
    """Lowest, highest and step of a slider: round values within what may be asked.

    The number box beside it takes every value between `limits`, so nothing is lost
    where the data begin or end at a crooked figure.
    """
    low, high = limits(facts)
    step = facts.step / 10
    if facts.kind == "whole number":
        step = max(1.0, float(round(step)))
    first, last = (
        cleaned(math.ceil(low / step - 1e-9) * step),
        cleaned(math.floor(high / step + 1e-9) * step),
    )
    if last - first < 4 * step:
        # a range so narrow that round values would leave the slider nowhere to go
        step = 1.0 if facts.kind == "whole number" else (high - low) / 100
        first, last = low, high
    return first, last, cleaned(step)


def limits(facts: PredictorFacts) -> tuple[float, float]:
    """The range that is offered, within what can be computed."""
    return max(facts.offered[0], facts.allowed[0]), min(facts.offered[1], facts.allowed[1])


def settled(facts: PredictorFacts, ends: tuple[float, float], entered: float) -> tuple[float, str]:
    """The number that can be had for the one entered, and what had to be changed.

    Parameters
    ----------
    facts : PredictorFacts
    ends : (float, float)
        What may be asked.
    entered : float
    """
    low, high = ends
    number, why = entered, ""
    if not low <= entered <= high:
        why = f"goes from {quantity(low)} to {value_label(facts, high)} here"
        number = min(max(entered, low), high)
    elif facts.kind == "whole number" and not entered.is_integer():
        why = "takes whole numbers"
        number = min(max(float(round(entered)), low), high)
    if not why:
        return number, ""
    wanted = value_label(facts, entered)
    return number, f"{predictor_label(facts)} {why}; {wanted} was set to {quantity(number)}."


def cleaned(number: float) -> float:
    """A slider's value without the noise of its steps."""
    return float(f"{number:.10g}")


class NumberControl:
    """A number box with its name, and a slider beneath it."""

    def __init__(self, facts: PredictorFacts) -> None:
        self._facts = facts
        low, high, step = slider_range(facts)
        start = float(facts.typical)
        self._low, self._high = limits(facts)
        self.box = widgets.FloatText(value=start, step=step, description=axis_title(facts))
        self.slider = widgets.FloatSlider(
            value=min(max(start, low), high), min=low, max=high, step=step, readout=False
        )
        self.widget = widgets.VBox([self.box, self.slider])
        self.widget.add_class("plainodds-number-control")

    @property
    def value(self) -> Scalar:
        """The number in the box, whole where the predictor is."""
        number = float(self.box.value)
        return int(number) if self._facts.kind == "whole number" else number

    def on_edit(self, callback: Edited) -> None:
        """Call back on each change of box or slider."""
        for each in (self.box, self.slider):
            each.observe(lambda change: callback(self, change.owner), "value")

    def take(self, source: widgets.Widget) -> str:
        """Let the box follow the slider, or the slider the box."""
        if source is self.slider:
            # the slider itself stays as it is: its user may be ahead of the kernel
            self.box.value = cleaned(self.slider.value)
            return ""
        entered = float(self.box.value)
        number, remark = settled(self._facts, (self._low, self._high), entered)
        if number != entered:
            self.box.value = number
        self.slider.value = number
        return remark

    def show(self, value: Scalar) -> None:
        """Show a number; a range that is too narrow for it gives way."""
        number = float(value)
        self._low, self._high = min(self._low, number), max(self._high, number)
        self.slider.max = max(self.slider.max, number)
        self.slider.min = min(self.slider.min, number)
        self.box.value = number
        self.slider.value = number


class BoxControl:
    """A number box alone, for a step or one of two values."""

    def __init__(self, label: str, value: float) -> None:
        self.widget = widgets.FloatText(value=value, description=label, step=None)

    @property
    def value(self) -> float:
        """The number in the box."""
        return float(self.widget.value)

    def on_edit(self, callback: Edited) -> None:
        """Call back on each change."""
        self.widget.observe(lambda change: callback(self, change.owner), "value")

    def take(self, source: widgets.Widget) -> str:
        """Whether the number will do is for the question to say."""
        return ""

    def show(self, value: float) -> None:
        """Show a number."""
        self.widget.value = float(value)


class ChoiceControl:
    """A drop-down of named values."""

    def __init__(self, label: str, options: Sequence[tuple[str, Any]], value: Any) -> None:
        self._options: tuple[tuple[str, Any], ...] = ()
        self.widget = widgets.Dropdown(description=label)
        self.offer(options, value)

    @property
    def value(self) -> Any:
        """The value chosen."""
        return self._options[self.widget.index][1]

    def on_edit(self, callback: Edited) -> None:
        """Call back on each choice."""
        self.widget.observe(lambda change: callback(self, change.owner), "index")

    def take(self, source: widgets.Widget) -> str:
        """Whatever is chosen can be had."""
        return ""

    def offer(self, options: Sequence[tuple[str, Any]], value: Any) -> None:
        """Offer other values, and show one of them; the same values change nothing.

        What a person has just chosen may be waiting for its turn on another thread: an
        offer of the same values must not undo it.
        """
        if tuple(options) == self._options:
            return
        self._options = tuple(options)
        # places instead of values: True equals 1, and names may repeat
        self.widget.options = [(label, place) for place, (label, _) in enumerate(options)]
        self.show(value)

    def show(self, value: Any) -> None:
        """Show a value; one that was not on offer joins the others."""
        places = [place for place, (_, held) in enumerate(self._options) if _same(held, value)]
        if not places:
            self.offer((*self._options, (str(value), value)), value)
            return
        self.widget.index = places[0]


def _same(one: Any, other: Any) -> bool:
    return type(one) is type(other) and bool(one == other)


class SwitchControl:
    """A box to tick, for a predictor that is yes or no."""

    def __init__(self, facts: PredictorFacts) -> None:
        self._levels = facts.levels
        self.widget = widgets.Checkbox(
            value=facts.levels.index(facts.typical) == 1,
            description=predictor_label(facts),
            indent=False,
        )

    @property
    def value(self) -> Scalar:
        """The level that stands for yes, or the one for no."""
        return self._levels[int(self.widget.value)]

    def on_edit(self, callback: Edited) -> None:
        """Call back on each tick."""
        self.widget.observe(lambda change: callback(self, change.owner), "value")

    def take(self, source: widgets.Widget) -> str:
        """Both can be had."""
        return ""

    def show(self, value: Scalar) -> None:
        """Show a level."""
        self.widget.value = self._levels.index(value) == 1


def predictor_control(facts: PredictorFacts) -> Control:
    """The control that fits a predictor's kind."""
    if facts.is_number:
        return NumberControl(facts)
    if facts.kind == "yes/no" and facts.level_labels == ("no", "yes"):
        return SwitchControl(facts)
    options = [(value_label(facts, level), level) for level in facts.levels]
    return ChoiceControl(predictor_label(facts), options, facts.typical)
