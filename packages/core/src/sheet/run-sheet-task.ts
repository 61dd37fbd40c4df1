import { certificateOf } from '../certificate/make-certificate.js';
import {
  type BakryEmeryResult,
  type CompleteBakryEmery,
  bakryEmery,
  completeBakryEmery,
} from '../constants/bakry-emery.js';
import { carreDuChamp } from '../constants/carre-du-champ.js';
import { clsiByComparison } from '../constants/clsi-comparison.js';
import type { EntropyResult } from '../constants/entropy-search.js';
import { type Gap, gapDense } from '../constants/gap.js';
import { type LanczosGap, gapMatrixFree } from '../constants/gap-matrix-free.js';
import { type GradientEstimateResult, runGradientEstimateStart } from '../constants/gradient-estimate.js';
import { runLsiStart } from '../constants/lsi.js';
import { runMlsiStart } from '../constants/mlsi.js';
import { unboundedDirection } from '../constants/unbounded-direction.js';
import { type EnclosedEnds, encloseBakryEmery, encloseCompleteBakryEmery } from '../enclosure/enclose-bakry-emery.js';
import { encloseForms } from '../enclosure/enclosed-forms.js';
import { encloseGap } from '../enclosure/enclose-gap.js';
import type { JumpBasis } from '../lift/jump-bases.js';
import { type LadderResult, climbLadder } from '../lift/lift-ladder.js';
import { type MetricModel, metricModel } from '../metric/metric-model.js';
import type { MeanName } from '../metric/operator-mean.js';
import type { ProgrammeIterate } from '../programme/programme-options.js';
import { seededRandom } from '../random.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import type { FixedPoints } from '../structure/fixed-points.js';
import type { Structure } from '../structure/structure.js';
import { CERTIFY_LIFT_SIDE, DENSE_LIMIT, SHEET_LIFT_SIDE, SHEET_LIFT_UNKNOWNS } from '../tolerances.js';
import type { End } from './bracket.js';
import { cellEnd } from './cell-finding.js';
import type { SheetTask } from './sheet-plan.js';

/** What one task found; plain data. */
export type SheetFinding =
  | {
      readonly kind: 'gap';
      readonly dense: Gap | null;
      readonly lanczos: LanczosGap | null;
      readonly enclosed: EnclosedEnds | null;
    }
  | {
      readonly kind: 'bakry-emery';
      readonly complete: CompleteBakryEmery;
      readonly plain: BakryEmeryResult | null;
      readonly enclosed: { readonly complete: EnclosedEnds; readonly plain: EnclosedEnds | null } | null;
      /** Shows that cbe is −∞, as text; null where it is not. */
      readonly direction: string | null;
    }
  | { readonly kind: 'comparison'; readonly end: End | null }
  | {
      readonly kind: 'lift';
      readonly end: End | null;
      readonly reason: LadderResult['reason'] | 'none';
      /** What the solver told, iteration by iteration. */
      readonly iterates: readonly ProgrammeIterate[];
    }
  | { readonly kind: 'ge'; readonly mean: MeanName; readonly result: GradientEstimateResult }
  | { readonly kind: 'cells'; readonly end: End | null }
  | { readonly kind: 'entropy'; readonly result: EntropyResult | null };

/** Run one task of `planSheet`; `stop` ends a search early at the best it has. */
export function runSheetTask(structure: Structure, task: SheetTask, stop?: () => boolean): SheetFinding {
  switch (task.kind) {
    case 'gap':
      return gapFinding(structure);
    case 'bakry-emery':
      return bakryEmeryFinding(structure, task.seed, task.withPlain, stop);
    case 'comparison':
      return { kind: 'comparison', end: clsiByComparison(structure) };
    case 'lift':
      return liftFinding(structure, task, stop);
    case 'ge': {
      const problem = { model: metricOf(structure), mean: task.mean, covariant: task.covariant };
      return { kind: 'ge', mean: task.mean, result: runGradientEstimateStart(problem, task.start, stop) };
    }
    case 'cells': {
      const problem = { model: metricOf(structure), mean: 'logarithmic', covariant: task.covariant } as const;
      return { kind: 'cells', end: cellEnd(structure, problem, task, stop) };
    }
    case 'entropy': {
      const run = task.start.constant === 'lsi' ? runLsiStart : runMlsiStart;
      return { kind: 'entropy', result: run(structure, task.start, stop ? { stop } : {}) };
    }
  }
}

