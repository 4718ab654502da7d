"""Findings made by hand: every topic and concern, and the cases that break pictures."""

import math
from dataclasses import replace

import numpy as np

from plainodds.answers.checks.amount import (
    AmountEvidence,
    LevelCount,
    LevelsEvidence,
    MissingEvidence,
)
from plainodds.answers.checks.calibration import CalibrationEvidence, Optimism
from plainodds.answers.checks.collinearity import CollinearityEvidence, TiedColumns
from plainodds.answers.checks.convergence import ConvergenceEvidence
from plainodds.answers.checks.dependence import DependenceEvidence, StandardErrorPair
from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern, Moved
from plainodds.answers.checks.overall import OverallEvidence
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.answers.checks.shape import Bin, ShapeEvidence
from plainodds.answers.checks.standard_errors import StandardErrorsEvidence, WideCoefficient
from plainodds.answers.estimate import Estimate
from plainodds.answers.soundness import SoundnessAnswer, SoundnessQuestion
from tests.drawings.made import NASTY, subject

NAN, INF = math.nan, math.inf


def town(name="material", events=(270.0, 150.0, 80.0)):
    """The invented town, with cases and events at each of its levels."""
    facts = subject()
    return replace(
        facts,
        predictors=tuple(
            replace(
                each,
                level_cases=tuple(map(float, each.level_counts)),
                level_events=events if each.name == name else tuple(
                    0.08 * cases for cases in each.level_counts
                ),
            )
            for each in facts.predictors
        ),
    )  # fmt: skip


def answer(finding, *others, facts=None, **question):
    asked = SoundnessQuestion(**{"show": finding.topic, **question})
    return SoundnessAnswer(asked, facts or town(), (finding, *others))


def groups(shift=0.0, cases=(60.0,) * 10, low=0.0, high=110.0):
    """Ten bins, whose shares bend away from the model's by `shift`."""
    step = (high - low) / 10
    found = []
    for place, number in enumerate(cases):
        centre = low + (place + 0.5) * step
        expected = 0.04 + 0.5 * place / 10
        observed = min(0.98, max(0.0, expected + shift * ((place - 4.5) ** 2 - 8) / 10))
        half = 1.96 * math.sqrt(0.2 / number)
        found.append(
            Bin(centre - step / 2, centre + step / 2, centre, number, number * observed, observed,
                expected, max(0.0, observed - half), min(1.0, observed + half))
        )  # fmt: skip
    return tuple(found)


def shape(shift=0.06, concern="don't explain yet", predictor="age_years", **more):
    bins = groups(shift, **more)
    evidence = ShapeEvidence(
        predictor=predictor, bins=bins, at=tuple(each.centre for each in bins),
        observed=tuple(each.observed for each in bins),
        lower=tuple(max(0.0, each.observed - 0.06) for each in bins),
        upper=tuple(min(1.0, each.observed + 0.06) for each in bins),
        expected=tuple(each.expected for each in bins), statistic=31.0, degrees_of_freedom=3,
        p_value=1e-6, largest_gap=0.11,
    )  # fmt: skip
    reasons = ("bends",) if concern in ("keep in mind", "don't explain yet") else ()
    return Finding("shape", concern, reasons, (predictor,), evidence)


OPTIMISM = Optimism("bootstrap", 198, 2, 0.81, 0.196, 0.68)


def calibration(optimism=None, concern="keep in mind", shift=0.03, top=0.55):
    bins = tuple(
        replace(each, centre=each.expected * top / 0.55, low=(each.expected - 0.02) * top / 0.55,
                high=(each.expected + 0.02) * top / 0.55)
        for each in groups(shift)
    )  # fmt: skip
    at = np.linspace(0.03, top, 40)
    smoothed = at + shift * np.sin(9 * at)
    evidence = CalibrationEvidence(
        bins=bins, at=tuple(at.tolist()), smoothed=tuple(smoothed.tolist()),
        lower=tuple((smoothed - 0.05).clip(0, 1).tolist()),
        upper=tuple((smoothed + 0.05).clip(0, 1).tolist()),
        intercept=Estimate(0.0, 0.1, -0.2, 0.2), slope=Estimate(1.0, 0.1, 0.8, 1.2), brier=0.179,
        brier_of_share=0.21, largest_gap=0.04, optimism=optimism,
    )  # fmt: skip
    return Finding("calibration", concern, ("curve",), (), evidence)


