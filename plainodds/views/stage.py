"""Where a view's picture stands, and the still that a saved notebook keeps of it."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import ipywidgets as widgets

from plainodds.answers.questions import Answer
from plainodds.drawings.picture import Picture
from plainodds.phrases import alternative
from plainodds.views import markup
from plainodds.views.parts import block, html

__all__ = ["NARROW_PX", "WIDE_PX", "Shot", "Stage"]

WIDE_PX = 590
NARROW_PX = 380
_PIXEL_RATIO = 2
_LARGER, _SMALLER = "Larger letters", "Smaller letters"


@dataclass(frozen=True)
class Shot:
    """A picture that was taken: its file, its text alternative, its size in CSS pixels."""

    png: bytes
    alternative: str
    width: int
    height: int

    def markup(self, style: str | None = None) -> markup.Markup:
        """The picture in HTML."""
        return markup.picture(self.png, self.alternative, self.width, self.height, style)


class Stage:
    """A place for the picture of an answer.

    Parameters
    ----------
    on_resize : callable
        Called with the width that is wanted, at the press of the button that narrow pages
        show: a picture drawn for a wide page has small letters there.

    Attributes
    ----------
    widget : widgets.VBox
    shot : Shot
        What is shown.
    """

    def __init__(self, on_resize: Callable[[int], None]) -> None:
        self.shot: Shot
        self.place = html("picture")
        self.letters = widgets.Button(description=_LARGER)
        self.letters.add_class("plainodds-letters")
        self.letters.on_click(lambda _: on_resize(NARROW_PX if self.width > NARROW_PX else WIDE_PX))
        self.widget = block(self.place, self.letters, name="shown")
        self._picture = Picture("screen", WIDE_PX)

    @property
    def width(self) -> int:
        """Width in CSS pixels."""
        return self._picture.width_px

    @width.setter
    def width(self, width: int) -> None:
        self._picture = Picture("screen", width)
        narrow = width <= NARROW_PX
        self.letters.description = _SMALLER if narrow else _LARGER
        # a page that has become wide again must offer the way back
        (self.letters.add_class if narrow else self.letters.remove_class)("plainodds-on")

    def taken(self, answer: Answer) -> Shot:
        """Draw an answer, without showing it yet."""
        self._picture.show(answer)
        return Shot(
            self._picture.png(_PIXEL_RATIO),
            alternative(answer),
            self._picture.width_px,
            self._picture.height_px,
        )

    def show(self, shot: Shot) -> None:
        """Show what was drawn."""
        self.shot = shot
        self.place.value = shot.markup()
