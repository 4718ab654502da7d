"""What is refused, always with the reason and the way out."""

from __future__ import annotations

__all__ = ["FitRefused", "QuestionRefused"]


class FitRefused(ValueError):
    """A fitted result cannot be taken in as a binary logit model."""


class QuestionRefused(ValueError):
    """A question cannot be answered for this model, predictor or value."""
