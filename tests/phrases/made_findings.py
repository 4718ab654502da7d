"""Hand-made findings: every figure in them is stated, so that sentences can be held to it."""

import math
from dataclasses import fields, is_dataclass, replace

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
from plainodds.answers.checks.finding import TOPICS, Finding
from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern, Moved
from plainodds.answers.checks.overall import OverallEvidence
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.answers.checks.shape import Bin, ShapeEvidence
from plainodds.answers.checks.standard_errors import StandardErrorsEvidence, WideCoefficient
from plainodds.answers.estimate import Estimate
from plainodds.answers.soundness import SoundnessAnswer, SoundnessQuestion
from tests.phrases.made import subject

__all__ = ["MADE", "UNKNOWN", "answer_of", "everything", "finding", "numbers_of"]

INF, NAN = math.inf, math.nan
MIND, HEAVY, FINE, OPEN = "keep in mind", "don't explain yet", "nothing found", "not known"

UNKNOWN = (
    "no rows",
    "no outcome",
    "no covariance",
    "no likelihood",
    "no groups named",
    "not said by the fit",
    "rows chosen by outcome",
    "too few rows",
)


def finding(topic, concern, evidence, reasons=(), about=(), unknown=""):
    return Finding(topic, concern, reasons, about, evidence, unknown)


def convergence(converged=True, iterations=7, step=0.0034, column="x"):
    return ConvergenceEvidence(converged, iterations, step, column)


OVERLAP = SeparationEvidence("none", (), (), (), 0, 0, 512, 498)
QUASI = SeparationEvidence(
    "quasi-complete",
    (("C(material)[T.PVC]", INF), ("age_years", NAN)),
    ("material", "age_years"),
    (("material", "PVC"),),
    14,
    13,
    512,
    498,
)
PAIRED = TiedColumns(("age_years", "past_repairs"), ("age_years", "past_repairs"), 41.3)
EXACT = TiedColumns(("age_years", "past_repairs"), ("age_years", "past_repairs"), INF)
INFLATION = (("age_years", 4.32), ("past_repairs", 4.29), ("material", 1.04))
WIDE = (
    WideCoefficient("age_years", ("age_years",), 0.71, 5.3),
    WideCoefficient("C(material)[T.PVC]", ("material",), 12.1, 4.4),
)
COUNTS = (
    LevelCount("material", "PVC", 14.0, 0.0),
    LevelCount("lined", True, 23.0, 3.0),
    LevelCount("material", "CI", 311.0, 87.0),
)


HIGHER = Estimate(0.034, 0.01, 0.014, 0.056)


def missing(dropped=720, known=613, difference=HIGHER, **stated):
    made = MissingEvidence(
        used=5280,
        dropped=dropped,
        columns=(("age_years", 700), ("burst", 107), ("<i>strange</i>", 11)),
        known=known,
        share_used=0.112,
        share_dropped=0.146,
        difference=difference,
    )
    return replace(made, **stated)


BINS = tuple(
    Bin(10.0 * k, 10.0 * k + 9, 10.0 * k + 5, 60.0, 6.0, 0.1, 0.11, 0.05, 0.2) for k in range(11)
)
GRID = (10.0, 50.0, 90.0)
SHARES = (0.08, 0.1, 0.12)


def shape(gap=0.12, p=0.0003, statistic=14.2, freedom=2):
    return ShapeEvidence(
        "age_years", BINS, GRID, SHARES, SHARES, SHARES, SHARES, statistic, freedom, p, gap
    )


def calibration(gap=0.019, optimism=None, **stated):
    made = CalibrationEvidence(
        bins=BINS,
        at=GRID,
        smoothed=SHARES,
        lower=SHARES,
        upper=SHARES,
        intercept=Estimate(1e-17, 0.1, -0.19, 0.19),
        slope=Estimate(1.0, 0.11, 0.78, 1.22),
        brier=0.093,
        brier_of_share=0.101,
        largest_gap=gap,
        optimism=optimism,
    )
    return replace(made, **stated)


