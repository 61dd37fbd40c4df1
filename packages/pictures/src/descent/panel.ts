import { scaleLinear, scaleLog } from 'd3-scale';
import { element, pathData } from '../svg/element.js';
import { tickLabels } from '../svg/tick-labels.js';
import { spreadApart } from '../svg/spread-apart.js';
import { numberText, tickTexts } from '../svg/number-text.js';
import { type Paint, paint } from '../svg/palette.js';
import { CHARACTER, TYPE, textLine, textWidth } from '../svg/text.js';

/** A curve over time; values are at least 0. */
export interface Curve {
  readonly label: string;
  readonly points: readonly (readonly [number, number])[];
}

export interface PanelSpec {
  readonly title: string;
  /** Outer box, labels of both axes included. */
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly flow: Curve;
  readonly bounds: readonly Curve[];
  readonly timeLabels: boolean;
  /** Characters of the longest label at the right. */
  readonly labelRoom: number;
}

const LEFT = 50;
const DASHES = ['', '7 3', '2 3', '9 3 2 3'];
const LABEL_STEP = 13;

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** The flow and its bounds on a logarithmic scale over time, ground below the flow, names at the right ends. */
export function panel(spec: PanelSpec): { readonly body: string[]; readonly bottom: number } {
  const { x, y, width, height, flow, bounds, title, timeLabels } = spec;
  const right = x + width - (spec.labelRoom * CHARACTER * TYPE.small + 14);
  const box: Box = { left: x + LEFT, right, top: y + 16, bottom: y + 16 + height };
  const body = [textLine(x, y + 8, title, { size: TYPE.small, colour: 'ink' })];
  const times = flow.points.map(([time]) => time);
  const time = scaleLinear([Math.min(...times), Math.max(...times)], [box.left, box.right]);
  const domain = valueDomain(flow, bounds);
  if (domain === null) {
    const [cx, cy] = [(box.left + box.right) / 2, (box.top + box.bottom) / 2];
    body.push(textLine(cx, cy, '0 at all times', { anchor: 'middle', colour: 'ink2' }));
  } else {
    const value = scaleLog(domain, [box.bottom, box.top]).clamp(true);
    const place = (curve: Curve): [number, number][] =>
      curve.points.flatMap(([t, v]): [number, number][] => (isDrawn(v) ? [[time(t), value(v)]] : []));
    body.push(...valueAxis(domain, value, box), ground(place(flow), box));
    bounds.forEach((bound, k) =>
      body.push(line(place(bound), { stroke: 'water' }, 1.4, DASHES[k % DASHES.length] ?? '')),
    );
    body.push(line(place(flow), { stroke: 'ink' }, 1.9, ''), ...names([flow, ...bounds], place, box));
  }
  body.push(...timeAxis(time.ticks(6), time, box, timeLabels));
  return { body, bottom: box.bottom + (timeLabels ? 20 : 6) };
}

/** Smaller values have no place on a scale whose ends are doubles. */
const LEAST_DRAWN = 1e-250;

function isDrawn(value: number): boolean {
  return value > LEAST_DRAWN;
}

/** From the least to the largest positive value, whole decades where it spans more than one. */
function valueDomain(flow: Curve, bounds: readonly Curve[]): [number, number] | null {
  const own = flow.points.map(([, v]) => v).filter(isDrawn);
  if (own.length === 0) return null;
  const all = bounds.flatMap(({ points }) => points.map(([, v]) => v)).filter(isDrawn);
  const low = Math.min(...own);
  const high = Math.max(...own, ...all);
  const room = Math.max(1.3, (high / low) ** 0.03);
  return [low / room, high * room];
}

/** Decades, or 1, 2, 5 between them where there are few. */
function valueTicks([low, high]: readonly [number, number]): number[] {
  const decades = Math.log10(high / low);
  const every = Math.max(1, Math.ceil(decades / 6));
  const ticks: number[] = [];
  for (let p = Math.ceil(Math.log10(low) - 1); p <= Math.log10(high); p++) {
    const steps = decades < 1.6 ? [1, 2, 5] : [1];
    if (decades >= 1.6 && p % every !== 0) continue;
    for (const step of steps) {
      const tick = step * 10 ** p;
      if (tick >= low && tick <= high) ticks.push(tick);
    }
  }
  return ticks;
}

function valueAxis(domain: readonly [number, number], value: (v: number) => number, box: Box): string[] {
  return valueTicks(domain).flatMap((tick) => {
    const y = value(tick);
    const label = numberText(tick, 1).replace(/^0\.0*1$/, (text) => `10^{−${text.length - 2}}`);
    return [
      line([[box.left, y], [box.right, y]], { stroke: 'hair' }, 0.6, ''), // prettier-ignore
      textLine(box.left - 8, y + 4, label, { size: TYPE.small, anchor: 'end', colour: 'ink2' }),
    ];
  });
}

function timeAxis(ticks: readonly number[], time: (t: number) => number, box: Box, labels: boolean): string[] {
  const texts = tickTexts(ticks);
  const axis = line([[box.left, box.top], [box.left, box.bottom], [box.right, box.bottom]], { stroke: 'ink' }, 1, ''); // prettier-ignore
  const marks = ticks.map((tick) => line([[time(tick), box.bottom], [time(tick), box.bottom + 4]], { stroke: 'ink' }, 1, '')); // prettier-ignore
  if (!labels) return [axis, ...marks];
  const places = ticks.map((tick, k) => ({ x: time(tick), text: texts[k] ?? '' }));
  const shown = tickLabels(places, [box.left - LEFT, box.right + LEFT]);
  const style = { size: TYPE.small, colour: 'ink2' } as const;
  const numbers = shown.map(({ x, text }) => textLine(x, box.bottom + 17, text, { ...style, anchor: 'middle' }));
  // Beside the last number, however wide that is.
  const last = shown.at(-1) ?? { x: box.right, text: '' };
  const name = textLine(last.x + textWidth(last.text, TYPE.small) / 2 + 8, box.bottom + 17, 't', style);
  return [axis, ...marks, ...numbers, name];
}

/** The land below the flow. */
function ground(points: readonly [number, number][], box: Box): string {
  const [first, last] = [points[0], points.at(-1)];
  if (!first || !last) return '';
  const outline: [number, number][] = [[first[0], box.bottom], ...points, [last[0], box.bottom]];
  return element('path', { d: pathData(outline, true), ...paint({ fill: 'land' }) });
}

/** Names beside the right ends, moved apart where they would collide, with a leader where they moved. */
function names(curves: readonly Curve[], place: (curve: Curve) => [number, number][], box: Box): string[] {
  const ends = curves.flatMap((curve, k) => {
    const end = place(curve).at(-1);
    return end ? [{ label: curve.label, x: end[0], y: end[1], own: k === 0 }] : [];
  });
  const placed = spreadApart(ends.map(({ y }) => y), LABEL_STEP, box.top + 4, box.bottom - 2); // prettier-ignore
  return ends.flatMap(({ label, x, y, own }, k) => {
    const at = placed[k] ?? y;
    const colour = own ? 'ink' : 'water';
    const leader = line([[x + 1, y], [x + 9, at]], { stroke: colour }, 0.7, ''); // prettier-ignore
    return [leader, textLine(x + 11, at + 4, label, { size: TYPE.small, colour })];
  });
}

function line(points: readonly (readonly [number, number])[], colours: Paint, width: number, dash: string): string {
  return element('path', {
    d: pathData(points),
    'stroke-width': width,
    'stroke-linejoin': 'round',
    ...(dash === '' ? {} : { 'stroke-dasharray': dash }),
    ...paint(colours),
  });
}
