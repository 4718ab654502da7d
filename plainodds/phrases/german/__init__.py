"""German, complete: importing it makes the language known."""

# each kind of answer registers its own texts when it is imported
from plainodds.phrases.german import (  # noqa: F401
    captions,
    change,
    curve,
    effects,
    methods,
    odds,
    pair,
    profile,
    soundness,
    soundness_methods,
    together,
)
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.languages import add_language

__all__ = ["GERMAN"]

add_language(GERMAN)
