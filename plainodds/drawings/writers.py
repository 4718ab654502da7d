"""Figures written as PDF and SVG whose text stays text, without touching a global setting.

matplotlib decides by `rcParams["pdf.fonttype"]` and `rcParams["svg.fonttype"]` whether text
is embedded as TrueType and as text, and offers no argument for it. Setting them around the
call, even under a lock of our own, is not safe: rcParams are one for all threads, widget
callbacks run on several, and a style context that another thread opens at that moment would
keep our settings for good. So this module loads a second copy of the two writer modules
under a name of its own, in which `matplotlib.rcParams` are the defaults with our settings on
top. The writers that everybody else uses, and rcParams themselves, stay as they are.
"""

from __future__ import annotations

import base64
import importlib.util
import io
import sys
import threading
from collections import ChainMap
from functools import lru_cache
from types import ModuleType
from typing import Any
from xml.sax.saxutils import escape

import matplotlib as mpl
import numpy as np
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure
from matplotlib.font_manager import FontProperties, findfont
from matplotlib.text import Text
from PIL import Image, TiffImagePlugin

from plainodds.drawings.about import About

__all__ = ["pdf", "png", "svg", "tiff"]

_PDF = {
    "pdf.fonttype": 42,
    "ps.fonttype": 42,
    "pdf.use14corefonts": False,
    "pdf.compression": 6,
    "pdf.inheritcolor": False,
}
_SVG = {"svg.fonttype": "none", "svg.hashsalt": "plainodds", "svg.image_inline": True}
_loading = threading.Lock()


class _Seen:
    """matplotlib as a writer's copy sees it: its defaults, but for a few settings."""

    def __init__(self, settings: dict[str, Any]) -> None:
        defaults: Any = mpl.rcParamsDefault
        self.rcParams: ChainMap[str, Any] = ChainMap(settings, defaults)

    def __getattr__(self, name: str) -> Any:
        return getattr(mpl, name)


@lru_cache(maxsize=2)
def _writer(name: str) -> ModuleType:
    """A copy of matplotlib's writer for "pdf" or "svg", with its own view of rcParams."""
    with _loading:
        source = importlib.util.find_spec(f"matplotlib.backends.backend_{name}")
        if source is None or source.origin is None:
            raise ImportError(f"matplotlib has no writer for {name}.")
        # within matplotlib's package, so that the copy finds the modules that it imports
        own = f"matplotlib.backends.plainodds_{name}"
        spec = importlib.util.spec_from_file_location(own, source.origin)
        assert spec is not None
        assert spec.loader is not None
        module = importlib.util.module_from_spec(spec)
        sys.modules[own] = module
        spec.loader.exec_module(module)
        module.mpl = _Seen(_PDF if name == "pdf" else _SVG)  # type: ignore[attr-defined]
        return module


def pdf(figure: Figure, about: About) -> bytes:
    """Write a figure as PDF, fonts embedded as TrueType.

    Parameters
    ----------
    figure : Figure
        One that nobody else draws on meanwhile.
    about : About
        For the file's metadata: the caption is its subject, the code among its keywords.
    """
    buffer = io.BytesIO()
    canvas = _writer("pdf").FigureCanvasPdf(figure)
    metadata = {
        "Title": about.title,
        "Subject": f"{about.caption}\n\n{about.description}",
        "Keywords": about.code,
        "Creator": about.made_with,
        # without a date equal pictures are equal files
        "CreationDate": None,
    }
    canvas.print_pdf(buffer, metadata=metadata)
    return buffer.getvalue()


def svg(figure: Figure, about: About) -> bytes:
    """Write a figure as SVG: text as text, with just the letters used of its font inside.

    Parameters
    ----------
    figure : Figure
        One that nobody else draws on meanwhile.
    about : About
        For the file's metadata, and what is read to those who cannot see it.
    """
    buffer = io.StringIO()
    canvas = _writer("svg").FigureCanvasSVG(figure)
    metadata = {
        "Title": about.title,
        "Description": about.caption,
        "Source": about.code,
        "Creator": about.made_with,
        "Date": None,
    }
    canvas.print_svg(buffer, metadata=metadata)
    texts = [text for text in figure.findobj(Text) if text.get_text() and text.get_visible()]
    faces = {(text.get_fontfamily()[0], text.get_fontweight()) for text in texts}
    letters = "".join(sorted({each for text in texts for each in text.get_text()} - {"\n"}))
    style = "".join(_face(family, weight, letters) for family, weight in sorted(faces, key=str))
    head, tag, rest = buffer.getvalue().partition("<svg ")
    opening, bracket, inside = rest.partition(">")
    told = (
        f"\n <title>{escape(about.title)}</title>\n <desc>{escape(about.description)}</desc>"
        f'\n <style type="text/css">{style}</style>'
    )
    return f'{head}{tag}role="img" {opening}{bracket}{told}{inside}'.encode()


