"""The invented water works of Tessel Bay, to learn on and to test with."""

from __future__ import annotations

from plainodds.demo.scenario import tessel_bay
from plainodds.demo.truth import TRUE_FORMULA, true_coefficients, true_linear_predictor

__all__ = ["TRUE_FORMULA", "tessel_bay", "true_coefficients", "true_linear_predictor"]
