"""Laws that the reference itself must satisfy, so that agreement with it means something.

    /usr/bin/python3 self_check.py

prints one line per law with its residual and tolerance, and exits 1 if any law is broken. Every law compares two
computations that share no formula, or a computation with a closed form of method section 7."""

import sys

import numpy as np
import scipy.integrate
import scipy.optimize

import bakry_emery
import canonical
import curvature
import entropy
import generators as gen
import group_algebra
import search
import semigroup as sg
from model import semigroup_of

SEED = 7


def sample_models():
    """Small GNS-symmetric models, one for each form and corner case."""
    rng = np.random.default_rng(SEED)
    coupling = rng.standard_normal((3, 3)) + 1j * rng.standard_normal((3, 3))
    coupling = coupling + coupling.conj().T
    ohmic = {"kind": "ohmic", "strength": 0.8, "cutoff": 2.0}
    chain = gen.rates([[0, 1, 0], [2, 0, 0.5], [0, 1.5, 0]])
    table = group_algebra.multiplication_table({"symmetric": 3})
    return {
        "thermal qubit": thermal_qubit(1.0, 1.0),
        "depolarising 3": gen.expectation_onto([3], "scalars"),
        "dephasing 3": gen.expectation_onto([3], "diagonal"),
        "expectation onto blocks 2,1": gen.expectation_onto([3], [2, 1]),
        "expectation on M_2 + C": gen.expectation_onto([2, 1], "scalars"),
        "davies, degenerate levels": gen.davies([3], np.diag([0, 0.7, 0.7]), [coupling], 1.3, ohmic),
        "davies, three frequencies": gen.davies([3], np.diag([0, 0.7, 1.9]), [coupling], 1.3, ohmic),
        "chain": chain,
        "thermal qubit x chain": gen.tensor([thermal_qubit(0.5, 1.0), chain]),
        "schur": gen.schur([[0.0, 0.0], [1.0, 0.5], [-0.3, 0.8]]),
        "symmetric group": group_algebra.length_semigroup(table, group_algebra.word_length({"symmetric": 3}, table)),
    }


def thermal_qubit(beta, gamma):
    """Two jumps sqrt(gamma) sigma_-+, frequencies -+beta; ground state first."""
    lower = np.sqrt(gamma) * np.array([[0, 1], [0, 0]], dtype=complex)
    weights = np.array([1, np.exp(-beta)]) / (1 + np.exp(-beta))
    return gen.balanced([2], np.diag(weights).astype(complex), [(lower, -beta), (lower.T, beta)])


def random_hermitian(algebra, rng):
    return algebra.matrix(algebra.hermitian_basis @ rng.standard_normal(algebra.dimension))


def random_state(algebra, rng):
    return search.state_from_coordinates(algebra, rng.standard_normal(algebra.dimension))


def model_laws(name, model):
    """(law, residual, tolerance) for one model at a random state and observable."""
    rng = np.random.default_rng(SEED + len(name))
    a = model.algebra
    rho, observable = random_state(a, rng), random_hermitian(a, rng)
    sigma = sg.reference_state(model)
    geometry = curvature.Geometry(model)
    norm, q = curvature.norm_and_q(geometry, rho, observable)
    chemical = a.function(rho, np.log) - a.function(sigma, np.log)
    chemical_norm, chemical_q = curvature.norm_and_q(geometry, rho, chemical)
    value, witness = curvature.kappa(geometry, rho)
    witness_norm, witness_q = curvature.norm_and_q(geometry, rho, witness)
    flow = lambda t: sg.evolve_state(model, t, rho)
    slope = curvature.time_derivative(lambda t: entropy.relative_entropy(a, flow(t), sigma), model, rho)
    bend = curvature.time_derivative(lambda t: entropy.entropy_production(model, flow(t)), model, rho)
    production = entropy.entropy_production(model, rho)
    yield "GNS symmetry", sg.symmetry_residuals(model)["gns"], 1e-12
    yield "sigma V sigma^-1 = e^-w V", modular_residual(sigma, geometry.jumps), 1e-10
    yield "L rebuilt from its jumps", canonical.rebuild_residual(model, geometry.jumps), 1e-12
    yield "P_t is completely positive", max(0.0, -smallest_choi_eigenvalue(model, 0.3)), 1e-12
    flow_law = "L^dagger rho = -sum [V*, [rho] [V, log rho - log sigma]]"
    yield flow_law, flow_residual(model, geometry, rho, chemical), 1e-11
    yield "norm by spectrum = norm by integral", norm / curvature.norm_by_integral(geometry, rho, observable) - 1, 1e-11
    yield "q/norm = limit of the definition", curvature.rate_by_differences(geometry, rho, observable) - q / norm, 1e-8
    yield "I(rho) = ||log rho - log sigma||^2", production / chemical_norm - 1, 1e-10
    yield "dD/dt = -I", slope / production + 1, 1e-8
    yield "d2D/dt2 = 2 q(log rho - log sigma)", bend / (2 * chemical_q) + 1, 1e-8
    yield "kappa is attained", witness_q / witness_norm - value, 1e-9


