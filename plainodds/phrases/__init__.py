"""An answer in words, in Python, and for those who cannot see its picture."""

# each kind of answer registers its own words when it is imported
from plainodds.phrases import change, curve, effects, odds, profile, soundness  # noqa: F401
from plainodds.phrases.alternative import alternative
from plainodds.phrases.code import code
from plainodds.phrases.saying import Words, words

__all__ = ["Words", "alternative", "code", "words"]
