"""The list of findings: a card for each, with a button that shows its picture."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from operator import itemgetter

import ipywidgets as widgets

from plainodds.answers.checks.finding import CONCERNS, Finding
from plainodds.answers.soundness import SoundnessAnswer, shown_finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.checks.headings import (
    concern_label,
    concern_sign,
    finding_heading,
    topic_label,
)
from plainodds.phrases.labels import listed, predictor_name, sentence_case
from plainodds.phrases.numbers import count
from plainodds.views import markup
from plainodds.views.parts import block, fill, html, titled

__all__ = ["Entry", "FindingsList", "entries"]

_WEIGHS = CONCERNS.index("keep in mind")
_CHOSEN = "plainodds-chosen"


@dataclass(frozen=True)
class Entry:
    """What one card stands for.

    Attributes
    ----------
    findings : tuple of Finding
        One; or those of one topic and one weight, where they do not weigh.
    """

    findings: tuple[Finding, ...]

    @property
    def first(self) -> Finding:
        """The finding that the card opens."""
        return self.findings[0]

    def heading(self, subject: Subject) -> str:
        """What was looked at, and what it weighs."""
        # a weight of two words is not torn apart
        weight = concern_label(self.first.concern).replace(" ", "\N{NO-BREAK SPACE}")
        told = finding_heading(self.first, subject)
        if len(self.findings) > 1:
            told = f"{topic_label(self.first.topic)} along {count(len(self.findings))} predictors"
        return f"{concern_sign(self.first.concern)}\N{NO-BREAK SPACE}{told}: {weight}"

    def sentence(self, subject: Subject, level: float) -> str:
        """What was found; of several findings, along which predictors."""
        if len(self.findings) == 1:
            return finding_words(self.first, subject, level).what
        names = [predictor_name(subject.predictor(each.about[0])) for each in self.findings]
        return f"{sentence_case(listed(names))}."


def entries(answer: SoundnessAnswer) -> list[Entry]:
    """The findings as cards tell them, in their order.

    Those that weigh stand one by one. Of those that do not, the many of one topic are told
    together.
    """
    found: list[Entry] = []
    for finding in answer.findings:
        last = found[-1].first if found else None
        if (
            last is not None
            and (last.topic, last.concern) == (finding.topic, finding.concern)
            and finding.weight < _WEIGHS
        ):
            found[-1] = Entry((*found[-1].findings, finding))
        else:
            found.append(Entry((finding,)))
    return found


class FindingsList:
    """The cards, the heaviest finding first.

    Parameters
    ----------
    choose : callable
        Called with an entry when its button is pressed.

    Attributes
    ----------
    widget : Box
    cards : list of Card
        Those that are shown.
    """

    def __init__(self, choose: Callable[[Entry], None]) -> None:
        self._choose = choose
        self._made: list[Card] = []
        self.cards: list[Card] = []
        self._place = block(name="findings")
        self.widget = titled("What was looked at, the heaviest first", self._place)

    def show(self, answer: SoundnessAnswer) -> None:
        """Show the findings of an answer, and which of them the picture shows."""
        told, chosen = entries(answer), shown_finding(answer)
        while len(self._made) < len(told):
            self._made.append(Card(self._choose))
        self.cards = self._made[: len(told)]
        marks = [any(each is chosen for each in entry.findings) for entry in told]
        for card, entry in zip(self.cards, told, strict=True):
            card.show(entry, answer)
        # each mark is a message of its own: the one that goes first leaves no two on the page
        for card, is_chosen in sorted(zip(self.cards, marks, strict=True), key=itemgetter(1)):
            card.mark(is_chosen=is_chosen)
        fill(self._place, [card.widget for card in self.cards])


class Card:
    """A button with a finding's sign, heading and weight, and its sentence beneath."""

    def __init__(self, choose: Callable[[Entry], None]) -> None:
        self._entry: Entry
        self.button = widgets.Button()
        self.button.on_click(lambda _: choose(self._entry))
        self.sentence = html("found")
        self.widget = block(self.button, self.sentence, name="finding")

    def show(self, entry: Entry, answer: SoundnessAnswer) -> None:
        """Show an entry; what stays the same is not sent again."""
        self._entry = entry
        subject, level = answer.subject, answer.question.level
        self.button.description = entry.heading(subject)
        self.sentence.value = markup.element("span", entry.sentence(subject, level))
        _put_class(self.widget, "plainodds-weighs", entry.first.weight >= _WEIGHS)

    def mark(self, *, is_chosen: bool) -> None:
        """Say whether this is what the picture shows."""
        self.button.tooltip = "Shown in the picture" if is_chosen else "Show this in the picture"
        _put_class(self.widget, _CHOSEN, is_chosen)


def _put_class(box: widgets.Box, name: str, wanted: bool) -> None:
    (box.add_class if wanted else box.remove_class)(name)
