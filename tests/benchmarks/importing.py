"""Importing plainodds against importing what it imports, in processor time.

python -m tests.benchmarks.importing
"""

import os
import subprocess
import sys

TARGET = 1.2
_TURNS = 9
_LOADED = """
import json, sys
before = set(sys.modules)
import plainodds
own = lambda name: name.partition(".")[0] == "plainodds"
print(json.dumps([name for name in sys.modules if name not in before and not own(name)]))
"""
_TIMED = """
import contextlib, importlib, json, sys, time
names = json.loads(sys.stdin.read())
start = time.process_time()
for name in names:
    # some names are made up by packages while they are imported
    with contextlib.suppress(ImportError):
        importlib.import_module(name)
print(time.process_time() - start)
"""


def _output(code: str, given: str = "") -> str:
    # installed packages come with their bytecode; ours must be allowed to keep its own
    kept = {name: held for name, held in os.environ.items() if name != "PYTHONDONTWRITEBYTECODE"}
    ran = subprocess.run(
        [sys.executable, "-c", code], input=given, capture_output=True, text=True, check=True,
        env=kept,
    )  # fmt: skip
    return ran.stdout


def main() -> None:
    """Import both in turns and print the ratio of the quickest."""
    modules = _output(_LOADED)
    turns = [
        (float(_output(_TIMED, '["plainodds"]')), float(_output(_TIMED, modules)))
        for _ in range(_TURNS)
    ]
    own, dependencies = min(a for a, _ in turns), min(b for _, b in turns)
    print(
        f"plainodds {own:.2f} s, what it imports {dependencies:.2f} s, "
        f"ratio {own / dependencies:.2f} (target {TARGET})"
    )


if __name__ == "__main__":
    main()
