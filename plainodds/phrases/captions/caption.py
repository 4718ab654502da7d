"""What stands beneath a figure in print."""

from __future__ import annotations

from plainodds.answers.questions import Answer
from plainodds.phrases.languages import by_language

__all__ = ["caption"]


@by_language
def caption(answer: Answer) -> str:
    """Write what stands beneath the answer's figure: what is shown, of whom, and how marked.

    Parameters
    ----------
    answer : Answer

    Returns
    -------
    str
        Plain text in whole sentences, the first one a title; not escaped.

    Raises
    ------
    TypeError
        If there is no picture of this kind of answer.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> result = sm.Logit(y, sm.add_constant(x)).fit(disp=False)
    >>> caption(po.FittedLogit(result).odds()).startswith("Odds ratios ")
    True
    """
    raise TypeError(f"There is no picture of {type(answer).__name__} to write a caption for.")
