"""What was computed and how, so that it can be cited."""

from __future__ import annotations

from plainodds.answers.questions import Answer
from plainodds.phrases.languages import by_language
from plainodds.phrases.references import REFERENCES
from plainodds.phrases.sentences import sentence
from plainodds.values import value

__all__ = ["MethodsNote", "methods_note", "noted"]


@value
class MethodsNote:
    """How an answer was computed.

    Attributes
    ----------
    sentences : tuple of str
        Whole sentences, for a section on methods; they cite as "(Localio et al. 2007)".
    references : tuple of str
        The works cited, in full, in alphabetical order.

    Examples
    --------
    >>> note = MethodsNote(("Odds ratios were computed.",), ("A. Author (1990). A work.",))
    >>> print(note)
    Odds ratios were computed.
    <BLANKLINE>
    A. Author (1990). A work.
    """

    sentences: tuple[str, ...]
    references: tuple[str, ...]

    def __str__(self) -> str:
        """The sentences as one paragraph, the references one a line beneath."""
        return "\n\n".join(
            part for part in (" ".join(self.sentences), "\n".join(self.references)) if part
        )


def noted(*told: str) -> MethodsNote:
    """A note of these sentences, empty ones left out, with the works that they cite."""
    sentences = tuple(sentence(each) for each in told if each)
    text = " ".join(sentences)
    cited = [full for short, full in REFERENCES.items() if short in text]
    return MethodsNote(sentences, tuple(sorted(cited)))


@by_language
def methods_note(answer: Answer) -> MethodsNote:
    """Say what was computed and how, citable, with the references.

    Parameters
    ----------
    answer : Answer

    Returns
    -------
    MethodsNote

    Raises
    ------
    TypeError
        If nothing is known of this kind of answer.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> result = sm.Logit(y, sm.add_constant(x)).fit(disp=False)
    >>> note = methods_note(po.FittedLogit(result).odds())
    >>> len(note.sentences) > 0 and len(note.references) > 0
    True
    """
    raise TypeError(f"There are no methods of {type(answer).__name__} to tell.")
