"""Generators of quantum Markov semigroups as superoperators, and what a superoperator alone tells about them.

Heisenberg picture throughout: `generator` is the D x D complex matrix of L in matrix-unit coordinates of M
(blocks.BlockAlgebra), so that coordinates(L(A)) = generator @ coordinates(A). The matrix of L^dagger is its conjugate
transpose, because Tr rho L(A) = <rho, L(A)> for Hermitian rho.
"""

from dataclasses import dataclass
from typing import Optional

import numpy as np
import scipy.linalg

from blocks import BlockAlgebra

NULL_TOLERANCE = 1e-10  # singular values of L below this times ||L||_2 count as zero


@dataclass
class Semigroup:
    """L on M with, possibly, the reference state declared by the model."""

    algebra: BlockAlgebra
    generator: np.ndarray
    declared_state: Optional[np.ndarray] = None

    def apply(self, observable):
        """L(A) for an N x N matrix A in M."""
        return self.algebra.matrix(self.generator @ self.algebra.coordinates(observable))

    def apply_adjoint(self, state):
        """L^dagger(rho) for an N x N matrix rho in M."""
        return self.algebra.matrix(self.generator.conj().T @ self.algebra.coordinates(state))


def evolve(semigroup, t, observable):
    """P_t A = e^{tL} A by scipy.linalg.expm."""
    a = semigroup.algebra
    return a.matrix(scipy.linalg.expm(t * semigroup.generator) @ a.coordinates(observable))


def evolve_state(semigroup, t, state):
    """P_t^dagger rho."""
    a = semigroup.algebra
    return a.matrix(scipy.linalg.expm(t * semigroup.generator.conj().T) @ a.coordinates(state))


def spectrum(semigroup):
    """The D eigenvalues of -L on M, sorted by real part, then imaginary part."""
    values = scipy.linalg.eigvals(-semigroup.generator)
    scale = max(1.0, np.abs(values).max(initial=0.0))
    keys = np.round(values.real / scale, 9)
    return values[np.lexsort((values.imag, keys))]


def null_space(matrix):
    """Orthonormal columns spanning the kernel, to NULL_TOLERANCE."""
    _, s, vh = np.linalg.svd(matrix)
    scale = s.max(initial=0.0)
    rank = int((s > NULL_TOLERANCE * scale).sum()) if scale > 0 else 0
    return vh[rank:].conj().T


def fixed_point_dimension(semigroup):
    """dim F, F = {A in M: L(A) = 0}."""
    return null_space(semigroup.generator).shape[1]


def expectation(semigroup):
    """D x D matrix of E = spectral projection of L at 0 (lim P_t when no eigenvalue of L is purely imaginary)."""
    right = null_space(semigroup.generator)
    left = null_space(semigroup.generator.conj().T)
    return right @ np.linalg.solve(left.conj().T @ right, left.conj().T)


def limit_state(semigroup, state):
    """E^dagger rho, the state every entropy is taken to (method, section 1)."""
    a = semigroup.algebra
    out = a.matrix(expectation(semigroup).conj().T @ a.coordinates(state))
    return (out + out.conj().T) / 2


def reference_state(semigroup):
    """The declared state if there is one, else E^dagger(1/N); N x N, trace one."""
    if semigroup.declared_state is not None:
        state = semigroup.declared_state
        return state / np.trace(state).real
    n = semigroup.algebra.size
    return limit_state(semigroup, np.eye(n) / n)


def symmetry_residuals(semigroup):
    """Relative departures from symmetry, ||S - S^dagger||_F / ||S||_F with S = J^{1/2} L J^{-1/2} and J the Gram matrix
    of the inner product: Tr A*B (tracial), Tr sigma A*B (gns), Tr sigma^{1/2} A* sigma^{1/2} B (kms); also
    `invariance` = ||L^dagger sigma||_F / ||L||_F. "tracial" of method section 1 needs sigma proportional to 1 as well:
    `state_from_trace` = ||sigma - 1/N||_F."""
    a = semigroup.algebra
    sigma = reference_state(semigroup)
    scale = np.linalg.norm(semigroup.generator) or 1.0
    quarter = a.function(sigma, lambda x: np.maximum(x, 0) ** 0.25)
    half = quarter @ quarter
    eye = np.eye(a.size)
    residual = {
        "invariance": np.linalg.norm(semigroup.apply_adjoint(sigma)) / scale,
        "state_from_trace": np.linalg.norm(sigma - eye / a.size),
    }
    for name, left, right in [("tracial", eye, eye), ("gns", eye, half), ("kms", quarter, quarter)]:
        root = restrict(a, np.kron(left, right.T))  # A -> left A right
        s = root @ semigroup.generator @ np.linalg.inv(root)
        residual[name] = np.linalg.norm(s - s.conj().T) / (np.linalg.norm(s) or 1.0)
    return {name: float(value) for name, value in residual.items()}


def restrict(algebra, full):
    """Compression to M of an N^2 x N^2 matrix acting on row-stacked N x N matrices."""
    return full[np.ix_(algebra.position, algebra.position)]


def leak(algebra, full):
    """Norm of the part of an N^2 x N^2 superoperator that takes M outside M."""
    outside = np.setdiff1d(np.arange(algebra.size**2), algebra.position)
    return float(np.linalg.norm(full[np.ix_(outside, algebra.position)]))
