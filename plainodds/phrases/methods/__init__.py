"""Notes on methods, one module for each kind of answer."""

# each kind of answer registers its own note when it is imported
from plainodds.phrases.methods import change, curve, effects, odds, pair, profile, soundness  # noqa: F401
from plainodds.phrases.methods.note import MethodsNote, methods_note

__all__ = ["MethodsNote", "methods_note"]
