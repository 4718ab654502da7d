"""Hand-made changes and effects: every number in them is stated."""

import math

from plainodds.answers.change import ChangeAnswer, ChangeQuestion
from plainodds.answers.comparing import Comparison, number_needed
from plainodds.answers.effects import EffectRow, EffectsAnswer, EffectsQuestion
from plainodds.answers.estimate import Estimate
from plainodds.answers.moves import Move
from tests.phrases.made import PREDICTORS, Z, odds, probability, subject, wald

AGE = (("age_years", Move(20.0, 60.0)),)


def held_but(*moved):
    """The typical profile without these predictors."""
    return tuple((facts.name, facts.typical) for facts in PREDICTORS if facts.name not in moved)


def difference(value, se):
    if se is None:
        return Estimate(value, None, None, None)
    return Estimate(value, se, value - Z * se, value + Z * se)


def change_answer(
    eta=-1.5,
    start=-2.4,
    moves=AGE,
    se=0.2,
    difference_se=0.01,
    others="observed",
    where=None,
    sample="fixed",
    beyond=(),
    counted=6000,
    **stated,
):
    """A change of given η, its chances compared."""
    before, after = probability(wald(start, se)), probability(wald(eta, se))
    p, q = after.estimate, before.estimate
    apart = difference(p - q, None if se is None else difference_se)
    ratio = odds(wald(math.log(p) - math.log(q), se))
    observed = others == "observed"
    return ChangeAnswer(
        ChangeQuestion(moves, others=others, where=where, sample=sample),
        subject(**stated),
        before,
        after,
        Comparison(odds(wald(eta - start, se)), apart, ratio),
        number_needed(apart),
        () if observed else held_but(*(name for name, _ in moves)),
        counted if observed else 0,
        beyond,
    )


def effect_row(predictor="age_years", value=0.0014, se=0.0002, **stated):
    p = None if se is None else math.erfc(abs(value) / se / math.sqrt(2))
    parts = {"start": None, "end": None, "step": None, "by": None} | stated
    return EffectRow(predictor, effect=difference(value, se), p_value=p, **parts)


def level_row(end="PVC", value=-0.005, se=0.002, predictor="material", start="CI", **stated):
    return effect_row(predictor, value, se, start=start, end=end, **stated)


def effects_answer(*rows, others="observed", by=None, where=None, counted=(6000,), **stated):
    sample = stated.pop("sample", "fixed")
    number = "step" if any(row.step is not None for row in rows) else "slope"
    observed = others == "observed"
    return EffectsAnswer(
        EffectsQuestion(others=others, number=number, by=by, where=where, sample=sample),
        subject(**stated),
        rows,
        () if observed else held_but(by),
        counted if observed else (),
    )
