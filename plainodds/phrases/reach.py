"""Which parts of a curve have data, and how far beyond them it is drawn."""

from __future__ import annotations

from itertools import pairwise

from plainodds.answers.curve import CurveAnswer, CurveLine
from plainodds.phrases.labels import listed, named_value, predictor_name, value_label
from plainodds.phrases.lexicon import lexicon

__all__ = ["beyond_words", "line_words", "parts_without_data", "supported_places"]


def supported_places(line: CurveLine) -> list[int]:
    """Positions of the points near which there are data; all of them where there are none."""
    places = [place for place, supported in enumerate(line.supported) if supported]
    return places or list(range(len(line.at)))


def line_words(answer: CurveAnswer, line: CurveLine) -> str:
    """What tells a line from the others: "material PVC"; empty where there is one line only."""
    by = answer.question.by
    if by is None or line.by is None:
        return ""
    return named_value(answer.subject.predictor(by), line.by)


def beyond_words(answer: CurveAnswer) -> list[str]:
    """Where the curve leaves the data; empty where it does not."""
    told = parts_without_data(answer)
    if not told:
        return []
    if answer.subject.predictor(answer.question.predictor).is_number:
        return [
            "Where a line is dashed the data have no rows near by and the model speaks on its "
            f"own: {told}"
        ]
    return [f"The data have no rows here and the model speaks on its own: {told}"]


def parts_without_data(answer: CurveAnswer) -> str:
    """The parts of the lines that leave the data, each with its lines; empty without any."""
    parts: dict[str, list[str]] = {}
    for line in answer.lines:
        where = _unsupported(answer, line)
        if where:
            parts.setdefault(where, []).append(line_words(answer, line))
    for_lines = lexicon().for_lines
    return "; ".join(
        where if len(lines) == len(answer.lines) else for_lines.format(listed(lines), where)
        for where, lines in parts.items()
    )


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
        return lexicon().value.format(name, listed(missing))
    if not any(line.supported):
        return lexicon().along_all.format(name)
    return f"{name} {listed(_gaps(answer, line))}"


def _gaps(answer: CurveAnswer, line: CurveLine) -> list[str]:
    facts = answer.subject.predictor(answer.question.predictor)
    places, say = supported_places(line), lexicon()
    gaps = []
    if places[0] > 0:
        gaps.append(say.below.format(value_label(facts, line.at[places[0]])))
    gaps += [
        say.between.format(value_label(facts, line.at[low]), value_label(facts, line.at[high]))
        for low, high in pairwise(places)
        if high > low + 1
    ]
    if places[-1] < len(line.at) - 1:
        gaps.append(say.above.format(value_label(facts, line.at[places[-1]])))
    return gaps
