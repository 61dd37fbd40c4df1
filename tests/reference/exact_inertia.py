"""Signatures of Hermitian forms in rational arithmetic (Python's fractions), for generators whose doubles are exact numbers.

Standard input: a JSON list of requests {"form": "gap" | "curvature", "blocks": [...], "jumps": [{"re": ..., "im": ...}], "bounds": [...]}
for L(A) = 2 sum_j (V_j* A V_j - {V_j* V_j, A}/2) with V_j closed under adjoints. Standard output: for every bound K the number of
negative and of zero directions of -<A, LA> - K <A, A> (trace product), or of Gamma_2 - K Gamma on M tensor C^N, block by block.
"""

import json
import sys
from fractions import Fraction

ZERO = (Fraction(0), Fraction(0))


def add(x, y):
    return (x[0] + y[0], x[1] + y[1])


def scale(x, c):
    return (c * x[0], c * x[1])


def mul(x, y):
    return (x[0] * y[0] - x[1] * y[1], x[0] * y[1] + x[1] * y[0])


def conj(x):
    return (x[0], -x[1])


def product(a, b):
    columns = list(zip(*b))
    out = []
    for row in a:
        line = []
        for column in columns:
            total = ZERO
            for x, y in zip(row, column):
                if x != ZERO and y != ZERO:
                    total = add(total, mul(x, y))
            line.append(total)
        out.append(line)
    return out


def adjoint(a):
    return [[conj(a[j][i]) for j in range(len(a))] for i in range(len(a[0]))]


def combine(a, b, c):
    return [[add(x, scale(y, c)) for x, y in zip(r, s)] for r, s in zip(a, b)]


def generator(jumps):
    squares = [product(adjoint(v), v) for v in jumps]

    def apply(a):
        out = [[ZERO] * len(a) for _ in a]
        for v, s in zip(jumps, squares):
            out = combine(out, product(adjoint(v), product(a, v)), Fraction(2))
            out = combine(out, product(s, a), Fraction(-1))
            out = combine(out, product(a, s), Fraction(-1))
        return out

    return apply


def units(blocks):
    n = sum(blocks)
    owner = [b for b, size in enumerate(blocks) for _ in range(size)]
    for i in range(n):
        for j in range(n):
            if owner[i] == owner[j]:
                yield [[(Fraction(int((k, l) == (i, j))), Fraction(0)) for l in range(n)] for k in range(n)]


def inertia(a):
    """Numbers of negative and of zero directions, by elimination with diagonal pivots."""
    a = [list(row) for row in a]
    rest = list(range(len(a)))
    negative = 0
    while True:
        pivots = [i for i in rest if a[i][i][0] != 0]
        if not pivots:
            if any(a[i][j] != ZERO for i in rest for j in rest):
                raise ValueError("a zero diagonal beside entries that are not zero")
            return negative, len(rest)
        k = pivots[0]
        pivot = a[k][k][0]
        negative += pivot < 0
        rest.remove(k)
        for i in rest:
            if a[i][k] == ZERO:
                continue
            factor = scale(a[i][k], Fraction(-1) / pivot)
            for j in rest:
                if a[k][j] != ZERO:
                    a[i][j] = add(a[i][j], mul(factor, a[k][j]))


def gap_form(apply, basis, bound):
    images = [apply(b) for b in basis]
    cells = [(i, j) for i in range(len(basis[0])) for j in range(len(basis[0]))]

    def entry(p, q):
        total = ZERO
        for i, j in cells:
            shifted = add(images[q][i][j], scale(basis[q][i][j], bound))
            total = add(total, mul(conj(basis[p][i][j]), shifted))
        return scale(total, Fraction(-1))

    return [[entry(p, q) for q in range(len(basis))] for p in range(len(basis))]


def gamma(apply, a, b):
    out = apply(product(adjoint(a), b))
    out = combine(out, product(adjoint(apply(a)), b), Fraction(-1))
    out = combine(out, product(adjoint(a), apply(b)), Fraction(-1))
    return [[scale(x, Fraction(1, 2)) for x in row] for row in out]


def gamma2(apply, a, b):
    out = apply(gamma(apply, a, b))
    out = combine(out, gamma(apply, a, apply(b)), Fraction(-1))
    out = combine(out, gamma(apply, apply(a), b), Fraction(-1))
    return [[scale(x, Fraction(1, 2)) for x in row] for row in out]


def curvature_forms(apply, basis, blocks):
    first = [[gamma(apply, a, b) for b in basis] for a in basis]
    second = [[gamma2(apply, a, b) for b in basis] for a in basis]
    start = 0
    for size in blocks:
        yield first, second, range(start, start + size)
        start += size


def curvature_inertia(forms, bound):
    total = (0, 0)
    for first, second, inside in forms:
        rows = [(p, k) for p in range(len(first)) for k in inside]
        matrix = [
            [add(second[p][q][k][l], scale(first[p][q][k][l], -bound)) for q, l in rows] for p, k in rows
        ]
        found = inertia(matrix)
        total = (total[0] + found[0], total[1] + found[1])
    return total


def rational(x):
    return Fraction(x)


def answer(request):
    jumps = [
        [[(rational(x), rational(y)) for x, y in zip(r, s)] for r, s in zip(v["re"], v["im"])]
        for v in request["jumps"]
    ]
    apply = generator(jumps)
    basis = list(units(request["blocks"]))
    bounds = [rational(k) for k in request["bounds"]]
    if request["form"] == "gap":
        return [inertia(gap_form(apply, basis, k)) for k in bounds]
    forms = list(curvature_forms(apply, basis, request["blocks"]))
    return [curvature_inertia(forms, k) for k in bounds]


if __name__ == "__main__":
    json.dump([answer(request) for request in json.load(sys.stdin)], sys.stdout)
