"""Answers made by hand: water mains of an invented town, and the cases that break pictures."""

import math
from dataclasses import replace

import numpy as np

from plainodds.answers.curve import CurveAnswer, CurveLine, CurveQuestion, Support
from plainodds.answers.estimate import Estimate
from plainodds.answers.joined import JoinedTest
from plainodds.answers.odds import OddsAnswer, OddsQuestion, OddsRow
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.answers.profile import (
    Comparison,
    Familiarity,
    LedgerRow,
    ProfileAnswer,
    ProfilePoint,
    ProfileQuestion,
)
from plainodds.model.predictors import OutcomeFacts, PredictorFacts, Setting, Subject

NAN = math.nan
NASTY = "_cost in $ per $x^2 {_y}$ <img src=x onerror=alert(1)> \\frac & so on without an end"
NASTY_LEVEL = "$_"


def number(name, label, unit, low, high, quartiles, typical, step, **more):
    facts = PredictorFacts(
        name=name, label=label, unit=unit, kind="number", levels=(), level_labels=(),
        level_counts=(), minimum=low, maximum=high, quartiles=quartiles, offered=(low, high),
        allowed=(-math.inf, math.inf), typical=typical, step=step, linear=True, modifiers=(),
    )  # fmt: skip
    return replace(facts, **more)


def category(name, label, levels, counts, typical, **more):
    facts = PredictorFacts(
        name=name, label=label, unit="", kind="category", levels=levels, level_labels=levels,
        level_counts=counts, minimum=NAN, maximum=NAN, quartiles=(NAN, NAN, NAN),
        offered=(NAN, NAN), allowed=(NAN, NAN), typical=typical, step=NAN, linear=False,
        modifiers=(),
    )  # fmt: skip
    return replace(facts, **more)


AGE = number(
    "age_years", "Pipe age", "years", 0.0, 110.0, (18.0, 41.0, 63.0), 41.0, 10.0,
    modifiers=("material",),
)  # fmt: skip
MATERIAL = category(
    "material", "Material", ("cast iron", "ductile iron", "PVC"), (2714, 1806, 1480), "cast iron",
    modifiers=("age_years",),
)  # fmt: skip
SOIL = category("soil", "Soil corrosivity", ("low", "moderate", "high"), (2410, 2350, 1240), "low")
PRESSURE = number(
    "pressure_m", "Pressure", "m", 18.0, 95.0, (38.0, 47.0, 58.0), 47.0, 10.0, linear=False
)
DIAMETER = number("diameter_mm", "Diameter", "mm", 80.0, 600.0, (100, 150, 200), 150.0, 50.0)
REPAIRS = number("past_repairs", "Past repairs", "", 0, 9, (0, 0, 1), 0, 1, kind="whole number")
LINED = PredictorFacts(
    **{
        **category("lined", "Lined", (False, True), (5100, 900), False).__dict__,
        "kind": "yes/no",
        "level_labels": ("no", "yes"),
    }
)
TOWN = (AGE, MATERIAL, SOIL, PRESSURE, DIAMETER, REPAIRS, LINED)


def subject(predictors=TOWN, **more):
    facts = Subject(
        outcome=OutcomeFacts("burst", "burst this winter", "pipe", "pipes", 1, 0.083),
        predictors=tuple(predictors), rows=6000, covariance_kind="nonrobust", no_interval="",
        offset=None, notices=(), setting=Setting(),
    )  # fmt: skip
    return replace(facts, **more)


NO_INTERVAL = "A penalised fit has no covariance matrix, so no interval can be given."


# ---------------------------------------------------------------- odds