def modular_residual(sigma, jumps):
    inverse = np.linalg.inv(sigma)
    return max(np.linalg.norm(sigma @ v @ inverse - np.exp(-w) * v) / np.linalg.norm(v) for v, w in jumps)


def flow_residual(model, geometry, rho, chemical):
    n = model.algebra.size
    out = model.apply_adjoint(rho)
    for v, omega in geometry.jumps:
        x = (curvature.multiplication(model.algebra, rho, omega) @ (v @ chemical - chemical @ v).ravel()).reshape(n, n)
        out = out + v.conj().T @ x - x @ v.conj().T
    return np.linalg.norm(out) / np.linalg.norm(model.apply_adjoint(rho))


def smallest_choi_eigenvalue(model, t):
    a = model.algebra
    choi = sum(np.kron(unit, sg.evolve(model, t, unit)) for unit in a.units())
    return np.linalg.eigvalsh((choi + choi.conj().T) / 2)[0]


def closed_forms():
    """(law, residual, tolerance) against formulas of section 7."""
    p, q = 1.0, 2.0
    bound = lambda b: (p + q) / 2 + (q * (1 - b) - p * (1 + b)) / np.log(q * (1 - b) / (p * (1 + b))) / (1 - b * b)
    maas = scipy.optimize.minimize_scalar(bound, bounds=(-0.99, 0.99), method="bounded", options={"xatol": 1e-12}).fun
    geometry = curvature.Geometry(gen.rates([[0, p], [q, 0]]))
    found = search.minimise(geometry.algebra, lambda rho: curvature.kappa(geometry, rho)[0], SEED, 3)[0]
    yield "two points, Maas 2011", found - maas, 1e-7
    for n in (2, 3, 4):
        model = gen.expectation_onto([n], "scalars")
        yield "depolarising %d, cbe = 1/2 + 1/n^2" % n, bakry_emery.cbe(model) - (0.5 + 1 / n**2), 1e-10
        yield "depolarising %d, be = 1/2 + 1/(n+1)" % n, bakry_emery.be(model, SEED, 2)[0] - (0.5 + 1 / (n + 1)), 1e-6
    for n in (2, 3):
        model = gen.expectation_onto([n], "diagonal")
        yield "dephasing %d, cbe = 1/2 + 1/n" % n, bakry_emery.cbe(model) - (0.5 + 1 / n), 1e-10
    for group in ({"cyclic": 6}, {"dihedral": 3}, {"symmetric": 3}):
        table = group_algebra.multiplication_table(group)
        length = group_algebra.word_length(group, table)
        direct = bakry_emery.cbe(group_algebra.length_semigroup(table, length))
        yield "group %s, cbe from k o k - K k" % group, direct - group_algebra.cbe_of_length(table, length), 1e-8
    for n in (3, 4):
        value = curvature.kappa(curvature.Geometry(gen.expectation_onto([n], "scalars")), two_level_state(n, 0.35))[0]
        yield "depolarising %d, kappa at (1,1,r,..,r)" % n, value - two_level_kappa(n, 0.35), 1e-10
    qubit = gen.expectation_onto([2], "scalars")
    amplified = bakry_emery.be(gen.amplify(qubit, 2), SEED, 2)[0]
    yield "be of L (x) id_2 = cbe of L", amplified - bakry_emery.cbe(qubit), 1e-6
    value = search.minimise(qubit.algebra, qubit_mlsi, SEED, 2)[0]
    yield "depolarising 2, mlsi = 1", value - 1, 1e-5


