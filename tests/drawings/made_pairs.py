"""Answers about two predictors together, made by hand: water mains of an invented town."""

import math
from dataclasses import replace
from itertools import groupby

import numpy as np

from plainodds.answers.curve import CurveAnswer, CurveQuestion
from plainodds.answers.estimate import Estimate
from plainodds.answers.joined import JoinedTest
from plainodds.answers.pair import Interaction, PairAnswer, PairQuestion
from plainodds.answers.stretches import EffectAlong, Stretch
from plainodds.answers.support import Support
from plainodds.answers.surface import Surface
from plainodds.model.predictors import OutcomeFacts
from plainodds.scales import probability_from_linear_predictor as chance_at
from tests.drawings import made
from tests.drawings.made import AGE, DIAMETER, LINED, MATERIAL, NAN, PRESSURE, SOIL

_BY_LEVEL = {
    "cast iron": 0.0, "ductile iron": -0.5, "PVC": -1.2, "low": 0.0, "moderate": 0.4, "high": 1.0,
    False: 0.0, True: -0.5,
}  # fmt: skip
# what a unit, or a level, adds to log odds
_PER = {"age_years": 0.034, "pressure_m": 0.03, "diameter_mm": -0.004}
_MIDDLE = {"age_years": 41.0, "pressure_m": 47.0, "diameter_mm": 150.0}


def _score(facts, x):
    if facts.is_number:
        return _PER[facts.name] * (np.asarray(x, dtype=float) - _MIDDLE[facts.name])
    return np.asarray([_BY_LEVEL.get(each, 0.2) for each in np.atleast_1d(np.asarray(x, object))])


def _eta(a, b, x, y, joint, shift):
    own, other = _score(a, x), _score(b, y)
    return -2.2 + shift + own + other + joint * own * other


def _change(facts):
    if facts.is_number:
        return (facts.quartiles[0], facts.quartiles[2])
    return (facts.levels[0], facts.levels[-1])


def _along(facts, points):
    if facts.is_number:
        return tuple(float(x) for x in np.linspace(*facts.offered, points))
    return facts.levels


def _held_range(facts):
    width = facts.maximum - facts.minimum
    return facts.minimum + 0.04 * width, facts.maximum - 0.2 * width


def _lies_in(facts, at):
    if not facts.is_number:
        return tuple(True for _ in at)
    low, high = _held_range(facts)
    return tuple(low <= x <= high for x in at)


def _lines(a, b, subject, scale, joint, shift, intervals):
    along, by = (b, a) if b.is_number and not a.is_number else (a, b)
    values = by.levels or by.quartiles
    at = _along(along, 60)
    lines, support = [], []
    for place, each in enumerate(values):
        pair = (at, each) if along is a else (each, at)
        eta = np.broadcast_to(_eta(a, b, *pair, joint, shift), len(at))
        se = np.linspace(0.12, 0.3, len(at)) + 0.05 * place
        held = _lies_in(along, at)
        lines.append(
            made.curve_line(at, eta, se, scale, 0.02, each, held, intervals)
        )  # fmt: skip
        edges = tuple(np.linspace(*along.offered, 23)) if along.is_number else ()
        bins = np.arange(22 if along.is_number else len(at))
        counts = tuple(int(300 * math.exp(-(((i - 8 - 2 * place) / 5) ** 2))) for i in bins)
        support.append(Support(each, edges, counts))
    question = CurveQuestion(along.name, by=by.name, scale=scale)
    return CurveAnswer(question, subject, tuple(lines), tuple(support), (("soil", "low"),))


def _surface(a, b, scale, joint, shift, points):
    a_at, b_at = (np.linspace(*facts.offered, points) for facts in (a, b))
    x, y = np.meshgrid(a_at, b_at)
    eta = _eta(a, b, x, y, joint, shift)
    shown = np.exp(eta) if scale == "odds" else chance_at(eta)
    measured = eta if scale == "odds" else shown
    crossing = np.gradient(np.gradient(measured, a_at, axis=1), b_at, axis=0)
    far = ((x - a.quartiles[1]) / (0.5 * np.ptp(a_at))) ** 2
    far = far + ((y - b.quartiles[1]) / (0.42 * np.ptp(b_at))) ** 2
    far = far + 0.9 * (x - a.quartiles[1]) * (y - b.quartiles[1]) / np.ptp(a_at) / np.ptp(b_at)
    as_rows = [tuple(map(tuple, each.tolist())) for each in (shown, crossing, far < 1)]
    return Surface(tuple(a_at.tolist()), tuple(b_at.tolist()), *as_rows)


