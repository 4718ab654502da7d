"""statsmodels results -> coefficients and covariance, or a refusal."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from numpy.typing import NDArray
from statsmodels.discrete.discrete_model import L1BinaryResults, Logit
from statsmodels.gam.generalized_additive_model import GLMGam
from statsmodels.genmod import families
from statsmodels.genmod.generalized_estimating_equations import GEE, NominalGEE, OrdinalGEE
from statsmodels.genmod.generalized_linear_model import GLM

from plainodds.errors import FitRefused

__all__ = ["Estimates", "estimates_of", "is_constrained", "is_penalised", "refuse_other_models"]

Floats = NDArray[np.float64]

_PENALISED = (
    "The fit is penalised: its coefficients are shrunk or selected on purpose, and the usual "
    "covariance does not describe them, so there are estimates without intervals."
)

_NO_COVARIANCE = (
    "The covariance of {} is not a number, so there are estimates without intervals. Usually a "
    "column is an exact combination of others (or is constant beside an intercept): leave one of "
    "them out and fit again."
)


@dataclass(frozen=True, eq=False)
class Estimates:
    """What a result says of its coefficients.

    Attributes
    ----------
    coefficients : array (k,)
    covariance : array (k, k) or None
    covariance_kind : str
    no_interval : str
        Why there is no covariance; empty where there is one.
    degrees_of_freedom : float or None
        Of the t distribution where the result uses it; None for the normal.
    no_likelihood : str
        Why likelihood intervals cannot be had; empty where they can.
    without_standard_error : tuple of str
        Columns whose variance is no number of at least 0.
    """

    coefficients: Floats
    covariance: Floats | None
    covariance_kind: str
    no_interval: str
    degrees_of_freedom: float | None
    no_likelihood: str
    without_standard_error: tuple[str, ...] = ()


def refuse_other_models(result: Any) -> None:
    """Refuse whatever is not the result of a binary logit model.

    Raises
    ------
    FitRefused
        Naming what it is and which model to fit instead.
    """
    if not hasattr(result, "params") or not hasattr(result, "model"):
        raise FitRefused(_not_a_result(result))
    model = result.model
    if isinstance(model, GLMGam):
        raise FitRefused(
            "GLMGam penalises its smooth terms and keeps their basis outside the formula. "
            "Fit the smooth as bs(x, df=...) in a GLM or Logit instead."
        )
    if isinstance(model, NominalGEE | OrdinalGEE) or not isinstance(model, Logit | GLM):
        raise FitRefused(_not_binary(type(model).__name__))
    if isinstance(model, GLM):
        _refuse_other_families(model)


def estimates_of(result: Any) -> Estimates:
    """Read coefficients and covariance from a fitted binary logit result.

    Raises
    ------
    FitRefused
        If a coefficient is not a number. A fit without usable standard errors is taken in,
        and its estimates go without intervals.
    """
    model = result.model
    found = _without_covariance(result) if is_penalised(result) else _with_covariance(result)
    return _checked(found, list(model.exog_names))


def is_penalised(result: Any) -> bool:
    """Whether a fit shrank or selected its coefficients."""
    held = getattr(result, "_results", result)
    if isinstance(result.model, Logit):
        return isinstance(held, L1BinaryResults)
    if isinstance(result.model, GEE):
        # a penalised GEE says so nowhere, but has no naive covariance
        return not hasattr(held, "cov_naive")
    # refitted after a selection it has a covariance, which knows nothing of the selection
    return not hasattr(held, "cov_params") or bool(getattr(held, "regularized", False))


def is_constrained(result: Any) -> bool:
    """Whether coefficients were kept under constraints."""
    return bool(getattr(result, "k_constr", 0)) or getattr(result, "constraints", None) is not None


def _not_a_result(result: Any) -> str:
    if hasattr(result, "fit") and hasattr(result, "exog_names"):
        return (
            "This is a model that has not been fitted. Hand over what its fit() returns: "
            "FittedLogit(model.fit())."
        )
    return (
        f"A {type(result).__name__} is not a fitted statsmodels result. Hand over what fit() of "
        "Logit, GLM (binomial, logit link) or GEE (the same) returned."
    )


def _not_binary(name: str) -> str:
    ways = {
        "MNLogit": "It models more than two outcome levels; fit one Logit per comparison of two.",
        "OrderedModel": "It models ordered levels; fit a Logit of 'at or above' a chosen level.",
        "ConditionalLogit": "It has no intercept per group, so no probabilities; fit a Logit with "
        "the groups as a category, or a GEE with the groups as clusters.",
        "Probit": "Its coefficients are not log odds; fit a Logit of the same formula.",
    }
    way = ways.get(name, "Fit Logit, GLM(family=Binomial()) or GEE(family=Binomial()) instead.")
    return f"{name} is not a binary logit model. {way}"


def _refuse_other_families(model: Any) -> None:
    name = type(model).__name__
    family = model.family
    if not isinstance(family, families.Binomial):
        raise FitRefused(
            f"The {name}'s family is {type(family).__name__}. Odds and probabilities need "
            "family=sm.families.Binomial()."
        )
    if type(family.link).__name__.lower() != "logit":
        raise FitRefused(
            f"The {name}'s link is {type(family.link).__name__}: its coefficients are not log "
            "odds. Fit it again with the default link of sm.families.Binomial(), the logit."
        )


def _without_covariance(result: Any) -> Estimates:
    coefficients = np.asarray(result.params, dtype=float)
    return Estimates(coefficients, None, "none", _PENALISED, None, _PENALISED)


def _with_covariance(result: Any) -> Estimates:
    freedom = None
    if getattr(result, "use_t", False):
        freedom = float(getattr(result, "df_resid_inference", None) or result.df_resid)
    coefficients = np.asarray(result.params, dtype=float)
    try:
        covariance = np.asarray(result.cov_params(), dtype=float)
    except ValueError:
        # statsmodels could not invert the Hessian, and warned when it was fitted
        covariance = np.full((len(coefficients),) * 2, np.nan)
    kind = str(getattr(result, "cov_type", "nonrobust"))
    return Estimates(coefficients, covariance, kind, "", freedom, _no_likelihood(result))


def _no_likelihood(result: Any) -> str:
    if isinstance(result.model, GEE):
        return (
            "a GEE has no likelihood, it solves estimating equations; ask interval='wald', which "
            "uses its own covariance."
        )
    kind = str(getattr(result, "cov_type", "nonrobust"))
    if kind != "nonrobust":
        return (
            f"the fit's covariance is {kind}, because the likelihood alone is not trusted; an "
            "interval from the likelihood would ignore that. Ask interval='wald'."
        )
    if is_constrained(result):
        return (
            "the fit is under constraints, and the refits would not keep them; ask interval='wald'."
        )
    if not math.isclose(float(getattr(result, "scale", 1.0)), 1.0):
        return (
            f"the fit has a scale of {float(result.scale):.3g} beside the binomial variance, so "
            "the deviance has no χ² distribution; ask interval='wald'."
        )
    return ""


def _checked(found: Estimates, names: list[str]) -> Estimates:
    bad = [name for name, b in zip(names, found.coefficients, strict=True) if not np.isfinite(b)]
    if bad:
        raise FitRefused(
            f"The coefficient of {', '.join(bad)} is not a number: the fit did not work out. "
            "Look at its warnings before explaining it."
        )
    if found.covariance is None:
        return found
    with np.errstate(invalid="ignore"):
        usable = np.isfinite(found.covariance).all(axis=1) & (np.diag(found.covariance) >= 0)
    if usable.all():
        return found
    without = tuple(name for name, each in zip(names, usable, strict=True) if not each)
    return replace(
        found,
        covariance=None,
        no_interval=_NO_COVARIANCE.format(", ".join(without)),
        without_standard_error=without,
    )
