"""The canonical form of a GNS-symmetric generator (method, section 2; Alicki 1976; Carlen & Maas 2017, Theorem 3.1)."""

import numpy as np

from semigroup import Semigroup, reference_state

MODULAR_TOLERANCE = 1e-7  # modular frequencies closer than this are one frequency
JUMP_TOLERANCE = 1e-11  # Kossakowski eigenvalues below this times the largest are no jumps
SYMMETRY_TOLERANCE = 1e-7  # relative residual of L rebuilt from its jumps above which there is no canonical form


def canonical_form(semigroup):
    """[(V_j, omega_j)] with V_j in M_N, closed under adjoints, such that on M
    L(A) = sum_j e^{-omega/2} V*[A,V] + e^{omega/2} [V,A] V*  and  sigma V sigma^{-1} = e^{-omega} V.

    Every V_j lies in the sum of the corners of one frequency, and is traceless on every diagonal block."""
    a = semigroup.algebra
    values, u = a.eigh(reference_state(semigroup))
    kossakowski = kossakowski_matrix(semigroup, u)
    omega = (np.log(values)[None, :] - np.log(values)[:, None]).ravel()  # of e_ab: log sigma_b - log sigma_a
    mirror = np.arange(a.size**2).reshape(a.size, a.size).T.ravel()
    largest = np.abs(kossakowski).max(initial=0.0)
    jumps = []
    for group, w in frequency_groups(omega):
        block = kossakowski[np.ix_(group, group)]
        if w == 0:
            basis = hermitian_units(group, mirror)
            mu, c = np.linalg.eigh((basis.conj().T @ block @ basis).real)
            c = basis @ c
        else:
            mu, c = np.linalg.eigh((block + block.conj().T) / 2)
        if mu.min() < -1e-9 * max(1.0, largest):
            raise ValueError("expected a completely positive semigroup; got Kossakowski eigenvalue %g" % mu.min())
        for m, vector in zip(mu, c.T):
            if m > JUMP_TOLERANCE * largest:
                v = np.zeros(a.size**2, dtype=complex)
                v[group] = np.sqrt(m / 2) * np.exp(w / 4) * vector
                v = u @ v.reshape(a.size, a.size) @ u.conj().T
                jumps += [(v, 0.0)] if w == 0 else [(v, w), (v.conj().T, -w)]
    residual = rebuild_residual(semigroup, jumps)
    if residual > SYMMETRY_TOLERANCE:
        raise ValueError("expected a GNS-symmetric generator; got one that its jumps rebuild only to %g" % residual)
    return jumps


def kossakowski_matrix(semigroup, u):
    """K with L(A) = sum K_{(cd),(ab)} e_ba A e_cd + (terms GA + AG*) in the basis u, i.e. K = sum_m r_m r_m* for
    R_m = sum r_m,(cd) e_cd; only corners (block of a = block of c) x (block of b = block of d) are determined by L on
    M, and in a diagonal corner only the part orthogonal to the identity."""
    a = semigroup.algebra
    n = a.size
    k = np.zeros((n, n, n, n), dtype=complex)  # [c, d, a, b]
    for i in range(n):
        for j in a.ranges[a.block_of[i]]:
            image = semigroup.apply(np.outer(u[:, i], u[:, j].conj()))  # L(e_ij)
            k[j, :, i, :] = (u.conj().T @ image @ u).T  # entry [d, b] = L(e_ac)_{bd}, a = i, c = j
    k = k.reshape(n * n, n * n)
    for r in a.ranges:
        trace = np.zeros(n * n)
        trace[r * n + r] = 1 / np.sqrt(len(r))
        inside = np.zeros(n * n)
        inside[(r[:, None] * n + r[None, :]).ravel()] = 1
        q = np.diag(inside) - np.outer(trace, trace)
        k = q @ k @ q + np.diag(1 - inside) @ k @ np.diag(1 - inside)
    return k


def frequency_groups(omega):
    """(indices, omega) for every frequency >= 0; within MODULAR_TOLERANCE of zero is exactly zero."""
    order = np.argsort(omega, kind="stable")
    groups = np.split(order, np.flatnonzero(np.diff(omega[order]) > MODULAR_TOLERANCE) + 1)
    out = []
    for g in groups:
        w = float(omega[g].mean())
        if abs(w) <= MODULAR_TOLERANCE:
            out.append((np.sort(g), 0.0))
        elif w > 0:
            out.append((np.sort(g), w))
    return out


def hermitian_units(group, mirror):
    """Columns: coordinates (within `group`) of an orthonormal Hermitian basis of span{e_ab : (a,b) in group}."""
    place = {int(g): k for k, g in enumerate(group)}
    basis = np.zeros((len(group), len(group)), dtype=complex)
    for k, g in enumerate(group):
        m = place[int(mirror[g])]
        if m == k:
            basis[k, k] = 1
        elif k < m:
            basis[k, k] = basis[m, k] = np.sqrt(0.5)
        else:
            basis[k, k], basis[m, k] = 1j * np.sqrt(0.5), -1j * np.sqrt(0.5)
    return basis


def from_jumps(algebra, jumps):
    """D x D matrix of sum_j e^{-omega/2} V*[A,V] + e^{omega/2} [V,A] V* on M."""
    columns = []
    for unit in algebra.units():
        out = np.zeros_like(unit)
        for v, omega in jumps:
            w = v.conj().T
            out += np.exp(-omega / 2) * w @ (unit @ v - v @ unit) + np.exp(omega / 2) * (v @ unit - unit @ v) @ w
        columns.append(algebra.coordinates(out))
    return np.array(columns).T


def rebuild_residual(semigroup, jumps):
    """||L - L rebuilt from the jumps||_F / ||L||_F on M."""
    rebuilt = from_jumps(semigroup.algebra, jumps)
    return float(np.linalg.norm(rebuilt - semigroup.generator) / (np.linalg.norm(semigroup.generator) or 1.0))


def canonical_semigroup(algebra, jumps, state=None):
    """The semigroup on M with these canonical jumps."""
    return Semigroup(algebra, from_jumps(algebra, jumps), state)
