"""How two predictors together were looked at."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.methods.parts import interval_sentence, note, others_sentence

__all__: list[str] = []


@methods_note.register
def _(answer: PairAnswer) -> MethodsNote:
    question, subject = answer.question, answer.subject
    found = answer.interaction
    chances = found.at_profile is not None or found.averaged is not None
    return note(
        subject,
        (
            _on_chances(answer) if chances else "",
            "On the odds scale the interaction is the ratio of odds ratios",
            others_sentence(subject, question.others, "chances", answer.counted),
            interval_sentence(
                subject,
                question.level,
                "by the delta method with exact gradients, of differences on their own scale, of "
                "ratios on the log scale",
            ),
            _stretches(answer),
            _test(answer),
            *_joint(answer),
        ),
    )


def _on_chances(answer: PairAnswer) -> str:
    kinds = {0: "cross difference", 1: "difference of slopes", 2: "cross partial derivative"}
    return (
        "On the probability scale the interaction is the "
        f"{kinds[len(answer.sloped)]} of the chance, not the coefficient of a product term "
        "(Ai & Norton 2003)"
    )


def _stretches(answer: PairAnswer) -> str:
    if answer.effect.lower is None:
        return ""
    return (
        "Where an effect differs from none was found from the ends of its pointwise interval "
        "(Johnson & Neyman 1936; Bauer & Curran 2005)"
    )


def _test(answer: PairAnswer) -> str:
    test = answer.interaction.test
    if test is None:
        return ""
    kind = {"wald": "Wald", "likelihood_ratio": "likelihood-ratio"}[test.kind]
    number = test.degrees_of_freedom
    terms = "the one term" if number == 1 else f"all {number} terms"
    return f"The test of the interaction is the {kind} test of {terms} that join the two predictors"


def _joint(answer: PairAnswer) -> list[str]:
    if answer.joint is None:
        return []
    told = [
        "The joint table follows Knol & VanderWeele 2012; relative excess risk, attributable "
        "proportion and synergy index have delta-method intervals (Hosmer & Lemeshow 1992)"
    ]
    if answer.joint.recoded:
        told.append(
            "Levels were exchanged so that the combination with the lowest odds is the reference "
            "(Knol et al. 2011)"
        )
    return told
