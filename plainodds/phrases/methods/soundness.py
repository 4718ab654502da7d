"""How a fit was looked at before it was explained."""

from __future__ import annotations

from plainodds.answers.checks.finding import Topic
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.phrases.choices.checks import optimism_of, topics_looked_at
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import note
from plainodds.phrases.numbers import count

__all__: list[str] = []

_METHODS: dict[Topic, str] = {
    "convergence": "Whether the fit had converged was judged by the step that one more Newton "
    "iteration would take",
    "separation": "Complete and quasi-complete separation (Albert & Anderson 1984) were looked for "
    "by linear programme (Konis 2007)",
    "collinearity": "Collinearity was judged by condition indexes with variance-decomposition "
    "proportions (Belsley et al. 1980) and by generalised variance inflation (Fox & Monette 1992)",
    "amount": "Events for each parameter were counted (Peduzzi et al. 1996; "
    "Vittinghoff & McCulloch 2007)",
    "missing": "Shares of events among rows used and rows left out were compared by a hybrid-score "
    "interval (Newcombe 1998)",
    "shape": "Model and data were compared along each number by smoothed and binned shares "
    "(Landwehr et al. 1984), with a score test of curvature on the logit scale",
    "calibration": "Calibration was judged by a smoothed curve and grouped shares "
    "(Van Calster et al. 2016), with the Brier score",
    "influence": "Influence was judged by leverage and by the changes of Pearson's statistic, "
    "deviance and coefficients when a covariate pattern is left out (Pregibon 1981)",
    "dependence": "Standard errors by groups are cluster-robust ones (Liang & Zeger 1986)",
    "discrimination": "Discrimination is the c statistic, its interval by DeLong's variance "
    "(DeLong et al. 1988)",
    "overall": "The overall test is that of Hosmer and Lemeshow (Hosmer et al. 2013), beside the "
    "coefficients of Tjur 2009 and McFadden 1974 and a link test (Pregibon 1980)",
}


@methods_note.register
def _(answer: SoundnessAnswer) -> MethodsNote:
    told = [_METHODS[topic] for topic in topics_looked_at(answer) if topic in _METHODS]
    return note(answer.subject, [*told, *_optimism(answer)])


def _optimism(answer: SoundnessAnswer) -> list[str]:
    """How optimism was estimated, where it was."""
    found = optimism_of(answer)
    if found is None:
        return []
    way = {
        "bootstrap": f"{count(found.repeats)} bootstrap samples",
        "cross-validation": f"{count(found.repeats)} repeats of tenfold cross-validation",
    }[found.way]
    return [f"Optimism was estimated from {way} (Harrell et al. 1996)"]
