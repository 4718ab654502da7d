"""How fast and how big averages over a million rows are, as ratios within one run.

    python -m tests.benchmarks.averages            # 10⁴, 10⁵ and 10⁶ rows
    python -m tests.benchmarks.averages 100000     # one size

Prints, for a model with a spline, interactions and an 8-level category:
averaged curves against the bare inverse logit of as many values; all effects against
statsmodels' get_margeff; memory beyond the model's own arrays against the design matrix;
what a slider's move costs by sketch and what its set-up costs, for two predictors together too.
"""

import sys
import time
import tracemalloc
from dataclasses import replace

import numpy as np
import pandas as pd
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.quick import answer_by_sketch, sketch_for

FORMULA = "y ~ bs(x, df=5) * v + s + z * v + w * u + I(u**2) + z:w + t"
POINTS = np.linspace(1, 99, 100)


def invented(rows: int) -> pd.DataFrame:
    rng = np.random.default_rng(1)
    data = pd.DataFrame(
        {
            "x": rng.uniform(0, 100, rows),
            **{name: rng.normal(size=rows) for name in "zwut"},
            "v": rng.integers(0, 2, rows),
            "s": rng.choice(list("abcdefgh"), rows),
        }
    )
    eta = -2 + 0.02 * data.x + 0.3 * data.z - 0.2 * data.w
    return data.assign(y=(rng.uniform(size=rows) < 1 / (1 + np.exp(-eta))).astype(int))


def seconds(work, repeats: int = 3) -> float:
    """The fastest of a few runs."""
    taken = []
    for _ in range(repeats):
        start = time.perf_counter()
        work()
        taken.append(time.perf_counter() - start)
    return min(taken)


def peak_megabytes(work) -> float:
    tracemalloc.start()
    work()
    peak = tracemalloc.get_traced_memory()[1]
    tracemalloc.stop()
    return peak / 2**20


def bare_inverse_logit(rows: int) -> float:
    eta = np.random.default_rng(0).normal(size=rows)
    return seconds(lambda: [1 / (1 + np.exp(-eta)) for _ in POINTS])


def measure(rows: int) -> None:
    result = smf.logit(FORMULA, invented(rows)).fit(disp=0)
    matrix = result.model.exog.nbytes / 2**20
    print(f"{rows:,} rows x {result.model.exog.shape[1]} columns, matrix {matrix:,.0f} MB")
    taken = time.perf_counter()
    fit = po.FittedLogit(result)
    print(f"  intake                     {time.perf_counter() - taken:8.3f} s")

    bare = bare_inverse_logit(rows)

    def curve() -> object:
        return fit.curve("x", others="observed", at=list(POINTS))

    averaged = seconds(curve)
    print(f"  curve, 100 points          {averaged:8.3f} s   {averaged / bare:5.2f} x bare")
    print(f"    memory beyond            {peak_megabytes(curve):8.1f} MB")

    effects = seconds(fit.effects)
    start = time.perf_counter()
    result.get_margeff()
    margins = time.perf_counter() - start
    print(f"  effects, all, with se      {effects:8.3f} s")
    print(f"    get_margeff              {margins:8.3f} s   {margins / effects:5.1f} x as long")
    peak = peak_megabytes(fit.effects)
    print(f"    memory beyond            {peak:8.1f} MB  {peak / matrix:5.2f} x matrix")

    question = fit.change("x", 20, 60).question
    start = time.perf_counter()
    sketch = sketch_for(fit.model, question)
    print(f"  sketch, set up once        {time.perf_counter() - start:8.3f} s")
    quick = seconds(lambda: answer_by_sketch(fit.model, question, sketch), 10)
    print(f"    a change by it           {1000 * quick:8.2f} ms")
    along = fit.curve("x", others="observed", at=[50.0]).question
    one = seconds(lambda: answer_by_sketch(fit.model, along, sketch), 10)
    print(f"    a curve's point by it    {1000 * one:8.2f} ms")
    for name, asked in (
        ("with lines", fit.pair("x", "v", b_values=(0, 1))),
        ("with a map", fit.pair("x", "t", shape="map")),
    ):
        both = replace(asked.question, others="observed")
        start = time.perf_counter()
        sketch = sketch_for(fit.model, both)
        setting_up = time.perf_counter() - start
        taken = seconds(lambda both=both, sketch=sketch: answer_by_sketch(fit.model, both, sketch))
        print(f"  a pair {name}, by sketch   {taken:8.3f} s   set up in {setting_up:.3f} s")
    for shape in ("lines", "map"):
        # a third number modifies both, so that there is no sketch
        asked = replace(fit.pair("z", "u", shape=shape).question, others="observed")
        assert sketch_for(fit.model, asked) is None
        start = time.perf_counter()
        fit.ask(asked)
        first = time.perf_counter() - start
        later = seconds(lambda asked=asked: fit.ask(replace(asked, level=0.9)))
        print(f"  a pair ({shape}), every row   {later:8.3f} s   the first time {first:.3f} s")


def main() -> None:
    for rows in [int(each) for each in sys.argv[1:]] or [10_000, 100_000, 1_000_000]:
        measure(rows)


if __name__ == "__main__":
    main()
