"""What `import plainodds` offers, and that what its docstrings say is so."""

import doctest
import importlib
import inspect
import pkgutil
import subprocess
import sys
from types import ModuleType

import pytest

import plainodds

MODULES = [
    "plainodds",
    *(each.name for each in pkgutil.walk_packages(plainodds.__path__, prefix="plainodds.")),
]
# a refusal is raised, never called
CALLABLES = [
    name
    for name in plainodds.__all__
    if callable(held := getattr(plainodds, name))
    and not (inspect.isclass(held) and issubclass(held, Exception))
]
METHODS = [
    name
    for name, member in inspect.getmembers(plainodds.FittedLogit, inspect.isfunction)
    if not name.startswith("_")
]
OPTIONS = doctest.ELLIPSIS | doctest.NORMALIZE_WHITESPACE


def test_all_is_the_public_namespace():
    public = [
        name
        for name, held in vars(plainodds).items()
        # importing the package makes its floors attributes; only modules in __all__ are offered
        if not name.startswith("_")
        and (name in plainodds.__all__ or not isinstance(held, ModuleType))
    ]
    assert sorted(public) == sorted(plainodds.__all__)


def test_all_is_sorted_and_names_nothing_twice():
    def place(name):
        # constants, then classes, then functions
        return not name.isupper(), not name[0].isupper(), name

    assert list(plainodds.__all__) == sorted(set(plainodds.__all__), key=place)


def test_the_face_has_what_the_readme_promises():
    promised = {
        "FittedLogit", "Predictor", "Outcome",
        "table", "draw", "words", "code", "save",
        "OddsView", "CurveView", "ProfileView", "ChangeView", "EffectsView", "PairView",
        "SoundnessView",
        "joint_table",
    }  # fmt: skip
    assert promised <= set(plainodds.__all__)


def has_an_example(documented):
    text = inspect.getdoc(documented) or ""
    return "Examples\n--------" in text and ">>> " in text.partition("Examples\n--------")[2]


@pytest.mark.parametrize("name", CALLABLES)
def test_a_public_callable_shows_an_example(name):
    assert has_an_example(getattr(plainodds, name))


@pytest.mark.parametrize("name", METHODS)
def test_a_method_of_the_fit_shows_an_example(name):
    assert has_an_example(getattr(plainodds.FittedLogit, name))


@pytest.mark.parametrize("name", MODULES)
def test_the_examples_run(name):
    failed, _ = doctest.testmod(importlib.import_module(name), optionflags=OPTIONS)
    assert failed == 0


def test_importing_it_starts_no_pyplot_and_changes_no_setting():
    # asking for the backend would choose one, and start pyplot for it
    check = """
import sys, matplotlib
params = matplotlib.rcParams
read = lambda: {name: params[name] for name in params if name != "backend"}
before = read()
import plainodds
assert read() == before, "rcParams"
assert "matplotlib.pyplot" not in sys.modules, "pyplot"
"""
    ran = subprocess.run([sys.executable, "-c", check], capture_output=True, text=True, check=False)
    assert ran.returncode == 0, ran.stderr
