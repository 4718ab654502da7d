"""Live widgets: controls that edit a question, and what its answer looks like."""

from plainodds.views.change import ChangeView
from plainodds.views.curve import CurveView
from plainodds.views.effects import EffectsView
from plainodds.views.odds import OddsView
from plainodds.views.pair import PairView
from plainodds.views.profile import ProfileView
from plainodds.views.soundness import SoundnessView

__all__ = [
    "ChangeView",
    "CurveView",
    "EffectsView",
    "OddsView",
    "PairView",
    "ProfileView",
    "SoundnessView",
]
