"""Controls for a change: from where to where."""

from __future__ import annotations

from typing import Any

import ipywidgets as widgets

from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.labels import value_label
from plainodds.values import Scalar
from plainodds.views.controls import (
    ChoiceControl,
    Control,
    Edited,
    cleaned,
    limits,
    settled,
    slider_range,
)

__all__ = ["LevelsControl", "SpanControl", "change_control", "usual_change"]

_ENDS = ("from", "to")


class SpanControl:
    """Two number boxes, from and to, and one slider of two handles beneath them.

    The slider knows a lower and a higher end only; which of them the change starts from
    stays as it is while handles are moved.

    Parameters
    ----------
    facts : PredictorFacts
    ends : (number, number)
        From where to where at the start.
    """

    def __init__(self, facts: PredictorFacts, ends: tuple[Scalar, Scalar]) -> None:
        self._facts = facts
        low, high, step = slider_range(facts)
        self._low, self._high = limits(facts)
        self._step, self._rising = step, True
        unit = f" ({facts.unit})" if facts.unit else ""
        self.boxes = tuple(
            widgets.FloatText(step=step, description=f"{end.capitalize()}{unit}") for end in _ENDS
        )
        for box, end in zip(self.boxes, _ENDS, strict=True):
            box.add_class(f"plainodds-control-{end}")
        self.slider = widgets.FloatRangeSlider(
            value=(low, high), min=low, max=high, step=step, readout=False
        )
        self.widget = widgets.VBox([*self.boxes, self.slider])
        self.widget.add_class("plainodds-span")
        self.show(ends)

    @property
    def value(self) -> tuple[Scalar, Scalar]:
        """From where to where, whole where the predictor is."""
        start, end = (float(box.value) for box in self.boxes)
        if self._facts.kind == "whole number":
            return int(start), int(end)
        return start, end

    def on_edit(self, callback: Edited) -> None:
        """Call back on each change of a box or a handle."""
        for each in (*self.boxes, self.slider):
            each.observe(lambda change: callback(self, change.owner), "value")

    def take(self, source: widgets.Widget) -> str:
        """Let the boxes follow the slider, or the slider the boxes."""
        if source is self.slider:
            # the slider itself stays as it is: its user may be ahead of the kernel
            for box, number in zip(self._ascending(), self.slider.value, strict=True):
                # a slider takes a crooked number for the round one beside it
                if abs(number - float(box.value)) >= 0.499 * self._step:
                    box.value = cleaned(number)
            return ""
        entered = float(source.value)
        number, remark = settled(self._facts, (self._low, self._high), entered)
        if number != entered:
            source.value = number
        self._follow()
        return remark

    def show(self, value: tuple[Scalar, Scalar]) -> None:
        """Show two numbers; a range that is too narrow for them gives way."""
        for box, number in zip(self.boxes, value, strict=True):
            box.value = float(number)
        low, high = sorted(float(number) for number in value)
        self._low, self._high = min(self._low, low), max(self._high, high)
        self.slider.max = max(self.slider.max, high)
        self.slider.min = min(self.slider.min, low)
        self._follow()

    def _ascending(self) -> tuple[widgets.FloatText, ...]:
        return self.boxes if self._rising else self.boxes[::-1]

    def _follow(self) -> None:
        start, end = (float(box.value) for box in self.boxes)
        if start != end:
            self._rising = start < end
        self.slider.value = (min(start, end), max(start, end))


class LevelsControl:
    """Two drop-downs of a predictor's levels, from and to."""

    def __init__(self, facts: PredictorFacts, ends: tuple[Scalar, Scalar]) -> None:
        options = [(value_label(facts, level), level) for level in facts.levels]
        self.choices = tuple(
            ChoiceControl(name.capitalize(), options, level)
            for name, level in zip(_ENDS, ends, strict=True)
        )
        for choice, name in zip(self.choices, _ENDS, strict=True):
            choice.widget.add_class(f"plainodds-control-{name}")
        self.widget = widgets.VBox([choice.widget for choice in self.choices])
        self.widget.add_class("plainodds-place")

    @property
    def value(self) -> tuple[Any, Any]:
        """From which level to which."""
        start, end = (choice.value for choice in self.choices)
        return start, end

    def on_edit(self, callback: Edited) -> None:
        """Call back on each choice."""
        for choice in self.choices:
            choice.on_edit(lambda _, source: callback(self, source))

    def take(self, source: widgets.Widget) -> str:
        """Whether the levels differ is for the question to say."""
        return ""

    def show(self, value: tuple[Scalar, Scalar]) -> None:
        """Show two levels."""
        for choice, level in zip(self.choices, value, strict=True):
            choice.show(level)


def change_control(facts: PredictorFacts, ends: tuple[Scalar, Scalar]) -> Control:
    """The control of a change that fits a predictor's kind."""
    return (SpanControl if facts.is_number else LevelsControl)(facts, ends)


def usual_change(facts: PredictorFacts) -> tuple[Scalar, Scalar]:
    """From where to where at the start: quartile to quartile, or first level to last.

    Quartiles go to the nearest round value; where they are the same, the whole range is
    taken. Levels that no row has are left out where that is possible.
    """
    if not facts.is_number:
        seen = [n for n, rows in zip(facts.levels, facts.level_counts, strict=True) if rows]
        first, *_, last = seen if len(seen) > 1 else facts.levels
        return first, last
    low, high, step = slider_range(facts)
    start, _, end = facts.quartiles
    ends = [low + step * round((each - low) / step) for each in (start, end)]
    start, end = (cleaned(min(max(each, low), high)) for each in ends)
    if start == end:
        start, end = low, high
    return (int(start), int(end)) if facts.kind == "whole number" else (start, end)
