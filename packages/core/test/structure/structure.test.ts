import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { superoperatorGenerator } from '../../src/generator/superoperator-generator.js';
import { depolarising, localDepolarising } from '../../src/families/index.js';
import { fromEntries, fromRows } from '../../src/linalg/complex-matrix.js';
import { analyse } from '../../src/structure/structure.js';
import { kmsQubit } from '../helpers/kms-qubit.js';

describe('analyse', () => {
  it('describes a model once', () => {
    const g = depolarising(2);
    const structure = analyse(g);
    expect(analyse(g)).toBe(structure);
    expect(structure).toMatchObject({ symmetry: { kind: 'tracial' }, fixedPoints: { primitive: true }, notes: [] });
    expect(structure.canonical?.jumps.length).toBe(3);
  });

  it('says why something is no Markov semigroup', () => {
    // Transposition minus identity on a qubit, on stacked rows.
    const swap = fromEntries(4, 4, (i, j) => [(j === (i % 2) * 2 + Math.floor(i / 2) ? 1 : 0) - (i === j ? 1 : 0), 0]);
    const g = superoperatorGenerator({
      algebra: blockAlgebra([2]),
      matrix: swap,
      picture: 'heisenberg',
      stacking: 'rows',
    });
    const structure = analyse(g);
    expect(structure).toMatchObject({ state: null, fixedPoints: null, canonical: null, symmetry: { kind: 'none' } });
    expect(structure.notes).toEqual(['The semigroup is not completely positive (smallest eigenvalue -1.00000).']);
  });

  it('describes a KMS-symmetric model without a canonical form', () => {
    const structure = analyse(kmsQubit());
    expect(structure.symmetry.kind).toBe('KMS');
    expect(structure.canonical).toBeNull();
    expect(structure.fixedPoints?.primitive).toBe(true);
  });

  it('says that a decaying qubit has no faithful state', () => {
    const g = lindbladGenerator({ algebra: blockAlgebra([2]), jumps: [{ matrix: fromRows([[0, 1], [0, 0]]) }] }); // prettier-ignore
    const structure = analyse(g);
    expect(structure.state?.faithful).toBe(false);
    expect(structure.fixedPoints).toMatchObject({ dimension: 1, primitive: false });
    expect(structure.notes[0]).toMatch(/not faithful/);
  });

  it('analyses eight qubits by probes, keeping the given jumps', () => {
    const structure = analyse(localDepolarising(8));
    expect(structure.symmetry).toMatchObject({ kind: 'tracial', probed: true });
    expect(structure.fixedPoints?.primitive).toBe(true);
    expect(structure.canonical?.jumps.map((jump) => jump.label).slice(0, 4)).toEqual(['X(1)', 'Y(1)', 'Z(1)', 'X(2)']);
    expect(structure.canonical?.residual).toBeLessThan(1e-13);
    expect(structure.notes.join(' ')).toMatch(/tested on random observables/);
  });
});
