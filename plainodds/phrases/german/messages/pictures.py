"""Fixed texts of pictures of answers in German, by their English."""

from __future__ import annotations

__all__ = ["PICTURES"]

PICTURES: dict[str, str] = {
    "(interval not known)": "(Intervall nicht bekannt)",
    "(reference)": "(Referenz)",
    "1 by the model": "1 nach dem Modell",
    (
        "A dash among the events: fewer than {} with or without them, or a number that would give "
        "such a one away."
    ): (
        "Strich bei den Ereignissen: weniger als {} mit oder ohne Ereignis, oder eine Zahl, "
        "die eine solche verraten würde."
    ),
    "A dash among the figures: not in this model.": (
        "Strich bei den Zahlen: nicht in diesem Modell."
    ),
    "Arrow: it goes on beyond the axis.": "Pfeil: Es geht jenseits der Achse weiter.",
    "Arrow: it goes on beyond the axis; its figures stand at the right.": (
        "Pfeil: Es geht jenseits der Achse weiter; die Zahlen stehen rechts."
    ),
    "Arrow: the line goes on beyond the break of the axis; its figures stand in the table.": (
        "Pfeil: Die Linie geht jenseits der unterbrochenen Achse weiter; die Zahlen stehen in "
        "der Tabelle."
    ),
    "At typical values: {}.": "Bei typischen Werten: {}.",
    "Average chance of {}": "Mittlere Wahrscheinlichkeit für „{}“",
    "Averaged over {}, each with its own values otherwise.": (
        "Gemittelt über {}, sonst jede mit ihren eigenen Werten."
    ),
    "Band": "Band",
    "Band and figures in brackets: {}% interval.": "Band und Zahlen in Klammern: {}-%-Intervall.",
    "Bands and lines: {}% intervals, cut off where they leave the axis.": (
        "Bänder und Linien: {}-%-Intervalle, abgeschnitten, wo sie die Achse verlassen."
    ),
    "Bands and lines: {}% intervals.": "Bänder und Linien: {}-%-Intervalle.",
    "Beneath the lines: where the {} are.": "Unter den Linien: wo die {} liegen.",
    "Beneath: where the {} are.": "Darunter: wo die {} liegen.",
    "Broken line of the effect: few {} or none there.": (
        "Effekt gestrichelt: dort wenige {} oder keine."
    ),
    "Broken line: few {} or none there.": "Gestrichelt: dort wenige {} oder keine.",
    "Broken pointer: beyond the data.": "Gestrichelter Zeiger: außerhalb der Daten.",
    "Broken pointer: few {} or none are like it.": (
        "Gestrichelter Zeiger: Wenige {} oder keine sind ähnlich."
    ),
    "Chance": "Wahrscheinlichkeit",
    "Chance of {}": "Wahrscheinlichkeit für „{}“",
    "Change of the average chance (percentage points per {} more)": (
        "Änderung der mittleren Wahrscheinlichkeit (Prozentpunkte je {} mehr)"
    ),
    "Change of the average chance (percentage points)": (
        "Änderung der mittleren Wahrscheinlichkeit (Prozentpunkte)"
    ),
    "Change of the average chance of {} (percentage points)": (
        "Änderung der mittleren Wahrscheinlichkeit für „{}“ (Prozentpunkte)"
    ),
    "Change of the chance (percentage points per {} more)": (
        "Änderung der Wahrscheinlichkeit (Prozentpunkte je {} mehr)"
    ),
    "Change of the chance (percentage points)": "Änderung der Wahrscheinlichkeit (Prozentpunkte)",
    "Change of the chance of {} (percentage points)": (
        "Änderung der Wahrscheinlichkeit für „{}“ (Prozentpunkte)"
    ),
    "Change of the difference {}": "Änderung der Differenz {}",
    "Change of the slope {}": "Änderung der Steigung {}",
    "Counts are of the model “{}”, or of the first that has the predictor.": (
        "Anzahlen aus dem Modell „{}“ oder aus dem ersten, in dem das Merkmal steht."
    ),
    "Difference": "Differenz",
    "Difference of differences": "Differenz der Differenzen",
    "Difference of slopes": "Differenz der Steigungen",
    "Each change per additional unit has an axis of its own: units cannot be compared.": (
        "Jede Änderung je Einheit hat ihre eigene Achse: Einheiten lassen sich nicht vergleichen."
    ),
    "Frame: the combinations compared.": "Rahmen: die verglichenen Kombinationen.",
    "Hatched: no {} near.": "Schraffiert: keine {} in der Nähe.",
    "Held: {}.": "Festgehalten: {}.",
    "Hollow point of the effect: few {} or none there.": (
        "Hohler Punkt beim Effekt: dort wenige {} oder keine."
    ),
    "Hollow point: beyond the data ({}).": "Hohler Punkt: außerhalb der Daten ({}).",
    "Hollow point: few {} or none there.": "Hohler Punkt: dort wenige {} oder keine.",
    "Line through a point": "Linie durch einen Punkt",
    "Lines, band and brackets: {}% intervals.": "Linien, Band und Klammern: {}-%-Intervalle.",
    "Log odds matching the average chance of {}": (
        "Log-Odds zur mittleren Wahrscheinlichkeit für „{}“"
    ),
    "Log odds of {}": "Log-Odds für „{}“",
    "Log odds η": "Log-Odds η",
    "No intervals can be given.": "Es lassen sich keine Intervalle angeben.",
    "Odds": "Chance (Odds)",
    "Odds matching the average chance of {}": (
        "Chance (Odds) zur mittleren Wahrscheinlichkeit für „{}“"
    ),
    "Odds of {}": "Chance (Odds) für „{}“",
    "Odds ratio": "Odds Ratio",
    "Odds ratio of {}": "Odds Ratio für „{}“",
    "Odds ratio of {}, of averages": "Odds Ratio für „{}“, aus Mittelwerten",
    "Of {} values of {}, those compared and the most frequent.": (
        "Von {} Werten von {} die verglichenen und die häufigsten."
    ),
    "Of {} {}, {} (rounded):": "Von {} {}, „{}“ (gerundet):",
    "On the odds scale": "Auf der Skala der Chancen (Odds)",
    "On the probability scale": "Auf der Skala der Wahrscheinlichkeit",
    "Pointed band: the interval goes on to where there is no chance.": (
        "Spitzes Band: Das Intervall reicht dorthin, wo es keine Wahrscheinlichkeit mehr gibt."
    ),
    "Profile compared with": "Profil zum Vergleich",
    "Ratio of odds ratios": "Verhältnis der Odds Ratios",
    "The interaction itself, on both scales": "Die Wechselwirkung selbst, auf beiden Skalen",
    "This profile": "Dieses Profil",
    "Typical profile": "Typisches Profil",
    "Unchanged: {}": "Unverändert: {}",
    "With {} as marked.": "Mit {} wie bezeichnet.",
    "after it": "danach",
    "after the change": "nach der Änderung",
    "all {}": "alle {}",
    "at any profile": "bei jedem Profil",
    "at the values held": "bei den festgehaltenen Werten",
    "at typical values": "bei typischen Werten",
    "at {}": "bei {}",
    "averaged over {} {}": "gemittelt über {} {}",
    "before the change": "vor der Änderung",
    "chance": "Wahrscheinlichkeit",
    "change": "Änderung",
    "change ({}% interval)": "Änderung ({}-%-Intervall)",
    "compared with": "verglichen mit",
    "estimate": "Schätzung",
    "estimate ({}% interval)": "Schätzung ({}-%-Intervall)",
    "events /{}{}": "Ereignisse /{}{}",
    "fewer {}: {} instead of {}": "weniger {}: {} statt {}",
    "for {}": "bei {}",
    "higher": "höher",
    "higher chance →": "höhere Wahrscheinlichkeit →",
    "higher odds →": "höhere Chance (Odds) →",
    "instead of {}": "statt {}",
    "interaction\nchanges sign": "Wechselwirkung\nwechselt Vorzeichen",
    "left open": "offen",
    "log odds {}": "Log-Odds {}",
    "log odds η": "Log-Odds η",
    "lower": "niedriger",
    "more or fewer: the difference is under 1 in {}": (
        "mehr oder weniger: Die Differenz liegt unter 1 von {}"
    ),
    "more {}: {} instead of {}": "mehr {}: {} statt {}",
    "neither {} nor {}": "weder {} noch {}",
    "no\neffect": "kein\nEffekt",
    "no {}": "keine {}",
    "no {} here": "hier keine {}",
    "none": "keine",
    "odds": "Odds",
    "odds ratio": "Odds Ratio",
    "odds ratio ({}% interval)": "Odds Ratio ({}-%-Intervall)",
    "odds ratio, logarithmic axis": "Odds Ratio, logarithmische Achse",
    "odds × {}": "Chance (Odds) × {}",
    "odds {}": "Chance (Odds) {}",
    "p-value": "p-Wert",
    "p-value {}": "p-Wert {}",
    "per additional {} of {}": "je {} mehr ({})",
    "sign changes": "Vorzeichenwechsel",
    "the sample tells no chances": "die Stichprobe verrät keine Wahrscheinlichkeiten",
    "this profile": "dieses Profil",
    "turns at {}": "wendet bei {}",
    "{} and {} alike": "{} und {} gleichermaßen",
    "{} of the {}": "{} der {}",
    "{} of {}": "{} ({})",
    "{}, in {}": "{} ({})",
    "{}, or {}: {}": "{} oder {}: {}",
    "{}: percentage points per {} more": "{}: Prozentpunkte je {} mehr",
    "{}: {} and {} together": "{}: {} und {} zusammen",
    "{}: {}% interval, cut off where it leaves the axis.": (
        "{}: {}-%-Intervall, abgeschnitten, wo es die Achse verlässt."
    ),
    "{}: {}% interval.": "{}: {}-%-Intervall.",
    "{}; {} as marked.": "{}; {} wie bezeichnet.",
    "← lower chance": "← niedrigere Wahrscheinlichkeit",
    "← lower odds": "← niedrigere Chance (Odds)",
}
