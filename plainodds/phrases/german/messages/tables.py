"""Fixed texts of printed tables and dossiers in German, by their English."""

from __future__ import annotations

__all__ = ["TABLES"]

TABLES: dict[str, str] = {
    # what more than one kind of table says
    "Cases": "Fälle",
    "Difference, percentage points": "Differenz, Prozentpunkte",
    "Estimate": "Schätzung",
    "Figure": "Kennzahl",
    "Group": "Gruppe",
    "Percentage points": "Prozentpunkte",
    "Predictor": "Merkmal",
    "Ratio of chances": "Verhältnis der Wahrscheinlichkeiten",
    "{} ({}% interval)": "{} ({}-%-Intervall)",
    # odds ratios
    "Events": "Ereignisse",
    "Intervals are Wald intervals": "Intervalle nach Wald",
    "Intervals by profile likelihood": "Intervalle aus der Profil-Likelihood",
    (
        "No finite value: in these data the outcome of some cases is told without exception, so "
        "the best odds ratio lies farther off than any number."
    ): (
        "Kein endlicher Wert: In diesen Daten steht das Ergebnis mancher Fälle ausnahmslos fest, "
        "sodass das beste Odds Ratio weiter weg liegt als jede Zahl."
    ),
    "The odds ratios of {} depend on {}": "Die Odds Ratios zu {} hängen ab von {}",
    "at every value": "bei jedem Wert",
    "by {}": "je nach {}",
    "no finite value": "kein endlicher Wert",
    "no value above 0": "kein Wert über 0",
    (
        "– among the events: fewer than {} with or without them, or a number that would give such "
        "a one away"
    ): (
        "– bei den Ereignissen: weniger als {} mit oder ohne Ereignis, oder eine Zahl, die eine "
        "solche verraten würde"
    ),
    # tests of joint terms
    "Test of interaction with {}, model “{}”, {}": (
        "Test auf Wechselwirkung mit {}, Modell „{}“, {}"
    ),
    "Test of interaction with {}, {}": "Test auf Wechselwirkung mit {}, {}",
    "Wald test": "Wald-Test",
    "likelihood-ratio test": "Likelihood-Quotienten-Test",
    "on {} and {} degrees of freedom": "bei {} und {} Freiheitsgraden",
    "on {} degree of freedom": "bei {} Freiheitsgrad",
    "on {} degrees of freedom": "bei {} Freiheitsgraden",
    "{} that no term joins {}: {}": "{} darauf, dass kein Term {} verbindet: {}",
    # curves
    "* The data have few cases there, or none.": "* Die Daten haben dort wenige Fälle oder keine.",
    "* The data have few {} there, or none.": (
        "* Die Daten haben dort wenige Fälle ({}) oder keine."
    ),
    "In brackets {}% intervals.": "In Klammern: {}-%-Intervalle.",
    # profiles and changes
    "Adds to the log odds, from where the ledger starts": (
        "Beitrag zu den Log-Odds, vom Start der Aufstellung an"
    ),
    "Compared": "Im Vergleich",
    "Log odds": "Log-Odds",
    "The other profile": "Das andere Profil",
    "The profile": "Das Profil",
    "The profile against the other": "Das Profil gegenüber dem anderen",
    "The profile: {}": "Das Profil: {}",
    "The profile: {}. The other profile: {}": "Das Profil: {}. Das andere Profil: {}",
    # two predictors together
    "({} in all)": "({} insgesamt)",
    "({} with, of {})": "({} mit Ereignis, von {})",
    "(no rows)": "(keine Zeilen)",
    "1 (no shared term)": "1 (kein gemeinsamer Term)",
    "Adding up, from chances": "Maße des Addierens, aus Wahrscheinlichkeiten",
    "Adding up, from odds": "Maße des Addierens, aus Odds",
    "Attributable proportion": "Zuschreibbarer Anteil",
    "Each combination: cases with and without the event, chance, odds ratio": (
        "Jede Kombination: Fälle mit und ohne Ereignis, Wahrscheinlichkeit, Odds Ratio"
    ),
    "Odds ratios within strata": "Odds Ratios innerhalb der Schichten",
    "Relative excess risk due to interaction": (
        "Relatives Überschussrisiko durch Wechselwirkung (RERI)"
    ),
    "Synergy index": "Synergie-Index",
    "The interaction": "Die Wechselwirkung",
    "has no meaning here": "hier ohne Bedeutung",
    "{}, percentage points, at the profile held": "{}, Prozentpunkte, am festgehaltenen Profil",
    "{}, percentage points, averaged": "{}, Prozentpunkte, gemittelt",
    "{}, with {}": "{}, bei {}",
    # what was looked at in a fit
    "Value": "Wert",
    "What was looked at in the fit": "Was an der Anpassung angesehen wurde",
    # dossiers
    "Figure {}.": "Abbildung {}.",
    "Methods": "Methoden",
    "Read with care:": "Mit Vorsicht zu lesen:",
    "References": "Literatur",
    "Table {}.": "Tabelle {}.",
}
