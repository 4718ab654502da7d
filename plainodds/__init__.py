"""plainodds: from a fitted binary logit model to a checked, explained, exportable account."""

from plainodds import demo
from plainodds.answers.tables import ledger, table
from plainodds.errors import FitRefused, QuestionRefused
from plainodds.fitted import FittedLogit, odds_of
from plainodds.model.predictors import Outcome, Predictor
from plainodds.values import from_json, to_json

__all__ = [
    "FitRefused",
    "FittedLogit",
    "Outcome",
    "Predictor",
    "QuestionRefused",
    "demo",
    "from_json",
    "ledger",
    "odds_of",
    "table",
    "to_json",
]
