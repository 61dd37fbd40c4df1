"""Rival to the search for `ge`: inf kappa(rho) for the depolarising semigroup L(A) = Tr(A)/n - A, in NumPy and SciPy.

    OPENBLAS_NUM_THREADS=1 /usr/bin/python3 gradient_estimate_search.py [levels=3] [starts=8] [seed=1]

BFGS (scipy.optimize) over traceless Hermitian H with rho = exp(H). kappa is the smallest eigenvalue of the pencil of
method section 5; a point and the central differences for its gradient are one batch, evaluated by batched BLAS and
LAPACK calls. One OpenBLAS thread (set below unless the environment says otherwise): the matrices are small, so more
threads are slower. `seconds` is the search alone, without the start of the interpreter. `evaluations` counts kappas."""

import json
import os
import sys
import time

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

import numpy as np  # noqa: E402  (the thread count must be set first)
import scipy.optimize  # noqa: E402

DIFFERENCE_STEP = 1e-5
SERIES_RADIUS = 1e-2  # |log(x/y)| below which power series replace the quotients
COINCIDENCE = 1e-4  # relative distance of eigenvalues below which a divided difference is a derivative
LARGEST_LOGARITHM = 25.0  # |H| beyond which the line search is told the point is bad


class DepolarisingPencil:
    """Batched kappa(exp(H)) on the traceless Hermitian matrices."""

    def __init__(self, n):
        self.n, self.evaluations = n, 0
        self.basis = traceless_hermitian_basis(n)  # (D, n, n), orthonormal
        jumps = self.basis / np.sqrt(2 * n)  # L(A) = -sum_j [V_j, [V_j, A]]
        derivative = np.einsum("jab,kbc->kjac", jumps, self.basis) - np.einsum("kab,jbc->kjac", self.basis, jumps)
        self.derivative = derivative.reshape(len(self.basis) * len(jumps), n * n)
        image = np.einsum("kaa->k", self.basis)[:, None, None] * np.eye(n) / n - self.basis
        self.generator = np.einsum("kab,lba->kl", self.basis, image).real

    def kappa(self, x):
        """kappa at the states exp(sum_k x_k b_k), x of shape (batch, D)."""
        self.evaluations += len(x)
        n, d, batch = self.n, len(self.basis), len(x)
        values, u = np.linalg.eigh((x @ self.basis.reshape(d, n * n)).reshape(batch, n, n))
        values = np.exp(values - values.max(axis=1, keepdims=True))
        change = np.einsum("zac,zbd->zabcd", u.conj(), u).reshape(batch, n * n, n * n)  # X -> U* X U on rows
        rotated = (self.derivative @ change).reshape(batch, d, -1, n * n)
        mean, multiplication = multiplication_matrices(values, self.flow(values, u))
        weighted = (rotated * mean.reshape(batch, 1, 1, n * n)).reshape(batch, d, -1)
        moved = (rotated.reshape(batch, -1, n * n) @ multiplication).reshape(batch, d, -1)
        left = rotated.reshape(batch, d, -1).conj()
        metric = (left @ weighted.transpose(0, 2, 1)).real
        cross = metric @ self.generator
        form = 0.5 * (left @ moved.transpose(0, 2, 1)).real - 0.5 * (cross + cross.transpose(0, 2, 1))
        inverse = np.linalg.inv(np.linalg.cholesky(metric))
        return np.linalg.eigvalsh(inverse @ form @ inverse.transpose(0, 2, 1))[:, 0]

    def flow(self, values, u):
        """L^dagger rho in the eigenbasis of rho: diagonal here, kept as a full matrix."""
        eta = values.sum(axis=1, keepdims=True) / self.n - values
        return np.einsum("za,ab->zab", eta, np.eye(self.n)).astype(complex)

    def value_and_gradient(self, x):
        """kappa and its central-difference gradient, in one batch."""
        if np.abs(x).max() > LARGEST_LOGARITHM:
            return 1e3, np.zeros_like(x)
        steps = DIFFERENCE_STEP * np.eye(len(x))
        batch = self.kappa(np.concatenate([x[None], x + steps, x - steps]))
        d = len(x)
        return batch[0], (batch[1 : d + 1] - batch[d + 1 :]) / (2 * DIFFERENCE_STEP)


def multiplication_matrices(values, eta):
    """Lambda(lambda_a, lambda_b), shape (z, n, n), and the transposed n^2 x n^2 matrices of D[rho; eta] in section 5."""
    n = values.shape[1]
    r = np.log(values[:, :, None] / values[:, None, :])
    small = np.abs(r) < SERIES_RADIUS
    safe = np.where(small, 1.0, r)
    x, y = values[:, :, None], values[:, None, :]
    mean = np.where(small, np.sqrt(x * y) * (1 + r**2 / 24 * (1 + r**2 / 80)), (x - y) / safe)
    slope = np.where(small, 0.5 - r / 6 + r**2 / 24 - r**3 / 120 + r**4 / 720, (np.expm1(-safe) + safe) / safe**2)
    gap = x - y
    close = np.abs(gap) < COINCIDENCE * (x + y)
    quotient = (mean[:, :, None, :] - mean[:, None, :, :]) / np.where(close, 1.0, gap)[:, :, :, None]
    middle = 0.5 * (slope[:, :, None, :] + slope[:, None, :, :])  # trapezium rule where the two eigenvalues meet
    divided = np.where(close[:, :, :, None], middle, quotient)  # [a, c, b] = (F_ab - F_cb)/(lambda_a - lambda_c)
    eye = np.eye(n)
    left = np.einsum("zac,zacb,bd->zcdab", eta, divided, eye, optimize=True)
    right = np.einsum("ac,zdb,zbda->zcdab", eye, eta, divided, optimize=True)
    return mean, (left + right).reshape(-1, n * n, n * n)


def traceless_hermitian_basis(n):
    """Orthonormal Hermitian traceless matrices (generalised Gell-Mann, norm 1), shape (n^2 - 1, n, n)."""
    out = []
    for a in range(n):
        for b in range(a + 1, n):
            for value in (1, 1j):
                m = np.zeros((n, n), dtype=complex)
                m[a, b], m[b, a] = value / np.sqrt(2), np.conj(value) / np.sqrt(2)
                out.append(m)
    for k in range(1, n):
        out.append(np.diag([1.0] * k + [-k] + [0.0] * (n - k - 1)).astype(complex) / np.sqrt(k * (k + 1)))
    return np.array(out)


def main(levels=3, starts=8, seed=1):
    rng = np.random.default_rng(seed)
    points = rng.standard_normal((starts, levels**2 - 1)) * np.linspace(0.5, 2.5, starts)[:, None]
    begin = time.perf_counter()
    pencil = DepolarisingPencil(levels)
    best = min(
        scipy.optimize.minimize(pencil.value_and_gradient, x, jac=True, method="BFGS", options={"gtol": 1e-7}).fun
        for x in points
    )
    seconds = time.perf_counter() - begin
    print(json.dumps({"seconds": seconds, "value": float(best), "evaluations": pencil.evaluations}))


if __name__ == "__main__":
    main(*map(int, sys.argv[1:]))
