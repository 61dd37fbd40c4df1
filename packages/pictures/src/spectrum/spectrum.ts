import { type ScaleLinear, scaleLinear } from 'd3-scale';
import { element, pathData } from '../svg/element.js';
import { numberText, tickTexts } from '../svg/number-text.js';
import { type Paint, paint } from '../svg/palette.js';
import { type PictureOptions, MARGIN, foot, head, picture } from '../svg/picture.js';
import { tickLabels } from '../svg/tick-labels.js';
import { TYPE, textLine, textWidth } from '../svg/text.js';
import { type Cluster, clusterEigenvalues } from './cluster-eigenvalues.js';

/** Eigenvalues of −L as `thalweg.report/1` holds them: a number, or [re, im]. */
export interface SpectrumData {
  readonly title: string;
  readonly eigenvalues: readonly (number | readonly [number, number])[];
}

const WIDTH = 480;
const LINE_HEIGHT = 120;
const PLANE_HEIGHT = 230;
const RIGHT = WIDTH - MARGIN - 26;

interface Box {
  readonly left: number;
  readonly top: number;
  readonly bottom: number;
}

/** The spectrum of −L: a line with multiplicities where it is real, the complex plane otherwise. */
export function spectrum(data: SpectrumData, options: PictureOptions = {}): string {
  const clusters = clusterEigenvalues(data.eigenvalues);
  const real = clusters.every(({ im }) => im === 0);
  const top = head(WIDTH, data.title, `Spectrum of −L, ${data.eigenvalues.length} eigenvalues`);
  const left = real ? MARGIN : planeLeft(clusters);
  const box = {
    left,
    top: top.bottom + (real ? 14 : 24),
    bottom: top.bottom + 24 + (real ? LINE_HEIGHT : PLANE_HEIGHT),
  };
  const drawn = real ? stems(clusters, box) : points(clusters, box);
  const notes = foot(WIDTH, box.bottom + 48, footNotes(clusters, real));
  const body = [...top.lines, ...drawn, ...notes.lines];
  const parts = { kind: 'spectrum', width: WIDTH, height: notes.bottom + MARGIN, body } as const;
  const description = describe(data, clusters, real);
  return picture({ ...parts, name: `Spectrum of −L: ${data.title}`, description }, options);
}

/** The slowest decay: the least positive real part; null where nothing decays. */
function slowest(clusters: readonly Cluster[]): number | null {
  const rates = clusters.map(({ re }) => re).filter((re) => re > 0);
  return rates.length === 0 ? null : Math.min(...rates);
}

function stems(clusters: readonly Cluster[], box: Box): string[] {
  const x = rateScale(clusters, box);
  const most = Math.max(...clusters.map(({ count }) => count));
  const y = scaleLinear([0, most], [box.bottom, box.top + 16]);
  const out = rateAxis(x, box);
  const gap = slowest(clusters);
  if (gap !== null) out.push(...gapMark(x(0), x(gap), gap, box));
  let labelled = -Infinity;
  for (const { re, count } of clusters) {
    const [at, top] = [x(re), y(count)];
    out.push(line([[at, box.bottom], [at, top]], { stroke: 'contour' }, 2)); // prettier-ignore
    out.push(element('circle', { cx: at, cy: top, r: 3, ...paint({ fill: 'contour' }) }));
    const text = `×${count}`;
    const half = textWidth(text, TYPE.small) / 2 + 3;
    if (count === 1 || at - half < labelled) continue;
    labelled = at + half;
    out.push(textLine(at, top - 7, text, { size: TYPE.small, anchor: 'middle' }));
  }
  return out;
}

function points(clusters: readonly Cluster[], box: Box): string[] {
  const x = rateScale(clusters, box);
  const y = imaginaryScale(clusters).range([box.bottom, box.top]);
  const ticks = y.ticks(5);
  const texts = tickTexts(ticks);
  const grid = ticks.flatMap((tick, k) => [
    line([[box.left, y(tick)], [RIGHT, y(tick)]], { stroke: 'hair' }, tick === 0 ? 1 : 0.6), // prettier-ignore
    textLine(box.left - 8, y(tick) + 4, texts[k] ?? '', { size: TYPE.small, colour: 'ink2', anchor: 'end' }),
  ]);
  const gap = slowest(clusters);
  const dots = clusters.map(({ re, im, count }) =>
    element('circle', {
      cx: x(re),
      cy: y(im),
      r: 2.6 + 1.2 * Math.sqrt(count - 1),
      'stroke-width': 1.2,
      ...paint({ fill: 'contour', stroke: 'ground' }),
    }),
  );
  const side = textLine(box.left + 7, box.top + 6, 'Im', { size: TYPE.small, colour: 'ink2' });
  const edge = line([[box.left, box.top], [box.left, box.bottom]], { stroke: 'ink' }, 1); // prettier-ignore
  return [...grid, edge, side, ...rateAxis(x, box), ...(gap === null ? [] : gapMark(x(0), x(gap), gap, box)), ...dots];
}

