"""Effects and changes made by hand, about the invented town's water mains."""

import math
from dataclasses import replace
from functools import cache

import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.change import ChangeAnswer, ChangeQuestion
from plainodds.answers.comparing import Comparison, number_needed
from plainodds.answers.effects import EffectRow, EffectsAnswer, EffectsQuestion
from plainodds.answers.estimate import Estimate
from plainodds.answers.moves import Move, Shift

NASTY = "_cost in $ per $x^2 {_y}$ <img src=x onerror=alert(1)> \\frac & so on without an end"
NO_INTERVAL = "A penalised fit has no covariance matrix, so no interval can be given."


@cache
def fit():
    """A real fit, for its subject and for real answers."""
    pipes = po.demo.tessel_bay().head(2500)
    pipes = pipes.assign(lined=pipes.index % 3 == 0)
    model = "burst ~ age_years * material + soil + diameter_mm + past_repairs + lined"
    return po.FittedLogit(
        smf.logit(model, pipes).fit(disp=False),
        predictors={
            "age_years": po.Predictor(label="Pipe age", unit="years", step=10),
            "diameter_mm": po.Predictor(label="Diameter", unit="mm", step=50),
        },
        outcome=po.Outcome(event="burst this winter", case="pipe", cases="pipes"),
    )


def about(**more):
    return replace(fit().subject, **more)


def nasty_subject():
    levels = ("$_", "__$_", "x" * 70)
    predictors = tuple(
        replace(facts, label=NASTY, unit="$_" if facts.unit else "",
                level_labels=levels[: len(facts.levels)])
        for facts in fit().subject.predictors
    )  # fmt: skip
    event = "$event$ _of a kind that takes a great many words before it has been named in full"
    return about(predictors=predictors, outcome=replace(fit().subject.outcome, event=event))


def estimate(middle, half):
    if half is None:
        return Estimate(middle, None, None, None)
    return Estimate(middle, half / 1.96, middle - half, middle + half)


def effect_row(predictor, middle, half, start=None, end=None, step=None, by=None):
    p = None if half is None else 0.2
    return EffectRow(predictor, start, end, step, by, estimate(middle, half), p)


def effect_rows(by=None, shift=0.0, wide=1.0, intervals=True):
    """Levels and slopes, of very different sizes."""

    def row(predictor, middle, half, *ends):
        spread = half * wide if intervals else None
        return effect_row(predictor, middle * (1 + shift), spread, *ends, by=by)

    return [
        row("material", 0.0036, 0.033, "cast iron", "ductile iron"),
        row("material", -0.0314, 0.0285, "cast iron", "PVC"),
        row("soil", 0.0139, 0.0138, "low", "moderate"),
        row("soil", 0.0636, 0.019, "low", "high"),
        row("lined", -0.011, 0.021, False, True),
        row("age_years", 0.0014, 0.0005),
        row("diameter_mm", -0.000135, 0.000086),
        row("past_repairs", 0.0279, 0.0075),
    ]


def effects_answer(rows=None, subject=None, **question):
    rows = effect_rows() if rows is None else rows
    return EffectsAnswer(EffectsQuestion(**question), subject or about(), tuple(rows), (), (2500,))


def effects_by_material(shift=0.0):
    rows = [
        row
        for i, level in enumerate(("cast iron", "ductile iron", "PVC"))
        for row in effect_rows(level, shift - 0.4 * i, 1.6 - 0.5 * i)
    ]
    return replace(effects_answer(rows, by="material"), counted=(900, 700, 900))


def effects_of_steps():
    """The same changes, numbers by their steps."""
    steps = {"age_years": 10.0, "diameter_mm": 50.0, "past_repairs": 1.0}
    rows = []
    for row in effect_rows():
        step = steps.get(row.predictor)
        middle, half = row.effect.estimate, 1.96 * row.effect.se
        rows.append(
            replace(row, step=step, effect=estimate(middle * step, half * step)) if step else row
        )
    return effects_answer(rows, number="step")


