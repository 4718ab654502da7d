"""plainodds: from a fitted binary logit model to a checked, explained, exportable account."""

from plainodds import demo, display
from plainodds.answers.moves import Shift
from plainodds.answers.tables import ledger, table
from plainodds.drawings import draw, save
from plainodds.errors import FitRefused, QuestionRefused
from plainodds.fitted import FittedLogit, odds_of
from plainodds.model.predictors import Outcome, Predictor
from plainodds.phrases import alternative, code, words
from plainodds.values import from_json, to_json
from plainodds.views import (
    ChangeView,
    CurveView,
    EffectsView,
    OddsView,
    ProfileView,
    SoundnessView,
)

__all__ = [
    "ChangeView",
    "CurveView",
    "EffectsView",
    "FitRefused",
    "FittedLogit",
    "OddsView",
    "Outcome",
    "Predictor",
    "ProfileView",
    "QuestionRefused",
    "Shift",
    "SoundnessView",
    "alternative",
    "code",
    "demo",
    "draw",
    "from_json",
    "ledger",
    "odds_of",
    "save",
    "table",
    "to_json",
    "words",
]

display.register()
