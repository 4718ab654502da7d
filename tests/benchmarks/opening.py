"""How long a view takes to open on a fit of 6,000 rows.

    python -m tests.benchmarks.opening

Each view opens in a Python of its own, as the first thing that is drawn there.
"""

import subprocess
import sys

TARGET_SECONDS = 1.0
_OPEN = """
import time, plainodds as po
from tests.benchmarks.models import fit_of_27_columns
fit = fit_of_27_columns()
start, used = time.perf_counter(), time.process_time()
view = po.{view}(fit)
print(time.perf_counter() - start, time.process_time() - used)
"""


def main() -> None:
    """Open each view and print the seconds."""
    for view in ("OddsView", "CurveView", "ProfileView"):
        ran = subprocess.run(
            [sys.executable, "-c", _OPEN.format(view=view)],
            capture_output=True,
            text=True,
            check=True,
        )
        passed, used = map(float, ran.stdout.split())
        print(
            f"{view}: {passed:.2f} s, of which {used:.2f} s of the processor "
            f"(target under {TARGET_SECONDS:g} s)"
        )


if __name__ == "__main__":
    main()
