"""Hand-made answers about two predictors together: every number in them follows from η."""

import math
from itertools import groupby, product

from plainodds.answers.curve import CurveAnswer, CurveLine, CurveQuestion, Support
from plainodds.answers.estimate import Estimate
from plainodds.answers.joined import JoinedTest
from plainodds.answers.joint import AdditiveInteraction, JointCell, JointTable, StratumEffect
from plainodds.answers.pair import Interaction, PairAnswer, PairQuestion
from plainodds.answers.stretches import EffectAlong, Stretch
from tests.phrases.made import PREDICTORS, odds, probability, subject, wald
from tests.phrases.made_changes import difference, held_but

CHANGES = {
    "age_years": (20.0, 60.0),
    "past_repairs": (0.0, 1.0),
    "material": ("CI", "PVC"),
    "lined": (False, True),
}
STEPS = {"age_years": (40.0, 50.0), "past_repairs": (0.0, 1.0)}
# what a level, or a unit of a number, adds to η
SCORES = {
    "age_years": lambda x: 0.02 * (x - 20),
    "past_repairs": lambda x: 0.5 * x,
    "material": {"CI": 0.0, "DI": 0.5, "PVC": 0.9}.__getitem__,
    "lined": {False: 0.0, True: 1.2}.__getitem__,
}
GRID = tuple(float(x) for x in range(0, 111, 10))
ALONG = {"age_years": GRID, "past_repairs": tuple(float(x) for x in range(9))}


def values_of(name):
    if name in ALONG:
        return ALONG[name]
    return next(facts.levels for facts in PREDICTORS if facts.name == name)


def eta_at(a, b, x, y, alone, times, base):
    one, other = alone[0] * SCORES[a](x), alone[1] * SCORES[b](y)
    return base + one + other + times * one * other


def sign_of(estimate, nothing):
    if estimate.lower > nothing:
        return "above"
    return "below" if estimate.upper < nothing else "open"


def stretches_of(at, effects, nothing, share):
    """Neighbouring places with one sign; each level of a category by itself."""
    signs = [sign_of(each, nothing) for each in effects]
    if not isinstance(at[0], float):
        return tuple(Stretch(x, x, sign, share) for x, sign in zip(at, signs, strict=True))
    found = [
        (sign, [x for _, x in run])
        for sign, run in groupby(zip(signs, at, strict=True), lambda each: each[0])
    ]
    return tuple(Stretch(xs[0], xs[-1], sign, share) for sign, xs in found)


def effect_along(at, effects, nothing, share=0.25, supported=None, turns=()):
    known = effects[0].se is not None
    return EffectAlong(
        at,
        tuple(each.estimate for each in effects),
        tuple(each.se for each in effects) if known else None,
        tuple(each.lower for each in effects) if known else None,
        tuple(each.upper for each in effects) if known else None,
        supported or tuple(True for _ in at),
        stretches_of(at, effects, nothing, share) if known else (),
        turns,
    )


def lines_of(a, b, along, by, eta, se, question, held, stated):
    """Lines along one of the two, by all values (or the two of the change) of the other."""
    lines = []
    by_values = CHANGES[by] if by in ALONG else values_of(by)
    for y in by_values:
        at = tuple(sorted({*values_of(along), *CHANGES[along]}, key=values_order(along)))
        chances = [probability(wald(eta(x, y) if along == a else eta(y, x), se)) for x in at]
        parts = {
            name: None if se is None else tuple(getattr(each, name) for each in chances)
            for name in ("se", "lower", "upper")
        }
        estimates = tuple(each.estimate for each in chances)
        lines.append(CurveLine(y, at, estimates, supported=tuple(True for _ in at), **parts))
    support = tuple(Support(y, (0.0, 110.0), (1000,)) for y in by_values)
    asked = CurveQuestion(along, by=by, others=question.others)
    return CurveAnswer(asked, subject(**stated), tuple(lines), support, held)


def values_order(name):
    if name in ALONG:
        return lambda x: x
    return values_of(name).index


def additive(reference, a, b, both, se):
    excess = both - a - b + 1
    bottom, top = a + b - 2, both - 1
    synergy = None
    if top > 0 and bottom > 0:
        synergy = odds(wald(math.log(top / bottom), se))
    return AdditiveInteraction(difference(excess, se), difference(excess / both, se), synergy)