/** The metric of a GNS-symmetric structure; the caller has checked `hasGradientMetric`. */
export function metricOf(structure: Structure): MetricModel {
  return metricModel(structure.canonical as CanonicalForm, structure.fixedPoints as FixedPoints);
}

function gapFinding(structure: Structure): SheetFinding {
  const { generator, state, fixedPoints, algebra, symmetry } = structure;
  if (algebra.dimension > DENSE_LIMIT) {
    const usable = symmetry.kind === 'tracial' || (state?.faithful && symmetry.kind !== 'none');
    const lanczos = usable
      ? gapMatrixFree(generator, symmetry.kind === 'tracial' ? null : state, seededRandom('gap'))
      : null;
    return { kind: 'gap', dense: null, lanczos, enclosed: null };
  }
  const dense = state?.faithful && fixedPoints ? gapDense(generator, state, fixedPoints) : null;
  const enclosure = dense && encloseGap(structure);
  return { kind: 'gap', dense, lanczos: null, enclosed: enclosure && { lower: enclosure.lo, upper: enclosure.hi } };
}

function bakryEmeryFinding(
  structure: Structure,
  seed: number | string,
  withPlain: boolean,
  stop?: () => boolean,
): SheetFinding {
  const forms = carreDuChamp(structure.generator);
  const complete = completeBakryEmery(forms);
  const random = seededRandom(`be ${seed}`);
  const plain = withPlain ? bakryEmery(structure.generator, forms, { random, ...(stop ? { stop } : {}) }) : null;
  const enclosing = encloseForms(structure);
  const enclosed = enclosing && {
    complete: encloseCompleteBakryEmery(enclosing, complete),
    plain: plain && encloseBakryEmery(enclosing, plain),
  };
  return { kind: 'bakry-emery', complete, plain, enclosed, direction: unboundedDirection(forms, complete) };
}

type LiftTask = Extract<SheetTask, { readonly kind: 'lift' }>;

function liftFinding(structure: Structure, { target, ansatz }: LiftTask, stop?: () => boolean): SheetFinding {
  const canonical = structure.canonical as CanonicalForm;
  const iterates: ProgrammeIterate[] = [];
  const result = climbLadder(canonical, {
    target,
    onIterate: (record) => void iterates.push(record),
    maxSide: { diagonal: CERTIFY_LIFT_SIDE, full: SHEET_LIFT_SIDE },
    maxUnknowns: SHEET_LIFT_UNKNOWNS,
    ...(ansatz ? { ansatz } : {}),
    ...(stop ? { stop } : {}),
  });
  if (!result) return { kind: 'lift', end: null, reason: 'none', iterates };
  const { lift, rung, reason } = result;
  const { verdict } = certificateOf(structure.generator, result, 'cge', {
    prefer: 'largest',
    ...(stop ? { stop } : {}),
  });
  if (!verdict.holds || !verdict.grade) return { kind: 'lift', end: null, reason, iterates };
  const end: End = {
    value: verdict.bound,
    grade: verdict.grade,
    by: `lift of ∂ (${rung.ansatz} form, ${JUMP_WORDS[rung.basis]}), checked`,
    ...(verdict.grade === 'exact' ? {} : { margin: Math.abs(lift.optimum - verdict.bound) }),
  };
  return { kind: 'lift', end, reason, iterates };
}

const JUMP_WORDS: Record<JumpBasis, string> = { given: 'jumps as given', pauli: 'Pauli jumps', weyl: 'Weyl jumps' };
