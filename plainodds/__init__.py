"""plainodds: from a fitted binary logit model to a checked, explained, exportable account."""

from plainodds import demo, display
from plainodds.answers.excerpts import excerpt
from plainodds.answers.moves import Shift
from plainodds.answers.panels import panels
from plainodds.answers.tables import joint_table, ledger, table
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
from plainodds.views import (
    ChangeView,
    CurveView,
    EffectsView,
    OddsView,
    PairView,
    ProfileView,
    SoundnessView,
)

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
    "PairView",
    "Predictor",
    "ProfileView",
    "QuestionRefused",
    "ReportTable",
    "Shift",
    "SoundnessView",
    "Theme",
    "alternative",
    "caption",
    "code",
    "demo",
    "dossier",
    "draw",
    "excerpt",
    "from_json",
    "joint_table",
    "ledger",
    "methods_note",
    "odds_of",
    "panels",
    "report_table",
    "save",
    "table",
    "to_json",
    "words",
    "writing",
]

display.register()
