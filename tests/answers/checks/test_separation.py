"""Separation by linear programme: verdicts known by hand, and found by another route."""

import math

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from pandas.api.types import is_numeric_dtype
from scipy.optimize import linprog

import plainodds as po
from plainodds.answers.checks.separation import separation_of
from plainodds.answers.optimum import optimum_of
from plainodds.answers.recession import recession_of

BINOMIAL = sm.families.Binomial

pytestmark = pytest.mark.filterwarnings("ignore")


def glm(formula, frame, **settings):
    return po.FittedLogit(smf.glm(formula, frame, family=BINOMIAL(), **settings).fit())


def cells(*counts):
    """Rows from (values…, events, others)."""
    rows = []
    for *values, events, others in counts:
        rows += [(*values, 1)] * events + [(*values, 0)] * others
    names = ["a", "b"][: len(counts[0]) - 2]
    return pd.DataFrame(rows, columns=[*names, "y"])


X = np.arange(8.0)

# formula, data, kind, unbounded coefficients, levels to blame, rows told without fail
BY_HAND = {
    "none": ("y ~ a", pd.DataFrame({"a": X, "y": [0, 1, 0, 1, 0, 1, 0, 1]}), "none", {}, (), 0),
    "complete": (
        "y ~ a",
        pd.DataFrame({"a": X, "y": (X > 3.5) * 1}),
        "complete",
        {"Intercept": -math.inf, "a": math.inf},
        (),
        8,
    ),
    "complete, the other way, around 0": (
        "y ~ a",
        pd.DataFrame({"a": X - 3.5, "y": (X < 3.5) * 1}),
        "complete",
        {"Intercept": math.nan, "a": -math.inf},
        (),
        8,
    ),
    "quasi-complete, both outcomes at the border": (
        "y ~ a",
        pd.DataFrame({"a": [0, 1, 2, 2, 3, 4.0], "y": [0, 0, 0, 1, 1, 1]}),
        "quasi-complete",
        {"Intercept": -math.inf, "a": math.inf},
        (),
        4,
    ),
    "quasi-complete, the border at 0": (
        "y ~ a",
        pd.DataFrame({"a": [-2, -1, 0, 0, 1, 2.0], "y": [0, 0, 0, 1, 1, 1]}),
        "quasi-complete",
        {"a": math.inf},
        (),
        4,
    ),
    "a level with events only": (
        "y ~ a",
        cells(("u", 3, 4), ("v", 5, 2), ("w", 6, 0)),
        "quasi-complete",
        {"a[T.w]": math.inf},
        (("a", "w"),),
        6,
    ),
    "a level without events": (
        "y ~ a",
        cells(("u", 3, 4), ("v", 0, 5), ("w", 2, 2)),
        "quasi-complete",
        {"a[T.v]": -math.inf},
        (("a", "v"),),
        5,
    ),
    "the reference level without events": (
        "y ~ a",
        cells(("u", 0, 4), ("v", 2, 5), ("w", 2, 2)),
        "quasi-complete",
        {"Intercept": -math.inf, "a[T.v]": math.inf, "a[T.w]": math.inf},
        (("a", "u"),),
        4,
    ),
    "two levels with opposite outcomes": (
        "y ~ a",
        cells(("u", 0, 4), ("v", 3, 0), ("w", 2, 2)),
        "quasi-complete",
        {"Intercept": -math.inf, "a[T.v]": math.inf, "a[T.w]": math.inf},
        (("a", "u"), ("a", "v")),
        7,
    ),
    "two levels with the same outcome": (
        "y ~ a",
        cells(("u", 0, 4), ("v", 0, 3), ("w", 2, 2)),
        "quasi-complete",
        # between the two levels without events nothing is known
        {"Intercept": -math.inf, "a[T.v]": math.nan, "a[T.w]": math.inf},
        (("a", "u"), ("a", "v")),
        7,
    ),
    "an empty cell of a saturated table": (
        "y ~ a * b",
        cells(("u", "k", 2, 3), ("u", "l", 3, 2), ("v", "k", 4, 1), ("v", "l", 5, 0)),
        "quasi-complete",
        {"a[T.v]:b[T.l]": math.inf},
        (),
        5,
    ),
    "the same cell without the interaction": (
        "y ~ a + b",
        cells(("u", "k", 2, 3), ("u", "l", 3, 2), ("v", "k", 4, 1), ("v", "l", 5, 0)),
        "none",
        {},
        (),
        0,
    ),
    "one outcome at a level, by itself": (
        "y ~ a + b",
        cells(("u", "k", 2, 3), ("u", "l", 3, 2), ("v", "k", 4, 0), ("v", "l", 5, 0)),
        "quasi-complete",
        {"a[T.v]": math.inf},
        (("a", "v"),),
        9,
    ),
    "no intercept": (
        "y ~ a - 1",
        pd.DataFrame({"a": [-2, -1, 1, 2.0], "y": [0, 0, 1, 1]}),
        "complete",
        {"a": math.inf},
        (),
        4,
    ),
}


