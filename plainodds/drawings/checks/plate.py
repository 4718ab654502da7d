"""What the picture of a check is made of, beneath the heading that all of them have."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Literal, TypeAlias, TypeVar

from plainodds.answers.checks.finding import Evidence, Finding
from plainodds.answers.soundness import SoundnessAnswer, shown_finding
from plainodds.drawings.checks.board import Board
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.model.predictors import Subject

__all__ = ["Found", "Plate", "Scale", "found_of"]

Scale: TypeAlias = Literal["linear", "log"]

E = TypeVar("E", bound=Evidence)


@dataclass(frozen=True)
class Found:
    """The finding to be drawn, with the answer that it is part of."""

    answer: SoundnessAnswer
    finding: Finding

    @property
    def subject(self) -> Subject:
        """The facts of the fit."""
        return self.answer.subject

    @property
    def level(self) -> float:
        """The level of the intervals."""
        return self.answer.question.level

    def evidence(self, kind: type[E]) -> E:
        """The finding's evidence, which is of this kind."""
        held = self.finding.evidence
        assert isinstance(held, kind)
        return held

    def also(self, kind: type[E]) -> E | None:
        """Evidence of another kind in the same answer, where there is some."""
        for finding in self.answer.findings:
            if isinstance(finding.evidence, kind):
                return finding.evidence
        return None


def found_of(answer: SoundnessAnswer) -> Found:
    """The finding that the question wants shown."""
    return Found(answer, shown_finding(answer))


@dataclass(frozen=True)
class Plate:
    """How one kind of finding is drawn.

    Attributes
    ----------
    name : str
        What tells its artists from those of another kind.
    natural_height, least_height : callable (found, theme, width) -> float
        In points, without heading and notes.
    notes : callable (found) -> list of str
    paint : callable (board, found, width, height) -> Margins
        Draws into a slot of a size in points, and gives the room that it takes around the plot.
    has_picture : callable (found) -> bool
        Whether there is anything to draw; else the finding is told in words.
    across : Scale
        Of the horizontal axis.
    variant : callable (found) -> str
        Which of several layouts is drawn, where a change of it needs other axes.
    """

    name: str
    natural_height: Callable[[Found, Theme, float], float]
    least_height: Callable[[Found, Theme, float], float]
    notes: Callable[[Found], list[str]]
    paint: Callable[[Board, Found, float, float], Margins]
    across: Scale = "linear"
    has_picture: Callable[[Found], bool] = lambda found: True
    variant: Callable[[Found], str] = lambda found: ""
