"""The choice of what the intervals of odds ratios rest on."""

from __future__ import annotations

from dataclasses import replace

import ipywidgets as widgets

from plainodds.model.fitted import FittedModel
from plainodds.views.controls import ChoiceControl
from plainodds.views.others import Bind

__all__ = ["interval_controls"]

_INTERVALS = (("standard errors (Wald)", "wald"), ("the likelihood", "likelihood"))


def interval_controls(model: FittedModel, bind: Bind) -> list[widgets.Widget]:
    """The choice of what intervals rest on; none where the fit has no likelihood intervals."""
    if model.no_likelihood:
        return []
    control = bind(
        "interval",
        ChoiceControl("Intervals from", _INTERVALS, "wald"),
        lambda question: question.interval,
        lambda question, interval: replace(question, interval=interval),
    )
    return [control.widget]
