"""What a saved notebook keeps of a view, for when there is no kernel to move it."""

from __future__ import annotations

import io
from base64 import b64encode
from typing import Any

from PIL import Image

from plainodds.phrases import Words
from plainodds.views import markup
from plainodds.views.stage import Shot

__all__ = ["bundle_of", "on_paper"]

_COLOURS = 96
_REMARK = "As it was when the cell was run; run it again to move it."


def on_paper(png: bytes) -> bytes:
    """A picture on white paper, readable on any page, in a third of the bytes.

    Parameters
    ----------
    png : bytes
        With transparent paper.
    """
    ink = Image.open(io.BytesIO(png)).convert("RGBA")
    paper = Image.new("RGB", ink.size, "white")
    paper.paste(ink, mask=ink.getchannel("A"))
    few = paper.quantize(_COLOURS, Image.Quantize.FASTOCTREE, dither=Image.Dither.NONE)
    # the few colours are averages of many: paper stays white
    palette = few.getpalette() or []
    corner = 3 * int(few.getpixel((0, 0)))  # type: ignore[arg-type]
    palette[corner : corner + 3] = [255, 255, 255]
    few.putpalette(palette)
    written = io.BytesIO()
    few.save(written, "png")
    return written.getvalue()


def bundle_of(shot: Shot, words: Words) -> dict[str, Any]:
    """A picture and its words by media type; every label in the HTML is escaped."""
    png = on_paper(shot.png)
    shown = markup.picture(png, shot.alternative, shot.width, shot.height)
    return {
        "image/png": b64encode(png).decode("ascii"),
        "text/html": markup.still(shown, words, _REMARK),
    }
