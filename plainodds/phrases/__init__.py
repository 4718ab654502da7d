"""An answer in words, in Python, and for those who cannot see its picture."""

# each kind of answer registers its own words when it is imported
from plainodds.phrases import (  # noqa: F401
    change,
    curve,
    effects,
    excerpts,
    odds,
    pair,
    panels,
    profile,
    soundness,
)
from plainodds.phrases import german as _german  # noqa: F401
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions import caption
from plainodds.phrases.code import code
from plainodds.phrases.methods import MethodsNote, methods_note
from plainodds.phrases.reports import ReportTable, report_table
from plainodds.phrases.saying import Words, words
from plainodds.phrases.writing import writing

__all__ = [
    "MethodsNote",
    "ReportTable",
    "Words",
    "alternative",
    "caption",
    "code",
    "methods_note",
    "report_table",
    "words",
    "writing",
]