@pytest.mark.parametrize("case", BY_HAND)
def test_the_verdict_is_the_one_known_by_hand(case):
    formula, frame, kind, unbounded, levels, rows = BY_HAND[case]
    found = separation_of(glm(formula, frame).model)
    evidence = found.evidence
    assert evidence.kind == kind
    assert found.concern == ("nothing found" if kind == "none" else "don't explain yet")
    assert found.reasons == (() if kind == "none" else (kind,))
    assert [name for name, _ in evidence.unbounded] == list(unbounded)
    np.testing.assert_array_equal([at for _, at in evidence.unbounded], list(unbounded.values()))
    assert evidence.levels == levels
    assert (evidence.rows, evidence.all_rows) == (rows, len(frame))


@pytest.mark.parametrize("case", BY_HAND)
def test_it_makes_no_difference_how_rows_are_counted(case):
    formula, frame, kind, *_ = BY_HAND[case]
    counted = frame.groupby(list(frame.columns), as_index=False).size()
    plain = separation_of(glm(formula, frame).model).evidence
    weighted = separation_of(glm(formula, counted, freq_weights=counted["size"]).model).evidence
    assert weighted.kind == kind
    assert str(weighted.unbounded) == str(plain.unbounded)
    assert weighted.patterns == plain.patterns
    assert weighted.all_patterns == plain.all_patterns


@pytest.mark.parametrize(
    "case",
    [c for c, held in BY_HAND.items() if held[0] == "y ~ a" and is_numeric_dtype(held[1]["a"])],
)
def test_how_numbers_are_scaled_and_shifted_makes_no_difference_to_the_kind(case):
    formula, frame, kind, *_ = BY_HAND[case]
    moved = frame.assign(a=frame["a"] * 1e-4 + 1990)
    assert separation_of(glm(formula, moved).model).evidence.kind == kind


def test_grouped_counts_are_both_outcomes_where_the_share_lies_between():
    grouped = pd.DataFrame({"a": ["u", "v", "w"], "dead": [3, 5, 6], "alive": [4, 2, 0]})
    found = separation_of(glm("dead + alive ~ a", grouped).model).evidence
    assert (found.kind, found.unbounded) == ("quasi-complete", (("a[T.w]", math.inf),))
    assert found.levels == (("a", "w"),)
    overlapping = grouped.assign(alive=[4, 2, 1])
    assert separation_of(glm("dead + alive ~ a", overlapping).model).evidence.kind == "none"


def test_rows_without_weight_say_nothing():
    frame = cells(("u", 3, 4), ("v", 5, 2), ("w", 6, 1))
    weight = np.where((frame["a"] == "w") & (frame["y"] == 0), 0.0, 1.0)
    found = separation_of(glm("y ~ a", frame, freq_weights=weight).model).evidence
    assert found.levels == (("a", "w"),)
    assert found.all_rows == len(frame) - 1


def test_an_offset_changes_nothing():
    frame = cells(("u", 3, 4), ("v", 5, 2), ("w", 6, 0))
    offset = np.linspace(-1, 1, len(frame))
    found = separation_of(glm("y ~ a", frame, offset=offset).model).evidence
    assert (found.kind, found.unbounded) == ("quasi-complete", (("a[T.w]", math.inf),))


def test_columns_that_repeat_each_other_are_not_separation():
    frame = BY_HAND["none"][1]
    found = separation_of(glm("y ~ a + I(2 * a)", frame).model)
    assert (found.concern, found.evidence.kind) == ("nothing found", "none")


def test_a_level_is_blamed_although_other_columns_repeat_each_other():
    frame = cells(("u", 3, 4), ("v", 5, 2), ("w", 6, 0))
    frame["b"] = np.arange(len(frame)) % 5
    found = separation_of(glm("y ~ a + b + I(2 * b)", frame).model).evidence
    assert (found.unbounded, found.levels) == ((("a[T.w]", math.inf),), (("a", "w"),))


def test_a_penalised_fit_of_separated_data_is_to_be_kept_in_mind():
    model = smf.logit("y ~ a", BY_HAND["a level with events only"][1])
    found = separation_of(po.FittedLogit(model.fit_regularized(alpha=0.5, disp=0)).model)
    assert found.concern == "keep in mind"
    assert found.evidence.levels == (("a", "w"),)


