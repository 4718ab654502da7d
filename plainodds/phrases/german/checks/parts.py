"""Parts of German sentences that several checks need: counts, lists of names, gaps."""

from __future__ import annotations

from plainodds.answers.checks.finding import Unknown
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.parts import LISTED_AT_MOST, amount
from plainodds.phrases.german.parts import case
from plainodds.phrases.german.parts import cases as many
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.units import tidy

__all__ = [
    "WHY_NOT_KNOWN",
    "because",
    "cases",
    "coefficients",
    "columns_named",
    "counted",
    "named",
    "rows",
    "short_list",
]

WHY_NOT_KNOWN: dict[Unknown, str] = {
    "no rows": "das Ergebnis der Anpassung enthält seine Zeilen nicht mehr",
    "no outcome": "das Ergebnis der Anpassung enthält die Zielgröße nicht mehr",
    "no covariance": "die Anpassung hat keine Kovarianzmatrix und damit keine Standardfehler",
    "no likelihood": "die Anpassung steht nicht an einem einfachen Maximum der Likelihood einzeln "
    "gezogener Zeilen",
    "no groups named": "niemand hat gesagt, welche Zeilen zusammengehören",
    "not said by the fit": "das Ergebnis der Anpassung sagt es nicht",
    "rows chosen by outcome": "die Zeilen wurden nach dem Ergebnis ausgewählt",
    "single rows": "es geht um einzelne Zeilen, und diese verlassen das Notebook nicht",
    "too few rows": "es gibt zu wenige Fälle mit dem Ereignis oder zu wenige ohne es",
}
"""Why something cannot be known, as a sentence of its own."""


def because(unknown: Unknown) -> str:
    """As in " (das Ergebnis enthält seine Zeilen nicht mehr)"; empty where all is known."""
    return f" ({WHY_NOT_KNOWN[unknown]})" if unknown else ""


def counted(number: float, one: str, many: str) -> str:
    """As in "1 Ereignis", "14 Ereignisse"."""
    written = amount(number)
    return f"{written} {one if written == '1' else many}"


def cases(subject: Subject, number: float, noun: str = "Fälle") -> str:
    """As in "1 Fall (Rohr)", "14 Fälle (Rohre)"; `noun` says many in the case wanted."""
    return counted(number, case(subject.outcome), many(subject.outcome, noun))


def rows(number: float, noun: str = "Zeilen") -> str:
    """As in "1 Zeile", "6.000 Zeilen"."""
    return counted(number, "Zeile", noun)


def coefficients(number: int, noun: str = "Koeffizienten") -> str:
    """As in "1 Koeffizient", "6 Koeffizienten"."""
    return counted(number, "Koeffizient", noun)


def short_list(items: list[str], at_most: int = LISTED_AT_MOST) -> str:
    """Join as in speech; of many only the first, and how many more there are."""
    left = len(items) - at_most
    if left <= 1:
        return listed(items)
    return listed([*items[:at_most], lexicon().further.format(left)])


def named(subject: Subject, names: tuple[str, ...]) -> str:
    """Predictors as within a sentence."""
    return short_list([predictor_name(subject.predictor(name)) for name in names])


def columns_named(names: tuple[str, ...]) -> str:
    """Columns of the design, as the fit's own table of coefficients calls them."""
    return short_list([f"„{tidy(name)}“" for name in names])