def discrimination(events=40.0, others=60.0, c=0.71, interval=(0.66, 0.76)):
    place = np.linspace(0, 1, 20)
    evidence = DiscriminationEvidence(
        c=Estimate(c, None if interval is None else 0.02, *(interval or (None, None))),
        edges=tuple(np.linspace(0.02, 0.71, 21).tolist()),
        events=tuple(np.round(events * place * np.exp(1 - 2 * place)).tolist()),
        others=tuple(np.round(others * (1 - place) ** 2).tolist()),
    )
    return Finding("discrimination", "nothing found", evidence=evidence)


def moved(predictor="age_years", before=1.4, step=1.7, refitted=2.0, **more):
    ends = {"age_years": (20.0, 30.0), "material": ("cast iron", "PVC")}[predictor]
    return Moved(predictor, *ends, more.get("given", ()), before, step, refitted)


def pattern(label, probability, delta_chi2, delta_beta, moves, cases=1.0, labels=None):
    return InfluentialPattern(
        labels=labels or (label,), cases=cases, events=1.0, values=(("age_years", 20.0),),
        probability=probability, leverage=0.1, delta_chi2=delta_chi2, delta_deviance=4.0,
        delta_beta=delta_beta, moved=moves,
    )  # fmt: skip


STANDING_OUT = (
    pattern("4", 0.07, 13.5, 2.1, (moved(), moved("material", 0.4, 0.3, 0.2))),
    pattern("18", 0.10, 9.3, 1.4, (moved("material", 0.4, 0.6, 0.9),)),
    pattern("28", 0.45, 2.0, 0.3, (moved(refitted=NAN),), 12.0, tuple("abcdefghij")),
)


def influence(standing_out=STANDING_OUT, concern="keep in mind", others=60, thinned=False):
    draws = np.random.default_rng(3)
    chance = draws.uniform(0.01, 0.9, others)
    square = draws.chisquare(1, others)
    known = [each for each in standing_out if math.isfinite(each.delta_chi2)]
    evidence = InfluenceEvidence(
        patterns=others + len(standing_out), standing_out=standing_out,
        probability=(*(each.probability for each in known), *chance.tolist()),
        delta_chi2=(*(each.delta_chi2 for each in known), *square.tolist()),
        delta_beta=(*(each.delta_beta for each in known), *(0.05 * square).tolist()),
        thinned=thinned,
    )  # fmt: skip
    reasons = {
        "keep in mind": ("moves an odds ratio",),
        "don't explain yet": ("turns an odds ratio", "moves an odds ratio"),
    }.get(concern, ())
    about = ("age_years", "material") if reasons else ()
    return Finding("influence", concern, reasons, about, evidence)


def separation(kind="quasi-complete", levels=(("material", "PVC"),), unbounded=None):
    sides = unbounded or (("material[T.PVC]", -INF), ("age_years", INF), ("soil[T.high]", NAN))
    evidence = SeparationEvidence(
        kind=kind, unbounded=sides, predictors=("material", "age_years"), levels=levels,
        rows=1480, patterns=900, all_rows=6000, all_patterns=4100,
    )  # fmt: skip
    return Finding("separation", "don't explain yet", (kind,), ("material",), evidence)


def no_separation():
    evidence = SeparationEvidence("none", (), (), (), 0, 0, 6000, 4100)
    return Finding("separation", "nothing found", evidence=evidence)


COUNTS = (
    LevelCount("material", "PVC", 14.0, 0.0),
    LevelCount("soil", "high", 1.0, 1.0),
    LevelCount("soil", "moderate", 9.0, 3.0),
    LevelCount("material", "cast iron", 210.0, 60.0),
    LevelCount("material", "ductile iron", 180.0, 31.0),
    LevelCount("soil", "low", 390.0, 87.0),
)


def levels(counts=COUNTS, sparse=3, concern="don't explain yet"):
    reasons = ("one outcome only", "few events") if sparse else ()
    about = tuple(dict.fromkeys(each.predictor for each in counts[:sparse]))
    return Finding("levels", concern, reasons, about, LevelsEvidence(counts, sparse))