function imaginaryScale(clusters: readonly Cluster[]): ScaleLinear<number, number> {
  const reach = 1.12 * Math.max(...clusters.map(({ im }) => Math.abs(im)));
  return scaleLinear([-reach, reach], [0, 1]);
}

/** Where the plane begins: behind the widest number of its side. */
function planeLeft(clusters: readonly Cluster[]): number {
  const texts = tickTexts(imaginaryScale(clusters).ticks(5));
  return MARGIN + Math.max(...texts.map((text) => textWidth(text, TYPE.small))) + 10;
}

function rateScale(clusters: readonly Cluster[], { left }: Box): ScaleLinear<number, number> {
  const [least, most] = [Math.min(0, ...clusters.map(({ re }) => re)), Math.max(...clusters.map(({ re }) => re))];
  return scaleLinear([least, most > least ? most : least + 1], [left + 8, RIGHT - 6]);
}

function rateAxis(x: ScaleLinear<number, number>, box: Box): string[] {
  const ticks = x.ticks(6);
  const texts = tickTexts(ticks);
  const marks = ticks.map((tick) => line([[x(tick), box.bottom], [x(tick), box.bottom + 5]], { stroke: 'ink' }, 1)); // prettier-ignore
  const places = ticks.map((tick, k) => ({ x: x(tick), text: texts[k] ?? '' }));
  const style = { size: TYPE.small, colour: 'ink2', anchor: 'middle' } as const;
  const labels = tickLabels(places, [MARGIN - 6, WIDTH - MARGIN]).map((label) =>
    textLine(label.x, box.bottom + 18, label.text, style),
  );
  const name = textLine(RIGHT + 4, box.bottom + 4, 'rate', { size: TYPE.small, colour: 'ink2' });
  return [line([[box.left, box.bottom], [RIGHT, box.bottom]], { stroke: 'ink' }, 1), ...marks, ...labels, name]; // prettier-ignore
}

/** A water-blue span from 0 to the slowest decay, below the axis. */
function gapMark(from: number, to: number, gap: number, box: Box): string[] {
  const y = box.bottom + 29;
  const text = `slowest decay ${numberText(gap, 7)}`;
  const ends = [[from, y - 3], [from, y + 3]] as const; // prettier-ignore
  const others = [[to, y - 3], [to, y + 3]] as const; // prettier-ignore
  const bar = [line([[from, y], [to, y]], { stroke: 'water' }, 2), line(ends, { stroke: 'water' }, 1.4), line(others, { stroke: 'water' }, 1.4)]; // prettier-ignore
  const room = WIDTH - MARGIN - to - 8;
  const inside = textWidth(text, TYPE.small) > room;
  const label = inside
    ? textLine((from + to) / 2, y + 14, text, { size: TYPE.small, colour: 'water', anchor: 'middle' })
    : textLine(to + 8, y + 4, text, { size: TYPE.small, colour: 'water' });
  return [...bar, label];
}

function footNotes(clusters: readonly Cluster[], real: boolean): string[] {
  const zero = clusters.find(({ re, im }) => re === 0 && im === 0)?.count ?? 0;
  const fixed =
    zero === 1 ? '0 once: multiples of 1 alone are fixed.' : `0 with multiplicity ${zero}: the fixed points.`;
  return [real ? 'All eigenvalues are real. ×n: n times.' : 'Larger dots: multiple eigenvalues.', fixed];
}

function describe({ eigenvalues }: SpectrumData, clusters: readonly Cluster[], real: boolean): string {
  const gap = slowest(clusters);
  const top = Math.max(...clusters.map(({ re }) => re));
  const shown = clusters.slice(0, 12).map(({ re, im, count }) => {
    const value = im === 0 ? plain(re) : `${plain(re)} ${im < 0 ? '−' : '+'} ${plain(Math.abs(im))}i`;
    return count === 1 ? value : `${value} (${count} times)`;
  });
  const more = clusters.length > shown.length ? `, and ${clusters.length - shown.length} others` : '';
  return [
    `${eigenvalues.length} eigenvalues of −L, ${real ? 'all real' : 'some complex'}, with real parts from 0 to ${plain(top)}.`,
    gap === null ? 'Nothing decays.' : `The slowest decay is ${plain(gap)}.`,
    `They are ${shown.join(', ')}${more}.`,
  ].join(' ');
}

function plain(value: number): string {
  return numberText(value, 7).replace(/\^\{([^}]*)\}/, '^$1');
}

function line(points: readonly (readonly [number, number])[], colours: Paint, width: number): string {
  return element('path', { d: pathData(points), 'stroke-width': width, ...paint(colours) });
}
