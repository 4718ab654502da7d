"""How a fit was looked at before it was explained, in German."""

from __future__ import annotations

from plainodds.answers.checks.finding import Topic
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.phrases.choices.checks import optimism_of, topics_looked_at
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.texts import note
from plainodds.phrases.methods.note import MethodsNote
from plainodds.phrases.numbers import count

__all__: list[str] = []

_METHODS: dict[Topic, str] = {
    "convergence": "Ob die Anpassung konvergiert war, wurde am Schritt beurteilt, den eine weitere "
    "Newton-Iteration machen würde",
    "separation": "Nach vollständiger und quasi-vollständiger Separation (Albert & Anderson 1984) "
    "wurde mit einem linearen Programm gesucht (Konis 2007)",
    "collinearity": "Kollinearität wurde an Konditionsindizes mit Varianzzerlegungsanteilen "
    "(Belsley et al. 1980) und an der verallgemeinerten Varianzinflation beurteilt "
    "(Fox & Monette 1992)",
    "amount": "Ereignisse je Parameter wurden gezählt (Peduzzi et al. 1996; "
    "Vittinghoff & McCulloch 2007)",
    "missing": "Die Anteile der Ereignisse unter verwendeten und ausgelassenen Zeilen wurden mit "
    "einem Hybrid-Score-Intervall verglichen (Newcombe 1998)",
    "shape": "Modell und Daten wurden entlang jeder Zahl anhand geglätteter und gruppierter "
    "Anteile verglichen (Landwehr et al. 1984), mit einem Score-Test auf Krümmung auf der "
    "Logit-Skala",
    "calibration": "Die Kalibrierung wurde an einer geglätteten Kurve und gruppierten Anteilen "
    "beurteilt (Van Calster et al. 2016), mit dem Brier-Score",
    "influence": "Der Einfluss wurde am Hebelwert und an den Änderungen von Pearsons Statistik, "
    "Devianz und Koeffizienten beurteilt, wenn ein Kovariatenmuster ausgelassen wird "
    "(Pregibon 1981)",
    "dependence": "Standardfehler nach Gruppen sind clusterrobust (Liang & Zeger 1986)",
    "discrimination": "Die Unterscheidung ist die c-Statistik, ihr Intervall beruht auf DeLongs "
    "Varianz (DeLong et al. 1988)",
    "overall": "Der Gesamttest ist der von Hosmer und Lemeshow (Hosmer et al. 2013), neben den "
    "Koeffizienten von Tjur 2009 und McFadden 1974 und einem Link-Test (Pregibon 1980)",
}


@GERMAN.methods_note.register
def _(answer: SoundnessAnswer) -> MethodsNote:
    told = [_METHODS[topic] for topic in topics_looked_at(answer) if topic in _METHODS]
    return note(answer.subject, [*told, *_optimism(answer)])


def _optimism(answer: SoundnessAnswer) -> list[str]:
    """How optimism was estimated, where it was."""
    found = optimism_of(answer)
    if found is None:
        return []
    way = {
        "bootstrap": "Bootstrap-Stichproben",
        "cross-validation": "Wiederholungen einer zehnfachen Kreuzvalidierung",
    }[found.way]
    return [
        f"Der Optimismus wurde aus {count(found.repeats)} {way} geschätzt (Harrell et al. 1996)"
    ]
