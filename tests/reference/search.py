"""Searches over states rho = exp(H)/Tr exp(H), H Hermitian in M: every value found is an upper bound only."""

import numpy as np
import scipy.optimize

LARGEST_LOGARITHM = 20.0  # eigenvalues of H are kept this close, so that rho still carries its smallest ones (1e-7)
OUTSIDE = 1e6  # value given to points where f cannot be evaluated


def state_from_coordinates(algebra, x):
    """rho = exp(H)/Tr exp(H), H = sum x_k b_k in the Hermitian basis of M."""
    values, u = algebra.eigh(algebra.matrix(algebra.hermitian_basis @ x))
    values = np.maximum(values - values.max(), -LARGEST_LOGARITHM)
    weights = np.exp(values)
    return (u * (weights / weights.sum())) @ u.conj().T


def minimise(algebra, f, seed=0, starts=8, spread=1.0):
    """Least f(rho) found by BFGS from seeded starts, polished by Nelder-Mead; returns (value, rho)."""
    rng = np.random.default_rng(seed)

    def objective(x):
        if not np.abs(x).max() < 1e3:
            return OUTSIDE
        value = f(state_from_coordinates(algebra, x))
        return value if np.isfinite(value) else OUTSIDE

    best, where = np.inf, None
    for start in range(starts):
        x = spread * (1 + start % 3) * rng.standard_normal(algebra.dimension)
        found = scipy.optimize.minimize(objective, x, method="BFGS", options={"gtol": 1e-8})
        if found.fun < best:
            best, where = found.fun, found.x
    options = {"maxiter": 200 * algebra.dimension, "xatol": 1e-9, "fatol": 1e-13}
    polished = scipy.optimize.minimize(objective, where, method="Nelder-Mead", options=options)
    if polished.fun < best:
        best, where = polished.fun, polished.x
    return float(best), state_from_coordinates(algebra, where)
