import { depolarising } from '../../../src/families/index.js';
import { analyse } from '../../../src/structure/structure.js';
import { minimiseAction } from '../../../src/transport/minimise-action.js';
import { startPath } from '../../../src/transport/start-path.js';
import { transportModel } from '../../../src/transport/transport-model.js';
import { endpointsOf } from '../../../src/transport/transport-states.js';
import { formulaState } from './formula-states.js';

/** The root of the least midpoint action of paths with `pieces` pieces for the depolarising semigroup, from the straight path. */
export function leastAction(levels: number, pieces: number): number {
  const model = transportModel(analyse(depolarising(levels)));
  const endpoints = endpointsOf(model, formulaState(levels, 0), formulaState(levels, 1));
  const path = minimiseAction(model.kernel, model.space, startPath(model.kernel, endpoints, pieces));
  if (!path) throw new Error('expected a path');
  return Math.sqrt(path.action.value);
}
