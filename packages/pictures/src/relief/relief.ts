import { element, pathData } from '../svg/element.js';
import { numberText } from '../svg/number-text.js';
import { paint } from '../svg/palette.js';
import { type PictureOptions, MARGIN, foot, head, picture } from '../svg/picture.js';
import { TYPE, textLine } from '../svg/text.js';
import { type ContourLine, contourLines } from './contour-lines.js';
import { LabelPlaces, placesAlong } from './label-places.js';
import { type Levels, chooseLevels } from './levels.js';
import { sliceMarks } from './marks.js';
import { type Projection, projectSlice } from './projection.js';
import type { ReliefData } from './relief-data.js';
import { sliceFrame } from './slice-frame.js';
import { describeRelief, reliefNotes, sliceText } from './words.js';

const WIDTH = 480;
const SIDE = 356;

/** Contours of κ over a slice of state space, its lowest point and the reference state. */
export function relief(data: ReliefData, options: PictureOptions = {}): string {
  const top = head(WIDTH, data.title, `Relief of κ(ρ)${meanText(data)} over ${sliceText(data)}`);
  const box = {
    middle: WIDTH / 2 + 8,
    top: top.bottom + (data.slice.kind === 'triangle' ? 34 : 24),
    width: SIDE,
    height: SIDE,
  };
  const projection = projectSlice(data, box);
  const levels = chooseLevels(data.grid);
  const places = new LabelPlaces(projection.rim, WIDTH);
  // Marks are placed first: contour labels make way for them.
  const marks = sliceMarks(data, projection, places);
  const frame = sliceFrame(data, projection);
  const lines = levels ? contours(data, levels, projection, places) : flat(projection, data);
  const notes = foot(WIDTH, projection.bottom + frame.below + 12, reliefNotes(data, levels));
  const rim = element('path', { d: pathData(projection.rim, true), 'stroke-width': 1.3, ...paint({ stroke: 'ink' }) });
  const land = element('path', { d: pathData(projection.rim, true), ...paint({ fill: 'land' }) });
  const body = [...top.lines, land, ...lines.paths, rim, ...frame.body, ...lines.labels, ...marks, ...notes.lines];
  const description = describeRelief(data, levels);
  const parts = { kind: 'relief', width: WIDTH, height: notes.bottom + MARGIN, body, description } as const;
  return picture({ ...parts, name: `Relief of κ: ${data.title}` }, options);
}

function meanText({ mean }: ReliefData): string {
  return mean === 'logarithmic' ? '' : `, ${mean} mean,`;
}

interface Lines {
  readonly paths: string[];
  readonly labels: string[];
}

function contours({ grid }: ReliefData, levels: Levels, projection: Projection, places: LabelPlaces): Lines {
  const paths: string[] = [];
  const labels: string[] = [];
  for (const [k, { level, index }] of levels.values.entries()) {
    const lines = contourLines(grid, level).map(({ points, closed }) => ({
      closed,
      points: points.map(projection.to),
    }));
    if (lines.length === 0) continue;
    paths.push(
      element('path', {
        d: lines.map(({ points, closed }) => pathData(points, closed)).join(''),
        'stroke-width': index ? 1.4 : 0.7,
        'stroke-linejoin': 'round',
        ...paint({ stroke: 'contour' }),
      }),
    );
    if (index || k === 0) labels.push(...levelLabel(level, lines, places));
  }
  return { paths, labels };
}

/** The height of a line, once, on the longest of its parts that has room for it. */
function levelLabel(level: number, lines: readonly ContourLine[], places: LabelPlaces): string[] {
  const text = numberText(level, 6);
  const longest = [...lines].sort((a, b) => b.points.length - a.points.length);
  for (const { points, closed } of longest) {
    const around = closed && points[0] ? [...points, points[0]] : points;
    const place = places.firstFree(
      placesAlong(around, [...text].length, LABEL_SIZE).filter((box) => places.isInside(box)),
    );
    if (!place) continue;
    const angle = (place.turn * Math.PI) / 180;
    // The baseline lies a third of the size below the middle, across the line.
    const [x, y] = [place.x - (Math.sin(angle) * LABEL_SIZE) / 3, place.y + (Math.cos(angle) * LABEL_SIZE) / 3];
    const style = { size: LABEL_SIZE, colour: 'contour', anchor: 'middle', turn: place.turn, halo: 'land' } as const;
    return [textLine(x, y, text, style)];
  }
  return [];
}

const LABEL_SIZE = TYPE.small;

function flat({ left, right, top, bottom }: Projection, { lowest }: ReliefData): Lines {
  const text = lowest ? `κ = ${numberText(lowest.kappa, 7)} everywhere` : 'κ is not resolved here';
  const y = top + (bottom - top) * 0.7;
  return {
    paths: [],
    labels: [textLine((left + right) / 2, y, text, { anchor: 'middle', colour: 'contour', bold: true })],
  };
}
