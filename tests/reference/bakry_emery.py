"""Gamma, Gamma_2 and the constants `be` and `cbe` from L alone (method, sections 4 and 6)."""

import numpy as np
import scipy.optimize

KERNEL_TOLERANCE = 1e-9  # eigenvalues of Gamma below this times the largest span its kernel
RANGE_TOLERANCE = 1e-7  # relative size of Gamma_2 on ker Gamma and of its cross terms that counts as non-zero


def gamma(semigroup, a, b):
    """Gamma(A,B) = (L(A*B) - L(A)*B - A*L(B))/2."""
    adjoint = a.conj().T
    la, lb = semigroup.apply(a), semigroup.apply(b)
    return 0.5 * (semigroup.apply(adjoint @ b) - la.conj().T @ b - adjoint @ lb)


def gamma2(semigroup, a, b):
    """Gamma_2(A,B) = (L Gamma(A,B) - Gamma(A,LB) - Gamma(LA,B))/2."""
    la, lb = semigroup.apply(a), semigroup.apply(b)
    return 0.5 * (semigroup.apply(gamma(semigroup, a, b)) - gamma(semigroup, a, lb) - gamma(semigroup, la, b))


def gamma_tables(semigroup):
    """Gamma(e_i,e_j) and Gamma_2(e_i,e_j) over the matrix units, each of shape (D, D, N, N)."""
    units = semigroup.algebra.units()
    d, n = semigroup.algebra.dimension, semigroup.algebra.size
    first = np.array([[gamma(semigroup, a, b) for b in units] for a in units])
    second = np.zeros((d, d, n, n), dtype=complex)
    image = semigroup.generator  # L e_j = sum_k image[k,j] e_k
    for i in range(d):
        for j in range(d):
            second[i, j] += 0.5 * semigroup.apply(first[i, j])
    second -= 0.5 * np.einsum("ikrs,kj->ijrs", first, image)
    second -= 0.5 * np.einsum("kjrs,ki->ijrs", first, image.conj())
    return first, second


def cbe(semigroup, tables=None):
    """Largest K with [Gamma_2(e_i,e_j)] - K [Gamma(e_i,e_j)] >= 0 on C^D (x) C^N; -inf when there is none."""
    first, second = gamma_tables(semigroup) if tables is None else tables
    constants = []
    for r in semigroup.algebra.ranges:  # M-valued forms: one positivity condition per block
        size = first.shape[0] * len(r)
        pick = np.ix_(range(first.shape[0]), range(first.shape[0]), r, r)
        g = first[pick].transpose(0, 2, 1, 3).reshape(size, size)
        g2 = second[pick].transpose(0, 2, 1, 3).reshape(size, size)
        constants.append(pencil_constant(g2, g))
    return min(constants)


def be_at(semigroup, psi, tables):
    """Largest K with <psi, Gamma_2(A,A) psi> >= K <psi, Gamma(A,A) psi> for every complex A in M."""
    first, second = tables
    g = np.einsum("r,ijrs,s->ij", psi.conj(), first, psi, optimize=True)
    g2 = np.einsum("r,ijrs,s->ij", psi.conj(), second, psi, optimize=True)
    return pencil_constant(g2, g)


def be(semigroup, seed=0, starts=6, tables=None):
    """inf of be_at over the pure states of every block (search: an upper bound) and the vector found."""
    tables = gamma_tables(semigroup) if tables is None else tables
    rng = np.random.default_rng(seed)
    best, witness = np.inf, None
    for r in semigroup.algebra.ranges:
        m = len(r)
        for _ in range(1 if m == 1 else starts):
            def vector(x):
                psi = np.zeros(semigroup.algebra.size, dtype=complex)
                psi[r] = x[:m] + 1j * x[m:]
                return psi / np.linalg.norm(psi)

            x = rng.standard_normal(2 * m)
            if m > 1:
                options = {"maxiter": 400 * m, "xatol": 1e-7, "fatol": 1e-11}
                x = scipy.optimize.minimize(
                    lambda z: max(be_at(semigroup, vector(z), tables), -1e6), x, method="Nelder-Mead", options=options
                ).x
            value = be_at(semigroup, vector(x), tables)
            if value < best:
                best, witness = value, vector(x)
    return best, witness


def pencil_constant(h, g):
    """Largest K with H - K G >= 0, for Hermitian H and G >= 0; +inf when G = 0 <= H, -inf when there is none.

    On ker G, H must be positive; elsewhere H is replaced by its Schur complement against ker G."""
    h, g = (h + h.conj().T) / 2, (g + g.conj().T) / 2
    values, u = np.linalg.eigh(g)
    scale = max(np.abs(h).max(initial=0.0), 1e-300)
    kernel, range_ = u[:, values <= KERNEL_TOLERANCE * values.max()], u[:, values > KERNEL_TOLERANCE * values.max()]
    hrr = range_.conj().T @ h @ range_
    if kernel.shape[1]:
        hkk, hkr = kernel.conj().T @ h @ kernel, kernel.conj().T @ h @ range_
        mu, w = np.linalg.eigh(hkk)
        if mu[0] < -RANGE_TOLERANCE * scale:
            return -np.inf
        flat, steep = w[:, mu <= RANGE_TOLERANCE * scale], w[:, mu > RANGE_TOLERANCE * scale]
        if np.abs(flat.conj().T @ hkr).max(initial=0.0) > np.sqrt(RANGE_TOLERANCE) * scale:
            return -np.inf
        cross = steep.conj().T @ hkr
        hrr = hrr - cross.conj().T @ (cross / mu[mu > RANGE_TOLERANCE * scale][:, None])
    if range_.shape[1] == 0:
        return np.inf
    root = 1 / np.sqrt(values[values > KERNEL_TOLERANCE * values.max()])
    return float(np.linalg.eigvalsh(root[:, None] * hrr * root[None, :])[0])
