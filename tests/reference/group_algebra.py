"""Semigroups e^{-t l(g)} lambda_g on finite group algebras (method, section 7), blocks found numerically."""

from itertools import permutations

import numpy as np

from bakry_emery import pencil_constant
from blocks import BlockAlgebra
from semigroup import Semigroup

SEED = 20240229  # of the random element of the commutant whose eigenspaces are the irreducible parts
CLUSTER_TOLERANCE = 1e-8
CHARACTER_TOLERANCE = 1e-6
NEGATIVITY_TOLERANCE = 1e-9


def multiplication_table(group):
    """table[g][h] = index of gh. cyclic: 0..n-1; dihedral: r^0..r^{n-1}, then r^k s; symmetric: lexicographic one-line
    order, (gh)(x) = g(h(x)); or {"table": ...}."""
    if "table" in group:
        return np.array(group["table"], dtype=int)
    if "cyclic" in group:
        k = np.arange(group["cyclic"])
        return (k[:, None] + k[None, :]) % len(k)
    if "dihedral" in group:
        n = group["dihedral"]
        product = lambda g, h: ((g % n + (-1) ** (g // n) * (h % n)) % n) + n * ((g // n + h // n) % 2)
        return np.array([[product(g, h) for h in range(2 * n)] for g in range(2 * n)])
    elements = list(permutations(range(group["symmetric"])))
    place = {e: k for k, e in enumerate(elements)}
    return np.array([[place[tuple(g[x] for x in h)] for h in elements] for g in elements])


def word_length(group, table):
    """Word length; generators +-1 (cyclic), r, r^{-1}, s (dihedral), adjacent transpositions (symmetric)."""
    if "cyclic" in group:
        generators = [1 % len(table), len(table) - 1]
    elif "dihedral" in group:
        n = group["dihedral"]
        generators = [1 % n, n - 1, n]
    elif "symmetric" in group:
        elements = list(permutations(range(group["symmetric"])))
        generators = [k for k, e in enumerate(elements) if is_adjacent_transposition(e)]
    else:
        raise ValueError("expected explicit lengths for a group given by its table")
    length = {identity_of(table): 0}
    frontier = list(length)
    while frontier:
        reached = []
        for g in frontier:
            for h in (int(table[g, s]) for s in generators):
                if h not in length:
                    length[h] = length[g] + 1
                    reached.append(h)
        frontier = reached
    return np.array([length[g] for g in range(len(table))], dtype=float)


def is_adjacent_transposition(e):
    moved = [x for x in range(len(e)) if e[x] != x]
    return len(moved) == 2 and moved[1] == moved[0] + 1


def identity_of(table):
    return int(np.flatnonzero((table == np.arange(len(table))).all(axis=1))[0])


def gromov_form(table, length):
    """k(g,h) = (l(g) + l(h) - l(g^{-1}h))/2."""
    identity = identity_of(table)
    inverse = np.argmax(table == identity, axis=1)
    return 0.5 * (length[:, None] + length[None, :] - length[table[inverse]])


def cbe_of_length(table, length):
    """Largest K with k o k - K k >= 0 off the identity (section 7)."""
    rest = [g for g in range(len(table)) if g != identity_of(table)]
    k = gromov_form(table, length)[np.ix_(rest, rest)]
    return pencil_constant(k * k, k)


def length_semigroup(table, length):
    """L lambda_g = -l(g) lambda_g on the group algebra, embedded as the direct sum of its irreducible representations;
    the state is the canonical trace, sum_b (n_b/|G|) Tr_b."""
    smallest = np.linalg.eigvalsh(gromov_form(table, length))[0]
    if smallest < -NEGATIVITY_TOLERANCE * max(1.0, length.max()):
        raise ValueError("expected a conditionally negative length; got smallest eigenvalue %.12g of k" % smallest)
    irreducible = irreducible_representations(table)
    algebra = BlockAlgebra([pi.shape[1] for pi in irreducible])
    columns = []
    for g in range(len(table)):
        element = np.zeros((algebra.size, algebra.size), dtype=complex)
        for r, pi in zip(algebra.ranges, irreducible):
            element[np.ix_(r, r)] = pi[g]
        columns.append(algebra.coordinates(element))
    columns = np.array(columns).T
    state = np.diag(np.concatenate([np.full(n, n / len(table)) for n in algebra.blocks])).astype(complex)
    return Semigroup(algebra, columns @ np.diag(-length) @ np.linalg.inv(columns), state)


def irreducible_representations(table):
    """One unitary representation, shape (|G|, n, n), for each irreducible class, smallest first."""
    order = len(table)
    left = np.zeros((order, order, order))
    right = np.zeros((order, order, order))
    for g in range(order):
        left[g, table[g], np.arange(order)] = 1  # lambda_g e_h = e_gh
        right[g, np.arange(order), table[:, g]] = 1  # commutes with every lambda_g
    rng = np.random.default_rng(SEED)
    x = np.einsum("g,gij->ij", rng.standard_normal(order) + 1j * rng.standard_normal(order), right)
    values, u = np.linalg.eigh(x + x.conj().T)
    found = []
    for part in np.split(np.arange(order), np.flatnonzero(np.diff(values) > CLUSTER_TOLERANCE * np.ptp(values)) + 1):
        pi = np.einsum("ia,gij,jb->gab", u[:, part].conj(), left, u[:, part])
        character = np.trace(pi, axis1=1, axis2=2)
        if all(np.abs(character - other).max() > CHARACTER_TOLERANCE for other, _ in found):
            found.append((character, pi))
    return [pi for _, pi in sorted(found, key=lambda item: item[1].shape[1])]
