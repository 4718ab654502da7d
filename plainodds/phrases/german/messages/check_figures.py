"""What figures behind a finding are called in German, by their English."""

from __future__ import annotations

__all__ = ["CHECK_FIGURES"]

CHECK_FIGURES: dict[str, str] = {
    # levels
    "{cases}, events not told": "{cases}, Ereignisse nicht genannt",
    "{number} event in {cases}": "{number} Ereignis auf {cases}",
    "{number} events in {cases}": "{number} Ereignisse auf {cases}",
    # how much data there is
    "With the event": "Mit dem Ereignis",
    "Without the event": "Ohne das Ereignis",
    "Coefficients beside the intercept": "Koeffizienten neben der Konstante",
    "Of the rarer outcome for each coefficient": "Fälle des selteneren Ergebnisses je Koeffizient",
    # chances against what happened
    "Largest gap in the middle {} of rows": "Größter Abstand in den mittleren {} der Zeilen",
    "Intercept (0 is right)": "Konstante (richtig ist 0)",
    "Brier score": "Brier-Score",
    "Brier score of one chance for all": "Brier-Score einer Wahrscheinlichkeit für alle",
    "Groups shown": "Gezeigte Gruppen",
    "Corrected for optimism": "Um Optimismus korrigiert",
    "not asked for": "nicht gefragt",
    "Repeats (bootstrap)": "Wiederholungen (Bootstrap)",
    "Repeats (cross-validation)": "Wiederholungen (Kreuzvalidierung)",
    "Repeats that could not be fitted": "Wiederholungen, die sich nicht anpassen ließen",
    "Slope, corrected for optimism": "Steigung, um Optimismus korrigiert",
    "Brier score, corrected for optimism": "Brier-Score, um Optimismus korrigiert",
    "c, corrected for optimism": "c, um Optimismus korrigiert",
    # how well events are told apart
    "c (pairs of {cases} ranked rightly)": "c ({cases}, paarweise richtig eingestuft)",
    # predictors that follow from each other
    "Columns": "Spalten",
    "Independent columns": "Unabhängige Spalten",
    "Condition number": "Konditionszahl",
    "condition index {}": "Konditionsindex {}",
    "no end": "kein Ende",
    "exactly": "genau",
    "Tied: {}": "Verbunden: {}",
    "Standard errors of {} stretched by": "Streckung der Standardfehler von {}",
    "{} times": "{}-fach",
    # how the fit ended
    "Converged, as the fit says": "Konvergiert, wie die Anpassung sagt",
    "Iterations": "Schritte (Iterationen)",
    "Largest remaining step (in standard errors)": (
        "Größter verbleibender Schritt (in Standardfehlern)"
    ),
    # rows that belong together
    "Groups named by": "Gruppen nach",
    "Groups": "Gruppen",
    "Rows of the largest group": "Zeilen der größten Gruppe",
    "Groups counted by the fit itself": "Gruppen von der Anpassung selbst gezählt",
    "Standard error of “{}”": "Standardfehler von „{}“",
    "{} as strangers, {} by groups": "{} als fremde, {} nach Gruppen",
    # rows that carry the result
    "row {} ({})": "Zeile {} ({})",
    "rows {} ({})": "Zeilen {} ({})",
    "one kind of row ({})": "eine bestimmte Art von Zeilen ({})",
    "Different rows": "Verschiedene Zeilen",
    "{cases}, with the event": "{cases}, mit dem Ereignis",
    "{cases}, without the event": "{cases}, ohne das Ereignis",
    "{cases}, {number} with the event": "{cases}, davon {number} mit dem Ereignis",
    "chance {}, leverage {}, ΔX² {}, ΔD {}, Δβ {}": (
        "Wahrscheinlichkeit {}, Hebelwert {}, ΔX² {}, ΔD {}, Δβ {}"
    ),
    "the odds ratio for {change} is {sizes}": "das Odds Ratio zu {change} beträgt {sizes}",
    "{} either way": "{} so oder so",
    "{} rather than {}": "{} statt {}",
    # rows left out
    "Rows used": "Verwendete Zeilen",
    "Missing: {}": "Fehlend: {}",
    "Left out, outcome known": "Ausgelassen, Ergebnis bekannt",
    "Share of events, rows used": "Anteil der Ereignisse, verwendete Zeilen",
    "Share of events, rows left out": "Anteil der Ereignisse, ausgelassene Zeilen",
    # overall tests and measures
    "Hosmer & Lemeshow (1 group)": "Hosmer und Lemeshow (1 Gruppe)",
    "Hosmer & Lemeshow ({} groups)": "Hosmer und Lemeshow ({} Gruppen)",
    "Tjur's R²": "Tjurs R²",
    "McFadden's R²": "McFaddens R²",
    "Link test, p-value": "Link-Test, p-Wert",
    "{}, {} df": "{} (Freiheitsgrade: {})",
    "{}, {} df, p-value {}": "{} (Freiheitsgrade: {}), p-Wert {}",
    (
        "Hosmer & Lemeshow's test hangs on how cases are grouped, which is arbitrary, finds little "
        "in small samples and something in any large one, and does not say where a model is wrong."
    ): (
        "Der Test von Hosmer und Lemeshow hängt daran, wie Fälle gruppiert werden, was willkürlich "
        "ist; er findet in kleinen Stichproben wenig und in jeder großen etwas und sagt nicht, wo "
        "ein Modell falsch ist."
    ),
    (
        "Tjur's and McFadden's R² are not shares of variance explained, and a right model of a "
        "rare or chancy event has low ones."
    ): (
        "Tjurs und McFaddens R² sind keine Anteile erklärter Varianz, und ein richtiges Modell "
        "eines seltenen oder zufälligen Ereignisses hat niedrige."
    ),
    "The link test sees one kind of bend only, along the model's own chances.": (
        "Der Link-Test sieht nur eine Art von Biegung, entlang der Wahrscheinlichkeiten des "
        "Modells selbst."
    ),
    # outcomes told without exception
    "left open by the data": "von den Daten offen gelassen",
    "Outcome told without exception": "Ergebnis steht ausnahmslos fest",
    "Rows so told": "Solche Zeilen",
    "Different rows so told": "Verschiedene solche Zeilen",
    "some rows": "bei einigen Zeilen",
    "all rows": "bei allen Zeilen",
    "Coefficient “{}”": "Koeffizient „{}“",
    # shape
    "Test for another bend (χ²)": "Test auf eine andere Biegung (χ²)",
    # standard errors
    "Largest standard error ({})": "Größter Standardfehler ({})",
    "missing": "fehlt",
    "{}, that is {} in {}": "{}, das sind {} in {}",
    "log odds for one standard deviation of the column": (
        "Log-Odds je Standardabweichung der Spalte"
    ),
}
