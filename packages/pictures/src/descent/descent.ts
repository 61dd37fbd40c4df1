import type { ConstantId } from '@thalweg/core';
import { element, pathData } from '../svg/element.js';
import { numberText } from '../svg/number-text.js';
import { paint } from '../svg/palette.js';
import { type PictureOptions, MARGIN, foot, head, picture } from '../svg/picture.js';
import { type Curve, panel } from './panel.js';

/** A flow as it is drawn: what `thalweg.flow/1` holds of it. */
export interface DescentData {
  /** Title of the model. */
  readonly title: string;
  /** Relative to σ; otherwise to E†ρ. */
  readonly primitive: boolean;
  readonly points: readonly { readonly time: number; readonly entropy: number; readonly distance: number }[];
  readonly bounds: readonly {
    readonly constant: ConstantId;
    readonly quantity: 'entropy' | 'production' | 'distance';
    /** One value a point; null where the bound does not hold yet. */
    readonly values: readonly (number | null)[];
  }[];
}

const WIDTH = 480;
const ENTROPY_HEIGHT = 190;
const DISTANCE_HEIGHT = 110;

/** Relative entropy and trace distance along the flow, below what the proved constants promise, on logarithmic scales. */
export function descent(data: DescentData, options: PictureOptions = {}): string {
  const limit = data.primitive ? 'σ' : 'E†ρ';
  const top = head(WIDTH, data.title, `Descent of relative entropy along the flow, towards ${limit}`);
  const entropy = panel({
    title: `relative entropy D(ρ_{t}‖${limit}), nats`,
    x: MARGIN,
    y: top.bottom + 10,
    width: WIDTH - 2 * MARGIN,
    height: ENTROPY_HEIGHT,
    flow: curveOf(data, 'entropy'),
    bounds: boundsOf(data, 'entropy'),
    timeLabels: false,
    labelRoom: labelRoom(data),
  });
  const distance = panel({
    title: `trace distance ‖ρ_{t}−${limit}‖_{1}`,
    x: MARGIN,
    y: entropy.bottom + 22,
    width: WIDTH - 2 * MARGIN,
    height: DISTANCE_HEIGHT,
    flow: curveOf(data, 'distance'),
    bounds: boundsOf(data, 'distance'),
    timeLabels: true,
    labelRoom: labelRoom(data),
  });
  const notes = foot(WIDTH, distance.bottom + 12, footNotes(data));
  const height = notes.bottom + MARGIN;
  const body = [...top.lines, ...entropy.body, ...distance.body, rule(distance.bottom + 8), ...notes.lines];
  const name = `Descent: ${data.title}`;
  return picture({ kind: 'descent', width: WIDTH, height, name, description: describe(data), body }, options);
}

function rule(y: number): string {
  return element('path', {
    d: pathData([[MARGIN, y], [WIDTH - MARGIN, y]]), // prettier-ignore
    'stroke-width': 1,
    ...paint({ stroke: 'hair' }),
  });
}

function curveOf({ points }: DescentData, quantity: 'entropy' | 'distance'): Curve {
  return { label: 'flow', points: points.map((point) => [point.time, point[quantity]]) };
}

/** Bounds that coincide are one curve with the names of all. */
function boundsOf({ points, bounds }: DescentData, quantity: 'entropy' | 'distance'): Curve[] {
  const groups: { label: string; values: readonly (number | null)[] }[] = [];
  for (const bound of bounds) {
    if (bound.quantity !== quantity) continue;
    const same = groups.find(({ values }) => values.every((value, k) => isClose(value, bound.values[k] ?? null)));
    if (same) same.label += `, ${bound.constant}`;
    else groups.push({ label: bound.constant, values: bound.values });
  }
  return groups.map(({ label, values }) => ({
    label,
    points: points.flatMap(({ time }, k): [number, number][] => {
      const value = values[k] ?? null;
      return value === null ? [] : [[time, value]];
    }),
  }));
}

/** Indistinguishable in the picture. */
function isClose(a: number | null, b: number | null): boolean {
  return a === b || (a !== null && b !== null && Math.abs(a - b) <= 1e-6 * Math.abs(a));
}

function labelRoom(data: DescentData): number {
  const labels = [...boundsOf(data, 'entropy'), ...boundsOf(data, 'distance')].map(({ label }) => label.length);
  return Math.max(4, ...labels);
}

function isStill({ points }: DescentData): boolean {
  return points.every(({ entropy, distance }) => entropy === 0 && distance === 0);
}

function footNotes(data: DescentData): string[] {
  if (isStill(data)) return ['The state is its own limit: nothing moves.'];
  const bounded = data.bounds.some(({ quantity }) => quantity !== 'production');
  const pinsker = data.bounds.some(({ quantity, constant }) => quantity === 'distance' && constant === 'mlsi');
  return [
    bounded ? 'Blue: what the proved constants promise.' : 'No positive constant is proved: nothing bounds the flow.',
    ...(pinsker ? ['mlsi bounds the distance through the inequality of Pinsker.'] : []),
    'Bounds hold for the model as given, not for a device.',
  ];
}

function describe(data: DescentData): string {
  const [first, last] = [data.points[0], data.points.at(-1)];
  if (!first || !last) return 'No point was computed.';
  if (isStill(data)) return 'The state is its own limit: relative entropy and trace distance are zero at all times.';
  const value = (x: number): string => numberText(x, 4).replace(/\^\{([^}]*)\}/, '^$1');
  const flow =
    `Over time ${value(first.time)} to ${value(last.time)}, relative entropy falls from ${value(first.entropy)} to ${value(last.entropy)} ` +
    `and the trace distance from ${value(first.distance)} to ${value(last.distance)}.`;
  const ends = (['entropy', 'distance'] as const).flatMap((quantity) =>
    boundsOf(data, quantity).map(({ label, points }) => {
      const end = points.at(-1)?.[1];
      return end === undefined ? '' : `${label} allows ${quantity} ${value(end)} at the end.`;
    }),
  );
  return [flow, ...ends].filter((text) => text !== '').join(' ');
}
