"""Semidefinite programmes by CVXOPT: the independent answer to packages/core/src/programme.

    OPENBLAS_NUM_THREADS=1 /usr/bin/python3 semidefinite.py < programmes.json > answers.json

Input: a JSON list of programmes {"objective": [b_i], "blocks": [{"kind", "size", "constant": [[i, j, re, im]],
"coefficients": [[unknown, [[i, j, re, im]]]]}]}, both triangles given: maximise b.y subject to
C_k - sum_i y_i A_ki >= 0. Output: one {"status", "primal", "dual", "y", "seconds"} each, in the same order; `status` is
CVXOPT's, read for its problem  minimise -b.y  ("primal infeasible" there: no feasible y; "dual infeasible": b.y grows
without bound). `seconds` is the processor time of the solver alone.

A Hermitian block H = P + iQ of size n becomes the real symmetric [[P, -Q], [Q, P]] of size 2n. Needs Debian's
python3-cvxopt."""

import json
import os
import sys
import time

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

try:
    from cvxopt import matrix, solvers, spmatrix
except ImportError:
    sys.exit("semidefinite.py needs CVXOPT: apt-get install python3-cvxopt")

# Tried in turn: the finest may be out of reach.
TOLERANCES = (1e-10, 1e-9, 1e-8)
ITERATIONS = 100


def solve(programme, tolerances=TOLERANCES):
    """Solves one programme to the finest tolerance that CVXOPT reaches; infinite values are given as null."""
    for tolerance in tolerances:
        answer = solve_once(programme, tolerance)
        if answer["status"] != "unknown" and not answer["status"].startswith("failed"):
            break
    return answer


def solve_once(programme, tolerance):
    c = matrix([-float(b) for b in programme["objective"]])
    (g_linear, h_linear), semidefinite = constraints(programme["blocks"], len(c))
    solvers.options.clear()
    solvers.options.update(show_progress=False, maxiters=ITERATIONS)
    solvers.options.update(abstol=tolerance, reltol=tolerance, feastol=tolerance)
    begin = time.process_time()
    try:
        answer = solvers.sdp(c, Gl=g_linear, hl=h_linear, Gs=[g for g, _ in semidefinite], hs=[h for _, h in semidefinite])
    except (ValueError, ArithmeticError) as error:
        return {"status": f"failed: {error}"}
    return {
        "status": answer["status"],
        # CVXOPT minimises -b.y: its dual objective is minus our primal one.
        "primal": None if answer["dual objective"] is None else -answer["dual objective"],
        "dual": None if answer["primal objective"] is None else -answer["primal objective"],
        "y": None if answer["x"] is None else list(answer["x"]),
        "iterations": answer.get("iterations"),
        "seconds": time.process_time() - begin,
    }


def constraints(blocks, unknowns):
    """The diagonal blocks as one (G, h), and one (G, h) for each other block."""
    rows, cols, values, bounds = [], [], [], []
    semidefinite = []
    for block in blocks:
        if block["kind"] == "diagonal":
            offset = len(bounds)
            bounds += [0.0] * block["size"]
            for i, _, value, _ in block["constant"]:
                bounds[offset + i] = value
            for unknown, entries in block["coefficients"]:
                for i, _, value, _ in entries:
                    rows.append(offset + i)
                    cols.append(unknown)
                    values.append(value)
        elif block["size"] > 0:
            semidefinite.append(matrix_constraint(block, unknowns))
    g = spmatrix(values, rows, cols, (len(bounds), unknowns))
    h = matrix(bounds, (len(bounds), 1), "d")
    return (g, h), semidefinite


def matrix_constraint(block, unknowns):
    """G with the vectorised coefficients as columns, and the constant as a dense matrix."""
    factor = 2 if block["kind"] == "hermitian" else 1
    size = factor * block["size"]
    rows, cols, values = [], [], []
    for unknown, entries in block["coefficients"]:
        for i, j, value in embedded(entries, block):
            rows.append(i + size * j)
            cols.append(unknown)
            values.append(value)
    constant = matrix(0.0, (size, size))
    for i, j, value in embedded(block["constant"], block):
        constant[i, j] += value
    return spmatrix(values, rows, cols, (size * size, unknowns)), constant


def embedded(entries, block):
    """Entries of the real embedding."""
    n = block["size"]
    for i, j, re, im in entries:
        yield i, j, re
        if block["kind"] == "hermitian":
            yield i + n, j + n, re
            if im != 0:
                yield i, j + n, -im
                yield i + n, j, im


if __name__ == "__main__":
    json.dump([solve(programme) for programme in json.load(sys.stdin)], sys.stdout)