MOVED = Moved("age_years", 40.0, 50.0, (), 1.43, 0.92, 0.83)
FAILED = Moved("material", "CI", "PVC", (("lined", True),), 2.31, 1.12, NAN)


def pattern(labels=("r12",), cases=1.0, events=1.0, moved=(MOVED, FAILED)):
    return InfluentialPattern(
        labels, cases, events, (("age_years", 97.0),), 0.021, 0.31, 47.2, 7.7, 19.4, moved
    )


def influence(*patterns):
    return InfluenceEvidence(498, patterns, (0.1, 0.2), (1.0, 2.0), (0.1, 0.2), False)


PAIRS = (
    StandardErrorPair("Intercept", (), 0.41, 0.43),
    StandardErrorPair("age_years", ("age_years",), 0.12, 0.31),
)


def dependence(name="household", groups=300, largest=25, pairs=PAIRS, already=False):
    return DependenceEvidence(name, groups, largest, 6000, pairs, already)


def discrimination(c=0.742, lower=0.703, upper=0.779):
    return DiscriminationEvidence(Estimate(c, None, lower, upper), (0.0, 0.5, 1.0), (3.0,), (9.0,))


OVERALL = OverallEvidence(10, 7.51, 8, 0.483, 0.182, 0.153, 0.594)
TIED_ABOUT = ("age_years", "past_repairs")

