"""What each check finds, in German."""

# the kinds of evidence register their words when they are imported
from plainodds.phrases.german.checks import bending, carrying, data, fit  # noqa: F401

__all__: list[str] = []
