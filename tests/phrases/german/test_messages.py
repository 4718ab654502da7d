"""Every fixed text of pictures, printed tables and dossiers has its German."""

import ast
import importlib
import pkgutil
import string
from pathlib import Path

import pytest

import plainodds
from plainodds.phrases.german import messages
from plainodds.phrases.german.messages import MESSAGES
from plainodds.phrases.languages import language_of, spoken_now, telling_in
from plainodds.phrases.lexicon import message

HOUSE = Path(plainodds.__file__).parent


def calls(module):
    """The calls of `message` in a module."""
    for node in ast.walk(ast.parse(module.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Call) and getattr(node.func, "id", "") == "message":
            yield node


def stated():
    """Every text that is stated as a message."""
    return {
        each.args[0].value
        for module in HOUSE.rglob("*.py")
        for each in calls(module)
        if isinstance(each.args[0], ast.Constant)
    }


def places(text):
    return sorted(name for _, name, _, _ in string.Formatter().parse(text) if name is not None)


def test_every_message_is_stated_where_it_is_used():
    """So that nothing that is said is missed here."""
    for module in HOUSE.rglob("*.py"):
        for each in calls(module):
            assert isinstance(each.args[0], ast.Constant), f"{module}:{each.lineno}"


def test_every_message_has_its_german_and_no_other_has():
    assert set(MESSAGES) == stated()


def test_no_message_stands_in_two_catalogues():
    catalogues = [
        held
        for module in pkgutil.iter_modules(messages.__path__, f"{messages.__name__}.")
        for name, held in vars(importlib.import_module(module.name)).items()
        if name.isupper()
    ]
    assert sum(map(len, catalogues)) == len(MESSAGES)


@pytest.mark.parametrize("text", sorted(MESSAGES))
def test_a_message_keeps_the_places_of_its_parts(text):
    assert places(MESSAGES[text]) == places(text)
    assert MESSAGES[text].strip() == MESSAGES[text] or text.strip() != text


def test_messages_are_spoken_in_the_language_of_now_only_where_it_is_spoken():
    text = next(each for each in sorted(MESSAGES) if not places(each) and MESSAGES[each] != each)
    with telling_in(language_of("de")):
        assert message(text) == text
        with spoken_now():
            assert message(text) == MESSAGES[text]
    assert message(text) == text
