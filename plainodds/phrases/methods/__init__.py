"""Notes on methods, one module for each kind of answer."""

from plainodds.phrases.methods.note import MethodsNote, methods_note

__all__ = ["MethodsNote", "methods_note"]
