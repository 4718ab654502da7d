"""What the README says runs, and it is what a bare machine runs."""

import re
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
README = (ROOT / "README.md").read_text(encoding="utf-8")


def test_its_examples_run_from_top_to_bottom(tmp_path, monkeypatch):
    monkeypatch.chdir(tmp_path)
    blocks = re.findall(r"```python\n(.*?)```", README, flags=re.DOTALL)
    assert len(blocks) > 3
    names = {}
    for block in blocks:
        exec(block, names)
    assert (tmp_path / "ageing.pdf").read_bytes().startswith(b"%PDF")


@pytest.mark.parametrize("ending", ["jupyter lab notebooks/tessel_bay.ipynb", "-m pytest"])
def test_it_has_one_command_for_the_demo_and_one_for_the_tests(ending):
    commands = [line for line in README.splitlines() if line.endswith(ending)]
    assert len(commands) == 1
    assert commands[0].startswith("    python3 -m venv .venv && ")


def test_the_notebooks_that_it_names_are_there():
    named = re.findall(r"\]\((notebooks/[^)]+)\)", README)
    assert sorted(named) == sorted(
        f"notebooks/{p.name}" for p in (ROOT / "notebooks").glob("*.ipynb")
    )
    assert all((ROOT / each).is_file() for each in named)