def estimate(middle, half):
    if half is None:
        return Estimate(middle, None, None, None)
    return Estimate(middle, half / 1.96, middle - half, middle + half)


def ratio(log, half):
    if half is None:
        return Estimate(math.exp(log), None, None, None)
    ends = math.exp(log - half), math.exp(log + half)
    return Estimate(math.exp(log), math.exp(log) * half / 1.96, *ends)


def _stretches(b, at, lower, upper, none):
    signs = ["above" if low > none else "below" if high < none else "open"
             for low, high in zip(lower, upper, strict=True)]  # fmt: skip
    if not b.is_number:
        share = 1 / len(at)
        return tuple(Stretch(x, x, sign, share) for x, sign in zip(at, signs, strict=True))
    found, start = [], at[0]
    for sign, run in groupby(zip(at, signs, strict=True), key=lambda each: each[1]):
        end = list(run)[-1][0]
        found.append(Stretch(start, end, sign, (end - start) / (at[-1] - at[0])))
        start = end
    return tuple(found)


def _effect(a, b, scale, number, joint, shift, intervals, wide):
    at = _along(b, 61)
    start, end = _change(a)
    slope = number == "slope" and a.is_number
    first, last = (
        np.broadcast_to(_eta(a, b, x, at, joint, shift), len(at)).astype(float)
        for x in ((start, start + a.step) if slope else (start, end))
    )
    spread = wide * (0.35 + 0.35 * np.abs(np.linspace(-0.8, 1, len(at))))
    if scale == "odds":
        middle = np.exp(last - first)
        low, high, none = middle * np.exp(-spread), middle * np.exp(spread), 1.0
    else:
        middle = chance_at(last) - chance_at(first)
        if slope:
            middle = middle / a.step
        half = spread * 0.5 * (np.abs(middle) + 0.1 * np.max(np.abs(middle)))
        low, high, none = middle - half, middle + half, 0.0
    turns = ()
    if b.is_number:
        bends = np.flatnonzero(np.diff(np.sign(np.round(np.diff(middle), 12))))
        turns = tuple(at[i + 1] for i in bends)
    ends = [tuple(each.tolist()) for each in (spread, low, high)]
    return EffectAlong(
        at, tuple(middle.tolist()), *(ends if intervals else (None, None, None)), _lies_in(b, at),
        _stretches(b, at, *ends[1:], none) if intervals else (), turns,
    )  # fmt: skip


def pair_answer(
    a=AGE, b=PRESSURE, scale="probability", shape="lines", number="change", joint=-0.5, shift=0.0,
    intervals=True, subject=None, cross=0.042, points=60, wide=1.0, chances=True, others="typical",
    log_ratio=0.33, counted=6000,
):  # fmt: skip
    """Two predictors of a model with log odds that are linear in each, and in their product."""
    if subject is None:
        subject = made.subject(no_interval="" if intervals else made.NO_INTERVAL)
    half = 0.03 if intervals else None
    joined = joint != 0
    interaction = Interaction(
        estimate(cross, half) if chances else None,
        estimate(0.6 * cross, half) if chances and counted else None,
        0.01, 0.02,
        ratio(log_ratio, 0.21 if intervals else None) if joined
        else Estimate(1.0, None, None, None),
        estimate(log_ratio, 0.21 if intervals else None) if joined
        else Estimate(0.0, None, None, None),
        joined, JoinedTest("wald", 6.2, 1, None, 0.012) if joined else None,
    )  # fmt: skip
    curve_scale = "odds" if scale == "odds" else "probability"
    sloped = tuple(f.name for f in (a, b) if number == "slope" and f.is_number)
    changes = tuple(
        (f.typical, f.typical + f.step) if f.name in sloped else _change(f) for f in (a, b)
    )
    return PairAnswer(
        PairQuestion(a.name, b.name, number=number, others=others, scale=scale, shape=shape),
        subject, *changes, sloped, (("soil", "low"), ("diameter_mm", 150.0)),
        counted if chances else 0,
        _lines(a, b, subject, curve_scale, joint, shift, intervals) if chances else None,
        _surface(a, b, scale, joint, shift, points) if shape == "map" else None,
        _effect(a, b, scale, number, joint, shift, intervals, wide), interaction, None,
    )  # fmt: skip