def amount(events=59.0, others=130.0, parameters=8, concern="keep in mind"):
    each = min(events, others) / parameters
    evidence = AmountEvidence(events, others, parameters, each)
    reasons = () if concern == "nothing found" else ("few events",)
    return Finding("amount", concern, reasons, (), evidence)


def missing(known=60, dropped=69, share=0.30, concern="keep in mind", rows_used=545):
    difference = Estimate(share - 0.21, 0.06, share - 0.21 - 0.11, share - 0.21 + 0.13)
    evidence = MissingEvidence(
        used=rows_used, dropped=dropped,
        columns=(("pressure_m", 41), ("burst", dropped - known), ("elsewhere", 3)),
        known=known, share_used=0.21, share_dropped=share if known else NAN,
        difference=difference if known else None,
    )  # fmt: skip
    return Finding("missing", concern, ("many",), (), evidence, "" if known else "no outcome")


def collinearity(inflation=None, tied=True, concern="keep in mind"):
    sizes = inflation or (
        ("age_years", 4.1), ("pressure_m", 4.0), ("material", 1.3), ("soil", 1.01),
    )  # fmt: skip
    ties = (TiedColumns(("age_years", "pressure_m"), ("age_years", "pressure_m"), 34.0),)
    endless = any(math.isinf(size) for _, size in sizes)
    evidence = CollinearityEvidence(
        6 if endless else 7, 7, INF if endless else 34.0, ties if tied else (), tuple(sizes)
    )
    about = ("age_years", "pressure_m")
    return Finding("collinearity", concern, ("tied",) if tied else (), about, evidence)


def wide(column="material[T.PVC]", se=8.0):
    return WideCoefficient(column, ("material",), se, se)


WIDE = (wide("soil[T.high]", 900.0), wide())


def standard_errors(coefficients=WIDE, largest=900.0):
    concern = "don't explain yet" if coefficients else "nothing found"
    reasons = ("absurd",) if coefficients else ()
    if any(math.isnan(each.se) for each in coefficients):
        reasons = ("missing",)
    evidence = StandardErrorsEvidence(tuple(coefficients), largest)
    return Finding("standard errors", concern, reasons, (), evidence)


PAIRS = (
    StandardErrorPair("Intercept", (), 0.50, 0.47),
    StandardErrorPair("age_years", ("age_years",), 0.011, 0.024),
    StandardErrorPair("soil[T.high]", ("soil",), 0.14, 0.15),
    StandardErrorPair("material[T.PVC]", ("material",), NAN, NAN),
)


def dependence(pairs=PAIRS, already=False, name="district", concern="don't explain yet"):
    evidence = DependenceEvidence(name, 42, 310, 6000, tuple(pairs), already)
    reasons = ("standard errors differ",) if concern == "don't explain yet" else ()
    return Finding("dependence", concern, reasons, ("age_years",) if reasons else (), evidence)


def convergence(step=0.4, converged=False, concern="don't explain yet"):
    evidence = ConvergenceEvidence(converged, 35, step, "age_years")
    reasons = () if converged else ("not converged",)
    reasons += ("gradient",) if step > 0.01 else ()
    unknown = "no outcome" if math.isnan(step) else ""
    return Finding("convergence", concern, reasons, (), evidence, unknown)


def overall(p_value=0.29, link=0.43, concern="nothing found", statistic=9.65):
    evidence = OverallEvidence(10, statistic, 8, p_value, 0.17, 0.14, link)
    reasons = ("link test",) if concern == "keep in mind" else ()
    return Finding("overall", concern, reasons, (), evidence)


def not_known(topic, why="no rows"):
    about = ("age_years",) if topic == "shape" else ()
    return Finding(topic, "not known", (), about, None, why)


def nasty(finding):
    """The same finding of a fit whose labels are as long and strange as they come."""
    facts = town()
    levels = ("$_", "__$_", "x" * 70)
    predictors = tuple(
        replace(each, label=NASTY, unit="$_" if each.unit else "",
                level_labels=levels[: len(each.levels)])
        for each in facts.predictors
    )  # fmt: skip
    event = "$event$ _of a kind that takes a great many words before it has been named in full"
    outcome = replace(facts.outcome, event=event, case="case with a name", cases="cases with names")
    return answer(finding, facts=replace(facts, predictors=predictors, outcome=outcome))


