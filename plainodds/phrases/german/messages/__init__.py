"""The fixed texts of pictures, printed tables and dossiers in German, by their English."""

from types import MappingProxyType

from plainodds.phrases.german.messages.check_figures import CHECK_FIGURES
from plainodds.phrases.german.messages.checks import CHECKS
from plainodds.phrases.german.messages.pictures import PICTURES
from plainodds.phrases.german.messages.tables import TABLES

__all__ = ["MESSAGES"]

MESSAGES = MappingProxyType({**PICTURES, **TABLES, **CHECKS, **CHECK_FIGURES})
