"""A Semigroup from a thalweg.model/1 document with dense matrices."""

import numpy as np

import generators
import group_algebra
from matrices import read_matrix


def semigroup_of(document):
    """The semigroup of a model document; a declared `state` overrides the one its form implies."""
    out = of_generator(document.get("algebra"), document["generator"])
    if document.get("state") is not None:
        out.declared_state = read_matrix(document["state"])
    return out


def of_generator(blocks, g):
    """The semigroup of one generator object on the algebra with these blocks."""
    return FORMS[g["form"]](blocks, g)


def _lindblad(blocks, g):
    hamiltonian = read_matrix(g["hamiltonian"]) if g.get("hamiltonian") is not None else None
    jumps = [np.sqrt(j.get("rate", 1.0)) * read_matrix(j["matrix"]) for j in g.get("jumps", [])]
    return generators.lindblad(blocks, hamiltonian, jumps)


def _balanced(blocks, g):
    terms = [(read_matrix(t["matrix"]), float(t["frequency"])) for t in g["terms"]]
    return generators.balanced(blocks, read_matrix(g["state"]), terms)


def _expectation(blocks, g):
    onto = g["onto"]
    if onto.get("scalars"):
        target = "scalars"
    elif onto.get("diagonal"):
        target = "diagonal"
    elif "blocks" in onto:
        target = onto["blocks"]
    else:
        target = [read_matrix(m) for m in onto["spannedBy"]]
    return generators.expectation_onto(blocks, target, g.get("rate", 1.0))


def _length(_, g):
    table = group_algebra.multiplication_table(g["group"])
    length = group_algebra.word_length(g["group"], table) if g["length"] == "word" else np.array(g["length"], float)
    return group_algebra.length_semigroup(table, length)


def _davies(blocks, g):
    couplings = [read_matrix(c["matrix"] if isinstance(c, dict) and "matrix" in c else c) for c in g["couplings"]]
    return generators.davies(blocks, read_matrix(g["hamiltonian"]), couplings, g["beta"], g["spectrum"])


def _superoperator(blocks, g):
    return generators.superoperator(blocks, read_matrix(g["matrix"]), g["picture"], g["stacking"])


def _sum(blocks, g):
    weights = [t.get("weight", 1.0) for t in g["terms"]]
    return generators.weighted_sum(weights, [of_generator(blocks, t["generator"]) for t in g["terms"]])


FORMS = {
    "lindblad": _lindblad,
    "balanced": _balanced,
    "rates": lambda blocks, g: generators.rates(g["rates"]),
    "expectation": _expectation,
    "length": _length,
    "schur": lambda blocks, g: generators.schur(g["points"]),
    "davies": _davies,
    "superoperator": _superoperator,
    "sum": _sum,
    "tensor": lambda blocks, g: generators.tensor([semigroup_of(m) for m in g["factors"]]),
}
