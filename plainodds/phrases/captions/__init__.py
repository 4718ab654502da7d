"""Captions, one module for each kind of answer."""

from plainodds.phrases.captions.caption import caption

__all__ = ["caption"]
