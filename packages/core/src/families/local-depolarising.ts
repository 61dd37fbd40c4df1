import { withDeclaredState } from '../generator/declared-state.js';
import type { Generator } from '../generator/generator.js';
import { tensorGenerator } from '../generator/tensor-generator.js';
import { diagonal } from '../linalg/complex-matrix.js';
import { requireWhole } from './check-parameter.js';
import { pauliJumps } from './pauli-jumps.js';

/** Σ_i rate (E_i − id) on q ≤ 10 qubits, E_i the trace over qubit i; by jumps ½√rate P along the Pauli matrices of each. */
export function localDepolarising(qubits: number, rate = 1): Generator {
  requireWhole(qubits, 1, 10, 'the number of qubits');
  const jumps = pauliJumps(['X', 'Y', 'Z'].map((string) => ({ string, rate: rate / 2 })));
  const one: Generator = {
    ...withDeclaredState(jumps, diagonal([0.5, 0.5])),
    origin: { kind: 'expectation', rate, tracial: true },
  };
  return tensorGenerator(new Array<Generator>(qubits).fill(one));
}
