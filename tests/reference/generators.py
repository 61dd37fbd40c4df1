"""The generator forms of thalweg.model/1, each as a plain function that returns a Semigroup."""

import numpy as np
import scipy.linalg

from blocks import BlockAlgebra, tensor_algebra
from semigroup import Semigroup, leak, restrict

FREQUENCY_TOLERANCE = 1e-9  # Bohr frequencies closer than this times the width of H are one frequency
MEMBERSHIP_TOLERANCE = 1e-9  # relative size of what L may move out of M


def lindblad(blocks, hamiltonian, jumps):
    """L(A) = i[H,A] + sum_m (R* A R - 1/2 {R*R, A}) (section 1); `jumps` are the R_m, rates folded in."""
    algebra = BlockAlgebra(blocks)
    n = algebra.size
    eye = np.eye(n)
    full = np.zeros((n * n, n * n), dtype=complex)
    if hamiltonian is not None:
        full += 1j * (np.kron(hamiltonian, eye) - np.kron(eye, hamiltonian.T))
    for r in jumps:
        square = r.conj().T @ r
        full += np.kron(r.conj().T, r.T) - 0.5 * (np.kron(square, eye) + np.kron(eye, square.T))
    return on_algebra(algebra, full)


def balanced(blocks, state, terms):
    """The canonical form of section 2, summed literally over the given (V_j, omega_j):
    L(A) = sum_j e^{-omega/2} V*[A,V] + e^{omega/2} [V,A] V*. The list must be closed under adjoints."""
    algebra = BlockAlgebra(blocks)
    n = algebra.size
    eye = np.eye(n)
    full = np.zeros((n * n, n * n), dtype=complex)
    for v, omega in terms:
        w = v.conj().T
        full += np.exp(-omega / 2) * (np.kron(w, v.T) - np.kron(w @ v, eye))
        full += np.exp(omega / 2) * (np.kron(v, w.T) - np.kron(eye, (v @ w).T))
    out = on_algebra(algebra, full)
    out.declared_state = state
    return out


def rates(table):
    """Finite Markov chain, L f(x) = sum_y Q(x,y) (f(y) - f(x)), on the algebra [1,...,1]."""
    q = np.array(table, dtype=float)
    np.fill_diagonal(q, 0.0)
    return Semigroup(BlockAlgebra([1] * len(q)), (q - np.diag(q.sum(axis=1))).astype(complex))


def expectation_onto(blocks, onto, rate=1.0):
    """L = rate (E - id), E the trace-preserving conditional expectation of M onto a subalgebra.

    `onto` is "scalars", "diagonal", a list of block sizes along the diagonal, or a list of matrices spanning it."""
    algebra = BlockAlgebra(blocks)
    span = subalgebra_span(algebra, onto)
    columns = scipy.linalg.orth(np.array([algebra.coordinates(m) for m in span]).T)
    return Semigroup(algebra, rate * (columns @ columns.conj().T - np.eye(algebra.dimension)))


def subalgebra_span(algebra, onto):
    """Matrices that span the named subalgebra of M."""
    if isinstance(onto, str) and onto == "scalars":
        return [np.eye(algebra.size)]
    if isinstance(onto, str) and onto == "diagonal":
        onto = [1] * algebra.size
    if np.ndim(onto[0]) == 0:
        inner = BlockAlgebra(onto)
        return [m for m in inner.units() if algebra.off_block(m) == 0]
    return onto


def schur(points):
    """Schur multipliers e^{tL}: A_ij -> exp(-t |a_i - a_j|^2) A_ij on M_n (section 7)."""
    a = np.array(points, dtype=float)
    a = a[:, None] if a.ndim == 1 else a
    distance = ((a[:, None, :] - a[None, :, :]) ** 2).sum(axis=2)
    return Semigroup(BlockAlgebra([len(a)]), np.diag(-distance.ravel()).astype(complex))


def bath_rate(spectrum, beta, w):
    """g(w) of the named bath spectrum; each satisfies g(-w) = exp(-beta w) g(w)."""
    kind, strength = spectrum["kind"], spectrum.get("strength", 1.0)
    if kind == "flat":
        return strength / (1 + np.exp(-beta * w))
    if kind == "metropolis":
        return strength * min(1.0, np.exp(beta * w))
    if kind == "ohmic":
        damping = np.exp(-abs(w) / spectrum["cutoff"])
        thermal = 1 / beta if abs(beta * w) < 1e-12 else -w / np.expm1(-beta * w)
        return strength * damping * thermal
    raise ValueError("expected a spectrum flat, ohmic or metropolis; got %r" % kind)


