"""Which parts of a curve have data, and how far beyond them it is drawn."""

from __future__ import annotations

from itertools import pairwise

from plainodds.answers.curve import CurveAnswer, CurveLine
from plainodds.phrases.labels import listed, predictor_name, value_label

__all__ = ["beyond_words", "line_words", "supported_places"]


def supported_places(line: CurveLine) -> list[int]:
    """Positions of the points near which there are data; all of them where there are none."""
    places = [place for place, supported in enumerate(line.supported) if supported]
    return places or list(range(len(line.at)))


def line_words(answer: CurveAnswer, line: CurveLine) -> str:
    """What tells a line from the others: "material PVC"; empty where there is one line only."""
    by = answer.question.by
    if by is None or line.by is None:
        return ""
    facts = answer.subject.predictor(by)
    return f"{predictor_name(facts)} {value_label(facts, line.by)}"


def beyond_words(answer: CurveAnswer) -> list[str]:
    """Where the curve leaves the data; empty where it does not."""
    parts: dict[str, list[str]] = {}
    for line in answer.lines:
        where = _unsupported(answer, line)
        if where:
            parts.setdefault(where, []).append(line_words(answer, line))
    if not parts:
        return []
    facts = answer.subject.predictor(answer.question.predictor)
    told = "; ".join(
        where if len(lines) == len(answer.lines) else f"for {listed(lines)}, {where}"
        for where, lines in parts.items()
    )
    if facts.is_number:
        return [
            "Where a line is dashed the data have no rows near by and the model speaks on its "
            f"own: {told}"
        ]
    return [f"The data have no rows here and the model speaks on its own: {told}"]


def _unsupported(answer: CurveAnswer, line: CurveLine) -> str:
    facts = answer.subject.predictor(answer.question.predictor)
    name = predictor_name(facts)
    if all(line.supported):
        return ""
    if not facts.is_number:
        missing = [
            value_label(facts, at)
            for at, supported in zip(line.at, line.supported, strict=True)
            if not supported
        ]
        return f"{name} {listed(missing)}"
    if not any(line.supported):
        return f"along all values of {name}"
    return f"{name} {listed(_gaps(answer, line))}"


def _gaps(answer: CurveAnswer, line: CurveLine) -> list[str]:
    facts = answer.subject.predictor(answer.question.predictor)
    places = supported_places(line)
    gaps = []
    if places[0] > 0:
        gaps.append(f"below {value_label(facts, line.at[places[0]])}")
    gaps += [
        f"between {value_label(facts, line.at[low])} and {value_label(facts, line.at[high])}"
        for low, high in pairwise(places)
        if high > low + 1
    ]
    if places[-1] < len(line.at) - 1:
        gaps.append(f"above {value_label(facts, line.at[places[-1]])}")
    return gaps
