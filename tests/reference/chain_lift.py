"""Largest K with a lift for finite reversible chains, with CVXOPT and without the jump form.

    echo '[[[0, 1], [2, 0]]]' | /usr/bin/python3 chain_lift.py

Reads a JSON list of rate matrices q, writes a JSON list of numbers. H is the functions zeta(x,y) on directed edges, dA(x,y) =
A(y) - A(x), and the lift any linear map of H with dL = Ld. At every point x the forms

    left:  sum_z q(x,z) (G(z) - G(x)) - 2 Re sum_y q(x,y) conj(zeta) (L zeta)(x,y) - 2K G(x),  G(x) = sum_y q(x,y) |zeta(x,y)|^2
    right: the same with G(y) = sum_x q(y,x) |zeta(x,y)|^2

must be positive semidefinite: a chain with an ancilla has these forms tensored with the identity, so nothing else is asked.
"""

import json
import sys

import numpy as np
from cvxopt import matrix, solvers


def largest(rates):
    """The optimum; the lift is eliminated by the equations it must satisfy."""
    q = np.array(rates, dtype=float)
    n = len(q)
    edges = [(x, y) for x in range(n) for y in range(n) if x != y and q[x, y] > 0]
    m = len(edges)
    generator = q - np.diag(np.diag(q)) - np.diag((q - np.diag(np.diag(q))).sum(axis=1))
    d = np.zeros((m, n))
    for k, (x, y) in enumerate(edges):
        d[k, y] += 1
        d[k, x] -= 1
    # Unknowns: the entries of the lift, row by row, then K.
    equations = np.hstack([np.kron(np.eye(m), d.T), np.zeros((m * n, 1))])
    origin = np.linalg.lstsq(equations, (d @ generator).flatten(), rcond=None)[0]
    _, s, vt = np.linalg.svd(equations)
    free = vt[int((s > 1e-10).sum()) :].T
    weights = {0: [q[x, y] for x, y in edges], 1: [q[y, x] for x, y in edges]}
    blocks = [(side, x) for side in (0, 1) for x in range(n)]
    constants = [constant(generator, edges, weights[side], side, x) + part(edges, weights[side], side, x, origin) for side, x in blocks]
    columns = [np.array([-part(edges, weights[side], side, x, v).flatten() for v in free.T]).T for side, x in blocks]
    solvers.options.update(show_progress=False, abstol=1e-10, reltol=1e-9, feastol=1e-9)
    solution = solvers.sdp(matrix(-free[-1]), Gs=[matrix(g) for g in columns], hs=[matrix(h) for h in constants])
    return float(origin[-1] + free[-1] @ np.array(solution["x"]).flatten())


def constant(generator, edges, weights, side, x):
    """sum_z L(x,z) G(z)."""
    return np.diag([w * generator[x, edge[side]] for edge, w in zip(edges, weights)])


def part(edges, weights, side, x, unknowns):
    """What the lift and K add to the form at x."""
    m = len(edges)
    lift, k = unknowns[:-1].reshape(m, m), unknowns[-1]
    out = np.zeros((m, m))
    for e, (edge, w) in enumerate(zip(edges, weights)):
        if edge[side] == x:
            out[e, :] -= w * lift[e, :]
            out[:, e] -= w * lift[e, :]
            out[e, e] -= 2 * k * w
    return out


if __name__ == "__main__":
    json.dump([largest(rates) for rates in json.load(sys.stdin)], sys.stdout)