def odds_row(predictor, start, end, log_or, se, given=(), per_step=False, model=""):
    if se is None:
        ratio, logs, p = (
            Estimate(math.exp(log_or), None, None, None), Estimate(log_or, None, None, None), None
        )  # fmt: skip
    else:
        low, high = log_or - 1.96 * se, log_or + 1.96 * se
        with np.errstate(over="ignore"):
            ratio = Estimate(
                float(np.exp(log_or)), float(np.exp(log_or)) * se, float(np.exp(low)),
                float(np.exp(high)),
            )  # fmt: skip
        logs, p = Estimate(log_or, se, low, high), 0.01
    return OddsRow(predictor, start, end, per_step, given, ratio, logs, p, model)


def odds_rows(model="", shift=0.0, se=1.0):
    def row(predictor, start, end, log_or, error, **more):
        spread = None if se is None else error * se
        return odds_row(predictor, start, end, log_or + shift, spread, model=model, **more)

    return (
        row("age_years", 41.0, 51.0, 0.34, 0.04, given=(("material", "cast iron"),), per_step=True),
        row("age_years", 41.0, 51.0, 0.19, 0.07, given=(("material", "ductile iron"),),
            per_step=True),
        row("age_years", 41.0, 51.0, 0.02, 0.09, given=(("material", "PVC"),), per_step=True),
        row("material", "cast iron", "ductile iron", -0.62, 0.17, given=(("age_years", 41.0),)),
        row("material", "cast iron", "PVC", -1.31, 0.25, given=(("age_years", 41.0),)),
        row("soil", "low", "moderate", 0.41, 0.13),
        row("soil", "low", "high", 1.02, 0.14),
        row("pressure_m", 38.0, 58.0, 0.55, 0.12),
        row("diameter_mm", 150.0, 200.0, -0.11, 0.05, per_step=True),
        row("past_repairs", 0, 1, 0.38, 0.05, per_step=True),
        row("lined", False, True, -0.47, 0.21),
    )  # fmt: skip


def odds_answer(rows=None, about=None, **question):
    rows = odds_rows() if rows is None else tuple(rows)
    return OddsAnswer(OddsQuestion(**question), about or subject(), rows, 0.062)


def odds_of_models(names=("crude", "adjusted")):
    rows = [odds_rows(name, shift=0.12 * i, se=1 + 0.2 * i) for i, name in enumerate(names)]
    return odds_answer([row for each in zip(*rows, strict=True) for row in each], models=names)


def odds_without_intervals():
    return odds_answer(odds_rows(se=None), subject(no_interval=NO_INTERVAL))


def odds_with_giants():
    """Separation's offspring: intervals and estimates that no axis can hold."""
    rows = list(odds_rows())
    rows[4] = odds_row("material", "cast iron", "PVC", -1.31, 4.5, given=(("age_years", 41.0),))
    rows[6] = odds_row("soil", "low", "high", 19.0, 4000.0)
    rows[10] = odds_row("lined", False, True, -24.0, 2.0)
    return odds_answer(rows)


def odds_nasty():
    level = "_" + NASTY_LEVEL
    bad = category("bad", NASTY, (NASTY_LEVEL, level, "x" * 70), (10, 20, 30), level)
    rows = [
        odds_row("bad", NASTY_LEVEL, level, 0.5, 0.2),
        odds_row("bad", NASTY_LEVEL, "x" * 70, -0.3, 0.2),
        odds_row("age_years", 41.0, 51.0, 0.3, 0.04, per_step=True),
    ]
    event = "$event$ _of a kind that takes a great many words before it has been named in full"
    about = subject((bad, AGE), outcome=OutcomeFacts("y", event, "case", "cases", 1, 0.3))
    return odds_answer(rows, about)


