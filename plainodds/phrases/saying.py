"""What words are, and where each kind of answer finds its own."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any, Literal, TypeAlias

from plainodds.answers.questions import Answer
from plainodds.errors import QuestionRefused
from plainodds.phrases.languages import by_language
from plainodds.values import value

__all__ = ["Audience", "Words", "for_audience", "words"]

Audience: TypeAlias = Literal["plain", "technical"]


@value
class Words:
    """An answer in words.

    Attributes
    ----------
    sentences : tuple of str
        What the answer says, in whole sentences.
    cautions : tuple of str
        What must be known to read it rightly, in whole sentences.
    """

    sentences: tuple[str, ...]
    cautions: tuple[str, ...]

    def __str__(self) -> str:
        """The sentences as one paragraph, the cautions as a second."""
        paragraphs = (" ".join(self.sentences), " ".join(self.cautions))
        return "\n\n".join(paragraph for paragraph in paragraphs if paragraph)


@by_language
def words(answer: Answer, audience: Audience = "plain") -> Words:
    """Say an answer in words.

    Parameters
    ----------
    answer : Answer
    audience : {"plain", "technical"}
        "plain" gives chances before ratios, in percent and as frequencies over one
        denominator; "technical" gives estimates, standard errors and methods.

    Returns
    -------
    Words

    Raises
    ------
    TypeError
        If there are no words for this kind of answer.
    QuestionRefused
        If the audience is neither of the two, or the language has no words for it.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> result = sm.Logit(y, sm.add_constant(x)).fit(disp=False)
    >>> print(words(po.FittedLogit(result).profile()).sentences[1])
    The chance that this does not happen is 40%, that is 40 in 100.
    """
    raise TypeError(f"There are no words for {type(answer).__name__}.")


def for_audience(
    audience: str, say: dict[Audience, Callable[[Any], Words]], answer: Answer
) -> Words:
    """Say an answer as this audience wants it."""
    for known, way in say.items():
        if known == audience:
            return way(answer)
    raise QuestionRefused(f"The audience is 'plain' or 'technical', not {audience!r}.")
