"""What the picture of an answer shows, for those who cannot see it."""

from __future__ import annotations

from plainodds.answers.questions import Answer
from plainodds.phrases.languages import by_language

__all__ = ["alternative"]


@by_language
def alternative(answer: Answer) -> str:
    """Say in one or two sentences what the picture of an answer shows.

    Parameters
    ----------
    answer : Answer

    Returns
    -------
    str
        Plain text, not escaped.

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
    >>> alternative(po.FittedLogit(result).odds()).startswith("1 odds ratio for ")
    True
    """
    raise TypeError(f"There is no picture of {type(answer).__name__} to describe.")
