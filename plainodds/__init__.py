"""plainodds: from a fitted binary logit model to a checked, explained, exportable account."""

from plainodds import demo, display
from plainodds.answers.moves import Shift
from plainodds.answers.tables import ledger, table
from plainodds.dossiers import dossier
from plainodds.drawings import THEMES, Theme, draw, save
from plainodds.errors import FitRefused, QuestionRefused
from plainodds.fitted import FittedLogit, odds_of
from plainodds.model.predictors import Outcome, Predictor
from plainodds.phrases import (
    MethodsNote,
    ReportTable,
    alternative,
    caption,
    code,
    methods_note,
    report_table,
    words,
    writing,
)
from plainodds.values import from_json, to_json
from plainodds.views import ChangeView, CurveView, EffectsView, OddsView, ProfileView

__all__ = [
    "THEMES",
    "ChangeView",
    "CurveView",
    "EffectsView",
    "FitRefused",
    "FittedLogit",
    "MethodsNote",
    "OddsView",
    "Outcome",
    "Predictor",
    "ProfileView",
    "QuestionRefused",
    "ReportTable",
    "Shift",
    "Theme",
    "alternative",
    "caption",
    "code",
    "demo",
    "dossier",
    "draw",
    "from_json",
    "ledger",
    "methods_note",
    "odds_of",
    "report_table",
    "save",
    "table",
    "to_json",
    "words",
    "writing",
]

display.register()
