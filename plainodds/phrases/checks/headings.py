"""What checks, their weights and their pictures' axes are called."""

from __future__ import annotations

from plainodds.answers.checks.finding import Concern, Finding, Topic
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import axis_title, predictor_name
from plainodds.phrases.units import tidy

__all__ = [
    "concern_label",
    "concern_sign",
    "finding_heading",
    "picture_axes",
    "picture_legend",
    "topic_label",
]

_TOPICS: dict[Topic, str] = {
    "convergence": "How the fit ended",
    "separation": "Outcomes told without exception",
    "collinearity": "Predictors that follow from each other",
    "standard errors": "Standard errors",
    "amount": "How much data there is",
    "levels": "Levels with few cases",
    "missing": "Rows left out",
    "shape": "Shape",
    "calibration": "Chances against what happened",
    "influence": "Rows that carry the result",
    "dependence": "Rows that belong together",
    "discrimination": "How well events are told apart",
    "overall": "Overall tests and measures",
}

# outlines differ, not only how full they are
_SIGNS: dict[Concern, str] = {
    "nothing found": "○",
    "not known": "?",
    "keep in mind": "◆",
    "don't explain yet": "■",
}


def topic_label(topic: Topic) -> str:
    """What a check is called, as a heading."""
    return _TOPICS[topic]


def concern_label(concern: Concern) -> str:
    """What a finding's weight is called."""
    return str(concern)


def concern_sign(concern: Concern) -> str:
    """A sign for a finding's weight, told by its shape: ring, question mark, diamond, block."""
    return _SIGNS[concern]


def finding_heading(finding: Finding, subject: Subject) -> str:
    """A finding's short heading: its topic, and the number whose shape it speaks of."""
    label = topic_label(finding.topic)
    if finding.topic == "shape" and finding.about:
        return f"{label} along {predictor_name(subject.predictor(finding.about[0]))}"
    return label


def picture_axes(finding: Finding, subject: Subject) -> tuple[str, str]:
    """Titles of a picture's horizontal and vertical axis; empty where there is none.

    Returns
    -------
    tuple of str
        An axis of names (levels, predictors, coefficients) has no title.
    """
    event, cases = tidy(subject.outcome.event), tidy(subject.outcome.cases)
    chance = f"Chance of {event} by the model"
    topic = finding.topic
    if topic == "shape":
        along = axis_title(subject.predictor(finding.about[0])) if finding.about else ""
        return along, f"Share of {event}"
    return {
        "calibration": (chance, f"Share of {event} in the data"),
        "discrimination": (chance, f"Number of {cases}"),
        "influence": (chance, "How badly a pattern is fitted (ΔX²)"),
        "levels": (f"Number of {cases}", ""),
        "collinearity": ("Standard errors are so many times as large", ""),
        "dependence": ("Standard error (log odds)", ""),
        "standard errors": ("Standard error (log odds for one standard deviation)", ""),
        "missing": (f"Share of {event}", ""),
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
    event = tidy(subject.outcome.event)
    by_event = (f"with {event}", f"without {event}")
    return {
        "shape": ("data, smoothed", "model, smoothed in the same way"),
        "calibration": ("data, smoothed", "chances that come true"),
        "discrimination": by_event,
        "levels": by_event,
        "dependence": ("counting groups", "taking rows as strangers"),
        "missing": ("rows left out", "rows used"),
    }.get(finding.topic, ("", ""))
