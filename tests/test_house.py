"""The house is in order: style, types, and imports that run down only."""

import ast
import subprocess
import sys
import sysconfig
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
PACKAGE = ROOT / "plainodds"

CHECKS = {
    "ruff check": [sys.executable, "-m", "ruff", "check", "."],
    "ruff format": [sys.executable, "-m", "ruff", "format", "--check", "."],
    "mypy": [sys.executable, "-m", "mypy"],
    "import-linter": [str(Path(sysconfig.get_path("scripts")) / "lint-imports")],
}

LONGEST_MODULE = 250
"""Lines of code; what docstrings say doesn't count."""


@pytest.mark.parametrize("check", CHECKS)
def test_nothing_is_found_by(check):
    ran = subprocess.run(CHECKS[check], cwd=ROOT, capture_output=True, text=True, check=False)
    assert ran.returncode == 0, f"{check}\n{ran.stdout}{ran.stderr}"


def floor(name):
    return {path.stem for path in (PACKAGE / name).glob("*.py")}


@pytest.mark.parametrize("name", ["phrases", "drawings", "views"])
@pytest.mark.parametrize(
    "question", ["odds", "curve", "profile", "effects", "change", "pair", "soundness"]
)
def test_each_question_has_a_module_of_its_name_on_each_floor(question, name):
    assert question in floor("answers")
    assert question in floor(name)


def lines_of_code(text):
    lines = set()
    for node in ast.walk(ast.parse(text)):
        if isinstance(node, ast.Expr) and isinstance(node.value, ast.Constant):
            continue
        if isinstance(node, ast.stmt):
            lines.update(range(node.lineno, node.end_lineno + 1))
    for node in ast.walk(ast.parse(text)):
        if isinstance(node, ast.Expr) and isinstance(node.value, ast.Constant):
            lines.difference_update(range(node.lineno, node.end_lineno + 1))
    rows = text.splitlines()
    return sum(1 for n in lines if rows[n - 1].strip() and not rows[n - 1].strip().startswith("#"))


def test_lines_of_code_are_counted_without_docstrings_comments_and_blank_lines():
    text = (
        '"""Module."""\n\nx = 1  # kept\n# gone\ndef f():\n    """Gone\n    too."""\n    return x\n'
    )
    assert lines_of_code(text) == 3


@pytest.mark.parametrize(
    "path",
    sorted(PACKAGE.rglob("*.py")),
    ids=lambda path: path.relative_to(PACKAGE).with_suffix("").as_posix(),
)
def test_a_module_is_short_enough_to_do_one_thing(path):
    assert lines_of_code(path.read_text(encoding="utf-8")) <= LONGEST_MODULE


def test_every_module_says_what_is_public():
    silent = [
        str(path.relative_to(ROOT))
        for path in sorted(PACKAGE.rglob("*.py"))
        if path.read_text(encoding="utf-8").strip()
        and "\n__all__" not in path.read_text(encoding="utf-8")
    ]
    assert silent == []
