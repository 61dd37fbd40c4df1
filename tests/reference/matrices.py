"""Matrices to and from JSON, in the forms of thalweg.model/1."""

import numpy as np

PAULI = {
    "I": np.eye(2, dtype=complex),
    "X": np.array([[0, 1], [1, 0]], dtype=complex),
    "Y": np.array([[0, -1j], [1j, 0]]),
    "Z": np.diag([1, -1]).astype(complex),
}


def pauli_string(word):
    """Kronecker product of Pauli matrices named by the letters of `word`."""
    out = np.eye(1, dtype=complex)
    for letter in word:
        out = np.kron(out, PAULI[letter])
    return out


def read_matrix(value):
    """Complex NumPy matrix from [[..]], {"re","im"}, {"shape","entries"} or {"pauli"}."""
    if isinstance(value, list):
        return np.array(value, dtype=complex)
    if "re" in value or "im" in value:
        re = np.array(value.get("re", 0.0), dtype=float)
        im = np.array(value.get("im", 0.0), dtype=float)
        return re + 1j * im
    if "entries" in value:
        out = np.zeros(tuple(value["shape"]), dtype=complex)
        for entry in value["entries"]:
            i, j, re = entry[:3]
            out[i, j] += re + 1j * (entry[3] if len(entry) > 3 else 0.0)
        return out
    if "pauli" in value:
        words = value["pauli"]
        words = {words: 1.0} if isinstance(words, str) else words
        return sum(weight * pauli_string(word) for word, weight in words.items())
    raise ValueError("expected a matrix as rows, re/im, entries or pauli; got keys %s" % sorted(value))


def write_matrix(matrix):
    """{"re","im"} of a matrix (or vector)."""
    matrix = np.asarray(matrix, dtype=complex)
    return {"re": matrix.real.tolist(), "im": matrix.imag.tolist()}


def write_number(x):
    """A float, or "Infinity", "-Infinity", "NaN" as a string, because JSON has none of the three."""
    x = float(x)
    if np.isfinite(x):
        return x
    return "NaN" if np.isnan(x) else ("Infinity" if x > 0 else "-Infinity")
