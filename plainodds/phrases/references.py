"""The works that notes on methods cite, in full. As remembered; nothing was looked up."""

from __future__ import annotations

__all__ = ["REFERENCES"]

REFERENCES = {
    "Albert & Anderson 1984": (
        "Albert A, Anderson JA (1984). On the existence of maximum likelihood estimates in "
        "logistic regression models. Biometrika 71:1–10."
    ),
    "Belsley et al. 1980": ("Belsley DA, Kuh E, Welsch RE (1980). Regression Diagnostics. Wiley."),
    "DeLong et al. 1988": (
        "DeLong ER, DeLong DM, Clarke-Pearson DL (1988). Comparing the areas under two or more "
        "correlated receiver operating characteristic curves: a nonparametric approach. Biometrics "
        "44:837–845."
    ),
    "Fox & Monette 1992": (
        "Fox J, Monette G (1992). Generalized collinearity diagnostics. Journal of the American "
        "Statistical Association 87:178–183."
    ),
    "Harrell et al. 1996": (
        "Harrell FE, Lee KL, Mark DB (1996). Multivariable prognostic models: issues in developing "
        "models, evaluating assumptions and adequacy, and measuring and reducing errors. "
        "Statistics in Medicine 15:361–387."
    ),
    "Konis 2007": (
        "Konis K (2007). Linear programming algorithms for detecting separated data in binary "
        "logistic regression models. DPhil thesis, University of Oxford."
    ),
    "Landwehr et al. 1984": (
        "Landwehr JM, Pregibon D, Shoemaker AC (1984). Graphical methods for assessing logistic "
        "regression models. Journal of the American Statistical Association 79:61–71."
    ),
    "McFadden 1974": (
        "McFadden D (1974). Conditional logit analysis of qualitative choice behavior. In Zarembka "
        "P (ed), Frontiers in Econometrics. Academic Press."
    ),
    "Newcombe 1998": (
        "Newcombe RG (1998). Interval estimation for the difference between independent "
        "proportions: comparison of eleven methods. Statistics in Medicine 17:873–890."
    ),
    "Peduzzi et al. 1996": (
        "Peduzzi P, Concato J, Kemper E, Holford TR, Feinstein AR (1996). A simulation study of "
        "the number of events per variable in logistic regression analysis. Journal of Clinical "
        "Epidemiology 49:1373–1379."
    ),
    "Pregibon 1980": (
        "Pregibon D (1980). Goodness of link tests for generalized linear models. Applied "
        "Statistics 29:15–24."
    ),
    "Pregibon 1981": (
        "Pregibon D (1981). Logistic regression diagnostics. Annals of Statistics 9:705–724."
    ),
    "Tjur 2009": (
        "Tjur T (2009). Coefficients of determination in logistic regression models: a new "
        "proposal. The American Statistician 63:366–372."
    ),
    "Van Calster et al. 2016": (
        "Van Calster B, Nieboer D, Vergouwe Y, De Cock B, Pencina MJ, Steyerberg EW (2016). A "
        "calibration hierarchy for risk models was defined: from utopia to empirical data. Journal "
        "of Clinical Epidemiology 74:167–176."
    ),
    "Vittinghoff & McCulloch 2007": (
        "Vittinghoff E, McCulloch CE (2007). Relaxing the rule of ten events per variable in "
        "logistic and Cox regression. American Journal of Epidemiology 165:710–718."
    ),
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
