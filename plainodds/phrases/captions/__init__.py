"""Captions, one module for each kind of answer."""

# each kind of answer registers its own caption when it is imported
from plainodds.phrases.captions import change, curve, effects, odds, pair, profile, soundness  # noqa: F401
from plainodds.phrases.captions.caption import caption

__all__ = ["caption"]
