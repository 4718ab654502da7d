"""Fixed texts of pictures of checks in German, by their English."""

from __future__ import annotations

__all__ = ["CHECKS"]

CHECKS: dict[str, str] = {
    # topics and weights
    "How the fit ended": "Wie die Anpassung endete",
    "Outcomes told without exception": "Ergebnisse, die ausnahmslos feststehen",
    "Predictors that follow from each other": "Merkmale, die auseinander folgen",
    "Standard errors": "Standardfehler",
    "How much data there is": "Wie viele Daten es gibt",
    "Levels with few cases": "Stufen mit wenigen Fällen",
    "Rows left out": "Ausgelassene Zeilen",
    "Shape": "Form",
    "Chances against what happened": "Wahrscheinlichkeiten und was eintrat",
    "Rows that carry the result": "Zeilen, die das Ergebnis tragen",
    "Rows that belong together": "Zeilen, die zusammengehören",
    "How well events are told apart": "Wie gut Ereignisse unterschieden werden",
    "Overall tests and measures": "Gesamttests und Gesamtmaße",
    "{} along {}": "{} entlang {}",
    "nothing found": "nichts gefunden",
    "not known": "nicht bekannt",
    "keep in mind": "zu bedenken",
    "don't explain yet": "noch nicht erklären",
    # axes
    "Chance of {event} by the model": "Wahrscheinlichkeit für „{event}“ nach dem Modell",
    "Share of {event}": "Anteil mit „{event}“",
    "Share of {event} in the data": "Anteil mit „{event}“ in den Daten",
    "Number of {cases}": "Anzahl der {cases}",
    "How badly a pattern is fitted (ΔX²)": "Wie schlecht ein Muster angepasst ist (ΔX²)",
    "Standard errors are so many times as large": "Streckung der Standardfehler (Faktor)",
    "Standard error (log odds)": "Standardfehler (Log-Odds)",
    "Standard error (log odds for one standard deviation)": (
        "Standardfehler (Log-Odds je Standardabweichung)"
    ),
    # kinds of marks
    "data": "Daten",
    "model": "Modell",
    "data, smoothed": "Daten, geglättet",
    "model, smoothed in the same way": "Modell, ebenso geglättet",
    "chances that come true": "Wahrscheinlichkeiten, die zutreffen",
    "with {event}": "mit „{event}“",
    "without {event}": "ohne „{event}“",
    "counting groups": "Gruppen zusammen gezählt",
    "taking rows as strangers": "Zeilen als fremde gezählt",
    "rows left out": "ausgelassene Zeilen",
    "rows used": "verwendete Zeilen",
    # cases, columns and numbers of them; what is one or many is never inflected here
    "case": "Fall",
    "cases": "Fälle",
    "{case}": "Fall ({case})",
    "{cases}": "Fälle ({cases})",
    "coefficient": "Koeffizient",
    "coefficients": "Koeffizienten",
    "“{}”": "„{}“",
    "the outcome": "Zielgröße",
    "{part} of {whole}": "{part} von {whole}",
    "none of {cases}": "0 von {cases}",
    "all of {cases}": "alle {cases}",
    "the only one": "der einzige Fall",
    # notes on dots, bands and strips
    "Dots: {cases} each.": "Punkte: je {cases}.",
    "Dots: {least} to {cases} each.": "Punkte: je {least} bis {cases}.",
    "Dots: {least} to {cases} each, the more the larger.": (
        "Punkte: je {least} bis {cases}, je mehr, desto größer."
    ),
    "Band and bars: {}% intervals.": "Band und Striche: {}-%-Intervalle.",
    "Beneath: where the {cases} are.": "Darunter: wo die {cases} liegen.",
    "Beneath: how many {cases} have each chance.": (
        "Darunter: wie viele {cases} welche Wahrscheinlichkeit haben."
    ),
    "Both lines are smoothed in the same way.": "Beide Linien sind auf dieselbe Weise geglättet.",
    "Each side has a scale of its own: there are many more of one kind.": (
        "Jede Seite hat ihre eigene Skala: von der einen Art gibt es viel mehr."
    ),
    "A wider bar is of several with few {} each, at their mean height.": (
        "Ein breiterer Balken fasst mehrere zusammen (je wenige {}), in ihrer mittleren Höhe."
    ),
    # how much data there is
    "{cases} {side} for each of {coefficients}": "{cases} {side} je Koeffizient ({coefficients})",
    "too few": "zu wenige",
    "few": "wenige",
    "no longer few": "nicht mehr wenige",
    "The marks at 5 and 10 are what simulations have found; what they weigh is a custom.": (
        "Die Marken bei 5 und 10 stammen aus Simulationen; was sie wiegen, ist Brauch."
    ),
    # chances against what happened
    "Slope (1 is right)": "Steigung (richtig ist 1)",
    "Brier score (0 is best)": "Brier-Score (am besten 0)",
    "c (1 is best)": "c (am besten 1)",
    "{} bootstrap samples": "Bootstrap-Stichproben: {}",
    "{} repeats of cross-validation": "Wiederholungen der Kreuzvalidierung: {}",
    "on its own data": "an den eigenen Daten",
    "corrected": "korrigiert",
    # predictors that follow from each other
    "without an end": "ohne Ende",
    "Tied: {}, exactly.": "Genau verbunden: {}.",
    "Tied: {} (condition index {}).": "Verbunden: {} (Konditionsindex {}).",
    "And {} more ties.": "Weitere Verbindungen: {}.",
    (
        "1: as if the predictor were unrelated to the others; 2: as if only 1 row in 4 were there "
        "to tell it apart; 5: as if only 1 in 25."
    ): (
        "1: als hinge das Merkmal mit den anderen nicht zusammen; 2: als wäre nur 1 von 4 Zeilen "
        "da, um es zu trennen; 5: als wäre es nur 1 von 25."
    ),
    "Not shown: {} more predictors, with less.": (
        "Nicht gezeigte weitere Merkmale, mit kleineren Werten: {}."
    ),
    # how the fit ended
    "Largest remaining step of a coefficient, in its standard errors": (
        "Größter verbleibender Schritt eines Koeffizienten, in seinen Standardfehlern"
    ),
    "cannot be seen": "nicht zu sehen",
    "can be seen": "zu sehen",
    "changes figures": "ändert Zahlen",
    # rows that belong together
    "times as large by groups": "Faktor nach Gruppen",
    "{} rows in {} groups by {}, at most {} to a group.": (
        "{} Zeilen in {} Gruppen nach „{}“, höchstens {} je Gruppe."
    ),
    "{} rows in {} groups, at most {} to a group.": (
        "{} Zeilen in {} Gruppen, höchstens {} je Gruppe."
    ),
    "The fit's own intervals count groups together already.": (
        "Die Intervalle der Anpassung zählen Gruppen bereits zusammen."
    ),
    "Not shown: {} more coefficients, which differ less.": (
        "Nicht gezeigte weitere Koeffizienten, mit kleineren Unterschieden: {}."
    ),
    # rows that carry the result
    (
        "A mark is a kind of row: all {cases} of the same values. The larger it is, the farther "
        "the fit moves without it (Δβ)."
    ): (
        "Ein Zeichen steht für eine Art von Zeilen: alle {cases} mit denselben Werten. Je größer "
        "es ist, desto weiter bewegt sich die Anpassung ohne sie (Δβ)."
    ),
    "{} of {} are shown, these among them.": "Gezeigt sind {} von {}, darunter diese.",
    "Odds ratio, with these rows and without": "Odds Ratio mit diesen Zeilen und ohne",
    "with all rows": "mit allen Zeilen",
    "without: one step": "ohne: ein Schritt",
    "without: fitted anew": "ohne: neu angepasst",
    "Row {}": "Zeile {}",
    "Rows {}": "Zeilen {}",
    "about {}": "etwa {}",
    # levels
    "Not shown: 1 more level.": "Nicht gezeigt: 1 weitere Stufe.",
    "Not shown: {} more levels.": "Nicht gezeigt: {} weitere Stufen.",
    # rows left out
    "{} rows used": "Verwendete Zeilen: {}",
    "{} rows left out": "Ausgelassene Zeilen: {}",
    "{} rows left out, outcome known": "Ausgelassene Zeilen, Ergebnis bekannt: {}",
    "Missing in the rows left out: {}.": "In den ausgelassenen Zeilen fehlt: {}.",
    "Line: {}% interval of the difference, drawn from the share among the rows used.": (
        "Linie: {}-%-Intervall der Differenz, gezeichnet ab dem Anteil in den verwendeten Zeilen."
    ),
    # overall tests and measures
    "Test or measure": "Test oder Maß",
    "figure": "Zahl",
    # outcomes told without exception
    "Coefficients without a finite estimate": "Koeffizienten ohne endlichen Schätzwert",
    "An arrow has no end: any value farther off fits the data better still.": (
        "Ein Pfeil hat kein Ende: jeder noch fernere Wert passt noch besser zu den Daten."
    ),
    "Not shown: {} more coefficients.": "Nicht gezeigte weitere Koeffizienten: {}.",
    "open either way": "beiderseits offen",
    "no upper end": "kein oberes Ende",
    "no lower end": "kein unteres Ende",
    # standard errors
    "standard error": "Standardfehler",
    "the widest: {}": "der größte: {}",
    "as usual": "wie üblich",
    "wide": "groß",
    "absurd": "absurd",
    (
        "At 4, an interval goes from a {times}th to {times} times the odds for one standard "
        "deviation more; at 10 there are no words for it. Both marks are custom."
    ): (
        "Bei 4 reicht ein Intervall von 1/{times} bis zum {times}-Fachen der Chance (Odds) je "
        "Standardabweichung mehr; für 10 gibt es keine Worte. Beide Marken sind Brauch."
    ),
}
