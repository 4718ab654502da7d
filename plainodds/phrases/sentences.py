"""Whole sentences, and several of them in a row."""

from __future__ import annotations

from plainodds.phrases.labels import sentence_case

__all__ = ["joined", "sentence"]


def sentence(text: str) -> str:
    """Make a sentence: one line, a capital where one is due, a full stop."""
    text = sentence_case(text)
    return text if text.endswith((".", "!", "?")) else f"{text}."


def joined(*told: str) -> str:
    """Whole sentences in a row, empty ones left out."""
    return " ".join(sentence(each) for each in told if each)
