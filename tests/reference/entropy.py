"""Relative entropy, entropy production and the ratios whose infima are `mlsi` and `lsi` (method, sections 3 and 4)."""

import numpy as np

from semigroup import limit_state, reference_state


def relative_entropy(algebra, rho, tau):
    """D(rho||tau) = Tr rho (log rho - log tau), both faithful."""
    difference = algebra.function(rho, np.log) - algebra.function(tau, np.log)
    return float(np.trace(rho @ difference).real)


def entropy_production(semigroup, rho):
    """I(rho) = -Tr L^dagger rho (log rho - log sigma)."""
    a = semigroup.algebra
    difference = a.function(rho, np.log) - a.function(reference_state(semigroup), np.log)
    return float(-np.trace(semigroup.apply_adjoint(rho) @ difference).real)


def mlsi_ratio(semigroup, rho):
    """I(rho) / (2 D(rho || E^dagger rho)); its infimum over faithful states is mlsi."""
    return entropy_production(semigroup, rho) / (
        2 * relative_entropy(semigroup.algebra, rho, limit_state(semigroup, rho))
    )


def lsi_ratio(semigroup, rho):
    """2 E_2(X) / D(rho||sigma), X = sigma^{-1/4} rho^{1/2} sigma^{-1/4}, E_2(X) = -Tr sigma^{1/2} X sigma^{1/2} L(X);
    its infimum is lsi in the convention lsi <= gap (primitive semigroups)."""
    a = semigroup.algebra
    sigma = reference_state(semigroup)
    inverse = a.function(sigma, lambda s: s**-0.25)
    x = inverse @ a.function(rho, np.sqrt) @ inverse
    half = a.function(sigma, np.sqrt)
    energy = -np.trace(half @ x @ half @ semigroup.apply(x)).real
    return float(2 * energy / relative_entropy(a, rho, sigma))
