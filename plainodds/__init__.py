"""plainodds: from a fitted binary logit model to a checked, explained, exportable account."""

from plainodds import demo, display
from plainodds.answers.moves import Shift
from plainodds.answers.tables import joint_table, ledger, table
from plainodds.drawings import draw, save
from plainodds.errors import FitRefused, QuestionRefused
from plainodds.fitted import FittedLogit, odds_of
from plainodds.model.predictors import Outcome, Predictor
from plainodds.phrases import alternative, code, words
from plainodds.values import from_json, to_json
from plainodds.views import ChangeView, CurveView, EffectsView, OddsView, PairView, ProfileView

__all__ = [
    "ChangeView",
    "CurveView",
    "EffectsView",
    "FitRefused",
    "FittedLogit",
    "OddsView",
    "Outcome",
    "PairView",
    "Predictor",
    "ProfileView",
    "QuestionRefused",
    "Shift",
    "alternative",
    "code",
    "demo",
    "draw",
    "from_json",
    "joint_table",
    "ledger",
    "odds_of",
    "save",
    "table",
    "to_json",
    "words",
]

display.register()
