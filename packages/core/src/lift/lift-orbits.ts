import { JUMP_SYMMETRY_TOLERANCE } from '../tolerances.js';
import type { LiftModel } from './lift-jumps.js';
import type { JumpSymmetry } from './lift-symmetries.js';
import type { LiftTerm } from './lift-terms.js';

/** A real unknown of a lift: each of its terms has the coefficient re + i·im times the unknown. */
export interface LiftUnknown {
  readonly terms: readonly { readonly term: LiftTerm; readonly re: number; readonly im: number }[];
}

/**
 * Tie the coefficients of terms that symmetries of the generator carry into each other, and the two sides by the
 * involution (Jξ)_{j*} = −ξ_j* (β_{m'm,j*k*} = conj β_{mm'jk}, γ'_{m,j*k*} = conj γ_{mjk}): a lift can be averaged over
 * all of them without losing K. With the involution the right form of a lift is the left one, mirrored.
 */
export function liftUnknowns(
  model: LiftModel,
  terms: readonly LiftTerm[],
  symmetries: readonly JumpSymmetry[],
): LiftUnknown[] {
  const index = new Map(terms.map((term, t) => [keyOf(term), t]));
  const maps = [involution(model), ...symmetries.map(termMap)];
  const seen = new Uint8Array(terms.length);
  const out: LiftUnknown[] = [];
  for (let t = 0; t < terms.length; t++) {
    if (seen[t]) continue;
    out.push(...orbitUnknowns(terms, index, maps, t, seen));
  }
  return out;
}

/** z_{image} = (re + i·im)·z, or ·conj z. */
interface Image {
  readonly term: LiftTerm;
  readonly re: number;
  readonly im: number;
  readonly conjugated: boolean;
}

type TermMap = (term: LiftTerm) => Image;

function keyOf({ left, right, from, to }: LiftTerm): string {
  return `${left},${right},${from},${to}`;
}

function involution({ jumps }: LiftModel): TermMap {
  return ({ left, right, from, to }) => ({
    term: { left: right, right: left, from: jumps[from].partner, to: jumps[to].partner },
    re: 1,
    im: 0,
    conjugated: true,
  });
}

function termMap({ permutation, phaseRe, phaseIm, anti }: JumpSymmetry): TermMap {
  return ({ left, right, from, to }) => {
    let re = 1;
    let im = 0;
    const times = (j: number, sign: number): void => {
      if (j < 0) return;
      [re, im] = [re * phaseRe[j] - im * sign * phaseIm[j], re * sign * phaseIm[j] + im * phaseRe[j]];
    };
    times(to, -1);
    times(from, 1);
    times(left, -1);
    times(right, 1);
    const move = (j: number): number => (j < 0 ? -1 : permutation[j]);
    return { term: { left: move(left), right: move(right), from: move(from), to: move(to) }, re, im, conjugated: anti };
  };
}

/** Walk the orbit of a term; its free directions (two, one or none) become unknowns. */
function orbitUnknowns(
  terms: readonly LiftTerm[],
  index: ReadonlyMap<string, number>,
  maps: readonly TermMap[],
  start: number,
  seen: Uint8Array,
): LiftUnknown[] {
  const reached = new Map<number, Image>([[start, { term: terms[start], re: 1, im: 0, conjugated: false }]]);
  const queue = [start];
  const free: Freedom = { line: null, zero: false };
  seen[start] = 1;
  for (let head = 0; head < queue.length; head++) {
    const at = reached.get(queue[head]) as Image;
    for (const map of maps) {
      const step = map(at.term);
      const next = index.get(keyOf(step.term));
      if (next === undefined) {
        free.zero = true;
        continue;
      }
      const image = compose(at, step);
      const known = reached.get(next);
      if (known) restrict(free, known, image);
      else {
        reached.set(next, image);
        seen[next] = 1;
        queue.push(next);
      }
    }
  }
  return directions(free).map(([x, y]) => ({
    terms: [...reached.values()].map(({ term, re, im, conjugated }) => {
      const s = conjugated ? -y : y;
      return { term, re: re * x - im * s, im: re * s + im * x };
    }),
  }));
}

/** z_next as a multiple of the representative's z or conj z. */
function compose(at: Image, step: Image): Image {
  const im = step.conjugated ? -at.im : at.im;
  return {
    term: step.term,
    re: step.re * at.re - step.im * im,
    im: step.re * im + step.im * at.re,
    conjugated: at.conjugated !== step.conjugated,
  };
}

interface Freedom {
  /** Angle of the line to which z is confined, or null. */
  line: number | null;
  zero: boolean;
}

/** Two expressions of one coefficient must agree: equal, zero, or z on a line. */
function restrict(free: Freedom, a: Image, b: Image): void {
  if (a.conjugated === b.conjugated) {
    if (Math.hypot(a.re - b.re, a.im - b.im) > 1e3 * JUMP_SYMMETRY_TOLERANCE) free.zero = true;
    return;
  }
  // φ_1 z = φ_2 conj z, so that z = r e^{iθ} with e^{2iθ} = φ_2/φ_1, φ_2 the factor of conj z.
  const [plain, conjugated] = a.conjugated ? [b, a] : [a, b];
  const angle = (Math.atan2(conjugated.im, conjugated.re) - Math.atan2(plain.im, plain.re)) / 2;
  if (free.line === null) free.line = angle;
  else if (Math.abs(Math.sin(angle - free.line)) > 1e3 * JUMP_SYMMETRY_TOLERANCE) free.zero = true;
}

function directions({ line, zero }: Freedom): [number, number][] {
  if (zero) return [];
  if (line !== null) return [[Math.cos(line), Math.sin(line)]];
  return [
    [1, 0],
    [0, 1],
  ];
}
