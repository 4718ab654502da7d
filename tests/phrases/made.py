"""Hand-made answers: every number in them is stated, so that sentences can be held to it."""

import math
from dataclasses import replace

from plainodds import scales
from plainodds.answers.curve import CurveAnswer, CurveLine, CurveQuestion, Support
from plainodds.answers.estimate import Estimate
from plainodds.answers.familiarity import Familiarity
from plainodds.answers.odds import OddsAnswer, OddsQuestion, OddsRow
from plainodds.answers.profile import (
    Comparison,
    LedgerRow,
    ProfileAnswer,
    ProfilePoint,
    ProfileQuestion,
)
from plainodds.model.predictors import OutcomeFacts, PredictorFacts, Setting, Subject

NAN = math.nan
Z = 1.959963984540054


def number_facts(name="age_years", **stated):
    facts = {
        "name": name,
        "label": "Pipe age",
        "unit": "years",
        "kind": "number",
        "levels": (),
        "level_labels": (),
        "level_counts": (),
        "minimum": 0.0,
        "maximum": 110.0,
        "quartiles": (20.0, 40.0, 60.0),
        "offered": (0.0, 110.0),
        "allowed": (-math.inf, math.inf),
        "typical": 40.0,
        "step": 10.0,
        "linear": True,
        "modifiers": (),
    }
    return PredictorFacts(**(facts | stated))


def level_facts(name="material", levels=("CI", "DI", "PVC"), **stated):
    facts = {
        "name": name,
        "label": "Material",
        "unit": "",
        "kind": "category",
        "levels": levels,
        "level_labels": ("cast iron", "ductile iron", "PVC"),
        "level_counts": (500, 300, 200),
        "minimum": NAN,
        "maximum": NAN,
        "quartiles": (NAN, NAN, NAN),
        "offered": (NAN, NAN),
        "allowed": (NAN, NAN),
        "typical": levels[0],
        "step": NAN,
        "linear": True,
        "modifiers": (),
    }
    return PredictorFacts(**(facts | stated))


AGE = number_facts()
REPAIRS = number_facts(
    "past_repairs",
    label="past repairs",
    unit="",
    kind="whole number",
    minimum=0.0,
    maximum=8.0,
    quartiles=(0.0, 0.0, 1.0),
    offered=(0.0, 8.0),
    typical=0.0,
    step=1.0,
)
MATERIAL = level_facts()
LINED = level_facts(
    "lined",
    (False, True),
    label="lined",
    kind="yes/no",
    level_labels=("no", "yes"),
    level_counts=(600, 400),
)
PREDICTORS = (AGE, REPAIRS, MATERIAL, LINED)


def subject(**stated):
    facts = {
        "outcome": OutcomeFacts("burst", "burst this winter", "pipe", "pipes", 1, 0.1),
        "predictors": PREDICTORS,
        "rows": 6000,
        "covariance_kind": "nonrobust",
        "no_interval": "",
        "offset": None,
        "notices": (),
        "setting": Setting(),
    }
    return Subject(**(facts | stated))


def wald(eta, se):
    """An estimate on the scale of η."""
    if se is None:
        return Estimate(eta, None, None, None)
    return Estimate(eta, se, eta - Z * se, eta + Z * se)


def carried(estimate, to, slope):
    if estimate.se is None:
        return Estimate(float(to(estimate.estimate)), None, None, None)
    return Estimate(
        float(to(estimate.estimate)),
        float(slope(estimate.estimate)) * estimate.se,
        float(to(estimate.lower)),
        float(to(estimate.upper)),
    )


def odds(eta):
    return carried(eta, scales.odds_from_linear_predictor, scales.odds_from_linear_predictor)


def probability(eta):
    to = scales.probability_from_linear_predictor
    return carried(eta, to, lambda x: scales.probability_slope(to(x)))


def odds_row(predictor="age_years", start=40.0, end=50.0, log=0.42, se=0.1, **stated):
    logs = wald(log, se)
    p = None if se is None else math.erfc(abs(log) / se / math.sqrt(2))
    per_step = predictor in ("age_years", "past_repairs")
    row = OddsRow(predictor, start, end, per_step, (), odds(logs), logs, p)
    return replace(row, **stated)


def odds_answer(*rows, typical=0.08, question=None, **stated):
    return OddsAnswer(question or OddsQuestion(), subject(**stated), rows, typical)


def curve_answer(
    eta=lambda x, b: -3 + 0.03 * x,
    predictor="age_years",
    at=tuple(float(x) for x in range(0, 111, 10)),
    by=None,
    by_values=(None,),
    scale="probability",
    others="typical",
    se=0.2,
    unsupported=(),
    held=(("past_repairs", 0.0), ("lined", False)),
    **stated,
):
    """A curve of a given η; for a slope, `eta` is the slope itself."""
    lines = []
    for b in by_values:
        estimates = [wald(eta(x, b), se) for x in at]
        if scale == "probability":
            estimates = [probability(each) for each in estimates]
        elif scale == "odds":
            estimates = [odds(each) for each in estimates]
        parts = {
            name: None if se is None else tuple(getattr(each, name) for each in estimates)
            for name in ("se", "lower", "upper")
        }
        supported = tuple((x not in unsupported and (b, x) not in unsupported) for x in at)
        lines.append(
            CurveLine(
                b, at, tuple(each.estimate for each in estimates), supported=supported, **parts
            )
        )
    question = CurveQuestion(predictor, by=by, others=others, scale=scale)
    support = tuple(Support(b, (0.0, 110.0), (1000,)) for b in by_values)
    held = () if others == "observed" else held
    return CurveAnswer(question, subject(**stated), tuple(lines), support, held)


FAMILIAR = Familiarity(0.002, 0.01, 0.05, 120, (), "familiar")


def typical_values():
    return tuple((facts.name, facts.typical) for facts in PREDICTORS)


def point(eta, se=0.2, familiarity=FAMILIAR, **values):
    logs = wald(eta, se)
    held = tuple((name, values.get(name, typical)) for name, typical in typical_values())
    return ProfilePoint(held, logs, odds(logs), probability(logs), familiarity)


def profile_answer(
    values=(("age_years", 60.0),),
    eta=-1.5,
    start=-2.4,
    against=None,
    se=0.2,
    familiarity=FAMILIAR,
    start_familiarity=FAMILIAR,
    adds=None,
    **stated,
):
    """A profile; `adds` are (predictors, what they add) and default to all in one row."""
    here = point(eta, se, familiarity, **dict(values))
    there = point(start, se, start_familiarity, **dict(against or ()))
    adds = adds or ([(("age_years",), eta - start)] if eta != start else [])
    ledger, running = [], start
    for predictors, add in adds:
        running += add
        chance = float(scales.probability_from_linear_predictor(running))
        added = wald(add, se)
        ledger.append(LedgerRow(predictors, added, odds(added), running, chance))
    comparison = None
    if against is not None:
        p, q = here.probability.estimate, there.probability.estimate
        both = wald(eta - start, se)
        difference = Estimate(p - q, None, None, None)
        log_risk = wald(math.log(p / q), se)
        if se is not None:
            difference = Estimate(p - q, 0.01, p - q - Z * 0.01, p - q + Z * 0.01)
        comparison = Comparison(odds(both), difference, odds(log_risk))
    question = ProfileQuestion(values, against)
    return ProfileAnswer(question, subject(**stated), here, there, comparison, tuple(ledger))