def test_without_rows_or_outcome_nothing_is_known():
    frame = BY_HAND["complete"][1]
    result = smf.glm("y ~ a", frame, family=BINOMIAL()).fit()
    result.remove_data()
    found = separation_of(po.FittedLogit(result, data=frame).model)
    assert (found.concern, found.unknown, found.evidence) == ("not known", "no outcome", None)


def drawn(seed):
    """A random design of a few columns, whole numbers or not, and an outcome."""
    draw = np.random.default_rng(seed)
    while True:
        matrix, outcome = _drawn(draw, whole=seed % 2 == 1)
        full = np.linalg.matrix_rank(matrix) == matrix.shape[1]
        if full and outcome.min() < outcome.max():
            return matrix, outcome


def _drawn(draw, whole):
    n, k = int(draw.integers(8, 50)), int(draw.integers(2, 5))
    columns = draw.integers(0, 3, (n, k - 1)) if whole else draw.normal(size=(n, k - 1))
    matrix = np.column_stack([np.ones(n), columns]).astype(float)
    eta = matrix @ draw.normal(size=k) * draw.choice([0.5, 3.0, 8.0])
    return matrix, (draw.uniform(size=n) < 1 / (1 + np.exp(-eta))).astype(float)


def told_strictly(matrix, outcome):
    """Rows that some receding direction tells strictly, by one programme with a gap per row.

    Maximises Σz under s·x'd ≥ z, 0 ≤ z ≤ 1, with d free: the sum counts every row that can
    be told, since directions add up and may be as long as they like.
    """
    n, k = matrix.shape
    signed = np.where(outcome == 1, 1.0, -1.0)[:, None] * matrix
    found = linprog(
        np.concatenate([np.zeros(k), -np.ones(n)]),
        A_ub=np.column_stack([-signed, np.eye(n)]),
        b_ub=np.zeros(n),
        bounds=[(None, None)] * k + [(0, 1)] * n,
    )
    return found.x[k:] > 1e-6


def attainable(matrix, outcome, column, side):
    """Whether a receding direction moves a coefficient to one side, by a programme of its own."""
    signed = np.where(outcome == 1, 1.0, -1.0)[:, None] * matrix
    cost = np.zeros(matrix.shape[1])
    cost[column] = -side
    found = linprog(cost, A_ub=-signed, b_ub=np.zeros(len(signed)), bounds=(-1, 1))
    return -found.fun > 1e-6


@pytest.mark.parametrize("seed", range(200))
def test_random_data_get_the_verdict_of_another_programme(seed):
    matrix, outcome = drawn(seed)
    k = matrix.shape[1]
    model = po.FittedLogit(sm.GLM(outcome, matrix, family=BINOMIAL()).fit()).model
    told = told_strictly(matrix, outcome)
    kind = "complete" if told.all() else "quasi-complete" if told.any() else "none"
    found = recession_of(model)
    assert found.kind == kind
    np.testing.assert_array_equal(found.separated[found.patterns.of_row], told)
    # the short cut never says overlap of separated data
    assert not (optimum_of(model).overlap and told.any())
    sides = [
        (attainable(matrix, outcome, j, 1.0), attainable(matrix, outcome, j, -1.0))
        for j in range(k)
    ]
    meant = {(False, False): 0.0, (True, False): math.inf, (False, True): -math.inf}
    expected = [meant.get(each, math.nan) for each in sides]
    np.testing.assert_array_equal(found.limits(np.eye(k)), expected)


def test_the_short_cut_is_taken_by_ordinary_fits():
    taken = 0
    for seed in range(20):
        draw = np.random.default_rng(seed)
        x = draw.normal(size=(300, 4))
        y = draw.uniform(size=300) < 1 / (1 + np.exp(-x @ [1.0, -0.5, 0.2, 0.0]))
        fit = po.FittedLogit(sm.Logit(y * 1.0, sm.add_constant(x)).fit(disp=0))
        taken += optimum_of(fit.model).overlap
    assert taken == 20


@pytest.mark.parametrize("iterations", [1, 2, 3, 5, 8, 12, 20, 35, 100])
@pytest.mark.parametrize("case", [c for c, held in BY_HAND.items() if held[2] != "none"])
def test_the_short_cut_lets_no_separated_fit_through_wherever_it_stopped(case, iterations):
    formula, frame, *_ = BY_HAND[case]
    result = smf.glm(formula, frame, family=BINOMIAL()).fit(maxiter=iterations, tol=0)
    assert not optimum_of(po.FittedLogit(result).model).overlap
