"""Rival to the matrix-free spectral gap: a chain of n qubits with local Pauli jumps, in NumPy and SciPy.

    OPENBLAS_NUM_THREADS=1 /usr/bin/python3 spin_chain_gap.py [qubits=5] [bonds=0] [seed=1]

L(A) = sum_m rate_m (P_m A P_m - A) with the 2n jumps X_i (rate 1) and Z_i (rate 0.7), and, with bonds=1, Z_i Z_{i+1}
(rate 0.3). The real and imaginary parts of A do not mix, so A is a real 2^n x 2^n array (4^n real dimensions). Z-type
jumps are one array of signs, summed once; X_i flips one row bit and one column bit of the array, as views without index
lists. scipy.sparse.linalg.eigsh finds the two smallest eigenvalues of -L; `value` is the second, the gap. It is known:
the slowest Pauli strings are X_i, which only Z-type jumps damp, and Z_i, which only X_i damps, so the gap is
min(2 * 0.7, 2 * 1) = 1.4, and 2 with bonds (then an end X decays at 2 * 0.7 + 2 * 0.3). One OpenBLAS thread; `seconds`
is building and solving, without the start of the interpreter."""

import json
import os
import sys
import time

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

import numpy as np  # noqa: E402  (the thread count must be set first)
from scipy.sparse.linalg import LinearOperator, eigsh  # noqa: E402

RATE_X, RATE_Z, RATE_BOND = 1.0, 0.7, 0.3
TOLERANCE = 1e-10


class SpinChain:
    """-L as a matrix-free real symmetric operator on 4^n dimensions."""

    def __init__(self, qubits, bonds):
        self.qubits, self.dimension, self.matvecs = qubits, 4**qubits, 0
        index = np.arange(2**qubits)
        bits = 1 - 2 * ((index[None, :] >> np.arange(qubits)[::-1, None]) & 1)  # Z_i as signs
        words = [(RATE_Z, z) for z in bits]
        if bonds:
            words += [(RATE_BOND, y * z) for y, z in zip(bits, bits[1:])]
        self.diagonal = np.full((2**qubits, 2**qubits), RATE_X * qubits + sum(rate for rate, _ in words))
        for rate, z in words:
            self.diagonal -= rate * np.outer(z, z)

    def apply(self, vector):
        """-L(A) for A as a flat real vector."""
        self.matvecs += 1
        a = vector.reshape(2**self.qubits, 2**self.qubits)
        out = self.diagonal * a
        for i in range(self.qubits):
            outer, inner = 2**i, 2 ** (self.qubits - 1 - i)
            shape = (outer, 2, inner, outer, 2, inner)
            out.reshape(shape)[...] -= RATE_X * a.reshape(shape)[:, ::-1, :, :, ::-1, :]
        return out.ravel()


def main(qubits=5, bonds=0, seed=1):
    start = np.random.default_rng(seed).standard_normal(4**qubits)
    begin = time.perf_counter()
    chain = SpinChain(qubits, bonds)
    operator = LinearOperator((chain.dimension, chain.dimension), matvec=chain.apply, dtype=float)
    values = eigsh(operator, k=2, which="SA", tol=TOLERANCE, v0=start, return_eigenvectors=False)
    seconds = time.perf_counter() - begin
    print(json.dumps({"seconds": seconds, "value": float(np.sort(values)[1]), "matvecs": chain.matvecs}))


if __name__ == "__main__":
    main(*map(int, sys.argv[1:]))
