"""What checks, their weights and their pictures' axes are called."""

from __future__ import annotations

from plainodds.answers.checks.finding import Concern, Finding, Topic
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.parts import cases_called
from plainodds.phrases.labels import axis_title, predictor_name
from plainodds.phrases.lexicon import message
from plainodds.phrases.units import tidy

__all__ = [
    "by_event",
    "concern_label",
    "concern_sign",
    "finding_heading",
    "picture_axes",
    "picture_legend",
    "topic_label",
]

# outlines differ, not only how full they are
_SIGNS: dict[Concern, str] = {
    "nothing found": "○",
    "not known": "?",
    "keep in mind": "◆",
    "don't explain yet": "■",
}


def by_event(subject: Subject) -> tuple[str, str]:
    """Cases with the event, and cases without it, to follow what they are called."""
    event = tidy(subject.outcome.event)
    return message("with {event}", event=event), message("without {event}", event=event)


def topic_label(topic: Topic) -> str:
    """What a check is called, as a heading."""
    labels: dict[Topic, str] = {
        "convergence": message("How the fit ended"),
        "separation": message("Outcomes told without exception"),
        "collinearity": message("Predictors that follow from each other"),
        "standard errors": message("Standard errors"),
        "amount": message("How much data there is"),
        "levels": message("Levels with few cases"),
        "missing": message("Rows left out"),
        "shape": message("Shape"),
        "calibration": message("Chances against what happened"),
        "influence": message("Rows that carry the result"),
        "dependence": message("Rows that belong together"),
        "discrimination": message("How well events are told apart"),
        "overall": message("Overall tests and measures"),
    }
    return labels[topic]


def concern_label(concern: Concern) -> str:
    """What a finding's weight is called."""
    labels: dict[Concern, str] = {
        "nothing found": message("nothing found"),
        "not known": message("not known"),
        "keep in mind": message("keep in mind"),
        "don't explain yet": message("don't explain yet"),
    }
    return labels[concern]


def concern_sign(concern: Concern) -> str:
    """A sign for a finding's weight, told by its shape: ring, question mark, diamond, block."""
    return _SIGNS[concern]


def finding_heading(finding: Finding, subject: Subject) -> str:
    """A finding's short heading: its topic, and the number whose shape it speaks of."""
    label = topic_label(finding.topic)
    if finding.topic == "shape" and finding.about:
        return message("{} along {}", label, predictor_name(subject.predictor(finding.about[0])))
    return label


def picture_axes(finding: Finding, subject: Subject) -> tuple[str, str]:
    """Titles of a picture's horizontal and vertical axis; empty where there is none.

    Returns
    -------
    tuple of str
        An axis of names (levels, predictors, coefficients) has no title.
    """
    event = tidy(subject.outcome.event)
    chance = message("Chance of {event} by the model", event=event)
    share = message("Share of {event}", event=event)
    number = message("Number of {cases}", cases=cases_called(subject))
    topic = finding.topic
    if topic == "shape":
        along = axis_title(subject.predictor(finding.about[0])) if finding.about else ""
        return along, share
    return {
        "calibration": (chance, message("Share of {event} in the data", event=event)),
        "discrimination": (chance, number),
        "influence": (chance, message("How badly a pattern is fitted (ΔX²)")),
        "levels": (number, ""),
        "collinearity": (message("Standard errors are so many times as large"), ""),
        "dependence": (message("Standard error (log odds)"), ""),
        "standard errors": (message("Standard error (log odds for one standard deviation)"), ""),
        "missing": (share, ""),
    }.get(topic, ("", ""))


def picture_legend(finding: Finding, subject: Subject) -> tuple[str, str]:
    """What a picture's two kinds of marks are; empty where there is only one.

    Returns
    -------
    tuple of str
        For shape and calibration (data, model); for discrimination and levels (cases with
        the event, cases without); for dependence (by groups, rows as strangers); for missing
        values (rows left out, rows used).
    """
    smoothed, sides = message("data, smoothed"), by_event(subject)
    return {
        "shape": (smoothed, message("model, smoothed in the same way")),
        "calibration": (smoothed, message("chances that come true")),
        "discrimination": sides,
        "levels": sides,
        "dependence": (message("counting groups"), message("taking rows as strangers")),
        "missing": (message("rows left out"), message("rows used")),
    }.get(finding.topic, ("", ""))
