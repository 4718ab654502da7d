"""An answer at the end of a notebook cell shows its picture and its words."""

from __future__ import annotations

import io
from base64 import b64encode
from typing import Any

from IPython import get_ipython

from plainodds.answers.questions import Answer
from plainodds.drawings import draw
from plainodds.phrases import alternative, words
from plainodds.views import markup
from plainodds.views.lock import LOCK

__all__ = ["bundle", "register"]

_CSS_PIXELS_PER_INCH = 96
_PIXEL_RATIO = 2


def bundle(answer: Answer) -> tuple[dict[str, Any], dict[str, Any]]:
    """An answer as a notebook shows it.

    Parameters
    ----------
    answer : Answer

    Returns
    -------
    data, metadata : dict
        By media type: the picture, the picture with the words in HTML (every label
        escaped), and the words as plain text.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay(rows=500)
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years", mains).fit(disp=0))
    >>> data, _ = bundle(fit.profile({"age_years": 80}))
    >>> sorted(data)
    ['image/png', 'text/html', 'text/plain']
    """
    with LOCK:
        figure = draw(answer)
        width, height = (
            round(_CSS_PIXELS_PER_INCH * inches) for inches in figure.get_size_inches()
        )
        written = io.BytesIO()
        figure.savefig(written, format="png", dpi=_CSS_PIXELS_PER_INCH * _PIXEL_RATIO)
    png, said = written.getvalue(), words(answer)
    shown = markup.picture(png, alternative(answer), width, height)
    data = {
        "image/png": b64encode(png).decode(),
        "text/html": markup.still(shown, said),
        "text/plain": str(said),
    }
    return data, {"image/png": {"width": width, "height": height}}


def register() -> None:
    """Tell the running IPython shell how answers are shown; without a shell do nothing."""
    shell = get_ipython()
    if shell is not None:
        shell.display_formatter.mimebundle_formatter.for_type(Answer, bundle)
