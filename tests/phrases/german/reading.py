"""Reading German sentences back: their figures, whether they are well made and wholly German."""

import re
from dataclasses import replace

from plainodds.answers.questions import Answer
from tests.phrases.made import FAMILIAR
from tests.phrases.reading import unaccounted as unaccounted_in_english

_NUMBER = re.compile(r"\d[\d.,]*\d")
_GERMAN = re.compile(r"(?!0\.)\d{1,3}(\.\d{3})*(,\d+)?|\d+(,\d+)?")
_LIMITS = re.compile(r"unter 0,1\s%|über 99,9\s%|unter 0,001|über 1\.000(?!\d)|über 0,99")
_SWAP = str.maketrans({".": ",", ",": "."})
_FORBIDDEN = re.compile(
    r"\b(\w*signifikan\w*|verursach\w*|ursach\w*|bewirk\w*|führt zu|führen zu|wegen|aufgrund|"
    r"Risikofaktor\w*|mal (so|mehr|weniger) \w+|nan|inf|none)\b",
    re.IGNORECASE,
)
# none of these is a German word, nor part of the names that the German labels use
_ENGLISH = re.compile(
    r"\b(the|of|and|with|is|are|were|to|per|rather|than|chances?|intervals?|percentage|points?|"
    r"more|less|fewer|higher|lower|rows?|not|known|where|which|there|each|other|others|held|at|"
    r"for|from|by|additional|standard error|estimates?|among|those|data|model|lines?|this|that|"
    r"one|no|yes|or|either|way|given|against|average|odds of|case|cases|units?|between|below|"
    r"above|over|under|infinity|just|nothing|but|if|its?|their|these|has|have|goes|multiplied)\b"
)
_FAULTS = {
    name: re.compile(pattern)
    for name, pattern in {
        "spaces": r"[ \n]{2}|^\s|\s$|\n",
        "no full stop": r"[^.!?]$|\.\.$",
        "no capital": r"^[a-zäöü]",
        "punctuation": r"\s[,.;:)]|\( |,,|\(\)|[,;:]\.$|[a-zäöü)]\. [a-zäöü]",
        "hyphen for a minus sign": r"(?<!\w)-\d",
        "0 % or 100 %": r"(?<![\d,])(0|100)(,0+)?\s%",
        "no space before a percent sign": r"\d%",
        "plural of one": r"(?<![\d.,])1 (Zeilen|Jahre|Rohre|Einheiten|Schritten)\b",
        "singular of many": r"(?<![\d,])(\d*[2-9]|\d+\d) (Zeile|Jahr|Einheit|Schritt)\b",
    }.items()
}


def with_german_labels(answer):
    """The same answer as a German analyst would have labelled it."""
    said = {
        "age_years": {"label": "Rohralter", "unit": "Jahre"},
        "past_repairs": {"label": "frühere Reparaturen"},
        "material": {"label": "Werkstoff", "level_labels": ("Grauguss", "Duktilguss", "PVC")},
        "lined": {"label": "Auskleidung"},
    }
    predictors = tuple(replace(facts, **said[facts.name]) for facts in answer.subject.predictors)
    outcome = replace(
        answer.subject.outcome, event="Rohrbruch in diesem Winter", case="Rohr", cases="Rohre"
    )
    said = replace(answer, subject=replace(answer.subject, predictors=predictors, outcome=outcome))
    if isinstance(getattr(said, "lines", None), Answer):
        said = replace(said, lines=with_german_labels(said.lines))
    return said


def unaccounted(text, numbers):
    """Figures of a German text that no number, in percent or as it is, rounds to."""
    text = _LIMITS.sub("", text)
    return unaccounted_in_english(_NUMBER.sub(lambda m: m.group().translate(_SWAP), text), numbers)


def faults(sentence):
    """What is wrong with a German sentence; empty where nothing is."""
    found = [name for name, pattern in _FAULTS.items() if pattern.search(sentence)]
    if sentence.count("(") != sentence.count(")"):
        found.append("brackets")
    if sentence.count("„") != sentence.count("“"):
        found.append("quotation marks")
    if not all(map(_GERMAN.fullmatch, _NUMBER.findall(sentence))):
        found.append("English marks")
    said = [pattern.search(sentence) for pattern in (_FORBIDDEN, _ENGLISH)]
    return found + [f"says {each.group()!r}" for each in said if each]


UNSEEN = {
    "no rows": replace(FAMILIAR, largest_leverage=float("nan"), verdict="rare"),
    "outside": replace(FAMILIAR, beyond=("age_years", "material"), verdict="beyond"),
    "combined": replace(FAMILIAR, verdict="beyond"),
    "nobody alike": replace(FAMILIAR, rows_alike=0, verdict="rare"),
    "one alike": replace(FAMILIAR, rows_alike=1, verdict="rare"),
    "few alike": replace(FAMILIAR, rows_alike=4, verdict="rare"),
}
"""Profiles that are not familiar, each for another reason."""
