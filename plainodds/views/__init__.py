"""Live widgets: controls that edit a question, and what its answer looks like."""

from plainodds.views.curve import CurveView
from plainodds.views.odds import OddsView
from plainodds.views.profile import ProfileView

__all__ = ["CurveView", "OddsView", "ProfileView"]
