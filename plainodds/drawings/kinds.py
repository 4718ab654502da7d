"""Which class draws which kind of answer."""

from __future__ import annotations

from functools import singledispatch
from typing import Any

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.pair import PairAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.answers.questions import Answer
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.drawings.change import ChangeDrawing
from plainodds.drawings.curve import CurveDrawing
from plainodds.drawings.curve_levels import LevelsDrawing
from plainodds.drawings.drawing import Drawing
from plainodds.drawings.effects import EffectsDrawing
from plainodds.drawings.odds import OddsDrawing
from plainodds.drawings.odds_table import OddsTableDrawing
from plainodds.drawings.pair import PairDrawing
from plainodds.drawings.profile import ProfileDrawing
from plainodds.drawings.soundness import SoundnessDrawing

__all__ = ["drawing_of"]


@singledispatch
def drawing_of(answer: Answer) -> type[Drawing[Any]]:
    """Give the class that draws a kind of answer.

    Raises
    ------
    TypeError
        If there is no picture of this kind of answer.
    """
    raise TypeError(f"There is no picture of {type(answer).__name__}.")


@drawing_of.register
def _(answer: OddsAnswer) -> type[Drawing[Any]]:
    return OddsTableDrawing if answer.question.layout == "table" else OddsDrawing


@drawing_of.register
def _(answer: CurveAnswer) -> type[Drawing[Any]]:
    along = answer.subject.predictor(answer.question.predictor)
    return CurveDrawing if along.is_number else LevelsDrawing


@drawing_of.register
def _(answer: ProfileAnswer) -> type[Drawing[Any]]:
    return ProfileDrawing


@drawing_of.register
def _(answer: EffectsAnswer) -> type[Drawing[Any]]:
    return EffectsDrawing


@drawing_of.register
def _(answer: ChangeAnswer) -> type[Drawing[Any]]:
    return ChangeDrawing


@drawing_of.register
def _(answer: PairAnswer) -> type[Drawing[Any]]:
    return PairDrawing


@drawing_of.register
def _(answer: SoundnessAnswer) -> type[Drawing[Any]]:
    return SoundnessDrawing
