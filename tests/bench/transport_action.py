"""Rival to the transport distance: the midpoint action of a discretised path for the depolarising semigroup L(A) = Tr(A)/n - A.

    OPENBLAS_NUM_THREADS=1 /usr/bin/python3 transport_action.py [levels=3] [pieces=16]

The same action as packages/core/src/transport/discrete-path.ts, minimised over the inner nodes by scipy.optimize from the straight
path: BFGS and L-BFGS-B with the exact gradient, all pieces in one batch of BLAS and LAPACK calls; the quicker counts. `value` is
the root of the action, `seconds` the minimisation alone, without the start of the interpreter."""

import json
import os
import sys
import time

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

import numpy as np  # noqa: E402  (the thread count must be set first)
import scipy.optimize  # noqa: E402

SERIES_RADIUS = 1e-2  # |log(x/y)| below which power series replace the quotients
COINCIDENCE = 1e-4  # relative distance of eigenvalues below which a divided difference is a derivative
GOAL = 1e-10  # relative decrease of the action at which the search ends
OUTSIDE = 1e6  # value for a path that leaves the faithful states


class Action:
    """Sum of step * <v, D^-1 v> over the pieces of a path, with its gradient in the inner nodes."""

    def __init__(self, n, pieces):
        self.n, self.pieces = n, pieces
        self.basis = traceless_hermitian_basis(n)
        self.size = len(self.basis)
        jumps = self.basis / np.sqrt(2 * n)  # L(A) = -sum_j [V_j, [V_j, A]]
        derivative = np.einsum("jab,kbc->kjac", jumps, self.basis) - np.einsum("kab,jbc->kjac", self.basis, jumps)
        self.derivative = derivative.reshape(self.size * self.size, n * n)
        self.start, self.end = (self.coordinates(state(n, shift)) for shift in (0, 1))

    def coordinates(self, rho):
        return np.einsum("kab,ba->k", self.basis, rho).real

    def straight(self):
        t = np.arange(1, self.pieces)[:, None] / self.pieces
        return ((1 - t) * self.start + t * self.end).ravel()

    def value_and_gradient(self, x):
        n, d, step = self.n, self.size, 1 / self.pieces
        nodes = np.vstack([self.start, x.reshape(-1, d), self.end])
        middle, velocity = (nodes[1:] + nodes[:-1]) / 2, (nodes[1:] - nodes[:-1]) / step
        rho = np.eye(n) / n + (middle @ self.basis.reshape(d, n * n)).reshape(-1, n, n)
        values, u = np.linalg.eigh(rho)
        if values.min() <= 0:
            return OUTSIDE, np.zeros_like(x)
        change = np.einsum("zac,zbd->zabcd", u.conj(), u).reshape(-1, n * n, n * n)  # X -> U* X U on rows
        rotated = (self.derivative @ change).reshape(self.pieces, d, d, n * n)  # piece, basis, jump, entry
        mean, left = mean_tables(values)
        weighted = (rotated * mean.reshape(-1, 1, 1, n * n)).reshape(self.pieces, d, -1)
        metric = (rotated.reshape(self.pieces, d, -1).conj() @ weighted.transpose(0, 2, 1)).real
        potential = np.linalg.solve(metric, velocity[:, :, None])[:, :, 0]
        moved = np.einsum("zk,zkjp->zjp", potential, rotated).reshape(self.pieces, d, n, n)
        # The mean is symmetric and all frequencies are zero: both sides of rho have the same divided differences.
        slope = np.einsum("zacb,zjab,zjcb->zac", left, moved, moved.conj())
        slope = slope + np.einsum("zacb,zjbc,zjba->zac", left, moved, moved.conj())
        slope = u @ slope @ u.conj().transpose(0, 2, 1)
        in_state = -np.einsum("kab,zba->zk", self.basis, (slope + slope.conj().transpose(0, 2, 1)) / 2).real
        value = step * np.sum(velocity * potential)
        gradient = (step / 2) * (in_state[1:] + in_state[:-1]) + 2 * (potential[:-1] - potential[1:])
        return value, gradient.ravel()


def mean_tables(values):
    """Lambda(lambda_a, lambda_b), and its divided differences (F_ab - F_cb)/(lambda_a - lambda_c), shape (z, a, c, b)."""
    x, y = values[:, :, None], values[:, None, :]
    r = np.log(x / y)
    small = np.abs(r) < SERIES_RADIUS
    safe = np.where(small, 1.0, r)
    mean = np.where(small, np.sqrt(x * y) * (1 + r**2 / 24 * (1 + r**2 / 80)), (x - y) / safe)
    slope = np.where(small, 0.5 - r / 6 + r**2 / 24 - r**3 / 120 + r**4 / 720, (np.expm1(-safe) + safe) / safe**2)
    gap = x - y
    close = np.abs(gap) < COINCIDENCE * (x + y)
    quotient = (mean[:, :, None, :] - mean[:, None, :, :]) / np.where(close, 1.0, gap)[:, :, :, None]
    average = (slope[:, :, None, :] + slope[:, None, :, :]) / 2
    return mean, np.where(close[:, :, :, None], average, quotient)


def state(n, shift):
    """A faithful state by formula: (A A* + 0.3)/trace, A_ij = cos(i + 2j + 1 + s) + i sin(2i - j + 3s)."""
    i, j = np.indices((n, n))
    a = np.cos(i + 2 * j + 1 + shift) + 1j * np.sin(2 * i - j + 3 * shift)
    rho = a @ a.conj().T + 0.3 * np.eye(n)
    return rho / np.trace(rho).real


def traceless_hermitian_basis(n):
    basis = []
    for i in range(n):
        for j in range(i + 1, n):
            for entry in (1, -1j):
                b = np.zeros((n, n), complex)
                b[i, j], b[j, i] = entry, np.conj(entry)
                basis.append(b / np.sqrt(2))
    for i in range(1, n):
        diagonal = np.zeros(n)
        diagonal[:i], diagonal[i] = 1, -i
        basis.append(np.diag(diagonal / np.linalg.norm(diagonal)).astype(complex))
    return np.array(basis)


def minimise(action, method, options):
    start = time.perf_counter()
    found = scipy.optimize.minimize(action.value_and_gradient, action.straight(), jac=True, method=method, options=options)
    return {"value": float(np.sqrt(found.fun)), "seconds": time.perf_counter() - start, "method": method}


def main():
    levels = int(sys.argv[1]) if len(sys.argv) > 1 else 3
    pieces = int(sys.argv[2]) if len(sys.argv) > 2 else 16
    action = Action(levels, pieces)
    runs = [
        minimise(action, "L-BFGS-B", {"maxiter": 5000, "maxfun": 50000, "ftol": GOAL, "gtol": 1e-9, "maxcor": 30}),
        minimise(action, "BFGS", {"maxiter": 5000, "gtol": 1e-6}),
    ]
    print(json.dumps(min(runs, key=lambda run: run["seconds"])))


if __name__ == "__main__":
    main()
