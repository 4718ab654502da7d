"""The works that notes on methods cite, in full. As remembered; nothing was looked up."""

from __future__ import annotations

__all__ = ["REFERENCES"]

REFERENCES = {
    "Ai & Norton 2003": (
        "Ai C, Norton EC (2003). Interaction terms in logit and probit models. Economics Letters "
        "80:123–129."
    ),
    "Bauer & Curran 2005": (
        "Bauer DJ, Curran PJ (2005). Probing interactions in fixed and multilevel regression: "
        "inferential and graphical techniques. Multivariate Behavioral Research 40:373–400."
    ),
    "Hosmer & Lemeshow 1992": (
        "Hosmer DW, Lemeshow S (1992). Confidence interval estimation of interaction. Epidemiology "
        "3:452–456."
    ),
    "Johnson & Neyman 1936": (
        "Johnson PO, Neyman J (1936). Tests of certain linear hypotheses and their application to "
        "some educational problems. Statistical Research Memoirs 1:57–93."
    ),
    "Knol & VanderWeele 2012": (
        "Knol MJ, VanderWeele TJ (2012). Recommendations for presenting analyses of effect "
        "modification and interaction. International Journal of Epidemiology 41:514–520."
    ),
    "Knol et al. 2011": (
        "Knol MJ, VanderWeele TJ, Groenwold RHH, Klungel OH, Rovers MM, Grobbee DE (2011). "
        "Estimating measures of interaction on an additive scale for preventive exposures. "
        "European Journal of Epidemiology 26:433–438."
    ),
    "Agresti 2013": "Agresti A (2013). Categorical Data Analysis, 3rd edition. Wiley.",
    "Altman 1998": (
        "Altman DG (1998). Confidence intervals for the number needed to treat. BMJ 317:1309–1312."
    ),
    "Dowd et al. 2014": (
        "Dowd BE, Greene WH, Norton EC (2014). Computation of standard errors. Health Services "
        "Research 49:731–750."
    ),
    "Gigerenzer et al. 2007": (
        "Gigerenzer G, Gaissmaier W, Kurz-Milcke E, Schwartz LM, Woloshin S (2007). Helping "
        "doctors and patients make sense of health statistics. Psychological Science in the Public "
        "Interest 8:53–96."
    ),
    "Greene 2012": "Greene WH (2012). Econometric Analysis, 7th edition. Pearson.",
    "Hanmer & Kalkan 2013": (
        "Hanmer MJ, Kalkan KO (2013). Behind the curve: clarifying the best approach to "
        "calculating predicted probabilities and marginal effects from limited dependent variable "
        "models. American Journal of Political Science 57:263–277."
    ),
    "Hosmer et al. 2013": (
        "Hosmer DW, Lemeshow S, Sturdivant RX (2013). Applied Logistic Regression, 3rd edition. "
        "Wiley."
    ),
    "King & Zeng 2001": (
        "King G, Zeng L (2001). Logistic regression in rare events data. Political Analysis "
        "9:137–163."
    ),
    "Liang & Zeger 1986": (
        "Liang KY, Zeger SL (1986). Longitudinal data analysis using generalized linear models. "
        "Biometrika 73:13–22."
    ),
    "Localio et al. 2007": (
        "Localio AR, Margolis DJ, Berlin JA (2007). Relative risks and confidence intervals were "
        "easily computed indirectly from multivariable logistic regression. Journal of Clinical "
        "Epidemiology 60:874–882."
    ),
    "Muller & MacLehose 2014": (
        "Muller CJ, MacLehose RF (2014). Estimating predicted probabilities from logistic "
        "regression: different methods correspond to different target populations. International "
        "Journal of Epidemiology 43:962–970."
    ),
    "Montgomery et al. 2012": (
        "Montgomery DC, Peck EA, Vining GG (2012). Introduction to Linear Regression Analysis, "
        "5th edition. Wiley."
    ),
    "Venzon & Moolgavkar 1988": (
        "Venzon DJ, Moolgavkar SH (1988). A method for computing profile-likelihood-based "
        "confidence intervals. Applied Statistics 37:87–94."
    ),
}
"""Full references by the way they are cited."""