def effects_without_intervals():
    return effects_answer(effect_rows(intervals=False), about(no_interval=NO_INTERVAL))


def effects_with_giants():
    rows = effect_rows()
    rows[1] = effect_row("material", -0.03, 7.0, "cast iron", "PVC")
    rows[3] = replace(rows[3], effect=Estimate(0.9, 0.01, 0.88, math.inf))
    return effects_answer(rows)


def effects_at_a_profile():
    held = (("material", "PVC"), ("soil", "low"), ("age_years", 37.0))
    return replace(effects_answer(others="typical"), held=held, counted=())


def effects_nasty():
    return effects_answer(subject=nasty_subject())


AGEING = (("age_years", Move(20.0, 60.0)),)


def chance(middle, half):
    """A chance with an interval that is symmetric in log odds."""
    if half is None:
        return Estimate(middle, None, None, None)
    eta = math.log(middle / (1 - middle))
    ends = [1 / (1 + math.exp(-(eta + sign * half))) for sign in (-1, 1)]
    return Estimate(middle, half / 2, *ends)


def change_answer(
    start=0.24, end=0.31, half=0.2, difference=0.04, moves=AGEING, subject=None, beyond=(),
    **question,
):  # fmt: skip
    apart = estimate(end - start, None if half is None else difference)
    subject = subject or about(no_interval="" if half is not None else NO_INTERVAL)
    return ChangeAnswer(
        question=ChangeQuestion(moves, **question), subject=subject,
        start=chance(start, half), end=chance(end, half),
        comparison=Comparison(estimate(1.4, 0.2), apart, estimate(1.3, 0.2)),
        number_needed=number_needed(apart), held=(), counted=2500, beyond=beyond,
    )  # fmt: skip


def change_of_material(**more):
    moves = (("material", Move("cast iron", "PVC")),)
    return change_answer(0.31, 0.24, moves=moves, **more)


def change_of_several():
    moves = (("age_years", Move(60.0, 0.0)), ("material", Move("cast iron", "PVC")))
    return change_answer(0.31, 0.24, moves=moves)


def change_by_shift():
    moves = (("age_years", Shift(by=-10, lowest=0)),)
    return change_answer(0.31, 0.24, moves=moves, beyond=("age_years",))


def change_at_a_profile():
    whole = change_answer(others="typical")
    held = (("material", "PVC"), ("soil", "low"), ("past_repairs", 0))
    return replace(whole, held=held, counted=0)


def change_nasty():
    return change_answer(subject=nasty_subject())


EFFECTS = {
    "effects": effects_answer,
    "effects by material": effects_by_material,
    "effects of steps": effects_of_steps,
    "effects without intervals": effects_without_intervals,
    "effects with giants": effects_with_giants,
    "effects at a profile": effects_at_a_profile,
    "effects with nasty labels": effects_nasty,
    "one effect": lambda: effects_answer(effect_rows()[5:6]),
    "real effects": lambda: fit().effects(),
    "real effects by soil": lambda: fit().effects(by="soil"),
}

CHANGES = {
    "change": change_answer,
    "change of material": change_of_material,
    "change of several": change_of_several,
    "change by a shift": change_by_shift,
    "change at a profile": change_at_a_profile,
    "change of a yes or no": lambda: change_answer(moves=(("lined", Move(False, True)),)),
    "change without intervals": lambda: change_answer(half=None),
    "change with nasty labels": change_nasty,
    "no change": lambda: change_answer(0.3, 0.3),
    "rare change": lambda: change_answer(0.0002, 0.0007, difference=0.0004),
    "change near certainty": lambda: change_answer(0.93, 0.991, difference=0.02),
    "change of all": lambda: change_answer(0.02, 0.98, difference=0.02),
    "vague change": lambda: change_answer(0.1, 0.3, half=4.0, difference=0.8),
    "real change": lambda: fit().change("material", "cast iron", "PVC"),
    "real change beyond": lambda: fit().change("age_years", 20, 190, others="typical"),
    "real shift": lambda: fit().change("age_years", Shift(by=-10, lowest=0)),
}