MADE = (
    finding("convergence", FINE, convergence()),
    finding("convergence", FINE, convergence(step=1e-9)),
    finding("convergence", FINE, convergence(None, None)),
    finding("convergence", FINE, convergence(step=NAN), unknown="no likelihood"),
    finding("convergence", FINE, convergence(step=NAN)),
    finding("convergence", MIND, convergence(False, 1), ("not converged",)),
    finding("convergence", MIND, convergence(step=0.034), ("gradient",), ("age_years",)),
    finding("convergence", HEAVY, convergence(False, 35, 0.71), ("not converged", "gradient")),
    finding("convergence", HEAVY, convergence(False, 35, INF), ("not converged", "gradient")),
    finding("convergence", HEAVY, convergence(None, None, 3.2), ("gradient",)),
    finding(
        "convergence", HEAVY, convergence(False, step=NAN), ("not converged",), (), "no outcome"
    ),
    finding("separation", FINE, OVERLAP),
    finding("separation", HEAVY, QUASI, ("quasi-complete",), QUASI.predictors),
    finding("separation", MIND, QUASI, ("quasi-complete",), QUASI.predictors),
    finding(
        "separation",
        HEAVY,
        replace(QUASI, levels=(("material", "PVC"), ("lined", True)), rows=1),
        ("quasi-complete",),
    ),
    finding(
        "separation",
        HEAVY,
        replace(QUASI, kind="complete", rows=512, levels=(), unbounded=(("age_years", -INF),)),
        ("complete",),
        ("age_years",),
    ),
    finding(
        "separation", HEAVY, replace(QUASI, predictors=("age_years",), levels=()), ("complete",)
    ),
    finding("separation", HEAVY, replace(QUASI, predictors=(), levels=()), ("complete",)),
    finding("collinearity", FINE, CollinearityEvidence(6, 6, 1.77, (), INFLATION[2:])),
    finding("collinearity", FINE, CollinearityEvidence(1, 1, 1.0, (), ())),
    finding(
        "collinearity",
        MIND,
        CollinearityEvidence(6, 6, 41.3, (PAIRED,), INFLATION),
        ("tied",),
        TIED_ABOUT,
    ),
    finding(
        "collinearity",
        MIND,
        CollinearityEvidence(6, 6, 9.0, (), INFLATION),
        ("tied",),
        ("age_years",),
    ),
    finding(
        "collinearity",
        HEAVY,
        CollinearityEvidence(5, 6, INF, (EXACT,), (("age_years", INF), ("material", 1.04))),
        ("rank",),
        TIED_ABOUT,
    ),
    finding(
        "collinearity",
        HEAVY,
        CollinearityEvidence(4, 6, INF, (replace(EXACT, columns=("zero",)), PAIRED), INFLATION),
        ("rank", "tied"),
    ),
    finding("standard errors", FINE, StandardErrorsEvidence((), 0.34)),
    finding("standard errors", FINE, StandardErrorsEvidence((), 0.0)),
    finding(
        "standard errors", MIND, StandardErrorsEvidence(WIDE, 5.3), ("absurd",), ("age_years",)
    ),
    finding("standard errors", HEAVY, StandardErrorsEvidence(WIDE[:1], 5.3), ("absurd",)),
    finding(
        "standard errors",
        HEAVY,
        StandardErrorsEvidence((replace(WIDE[0], se=NAN, se_per_spread=NAN),), NAN),
        ("missing",),
        ("age_years",),
    ),
    finding("amount", FINE, AmountEvidence(601.0, 5399.0, 6, 100.1667)),
    finding("amount", MIND, AmountEvidence(34.5, 46.0, 6, 5.75), ("few events",)),
    finding("amount", HEAVY, AmountEvidence(511.0, 1.0, 1, 1.0), ("few events",)),
    finding("levels", FINE, LevelsEvidence(COUNTS[2:], 0)),
    finding("levels", FINE, LevelsEvidence((), 0)),
    finding("levels", MIND, LevelsEvidence(COUNTS[1:], 1), ("few events",), ("lined",)),
    finding(
        "levels",
        HEAVY,
        LevelsEvidence(COUNTS, 2),
        ("one outcome only", "few events"),
        ("material", "lined"),
    ),
    finding(
        "levels",
        HEAVY,
        LevelsEvidence((COUNTS[0], COUNTS[2]), 1),
        ("one outcome only",),
        ("material",),
    ),
    finding(
        "levels",
        OPEN,
        LevelsEvidence(tuple(replace(each, events=NAN) for each in COUNTS), 0),
        unknown="no outcome",
    ),
    finding("missing", FINE, missing(0, 0, None, columns=(), share_dropped=NAN)),
    finding("missing", FINE, missing(difference=Estimate(0.0, 0.0, -0.014, 0.014))),
    finding("missing", FINE, missing(720, 720, Estimate(-0.0011, 0.01, -0.02, 0.018))),
    finding("missing", FINE, missing(1, 1, Estimate(0.888, 0.1, -0.02, 0.95), columns=())),
    finding("missing", MIND, missing(), ("many", "differ")),
    finding(
        "missing",
        MIND,
        missing(known=0, difference=None, share_dropped=NAN),
        ("many",),
        (),
        "no outcome",
    ),
    finding("shape", FINE, shape(0.012, 0.31), about=("age_years",)),
    finding("shape", FINE, shape(0.012, 1e-9), about=("age_years",)),
    finding("shape", FINE, shape(0.07, 0.31), about=("age_years",)),
    finding("shape", FINE, shape(0.07, NAN, 0.0, 0), about=("age_years",)),
    finding(
        "shape", FINE, shape(0.012, NAN, NAN, 0), about=("age_years",), unknown="no likelihood"
    ),
    finding("shape", OPEN, shape(0.07, NAN, NAN, 0), about=("age_years",), unknown="no likelihood"),
    finding("shape", MIND, shape(0.07), ("bends",), ("age_years",)),
    finding("shape", HEAVY, shape(), ("bends",), ("age_years",)),
    finding("shape", HEAVY, shape(), ("bends",), ("age_years",), "rows chosen by outcome"),
    finding("calibration", FINE, calibration()),
    finding("calibration", FINE, calibration(0.051)),
    finding("calibration", FINE, calibration(), unknown="rows chosen by outcome"),
    finding("calibration", OPEN, calibration(0.051), unknown="no likelihood"),
    finding(
        "calibration", FINE, calibration(optimism=Optimism("bootstrap", 200, 0, 1.01, 0.095, 0.73))
    ),
    finding(
        "calibration",
        MIND,
        calibration(optimism=Optimism("cross-validation", 20, 1, 0.83, 0.095, 0.73)),
        ("optimism",),
    ),
    finding(
        "calibration",
        MIND,
        calibration(optimism=Optimism("bootstrap", 0, 200, NAN, NAN, NAN)),
        ("optimism",),
    ),
    finding("calibration", MIND, calibration(0.081), ("curve",)),
    finding(
        "calibration",
        HEAVY,
        calibration(0.13, Optimism("bootstrap", 199, 1, 0.64, 0.095, 0.73)),
        ("curve", "optimism"),
    ),
    finding("influence", FINE, influence()),
    finding("influence", FINE, influence(pattern(moved=(replace(MOVED, refitted=1.41),)))),
    finding("influence", FINE, influence(pattern(moved=(replace(MOVED, refitted=1.4301),)))),
    finding(
        "influence",
        MIND,
        influence(pattern(), pattern((), 2.0, 1.0)),
        ("moves an odds ratio",),
        ("material",),
    ),
    finding(
        "influence",
        HEAVY,
        influence(pattern(("a", "b", "c", "d", "e"), 60.0, 0.0), pattern()),
        ("turns an odds ratio", "moves an odds ratio"),
        ("age_years",),
    ),
    finding("dependence", FINE, dependence("", 0, 0, PAIRS, True)),
    finding("dependence", FINE, dependence(groups=6000, largest=1)),
    finding("dependence", FINE, dependence(already=True)),
    finding("dependence", FINE, dependence(pairs=PAIRS[:1])),
    finding("dependence", MIND, dependence(pairs=()), ("repeated rows",), (), "no outcome"),
    finding(
        "dependence",
        MIND,
        dependence(groups=12),
        ("standard errors differ", "few groups"),
        ("age_years",),
    ),
    finding("dependence", MIND, dependence(groups=12, pairs=PAIRS[:1]), ("few groups",)),
    finding("dependence", MIND, dependence(groups=12, already=True), ("few groups",)),
    finding("dependence", HEAVY, dependence(), ("standard errors differ",), ("age_years",)),
    finding("discrimination", FINE, discrimination()),
    finding("discrimination", FINE, discrimination(1.0, None, None)),
    finding("discrimination", MIND, discrimination(0.54, 0.47, 0.61), ("no better than chance",)),
    finding("discrimination", OPEN, discrimination(0.74, None, None), unknown="no likelihood"),
    finding("overall", FINE, OVERALL),
    finding("overall", FINE, OVERALL, unknown="rows chosen by outcome"),
    finding("overall", FINE, replace(OVERALL, groups=2, degrees_of_freedom=0, p_value=NAN)),
    finding(
        "overall", OPEN, replace(OVERALL, p_value=NAN, link_p_value=NAN), unknown="no likelihood"
    ),
    finding("overall", MIND, replace(OVERALL, link_p_value=0.0004), ("link test",)),
)
"""Every topic with every reason, nothing found, and only partly known."""


def everything():
    """The hand-made findings, and for each topic and reason one of which nothing is known."""
    nothing = [
        Finding(topic, OPEN, (), ("age_years",) if topic == "shape" else (), None, unknown)
        for topic in TOPICS
        for unknown in UNKNOWN
    ]
    return [*MADE, *nothing]


def answer_of(*findings, question=None, **stated):
    return SoundnessAnswer(question or SoundnessQuestion(), subject(**stated), findings)


def numbers_of(held):
    """Every number within a value, and how many items each of its tuples has."""
    if isinstance(held, bool) or held is None:
        return []
    if isinstance(held, int | float):
        return [float(held)] if math.isfinite(held) else []
    if isinstance(held, tuple):
        return [float(len(held)), *(number for each in held for number in numbers_of(each))]
    if is_dataclass(held):
        return [n for field in fields(held) for n in numbers_of(getattr(held, field.name))]
    return []
