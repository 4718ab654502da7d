"""Pictures of answers: drawn into figures, kept for widgets, saved as files."""

from plainodds.drawings.draw import draw
from plainodds.drawings.picture import Picture
from plainodds.drawings.save import save
from plainodds.drawings.theme import THEMES, Theme

__all__ = ["THEMES", "Picture", "Theme", "draw", "save"]
