import type { ReliefField } from './relief-data.js';

/** The heights at which lines are drawn. */
export interface Levels {
  readonly values: readonly { readonly level: number; readonly index: boolean }[];
  /** Between lines, up to `evenTo`. */
  readonly step: number;
  readonly evenFrom: number;
  readonly evenTo: number;
  /** Lines beyond the even ones, at steps that double. */
  readonly doubledBelow: boolean;
  readonly doubledAbove: boolean;
}

/** Range of κ, relative to its size, below which the relief is flat. */
const FLAT = 1e-7;

const EVEN_LINES = 10;
const MOST_DOUBLED = 12;
const INDEX_EVERY = 5;

/**
 * Even steps (1, 2 or 5 times a power of ten) where most of the area lies, by quantiles of area, so that a κ that grows without
 * bound at the rim does not take all lines; outside of that, steps that double. Null for a flat relief.
 */
export function chooseLevels(field: ReliefField): Levels | null {
  const samples = areaSamples(field);
  const [lowest, highest] = [samples[0]?.value, samples.at(-1)?.value];
  if (lowest === undefined || highest === undefined) return null;
  const size = Math.max(Math.abs(lowest), Math.abs(highest));
  if (highest - lowest <= FLAT * size) return null;
  const [low, high] = [quantile(samples, 0.06), quantile(samples, 0.88)];
  const range = high - low > FLAT * size ? high - low : highest - lowest;
  const step = niceStep(range / EVEN_LINES);
  const [evenFrom, evenTo] = [Math.ceil(low / step - 1e-9), Math.floor(high / step + 1e-9)];
  const values: { level: number; index: boolean }[] = [];
  const push = (k: number): void => {
    const level = Number((k * step).toPrecision(12));
    if (level <= lowest + FLAT * size || level >= highest) return;
    values.push({ level, index: k % INDEX_EVERY === 0 });
  };
  for (let k = evenFrom; k <= evenTo; k++) push(k);
  for (let j = 1; j <= MOST_DOUBLED; j++) {
    push(evenTo + 2 ** j - 1);
    push(evenFrom - 2 ** j + 1);
  }
  values.sort((a, b) => a.level - b.level);
  return {
    values,
    step,
    evenFrom: evenFrom * step,
    evenTo: evenTo * step,
    // The first step beyond the even ones is one step more.
    doubledBelow: (values[0]?.level ?? Infinity) < (evenFrom - 1.5) * step,
    doubledAbove: (values.at(-1)?.level ?? -Infinity) > (evenTo + 1.5) * step,
  };
}

interface Sample {
  readonly value: number;
  readonly area: number;
}

/** κ at the nodes with the area that each stands for, ascending. */
function areaSamples({ rings, rays, x, y, kappa }: ReliefField): Sample[] {
  const samples: Sample[] = [];
  const radius = (i: number, j: number): number =>
    Math.hypot((x[i * rays + j] ?? 0) - (x[0] ?? 0), (y[i * rays + j] ?? 0) - (y[0] ?? 0));
  for (let i = 0; i < rings; i++) {
    for (let j = 0; j < rays; j++) {
      const value = kappa[i * rays + j];
      if (value === null || value === undefined || Number.isNaN(value)) continue;
      const own = radius(i, j);
      const inner = i === 0 ? 0 : (own + radius(i - 1, j)) / 2;
      const outer = i === rings - 1 ? own : (own + radius(i + 1, j)) / 2;
      samples.push({ value, area: outer ** 2 - inner ** 2 });
    }
  }
  return samples.sort((a, b) => a.value - b.value);
}

function quantile(samples: readonly Sample[], share: number): number {
  const total = samples.reduce((sum, { area }) => sum + area, 0);
  let seen = 0;
  for (const { value, area } of samples) {
    seen += area;
    if (seen >= share * total) return value;
  }
  return samples.at(-1)?.value ?? NaN;
}

/** The nearest of 1, 2, 5 times a power of ten, not below. */
function niceStep(step: number): number {
  const unit = Number(`1e${Math.floor(Math.log10(step))}`);
  return unit * ([1, 2, 5].find((factor) => factor * unit >= step * (1 - 1e-9)) ?? 10);
}