def joint_of(a, b, a_change, b_change, eta, se, told, rows):
    """The table, recoded to the combination with the lowest odds."""
    places = list(product(b_change, a_change))
    etas = {(x, y): eta(x, y) for y, x in places}
    x0, y0 = a_change[0], b_change[0]
    x1, y1 = a_change[1], b_change[1]
    recoded = ()
    if min(etas[x1, y0], etas[x0, y1]) < etas[x0, y0]:
        lowest = min(etas, key=etas.get)
        if lowest[0] != x0:
            x0, x1, recoded = x1, x0, (*recoded, a)
        if lowest[1] != y0:
            y0, y1, recoded = y1, y0, (*recoded, b)
    order = [(x0, y0), (x1, y0), (x0, y1), (x1, y1)]

    def ratio(one, other):
        return odds(wald(etas[one] - etas[other], se))

    def chance(place):
        return probability(wald(etas[place], se)) if told else None

    def apart(one, other):
        return difference(chance(one).estimate - chance(other).estimate, se) if told else None

    cells = tuple(
        JointCell(
            *place,
            rows[number],
            None if rows[number] is None else math.floor(rows[number] / 10),
            chance(place),
            Estimate(1.0, None, None, None) if number == 0 else ratio(place, order[0]),
            number == 0,
        )
        for number, place in enumerate(order)
    )
    strata = tuple(
        StratumEffect(name, start, end, within, ratio(there, here), apart(there, here))
        for name, start, end, within, here, there in (
            (a, x0, x1, y0, order[0], order[1]),
            (a, x0, x1, y1, order[2], order[3]),
            (b, y0, y1, x0, order[0], order[2]),
            (b, y0, y1, x1, order[1], order[3]),
        )
    )
    log = etas[x1, y1] - etas[x1, y0] - etas[x0, y1] + etas[x0, y0]
    odds_ratios = [math.exp(etas[place] - etas[order[0]]) for place in order]
    risks = None
    if told:
        at_reference = chance(order[0]).estimate
        risks = additive(*(chance(place).estimate / at_reference for place in order), se)
    return JointTable(
        cells, recoded, strata, odds(wald(log, se)), additive(*odds_ratios, se), risks
    )


def pair_answer(
    a="material",
    b="lined",
    alone=(1.0, 1.0),
    times=0.4,
    base=-2.4,
    se=0.2,
    apart_se=0.02,
    others="typical",
    number="change",
    scale="probability",
    share=0.25,
    supported=None,
    turns=(),
    table=None,
    rows=(300.0, 200.0, 120.0, 80.0),
    test="wald",
    freedom=1,
    denominator=None,
    counted=6000,
    **stated,
):
    """Two predictors whose η is given: `alone` for each, `times` for their product."""
    told = stated.get("sampling") != "case-control"
    slopes = tuple(name for name in (a, b) if number == "slope" and name in STEPS)
    a_change, b_change = (STEPS[name] if name in slopes else CHANGES[name] for name in (a, b))
    if se is None:
        apart_se = None

    def eta(x, y):
        return eta_at(a, b, x, y, alone, times, base)

    def chance(x, y):
        return 1 / (1 + math.exp(-eta(x, y)))

    def effect(y):
        x0, x1 = a_change
        if scale == "odds":
            return odds(wald(eta(x1, y) - eta(x0, y), se))
        per = x1 - x0 if a in slopes else 1.0
        return difference((chance(x1, y) - chance(x0, y)) / per, apart_se)

    (x0, x1), (y0, y1) = a_change, b_change
    per = math.prod(
        ends[1] - ends[0] for name, ends in ((a, a_change), (b, b_change)) if name in slopes
    )
    cross = (chance(x1, y1) - chance(x0, y1) - chance(x1, y0) + chance(x0, y0)) / per
    log = wald(eta(x1, y1) - eta(x0, y1) - eta(x1, y0) + eta(x0, y0), se)
    joined = times != 0
    if not joined:
        log = Estimate(0.0, None, None, None)
    asked = PairQuestion(
        a,
        b,
        number=number,
        others=others,
        scale=scale,
        test=test,
    )
    held = held_but(a, b)
    whole = difference(cross, apart_se)
    # the answer's own chances go with the one, the other is told beside it
    other = difference(0.7 * cross, apart_se)
    mean, whole = (whole, other) if others == "observed" else (other, whole)
    p = None if apart_se is None else math.erfc(abs(cross) / apart_se / math.sqrt(2))
    observed = others == "observed"
    if table is None:
        table = not slopes and not (a in ALONG or b in ALONG)
    along, by = (b, a) if b in ALONG and a not in ALONG else (a, b)
    return PairAnswer(
        asked,
        subject(**stated),
        a_change,
        b_change,
        slopes,
        held,
        counted,
        lines_of(a, b, along, by, eta, se, asked, () if observed else held, stated)
        if told
        else None,
        None,
        effect_along(
            values_of(b),
            [effect(y) for y in values_of(b)],
            1.0 if scale == "odds" else 0.0,
            share,
            supported,
            turns,
        ),
        Interaction(
            whole if told else None,
            mean if told and counted else None,
            p if told else None,
            p if told and counted else None,
            odds(log),
            log,
            joined,
            JoinedTest(test, 7.25, freedom, denominator, 0.0071) if joined and se else None,
        ),
        joint_of(a, b, a_change, b_change, eta, se, told, rows) if table else None,
    )