def odds_printed(answer=None, counts=True, tests=True, **about):
    """An answer to be printed as a table: with events and cases, and tests of interaction."""
    answer = odds_answer() if answer is None else answer
    predictors = tuple(
        replace(
            facts,
            level_cases=tuple(map(float, facts.level_counts)),
            level_events=tuple(float(n // 9 + i) for i, n in enumerate(facts.level_counts)),
        )
        if counts and not facts.is_number
        else facts
        for facts in answer.subject.predictors
    )
    joined = JoinedTest("wald", 6.93, 2, None, 0.0313)
    models = answer.question.models or ("",)
    pairs = {(row.predictor, name) for row in answer.rows for name, _ in row.given}
    pair = min(pairs, default=None)
    return replace(
        answer,
        question=replace(answer.question, layout="table"),
        subject=replace(answer.subject, predictors=predictors, **about),
        interactions=tuple(
            InteractionTest(*pair, joined, name) for name in models if tests and pair
        ),
    )


def odds_by_level(levels=("low", "moderate", "high"), at=((18.0, 0.2), (41.0, 0.5), (63.0, 0.9))):
    """A category's odds ratios at three values of a number."""
    first, *others = levels
    return odds_answer(
        odds_row("soil", first, level, log * (1 + i), 0.2, given=(("age_years", age),))
        for i, level in enumerate(others)
        for age, log in at
    )


# ---------------------------------------------------------------- curves


def _slope_at(by):
    return {"cast iron": 0.034, "ductile iron": 0.019, "PVC": 0.002}[by]


def _eta(age, by, shift=0.0):
    level = {"cast iron": -3.9, "ductile iron": -4.0, "PVC": -4.2}[by]
    return level + _slope_at(by) * np.asarray(age) + shift


def _carried(scale, eta, se, slope):
    """An estimate and its interval on a scale, from η and its standard error."""
    ends = (eta, eta - 1.96 * se, eta + 1.96 * se)
    if scale == "linear_predictor":
        return ends
    if scale == "odds":
        return tuple(np.exp(each) for each in ends)
    chances = tuple(1 / (1 + np.exp(-each)) for each in ends)
    if scale == "probability":
        return chances
    middle = slope * chances[0] * (1 - chances[0])
    wide = np.abs(middle) * 0.15 + 0.0004 * se / 0.1
    return middle, middle - wide, middle + wide


def _tuple(values):
    return tuple(float(each) for each in values)


def curve_line(at, eta, se, scale, slope=0.0, by=None, supported=None, intervals=True):
    middle, low, high = _carried(scale, np.asarray(eta), np.asarray(se), slope)
    supported = tuple(True for _ in at) if supported is None else supported
    ends = (_tuple(se), _tuple(low), _tuple(high)) if intervals else (None, None, None)
    return CurveLine(by, tuple(at), _tuple(middle), *ends, supported)


_RANGES = {"cast iron": (25, 110), "ductile iron": (8, 72), "PVC": (0, 38)}


def curve_by_material(scale="probability", shift=0.0, points=60, intervals=True, others="typical"):
    at = _tuple(np.linspace(0, 110, points))
    edges = _tuple(np.linspace(0, 110, 23))
    lines, support = [], []
    for by, (low, high) in _RANGES.items():
        ages = np.asarray(at)
        far = np.clip(np.maximum(low - ages, ages - high), 0, None)
        se = 0.09 + 0.0016 * np.abs(ages - (low + high) / 2) + 0.009 * far
        held = tuple(bool(each) for each in far == 0)
        lines.append(
            curve_line(at, _eta(ages, by, shift), se, scale, _slope_at(by), by, held, intervals)
        )
        middles = (np.asarray(edges[1:]) + np.asarray(edges[:-1])) / 2
        share = np.exp(-(((middles - (low + high) / 2) / (high - low) * 2.4) ** 2))
        share[(middles < low) | (middles > high)] = 0
        total = dict(zip(MATERIAL.levels, MATERIAL.level_counts, strict=True))[by]
        support.append(Support(by, edges, tuple(int(n) for n in share / share.sum() * total)))
    about = subject() if intervals else subject(no_interval=NO_INTERVAL)
    question = CurveQuestion("age_years", by="material", scale=scale, others=others)
    held_at = () if others == "observed" else (("soil", "low"), ("pressure_m", 47.0))
    return CurveAnswer(question, about, tuple(lines), tuple(support), held_at)


def curve_alone(scale="probability", shift=0.0):
    whole = curve_by_material(scale, shift)
    return replace(
        whole,
        question=replace(whole.question, by=None),
        lines=(replace(whole.lines[0], by=None),),
        support=(replace(whole.support[0], by=None),),
    )


def curve_of_six(scale="probability"):
    """Six lines that end close together, by a number without a unit."""
    at = _tuple(np.linspace(18, 95, 40))
    edges = _tuple(np.linspace(18, 95, 15))
    lines, support = [], []
    for repairs in range(6):
        x = np.asarray(at)
        eta = -3.2 + 0.02 * (x - 50) + 0.0004 * np.clip(x - 60, 0, None) ** 2 + 0.11 * repairs
        se = 0.1 + 0.002 * np.abs(x - 48)
        lines.append(curve_line(at, eta, se, scale, 0.02, repairs))
        counts = tuple(int(900 / (1 + repairs) ** 2 * math.exp(-(((i - 5) / 4) ** 2)))
                       for i in range(14))  # fmt: skip
        support.append(Support(repairs, edges, counts))
    question = CurveQuestion("pressure_m", by="past_repairs", scale=scale)
    return CurveAnswer(question, subject(), tuple(lines), tuple(support), ())


def curve_of_levels(scale="probability", by=True, intervals=True):
    """The chance at each level of soil, by material or alone."""
    lines, support = [], []
    for i, each in enumerate(MATERIAL.levels if by else (None,)):
        eta = np.asarray([-2.6, -2.2, -1.55]) - 0.55 * i
        lines.append(
            curve_line(SOIL.levels, eta, [0.08, 0.09 + 0.05 * i, 0.12 + 0.2 * i], scale, 1.0,
                       each, (True, True, i != 2), intervals)
        )  # fmt: skip
        counts = tuple(int(n / (2.2 + i)) for n in SOIL.level_counts) if by else SOIL.level_counts
        support.append(Support(each, (), counts if i < 2 else (402, 388, 0)))
    question = CurveQuestion("soil", by="material" if by else None, scale=scale)
    return CurveAnswer(question, subject(), tuple(lines), tuple(support), (("age_years", 41.0),))


def curve_yes_no():
    whole = curve_of_levels(by=False)
    line = whole.lines[0]
    short = CurveLine(
        None, (False, True), line.estimate[:2], line.se[:2], line.lower[:2], line.upper[:2],
        (True, True),
    )  # fmt: skip
    return replace(
        whole,
        question=replace(whole.question, predictor="lined"),
        lines=(short,),
        support=(Support(None, (), LINED.level_counts),),
    )


def curve_nasty():
    whole = curve_by_material()
    names = (NASTY, NASTY_LEVEL, "_hidden " * 9)
    bad = category("bad", NASTY, names, (1, 2, 3), NASTY_LEVEL)
    event = "$event$ _of a kind that takes a great many words before it has been named in full"
    about = subject((replace(AGE, label=NASTY, unit="$/m_2"), bad),
                    outcome=OutcomeFacts("y", event, "case", "cases", 1, 0.3))  # fmt: skip
    return replace(
        whole,
        question=replace(whole.question, by="bad"),
        subject=about,
        lines=tuple(replace(o, by=n) for o, n in zip(whole.lines, names, strict=True)),
        support=tuple(replace(o, by=n) for o, n in zip(whole.support, names, strict=True)),
        held=(),
    )


def curve_with_giant_band():
    """A line whose interval fills all of the scale where the data end."""
    whole = curve_by_material()
    line = whole.lines[2]
    n = len(line.at)
    wide = tuple(min(0.999, 0.02 + (i / n) ** 3 * 4) for i in range(n))
    return replace(whole, lines=(*whole.lines[:2], replace(line, upper=wide)))


# ---------------------------------------------------------------- profiles


def _familiar(verdict="familiar", beyond=()):
    return Familiarity(0.002, 0.006, 0.02, 214 if verdict == "familiar" else 0, beyond, verdict)


def profile_point(values, eta, se, verdict="familiar", beyond=()):
    ends = (None, None) if se is None else (eta - 1.96 * se, eta + 1.96 * se)

    def carried(to, slope):
        if se is None:
            return Estimate(to(eta), None, None, None)
        return Estimate(to(eta), slope * se, to(ends[0]), to(ends[1]))

    def chance(each):
        return 1 / (1 + math.exp(-each)) if each > -700 else 0.0

    pi = chance(eta)
    return ProfilePoint(
        values, Estimate(eta, se, *ends), carried(math.exp, math.exp(eta)),
        carried(chance, pi * (1 - pi)), _familiar(verdict, beyond),
    )  # fmt: skip


TYPICAL = tuple((facts.name, facts.typical) for facts in TOWN)


def profile_answer(
    age=78.0, eta=-0.94, se=0.13, start_eta=-2.51, compared=True, verdict="familiar", about=None
):
    values = (("age_years", age), ("soil", "high"), ("past_repairs", 2))
    changed = dict(TYPICAL) | dict(values)
    start = profile_point(TYPICAL, start_eta, None if se is None else 0.07)
    beyond = ("age_years",) if verdict == "beyond" else ()
    point = profile_point(tuple(changed.items()), eta, se, verdict, beyond)
    total = eta - start_eta
    parts = {("age_years", "material"): 0.34, ("soil",): 0.40, ("pressure_m",): 0.0,
             ("diameter_mm",): 0.0, ("past_repairs",): 0.26, ("lined",): 0.0}  # fmt: skip
    ledger, running = [], start_eta
    for names, share in parts.items():
        adds = share * total
        running += adds
        ends = (None,) * 3 if se is None else (0.1, adds - 0.2, adds + 0.2)
        times = (None,) * 3 if se is None else (0.1, math.exp(adds - 0.2), math.exp(adds + 0.2))
        ledger.append(
            LedgerRow(names, Estimate(adds, *ends), Estimate(math.exp(adds), *times), running,
                      1 / (1 + math.exp(-running)))
        )  # fmt: skip
    comparison = None
    if compared:
        ratio = math.exp(total)
        first, last = point.probability.estimate, start.probability.estimate
        comparison = Comparison(
            Estimate(ratio, 0.3, ratio * 0.8, ratio * 1.25),
            Estimate(first - last, 0.02, first - last - 0.04, first - last + 0.04),
            Estimate(first / last, 0.3, first / last * 0.85, first / last * 1.2),
        )
    about = about or subject(no_interval=NO_INTERVAL if se is None else "")
    against = (("age_years", 41.0),) if compared else None
    return ProfileAnswer(
        ProfileQuestion(values, against), about, point, start, comparison, tuple(ledger)
    )


def profile_nasty():
    whole = profile_answer()
    nasty = tuple(replace(facts, label=NASTY, unit="$_" if facts.unit else "") for facts in TOWN)
    event = "$event$ _of a kind that takes a great many words before it has been named in full"
    about = subject(nasty, outcome=OutcomeFacts("y", event, "case", "cases", 1, 0.3))
    return replace(whole, subject=about)


def curve_of_many_levels():
    """Twelve levels, by four others: more than fit beside each other in a narrow picture."""
    levels = tuple(f"district {each}" for each in "ABCDEFGHIJKL")
    district = category("district", "District", levels, (500,) * 12, levels[0])
    owners = tuple(f"owner {each}" for each in range(1, 5))
    owner = category("owner", "Owner", owners, (1500,) * 4, owners[0])
    lines, support = [], []
    for i, each in enumerate(owners):
        eta = -2.5 + 0.2 * np.sin(np.arange(12)) + 0.1 * i
        lines.append(curve_line(levels, eta, [0.2] * 12, "probability", 1.0, each))
        support.append(Support(each, (), (125,) * 12))
    question = CurveQuestion("district", by="owner")
    return CurveAnswer(question, subject((district, owner)), tuple(lines), tuple(support), ())
