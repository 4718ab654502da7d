"""Predictors that share terms, and so can only be told of together."""

from __future__ import annotations

from plainodds.model.fitted import FittedModel

__all__ = ["joined_predictors"]


def joined_predictors(model: FittedModel) -> tuple[tuple[str, ...], ...]:
    """Predictors joined by shared terms, directly or through others."""
    subject = model.subject
    group_of: dict[str, set[str]] = {}
    for facts in subject.predictors:
        joined = {facts.name}.union(*(group_of.get(m, {m}) for m in facts.modifiers))
        joined |= group_of.get(facts.name, set())
        for name in joined:
            group_of[name] = joined
    order = [facts.name for facts in subject.predictors]
    ordered = (tuple(n for n in order if n in group_of[name]) for name in order)
    return tuple(dict.fromkeys(ordered))