def _face(family: str, weight: str | int, letters: str) -> str:
    """A @font-face rule that holds a font's subset."""
    from fontTools import subset  # type: ignore[import-untyped]
    from fontTools.ttLib import TTFont  # type: ignore[import-untyped]

    path = findfont(FontProperties(family=family, weight=weight))
    font = TTFont(path, fontNumber=0, lazy=True, recalcTimestamp=False)
    options = subset.Options()
    options.hinting = False
    options.drop_tables += ["FFTM"]
    cutter = subset.Subsetter(options)
    cutter.populate(text=letters)
    cutter.subset(font)
    buffer = io.BytesIO()
    font.save(buffer)
    data = base64.b64encode(buffer.getvalue()).decode("ascii")
    heavy = 700 if weight in ("bold", 700) else 400
    return (
        f"@font-face{{font-family:'{family}';font-weight:{heavy};"
        f"src:url(data:font/ttf;base64,{data})}}"
    )


def png(figure: Figure, about: About, dpi: float) -> bytes:
    """Write a figure as PNG of about a resolution in pixels per inch.

    The resolution in the file makes its whole pixels exactly the figure's size.
    """
    buffer = io.BytesIO()
    canvas, resolution = _pixels(figure, dpi)
    canvas.print_png(  # type: ignore[no-untyped-call]
        buffer,
        metadata={
            "Title": about.title,
            "Description": f"{about.caption}\n\n{about.description}",
            "Source": about.code,
            "Software": about.made_with,
        },
        pil_kwargs={"dpi": resolution},
    )
    return buffer.getvalue()


def tiff(figure: Figure, about: About, dpi: float) -> bytes:
    """Write a figure as TIFF, compressed without loss, of about a resolution in pixels per inch.

    What the file says of itself stands in its XMP packet (ISO 16684), which holds any letter.
    """
    canvas, resolution = _pixels(figure, dpi)
    canvas.draw()  # type: ignore[no-untyped-call]
    pixels = np.asarray(canvas.buffer_rgba())  # type: ignore[no-untyped-call]
    # journals take no transparent TIFF; a picture without paper keeps its own
    solid = bool((pixels[..., 3] == 255).all())
    image = Image.fromarray(np.ascontiguousarray(pixels[..., :3]) if solid else pixels)
    told = TiffImagePlugin.ImageFileDirectory_v2()
    told[_XMP] = _packet(about).encode()
    told[_SOFTWARE] = about.made_with
    buffer = io.BytesIO()
    image.save(buffer, format="TIFF", compression="tiff_lzw", dpi=resolution, tiffinfo=told)
    return buffer.getvalue()


_XMP, _SOFTWARE = 700, 305


def _pixels(figure: Figure, dpi: float) -> tuple[FigureCanvasAgg, tuple[float, float]]:
    """A canvas of whole pixels, and the resolution at which they are the figure's size."""
    figure.set_dpi(dpi)
    canvas = FigureCanvasAgg(figure)
    pixels = canvas.get_width_height()
    width, height = figure.get_size_inches()
    return canvas, (pixels[0] / width, pixels[1] / height)


def _packet(about: About) -> str:
    """An XMP packet of Dublin Core terms."""
    parts = {
        "title": f'<rdf:Alt><rdf:li xml:lang="x-default">{escape(about.title)}</rdf:li></rdf:Alt>',
        "description": (
            '<rdf:Alt><rdf:li xml:lang="x-default">'
            f"{escape(about.caption)}\n\n{escape(about.description)}</rdf:li></rdf:Alt>"
        ),
        "source": escape(about.code),
    }
    told = "".join(f"<dc:{name}>{part}</dc:{name}>" for name, part in parts.items())
    return (
        '<?xpacket begin="\ufeff" id="W5M0MpCehiHzreSzNTczkc9d"?>'
        '<x:xmpmeta xmlns:x="adobe:ns:meta/">'
        '<rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">'
        '<rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/">'
        f"{told}</rdf:Description></rdf:RDF></x:xmpmeta>"
        '<?xpacket end="r"?>'
    )