def many_levels():
    counts = [LevelCount("material", f"level {place}", 9.0 + place, 2.0) for place in range(15)]
    return levels(tuple(counts), 15)


FINDINGS = {
    "shape": lambda: answer(shape()),
    "shape, nothing found": lambda: answer(shape(0.0, "nothing found")),
    "shape of a rare event": lambda: answer(shape(0.0, "nothing found", high=0.02)),
    "shape of few values": lambda: answer(
        shape(predictor="past_repairs", cases=(200.0, 40.0, 9.0, 1.0), high=10.0)
    ),
    "calibration": lambda: answer(calibration()),
    "calibration with optimism": lambda: answer(calibration(OPTIMISM), discrimination()),
    "calibration, optimism alone": lambda: answer(
        calibration(replace(OPTIMISM, way="cross-validation", slope=NAN))
    ),
    "calibration of all chances": lambda: answer(calibration(top=0.97)),
    "discrimination": lambda: answer(discrimination()),
    "discrimination of a rare event": lambda: answer(discrimination(30.0, 2500.0)),
    "discrimination without interval": lambda: answer(discrimination(interval=None)),
    "influence": lambda: answer(influence()),
    "influence that turns": lambda: answer(influence(concern="don't explain yet", thinned=True)),
    "influence of none": lambda: answer(influence((), "nothing found")),
    "separation": lambda: answer(separation()),
    "complete separation": lambda: answer(separation("complete", ())),
    "separation of many": lambda: answer(
        separation(unbounded=tuple((f"soil[T.{place}]", INF) for place in range(14)))
    ),
    "no separation": lambda: answer(no_separation()),
    "levels": lambda: answer(levels()),
    "levels, none sparse": lambda: answer(levels(COUNTS[3:], 0, "nothing found")),
    "many levels": lambda: answer(many_levels()),
    "amount": lambda: answer(amount()),
    "amount, far too few": lambda: answer(amount(3.0, 900.0, 12, "don't explain yet")),
    "amount, enough": lambda: answer(amount(9000.0, 3000.0, 3, "nothing found")),
    "missing": lambda: answer(missing()),
    "missing with their outcomes": lambda: answer(missing(known=0)),
    "missing none": lambda: answer(
        replace(missing(known=0), evidence=MissingEvidence(545, 0, (), 0, 0.2, NAN, None))
    ),
    "collinearity": lambda: answer(collinearity()),
    "collinearity, exact": lambda: answer(
        collinearity((("age_years", INF), ("pressure_m", INF), ("soil", 1.0)))
    ),
    "collinearity, none": lambda: answer(
        collinearity((("age_years", 1.1), ("soil", 1.0)), False, "nothing found")
    ),
    "standard errors": lambda: answer(standard_errors()),
    "standard errors, usual": lambda: answer(standard_errors((), 0.3)),
    "standard errors, missing": lambda: answer(standard_errors((wide(se=NAN),), NAN)),
    "dependence": lambda: answer(dependence()),
    "dependence, told already": lambda: answer(dependence(PAIRS[:2], True, "", "nothing found")),
    "dependence without errors": lambda: answer(dependence(())),
    "convergence": lambda: answer(convergence()),
    "convergence, reached": lambda: answer(convergence(1e-9, True, "nothing found")),
    "convergence without an end": lambda: answer(convergence(INF)),
    "convergence, step not known": lambda: answer(convergence(NAN)),
    "overall": lambda: answer(overall()),
    "overall, long figures": lambda: answer(overall(NAN, NAN, statistic=1e9)),
    "overall with a bend": lambda: answer(overall(NAN, 0.0001, "keep in mind")),
    **{
        f"{finding.topic} with nasty labels": lambda finding=finding: nasty(finding)
        for finding in (
            shape(),
            calibration(OPTIMISM),
            discrimination(),
            influence(),
            separation(),
            levels(COUNTS[:3] + COUNTS[4:], 3),
            amount(),
            missing(),
            collinearity(),
            standard_errors((wide(NASTY),)),
            dependence(),
            convergence(),
            overall(),
        )
    },
    **{
        f"{topic}, not known": lambda topic=topic: answer(not_known(topic))
        for topic in ("shape", "missing")
    },
}
"""Answers by name; each shows a finding of its own."""
