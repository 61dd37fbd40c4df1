"""The metric form ||A||^2_rho (method, section 3), q_rho and kappa(rho) (section 5), densely from the definition."""

import numpy as np
import scipy.linalg

from canonical import canonical_form
from means import MEANS, divided_difference_first, divided_difference_second
from semigroup import NULL_TOLERANCE, evolve, evolve_state

STEP = 0.02  # first step of the finite differences over min(1/||L||, smallest eigenvalue of rho / ||L^dagger rho||)

SMOOTH_AT_ZERO = ("arithmetic", "left", "right")  # the means that are linear, so that boundary states are allowed


class Geometry:
    """Derivations of a GNS-symmetric semigroup, as N^2 x D matrices on the Hermitian coordinates of M."""

    def __init__(self, semigroup, jumps=None):
        self.semigroup = semigroup
        self.algebra = a = semigroup.algebra
        self.jumps = canonical_form(semigroup) if jumps is None else jumps
        eye = np.eye(a.size)
        embed = np.zeros((a.size**2, a.dimension), dtype=complex)
        embed[a.position] = a.hermitian_basis
        self.derivations = [(np.kron(v, eye) - np.kron(eye, v.T)) @ embed for v, _ in self.jumps]
        self.generator = (a.hermitian_basis.conj().T @ semigroup.generator @ a.hermitian_basis).real
        _, s, vh = np.linalg.svd(self.generator)
        self.complement = vh[: int((s > NULL_TOLERANCE * s.max(initial=0)).sum())].T  # orthogonal complement of F

    def coordinates(self, observable):
        """Coordinates in the orthonormal Hermitian basis (real exactly when the observable is Hermitian)."""
        return self.algebra.hermitian_basis.conj().T @ self.algebra.coordinates(observable)


def multiplication(algebra, rho, omega, mean="logarithmic"):
    """[rho]_omega as an N^2 x N^2 matrix on row-stacked X: m(e^{omega/2} lambda_a, e^{-omega/2} lambda_b) X_ab."""
    values, u = algebra.eigh(rho)
    f = MEANS[mean][0](np.exp(omega / 2) * values[:, None], np.exp(-omega / 2) * values[None, :])
    change = np.kron(u, u.conj())
    return (change * f.ravel()) @ change.conj().T


def multiplication_derivative(algebra, rho, eta, omega, mean="logarithmic"):
    """Derivative of rho -> [rho]_omega at rho in the direction eta, as an N^2 x N^2 matrix (section 5)."""
    values, u = algebra.eigh(rho)
    n = algebra.size
    up, down = np.exp(omega / 2), np.exp(-omega / 2)
    x, y = up * values, down * values
    # first[a,c,b] = (F_ab - F_cb)/(lambda_a - lambda_c);  second[a,b,c] = (F_ab - F_ac)/(lambda_b - lambda_c)
    first = up * divided_difference_first(mean, x[:, None, None], x[None, :, None], y[None, None, :])
    second = down * divided_difference_second(mean, x[:, None, None], y[None, :, None], y[None, None, :])
    eta = u.conj().T @ eta @ u
    eye = np.eye(n)
    d = np.einsum("ac,acb,bd->abcd", eta, first, eye) + np.einsum("ac,db,abd->abcd", eye, eta, second)
    change = np.kron(u, u.conj())
    return change @ d.reshape(n * n, n * n) @ change.conj().T


def norm_and_q_matrices(geometry, rho, mean="logarithmic"):
    """Hermitian D x D matrices G, Q on Hermitian coordinates with ||A||^2_rho = <A,G A> and q_rho(A) = <A,Q A>."""
    a = geometry.algebra
    smallest = a.eigh(rho)[0].min()
    if smallest <= 0 and mean not in SMOOTH_AT_ZERO:
        raise ValueError("expected a faithful state for the %s mean; got smallest eigenvalue %g" % (mean, smallest))
    eta = geometry.semigroup.apply_adjoint(rho)
    g = np.zeros((a.dimension, a.dimension), dtype=complex)
    half = np.zeros_like(g)
    for (_, omega), d in zip(geometry.jumps, geometry.derivations):
        g += d.conj().T @ multiplication(a, rho, omega, mean) @ d
        half += 0.5 * d.conj().T @ multiplication_derivative(a, rho, eta, omega, mean) @ d
    cross = g @ geometry.generator
    q = half - (cross + cross.conj().T) / 2
    return (g + g.conj().T) / 2, (q + q.conj().T) / 2


def norm_and_q(geometry, rho, observable, mean="logarithmic"):
    """(||A||^2_rho, q_rho(A))."""
    g, q = norm_and_q_matrices(geometry, rho, mean)
    x = geometry.coordinates(observable)
    return float((x.conj() @ g @ x).real), float((x.conj() @ q @ x).real)


def kappa(geometry, rho, mean="logarithmic", observables="hermitian"):
    """kappa(rho) and an observable attaining it: smallest generalised eigenvalue of (Q, G) on M modulo F.

    For `left` and `right` the forms are not invariant under A -> A*; "complex" lets A be any element of M."""
    g, q = norm_and_q_matrices(geometry, rho, mean)
    c = geometry.complement
    g, q = c.T @ g @ c, c.T @ q @ c
    if observables == "hermitian":
        g, q = g.real, q.real
    values, vectors = scipy.linalg.eigh(q, g)
    coordinates = geometry.algebra.hermitian_basis @ (c @ vectors[:, 0])
    return float(values[0]), geometry.algebra.matrix(coordinates)


def norm_by_integral(geometry, rho, observable, nodes=40):
    """||A||^2_rho for the logarithmic mean from Lambda(L,R) X = int_0^1 (w rho)^s X (rho/w)^{1-s} ds, w = e^{omega/2}:
    shares nothing with `multiplication` but the spectral theorem."""
    s, weights = np.polynomial.legendre.leggauss(nodes)
    s, weights = (s + 1) / 2, weights / 2
    logarithm = scipy.linalg.logm(rho)
    powers = [(scipy.linalg.expm(p * logarithm), scipy.linalg.expm((1 - p) * logarithm)) for p in s]
    total = 0.0
    for v, omega in geometry.jumps:
        x = v @ observable - observable @ v
        for p, weight, (left, right) in zip(s, weights, powers):
            total += weight * np.exp(omega * (p - 0.5)) * np.trace(x.conj().T @ left @ x @ right).real
    return float(total)


def rate_by_differences(geometry, rho, observable, norm=norm_by_integral):
    """lim_{t->0} -log(||P_t A||^2_rho / ||A||^2_{P_t^dagger rho})/(2t) by finite differences; equals
    q_rho(A)/||A||^2_rho. Uses only the definition of the estimate."""
    semigroup = geometry.semigroup
    def exponent(t):
        numerator = norm(geometry, rho, evolve(semigroup, t, observable))
        return -0.5 * np.log(numerator / norm(geometry, evolve_state(semigroup, t, rho), observable))

    return time_derivative(exponent, semigroup, rho)


def time_derivative(f, semigroup, rho):
    """f'(0) of a function of P_t A and P_t^dagger rho, by central differences and three Richardson steps."""
    drift = np.linalg.norm(semigroup.apply_adjoint(rho), 2) / np.linalg.eigvalsh(rho)[0]
    step = STEP / max(np.linalg.norm(semigroup.generator, 2), drift)
    table = [(f(h) - f(-h)) / (2 * h) for h in (step, step / 2, step / 4, step / 8)]
    for k in range(1, 4):
        table = [(4**k * fine - coarse) / (4**k - 1) for coarse, fine in zip(table, table[1:])]
    return float(table[0])
