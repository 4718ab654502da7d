"""What a picture's file says of itself: title, caption, how to make it again, with what."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from plainodds.answers.questions import Answer
from plainodds.drawings.draw import drawing_of
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions import caption
from plainodds.phrases.code import code
from plainodds.phrases.versions import versions

__all__ = ["About", "about"]


@dataclass(frozen=True)
class About:
    """What is known of a picture, without user, path or date.

    Attributes
    ----------
    title : str
    caption : str
        What stands beneath it in print.
    description : str
        What is read to those who cannot see it.
    code : str
        The Python that gives its answer again.
    made_with : str
        Packages and their versions.
    """

    title: str
    caption: str
    description: str
    code: str
    made_with: str


def about(answer: Answer) -> About:
    """What the file of an answer's picture says of itself."""
    drawing: Any = drawing_of(answer)
    made_with = versions("plainodds", "statsmodels", "numpy", "matplotlib")
    return About(
        drawing.title(answer), caption(answer), alternative(answer), code(answer), made_with
    )