def davies(blocks, hamiltonian, couplings, beta, spectrum):
    """L(A) = sum_k sum_w g(w) (S* A S - 1/2 {S*S, A}), S = S_k(w) = sum over E' - E = w of P_E S_k P_E', which lowers
    the energy by w. GNS-symmetric for exp(-beta H)."""
    energies, vectors = BlockAlgebra(blocks).eigh(hamiltonian)
    differences = energies[None, :] - energies[:, None]  # [E, E'] -> E' - E
    tolerance = FREQUENCY_TOLERANCE * max(1.0, np.ptp(energies))
    jumps = []
    for coupling in couplings:
        rotated = vectors.conj().T @ coupling @ vectors
        for w in distinct(differences.ravel(), tolerance):
            part = np.where(np.abs(differences - w) <= tolerance, rotated, 0)
            if np.abs(part).max() > 0:
                jumps.append(np.sqrt(bath_rate(spectrum, beta, w)) * (vectors @ part @ vectors.conj().T))
    out = lindblad(blocks, None, jumps)
    weights = np.exp(-beta * (energies - energies.min()))
    out.declared_state = (vectors * (weights / weights.sum())) @ vectors.conj().T
    return out


def distinct(values, tolerance):
    """Representatives of clusters of real numbers whose neighbours are closer than the tolerance."""
    ordered = np.sort(values)
    groups = np.split(ordered, np.flatnonzero(np.diff(ordered) > tolerance) + 1)
    return [float(g.mean()) for g in groups]


def superoperator(blocks, matrix, picture, stacking):
    """L from its N^2 x N^2 matrix on stacked N x N matrices; stacking "rows" or "columns"."""
    algebra = BlockAlgebra(blocks)
    n = algebra.size
    full = np.array(matrix, dtype=complex)
    if stacking == "columns":
        swap = np.arange(n * n).reshape(n, n).T.ravel()
        full = full[np.ix_(swap, swap)]
    if not picture.lower().startswith("heisenberg"):
        full = full.conj().T
    return on_algebra(algebra, full)


def weighted_sum(weights, parts):
    """sum_i w_i L_i on one algebra; a declared state survives only if every part is invariant under it."""
    out = Semigroup(parts[0].algebra, sum(w * p.generator for w, p in zip(weights, parts)))
    for state in [p.declared_state for p in parts if p.declared_state is not None]:
        if np.linalg.norm(out.apply_adjoint(state)) <= MEMBERSHIP_TOLERANCE * np.linalg.norm(out.generator):
            out.declared_state = state
            break
    return out


def tensor(parts):
    """sum_i id (x) L_i (x) id on the tensor product, blocks in the order of blocks.tensor_algebra."""
    out = parts[0]
    for part in parts[1:]:
        out = tensor_pair(out, part)
    return out


def tensor_pair(first, second):
    """L (x) id + id (x) L' on M (x) M'."""
    algebra, permutation = tensor_algebra(first.algebra, second.algebra)
    columns = []
    eye_images = {}
    for unit in algebra.units():
        kron = (permutation.T @ unit @ permutation).reshape([first.algebra.size, second.algebra.size] * 2)
        i, k, j, m = (int(x[0]) for x in np.nonzero(kron))
        if (i, j) not in eye_images:
            eye_images[(i, j)] = first.apply(matrix_unit(first.algebra.size, i, j))
        image = np.kron(eye_images[(i, j)], matrix_unit(second.algebra.size, k, m))
        inner = second.apply(matrix_unit(second.algebra.size, k, m))
        image = image + np.kron(matrix_unit(first.algebra.size, i, j), inner)
        columns.append(algebra.coordinates(permutation @ image @ permutation.T))
    state = None
    if first.declared_state is not None and second.declared_state is not None:
        state = permutation @ np.kron(first.declared_state, second.declared_state) @ permutation.T
    return Semigroup(algebra, np.array(columns).T, state)


def amplify(semigroup, k):
    """L (x) id_k on M (x) M_k."""
    trivial = Semigroup(BlockAlgebra([k]), np.zeros((k * k, k * k), dtype=complex), np.eye(k) / k)
    return tensor_pair(semigroup, trivial)


def matrix_unit(n, i, j):
    """e_ij in M_n."""
    out = np.zeros((n, n), dtype=complex)
    out[i, j] = 1
    return out


def on_algebra(algebra, full):
    """Restriction of an N^2 x N^2 superoperator to M; refuses one that leaves M."""
    escaped = leak(algebra, full)
    if escaped > MEMBERSHIP_TOLERANCE * max(1.0, np.linalg.norm(full)):
        raise ValueError("expected a generator that maps the algebra into itself; got a leak of norm %g" % escaped)
    return Semigroup(algebra, restrict(algebra, full))
