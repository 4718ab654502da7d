"""Reading sentences back: their figures, and whether they are well made."""

import re

_FIGURE = re.compile(r"(?<![\w.,])[+−]?\d[\d,]*(?:\.\d+)?")
_LIMITS = ("under 0.1%", "over 99.9%", "under 0.001", "over 1,000", "over 0.99")
_FORBIDDEN = re.compile(
    r"\b(significan\w*|insignifican\w*|times (more|less|as) likely|caus\w+|leads? to|"
    r"(?<!marginal )effects?|due to|because of|risk factor|nan|inf|none(?! of))\b",
    re.IGNORECASE,
)


def figures(text):
    """Every figure of a text as (value, half a unit of its last digit)."""
    found = []
    for written in _FIGURE.findall(text):
        bare = written.replace(",", "").replace("−", "-").replace("+", "")
        decimals = len(bare.partition(".")[2])
        found.append((float(bare), 0.5 * 10.0**-decimals))
    return found


def unaccounted(text, numbers):
    """Figures of a text that no number, in percent or as it is, rounds to."""
    for limit in _LIMITS:
        text = text.replace(limit, "")
    known = [scaled for number in numbers for scaled in (number, 100 * number)]
    return [
        value
        for value, half in figures(text)
        if not any(abs(abs(value) - abs(each)) <= half * (1 + 1e-9) for each in known)
    ]


def says(text, number, unit=1.0):
    """Whether some figure of the text is this number, rounded."""
    return any(abs(value - number * unit) <= half * (1 + 1e-9) for value, half in figures(text))


def faults(sentence):
    """What is wrong with a sentence; empty where nothing is."""
    found = []
    if sentence != " ".join(sentence.split()):
        found.append("spaces")
    if not re.search(r"[.!?]$", sentence) or sentence.endswith(".."):
        found.append("no full stop")
    if sentence[:1].islower() and not re.match(r"[a-z]+[A-Z]", sentence):
        found.append("no capital")
    if sentence.count("(") != sentence.count(")"):
        found.append("brackets")
    if re.search(r" [,.;:)]|\( |,,|\(\)|[,;:]\.$|\. [a-z]", sentence):
        found.append("punctuation")
    if re.search(r"(?<![\w])-\d", sentence):
        found.append("hyphen for a minus sign")
    if re.search(r"(?<![\d.])(0|100)(\.0+)?%", sentence):
        found.append("0% or 100%")
    if re.search(r"(?<![\d.,])1 (rows|years|pipes|steps|units|odds ratios)\b", sentence):
        found.append("plural of one")
    if re.search(r"\b(\d*[2-9]|\d+\d) (row|year|step)\b", sentence):
        found.append("singular of many")
    said = _FORBIDDEN.search(sentence)
    if said:
        found.append(f"says {said.group()!r}")
    return found