def map_answer(scale="probability", **more):
    return pair_answer(scale=scale, shape="map", **more)


def nasty_answer(**more):
    """Labels that hold anything, and are long."""
    levels = ("$_", "__$_", "x" * 70)
    predictors = tuple(
        replace(facts, label=made.NASTY, unit="$_" if facts.unit else "",
                level_labels=levels[: len(facts.levels)])
        for facts in made.TOWN
    )  # fmt: skip
    event = "$event$ _of a kind that takes a great many words before it has been named in full"
    about = made.subject(predictors, outcome=OutcomeFacts("y", event, "case", "cases", 1, 0.3))
    return pair_answer(subject=about, **more)


def unknown_answer(**more):
    """Figures that came out as not a number."""
    whole = pair_answer(**more)
    missing = tuple(NAN for _ in whole.effect.at)
    effect = replace(whole.effect, estimate=missing, lower=missing, upper=missing, se=missing,
                     stretches=(), turns=())  # fmt: skip
    none = Estimate(NAN, NAN, NAN, NAN)
    interaction = replace(whole.interaction, at_profile=none, averaged=none, ratio=none,
                          log_ratio=none)  # fmt: skip
    return replace(whole, effect=effect, interaction=interaction)


def one_level_answer():
    """A predictor with a single level among the rows."""
    whole = pair_answer(AGE, LINED)
    effect = whole.effect
    first = replace(
        effect, at=effect.at[:1], estimate=effect.estimate[:1], se=effect.se[:1],
        lower=effect.lower[:1], upper=effect.upper[:1], supported=(True,),
        stretches=effect.stretches[:1],
    )  # fmt: skip
    return replace(whole, effect=first)


def giant_answer(**more):
    """What separation leaves: intervals that no axis can hold."""
    whole = pair_answer(wide=40.0, **more)
    wide = Estimate(7.0, 9.0, 1e-7, 1e9)
    interaction = replace(whole.interaction, ratio=wide, log_ratio=Estimate(1.9, 9.0, -16.1, 20.7),
                          averaged=Estimate(0.03, 0.5, -0.95, 1.01))  # fmt: skip
    return replace(whole, interaction=interaction)


PAIRS = {
    "two numbers": pair_answer,
    "two numbers, odds": lambda: pair_answer(scale="odds"),
    "two numbers, slopes": lambda: pair_answer(number="slope", cross=0.0002),
    "two numbers, map": map_answer,
    "two numbers, map of odds": lambda: map_answer("odds"),
    "map of slopes": lambda: map_answer(number="slope", cross=0.0002),
    "map, rare event": lambda: map_answer(shift=-4.0, cross=0.0011),
    "map without a shared term": lambda: map_answer(joint=0.0, shift=2.2),
    "map of odds without a shared term": lambda: map_answer("odds", joint=0.0),
    "map of nasty labels": lambda: nasty_answer(shape="map"),
    "number and category": lambda: pair_answer(AGE, MATERIAL),
    "number and category, odds": lambda: pair_answer(AGE, MATERIAL, "odds"),
    "category and number": lambda: pair_answer(MATERIAL, AGE),
    "category and number, odds": lambda: pair_answer(MATERIAL, AGE, "odds"),
    "number and yes or no": lambda: pair_answer(AGE, LINED),
    "two categories": lambda: pair_answer(SOIL, MATERIAL),
    "two categories, odds": lambda: pair_answer(SOIL, MATERIAL, "odds"),
    "without a shared term": lambda: pair_answer(AGE, DIAMETER, joint=0.0),
    "without intervals": lambda: pair_answer(intervals=False),
    "without intervals, levels": lambda: pair_answer(AGE, MATERIAL, intervals=False),
    "without averages": lambda: pair_answer(counted=0),
    "case-control": lambda: pair_answer(scale="odds", chances=False),
    "case-control of levels": lambda: pair_answer(AGE, MATERIAL, "odds", chances=False),
    "nasty labels": nasty_answer,
    "nasty labels of levels": lambda: nasty_answer(a=SOIL, b=MATERIAL),
    "not a number": unknown_answer,
    "not a number, levels": lambda: unknown_answer(b=MATERIAL),
    "one level": one_level_answer,
    "giants": giant_answer,
    "giants, odds": lambda: giant_answer(scale="odds"),
    "averaged": lambda: pair_answer(others="observed"),
}
