"""How long it takes to look whether a fit is fit to be explained, as a ratio to the fit itself.

    python -m tests.benchmarks.soundness            # 10⁴ and 10⁵ rows x 30 columns
    python -m tests.benchmarks.soundness 1000000    # one size

Prints the fit's own time, all default findings, and the checks of shares, chances and ranks
one by one. Promised are at most 10 times the fit's own time at 10⁵ rows x 30 columns.
"""

import sys
import time

import numpy as np
import pandas as pd
import statsmodels.api as sm

import plainodds as po
from plainodds.answers.checks.calibration import calibration_of
from plainodds.answers.checks.discrimination import discrimination_of
from plainodds.answers.checks.optimism import optimism_of
from plainodds.answers.checks.overall import overall_of
from plainodds.answers.checks.shape import shape_of
from plainodds.answers.soundness import SoundnessQuestion, answer_soundness

COLUMNS = 30
LEVEL = 0.95


def invented(rows: int) -> tuple[pd.Series, pd.DataFrame]:
    """Numbers, whole numbers and yes/no values, and an outcome."""
    rng = np.random.default_rng(1)
    numbers = {f"number_{n}": rng.normal(size=rows) for n in range(15)}
    counts = {f"count_{n}": rng.poisson(3, rows).astype(float) for n in range(7)}
    marks = {f"mark_{n}": rng.integers(0, 2, rows).astype(float) for n in range(7)}
    X = sm.add_constant(pd.DataFrame({**numbers, **counts, **marks}))
    assert X.shape[1] == COLUMNS
    eta = -1 + (X.to_numpy()[:, 1:] - X.to_numpy()[:, 1:].mean(axis=0)) @ np.full(COLUMNS - 1, 0.1)
    return pd.Series(rng.uniform(size=rows) < 1 / (1 + np.exp(-eta)), name="y").astype(int), X


def fitted(y: pd.Series, X: pd.DataFrame) -> object:
    return sm.Logit(y, X).fit(disp=0)


def measure(rows: int, repeats: int = 3) -> None:
    y, X = invented(rows)
    taken: dict[str, list[float]] = {}

    def timed(what, work, *given):
        start = time.perf_counter()
        done = work(*given)
        taken.setdefault(what, []).append(time.perf_counter() - start)
        return done

    question = SoundnessQuestion()
    for _ in range(repeats):
        result = timed("fit", fitted, y, X)
        # what is computed once for a model has to be computed again
        model = po.FittedLogit(result).model
        answer = timed("all default findings", answer_soundness, model, question)
        model = po.FittedLogit(result).model
        timed("  shape", shape_of, model, LEVEL)
        timed("  calibration", calibration_of, model, LEVEL, None)
        timed("  discrimination", discrimination_of, model, LEVEL)
        timed("  overall", overall_of, model)
        timed("one bootstrap sample", optimism_of, model, "bootstrap", 1)
    fit = min(taken["fit"])
    print(f"{rows:,} rows x {COLUMNS} columns, {len(answer.findings)} findings")
    for what, times in taken.items():
        print(f"  {what:22} {min(times):8.3f} s  {min(times) / fit:6.2f} x fit")


def main() -> None:
    for rows in [int(each) for each in sys.argv[1:]] or [10_000, 100_000]:
        measure(rows)


if __name__ == "__main__":
    main()
