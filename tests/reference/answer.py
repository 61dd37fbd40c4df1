"""Answers a JSON list of requests on stdin with a JSON list on stdout, independently of the TypeScript.

    echo '[{"what": "kappa", "model": {...}, "state": [[..]], "mean": "logarithmic"}]' | /usr/bin/python3 answer.py

A request is {"what", "model", ...}; `amplification` k replaces the model by L (x) id_k. Answers are objects with
`value`; a request that fails answers {"error": message}. Matrices are [[..]] or {"re","im"} in, {"re","im"} out;
numbers that are not finite are strings. What may be asked, and with which arguments:

    spectrum                              eigenvalues of -L on M, {"re": [..], "im": [..]}
    generator (observable)                L(A)
    adjoint (state)                       L^dagger(rho)
    expm (t, observable)                  e^{tL} A
    expm_state (t, state)                 P_t^dagger rho
    state                                 reference state; also `fixedPoints`, the dimension of F
    limit_state (state)                   E^dagger rho
    symmetry                              residuals invariance, state_from_trace, tracial, gns, kms (semigroup.py)
    canonical                             [{"matrix", "frequency"}] of section 2; also `residual`
    kappa (state, mean)                   kappa(rho), also `observable`; left, right: also `complexValue`
    norm_and_q (state, observable, mean)  {"norm": ||A||^2_rho, "q": q_rho(A)}
    rate (state, observable)              q/norm by finite differences in t, logarithmic mean only
    entropy (state)                       D(rho||E^dagger rho); also `production`
    mlsi_ratio (state), lsi_ratio (state)
    cbe                                   exact eigenvalue problem
    be, ge_search, mlsi_search, lsi_search (seed, starts; mean for ge_search)
                                          least value found, also `vector` or `state`
"""

import json
import sys

import numpy as np

import bakry_emery
import canonical
import curvature
import entropy
import generators
import search
import semigroup as sg
from matrices import read_matrix, write_matrix, write_number
from model import semigroup_of


def answer(request):
    """The answer object of one request."""
    model = semigroup_of(request["model"])
    if request.get("amplification", 1) > 1:
        model = generators.amplify(model, request["amplification"])
    given = {name: read_matrix(request[name]) for name in ("state", "observable") if request.get(name) is not None}
    return ANSWERS[request["what"]](model, request, **given)


def _spectrum(model, request):
    return {"value": write_matrix(sg.spectrum(model))}


def _state(model, request):
    return {"value": write_matrix(sg.reference_state(model)), "fixedPoints": sg.fixed_point_dimension(model)}


def _symmetry(model, request):
    return {"value": {name: write_number(x) for name, x in sg.symmetry_residuals(model).items()}}


def _canonical(model, request):
    jumps = canonical.canonical_form(model)
    return {
        "value": [{"matrix": write_matrix(v), "frequency": w} for v, w in jumps],
        "residual": canonical.rebuild_residual(model, jumps),
    }


def _kappa(model, request, state):
    geometry, mean = curvature.Geometry(model), request.get("mean", "logarithmic")
    value, observable = curvature.kappa(geometry, state, mean)
    out = {"value": write_number(value), "observable": write_matrix(observable)}
    if mean in ("left", "right"):
        out["complexValue"] = write_number(curvature.kappa(geometry, state, mean, "complex")[0])
    return out


def _norm_and_q(model, request, state, observable):
    mean = request.get("mean", "logarithmic")
    norm, q = curvature.norm_and_q(curvature.Geometry(model), state, observable, mean)
    return {"value": {"norm": write_number(norm), "q": write_number(q)}}


def _rate(model, request, state, observable):
    return {"value": write_number(curvature.rate_by_differences(curvature.Geometry(model), state, observable))}


def _entropy(model, request, state):
    value = entropy.relative_entropy(model.algebra, state, sg.limit_state(model, state))
    return {"value": write_number(value), "production": write_number(entropy.entropy_production(model, state))}


def _be(model, request):
    value, vector = bakry_emery.be(model, request.get("seed", 0), request.get("starts", 6))
    return {"value": write_number(value), "vector": write_matrix(vector)}


def _search(f):
    def run(model, request):
        prepared = f(model, request)
        value, state = search.minimise(model.algebra, prepared, request.get("seed", 0), request.get("starts", 8))
        return {"value": write_number(value), "state": write_matrix(state)}

    return run


def _ge(model, request):
    geometry, mean = curvature.Geometry(model), request.get("mean", "logarithmic")
    return lambda rho: curvature.kappa(geometry, rho, mean)[0]


ANSWERS = {
    "spectrum": _spectrum,
    "generator": lambda model, request, observable: {"value": write_matrix(model.apply(observable))},
    "adjoint": lambda model, request, state: {"value": write_matrix(model.apply_adjoint(state))},
    "expm": lambda model, request, observable: {"value": write_matrix(sg.evolve(model, request["t"], observable))},
    "expm_state": lambda model, request, state: {"value": write_matrix(sg.evolve_state(model, request["t"], state))},
    "state": _state,
    "limit_state": lambda model, request, state: {"value": write_matrix(sg.limit_state(model, state))},
    "symmetry": _symmetry,
    "canonical": _canonical,
    "kappa": _kappa,
    "norm_and_q": _norm_and_q,
    "rate": _rate,
    "entropy": _entropy,
    "mlsi_ratio": lambda model, request, state: {"value": write_number(entropy.mlsi_ratio(model, state))},
    "lsi_ratio": lambda model, request, state: {"value": write_number(entropy.lsi_ratio(model, state))},
    "cbe": lambda model, request: {"value": write_number(bakry_emery.cbe(model))},
    "be": _be,
    "ge_search": _search(_ge),
    "mlsi_search": _search(lambda model, request: lambda rho: entropy.mlsi_ratio(model, rho)),
    "lsi_search": _search(lambda model, request: lambda rho: entropy.lsi_ratio(model, rho)),
}


def main():
    out = []
    for request in json.load(sys.stdin):
        try:
            out.append(answer(request))
        except (ValueError, KeyError, TypeError, np.linalg.LinAlgError) as problem:
            out.append({"error": "%s: %s" % (type(problem).__name__, problem)})
    json.dump(out, sys.stdout, allow_nan=False)
    sys.stdout.write("\n")


if __name__ == "__main__":
    main()
