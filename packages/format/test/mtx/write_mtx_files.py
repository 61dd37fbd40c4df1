"""Writes Matrix Market files of every kind into a folder with SciPy; prints what is in them as JSON."""

import json
import sys
from pathlib import Path

import numpy as np
import scipy.io
import scipy.sparse

FOLDER = Path(sys.argv[1])


def main():
    random = np.random.default_rng(11)
    real = random.normal(size=(5, 5))
    complex_ = real + 1j * random.normal(size=(5, 5))
    whole = random.integers(-9, 9, (5, 5))
    mask = random.random((5, 5)) < 0.5
    lower = np.tril(mask) | np.tril(mask).T
    matrices = {
        "real-general": real,
        "real-symmetric": real + real.T,
        "real-skew": real - real.T,
        "complex-general": complex_,
        "complex-symmetric": complex_ + complex_.T,
        "complex-skew": complex_ - complex_.T,
        "complex-hermitian": complex_ + complex_.conj().T,
        "integer-general": whole,
        "integer-symmetric": whole + whole.T,
        "rectangular": random.normal(size=(2, 7)),
        "row": random.normal(size=(1, 4)),
        "extreme": np.array([[5e-324, 1.7976931348623157e308], [-1e-30, 0.1]]),
    }
    files = []
    for name, matrix in matrices.items():
        files.append(entry(f"{name}-array.mtx", matrix))
        square = matrix.shape == (5, 5)
        sparse = scipy.sparse.coo_matrix(np.where(lower, matrix, 0) if square else matrix)
        files.append(entry(f"{name}-coordinate.mtx", sparse))
    files.append(entry("pattern.mtx", scipy.sparse.coo_matrix(mask.astype(float)), field="pattern"))
    files.append(entry("symmetric-pattern.mtx", scipy.sparse.coo_matrix(lower.astype(float)), field="pattern"))
    files.append(entry("empty.mtx", scipy.sparse.coo_matrix((4, 3))))
    files.append(entry("comment.mtx", real, comment="written by a test\nin two lines: \u00e9"))
    files.append(entry("general.mtx", real + real.T, symmetry="general"))
    print(json.dumps(files))


def entry(name, matrix, **options):
    path = FOLDER / name
    scipy.io.mmwrite(path, matrix, precision=17, **options)
    values = (matrix.toarray() if scipy.sparse.issparse(matrix) else matrix).astype(complex)
    banner = open(path, encoding="latin-1").readline().split()
    return {"name": name, "banner": banner[2:], "re": values.real.tolist(), "im": values.imag.tolist()}


main()