def two_level_state(n, r):
    values = np.array([1.0, 1.0] + [r] * (n - 2))
    return np.diag(values / values.sum()).astype(complex)


def two_level_kappa(n, r):
    """q/norm at that state for a traceless observable of the two equal levels, from
    kappa = 1/2 + sum (Lambda^2/(lambda_a lambda_b)) w_ab / (2n sum Lambda w_ab), w_ab = sum_j |(d_j A)_ab|^2."""
    mean = (1 - r) / -np.log(r)
    return 0.5 + (2 + (n - 2) * mean**2 / r) * (2 + (n - 2) * r) / (2 + (n - 2) * mean) / (2 * n)


def same_semigroup():
    """(law, residual, tolerance): one thermal qubit written in six forms of thalweg.model/1."""
    beta, e01 = 0.8, [[0, 1], [0, 0]]
    e10, state = [[0, 0], [1, 0]], [[1 / (1 + np.exp(-beta)), 0], [0, 1 / (1 + np.exp(beta))]]
    down, up = 2 * np.exp(beta / 2), 2 * np.exp(-beta / 2)
    terms = [{"matrix": e01, "frequency": -beta}, {"matrix": e10, "frequency": beta}]
    jumps = [{"matrix": e01, "rate": down}, {"matrix": e10, "rate": up}]
    lindblad = {"form": "lindblad", "jumps": jumps}
    reference = semigroup_of({"algebra": [2], "generator": lindblad})
    full = reference.generator  # M = M_2: matrix-unit coordinates are rows stacked
    swap = [0, 2, 1, 3]
    columns = full[np.ix_(swap, swap)].real.tolist()
    schroedinger = full.conj().T.real.tolist()
    flat = {"kind": "flat", "strength": down + up}
    quarter, rest = {"weight": 0.25, "generator": lindblad}, {"weight": 0.75, "generator": lindblad}
    forms = {
        "balanced": {"form": "balanced", "state": state, "terms": terms},
        "davies": {"form": "davies", "hamiltonian": [[0, 0], [0, 1]], "couplings": [[[0, 1], [1, 0]]], "beta": beta,
                   "spectrum": flat},
        "superoperator, columns": {"form": "superoperator", "matrix": columns, "picture": "heisenberg",
                                   "stacking": "columns"},
        "superoperator, states": {"form": "superoperator", "matrix": schroedinger, "picture": "schroedinger",
                                  "stacking": "rows"},
        "sum": {"form": "sum", "terms": [quarter, rest]},
    }
    for name, form in forms.items():
        model = semigroup_of({"algebra": [2], "generator": form})
        yield "%s = lindblad" % name, np.abs(model.generator - full).max(), 1e-12
        yield "%s has the Gibbs state" % name, np.abs(sg.reference_state(model) - np.array(state)).max(), 1e-12
    gap = sg.spectrum(reference)[1].real
    yield "gap = 2 cosh(beta/2)", gap - 2 * np.cosh(beta / 2), 1e-12


def qubit_mlsi(rho):
    return entropy.mlsi_ratio(gen.expectation_onto([2], "scalars"), rho)


def main():
    broken = 0
    laws = [(name, law) for name, model in sample_models().items() for law in model_laws(name, model)]
    laws += [("closed form", law) for law in closed_forms()] + [("thermal qubit", law) for law in same_semigroup()]
    for name, (law, residual, tolerance) in laws:
        holds = abs(residual) <= tolerance
        broken += not holds
        verdict = "holds" if holds else "BROKEN"
        print("%-6s %-30s %-58s %9.1e (tolerance %.0e)" % (verdict, name, law, residual, tolerance))
    print("%d laws, %d broken" % (len(laws), broken))
    return 1 if broken else 0


if __name__ == "__main__":
    sys.exit(main())
