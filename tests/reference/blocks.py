"""Block algebras M = direct sum of full matrix blocks, held block-diagonally in N x N matrices (method, section 1)."""

import numpy as np


class BlockAlgebra:
    """The algebra with the given block sizes.

    Coordinates of A in M are its D = sum n_b^2 entries inside the blocks, row by row ("matrix-unit coordinates");
    `hermitian_basis` is the unitary D x D matrix whose columns are an orthonormal basis of Hermitian elements.
    """

    def __init__(self, blocks):
        self.blocks = [int(n) for n in blocks]
        self.size = sum(self.blocks)
        self.block_of = np.repeat(np.arange(len(self.blocks)), self.blocks)
        inside = self.block_of[:, None] == self.block_of[None, :]
        self.row, self.col = np.nonzero(inside)
        self.dimension = len(self.row)
        self.position = self.row * self.size + self.col
        self.ranges = [np.flatnonzero(self.block_of == b) for b in range(len(self.blocks))]
        self.hermitian_basis = self._hermitian_basis()

    def coordinates(self, matrix):
        """D entries of an N x N matrix inside the blocks."""
        return np.asarray(matrix, dtype=complex)[self.row, self.col]

    def matrix(self, coordinates):
        """The N x N block-diagonal matrix with these D entries."""
        out = np.zeros((self.size, self.size), dtype=complex)
        out[self.row, self.col] = coordinates
        return out

    def units(self):
        """The D matrix units of M, shape (D, N, N)."""
        out = np.zeros((self.dimension, self.size, self.size), dtype=complex)
        out[np.arange(self.dimension), self.row, self.col] = 1
        return out

    def off_block(self, matrix):
        """Frobenius norm of the part of an N x N matrix outside the blocks."""
        return float(np.linalg.norm(matrix - self.matrix(self.coordinates(matrix))))

    def eigh(self, hermitian):
        """Eigenvalues (N) and block-diagonal unitary of a Hermitian element of M, block by block."""
        values = np.zeros(self.size)
        vectors = np.zeros((self.size, self.size), dtype=complex)
        for r in self.ranges:
            values[r], vectors[np.ix_(r, r)] = np.linalg.eigh(hermitian[np.ix_(r, r)])
        return values, vectors

    def function(self, hermitian, f):
        """f(A) for a Hermitian element A of M and a scalar function f."""
        values, vectors = self.eigh(hermitian)
        return (vectors * f(values)) @ vectors.conj().T

    def _hermitian_basis(self):
        index = {(r, c): k for k, (r, c) in enumerate(zip(self.row, self.col))}
        basis = np.zeros((self.dimension, self.dimension), dtype=complex)
        for k, (r, c) in enumerate(zip(self.row, self.col)):
            mirror = index[(c, r)]
            if r == c:
                basis[k, k] = 1
            elif r < c:
                basis[k, k] = basis[mirror, k] = np.sqrt(0.5)
            else:
                basis[k, k], basis[mirror, k] = 1j * np.sqrt(0.5), -1j * np.sqrt(0.5)
        return basis


def tensor_algebra(first, second):
    """M (x) M': the algebra with blocks n_b m_c (b outer, c inner) and the N N' x N N' permutation P that takes
    Kronecker order (i, j) to block order, so that P kron(A, B) P^T is block-diagonal."""
    algebra = BlockAlgebra([n * m for n in first.blocks for m in second.blocks])
    order = [i * second.size + j for r in first.ranges for s in second.ranges for i in r for j in s]
    permutation = np.eye(algebra.size)[order]
    return algebra, permutation
