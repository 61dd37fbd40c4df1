import { scaleLinear } from 'd3-scale';
import { element, pathData } from '../svg/element.js';
import { tickTexts } from '../svg/number-text.js';
import { paint } from '../svg/palette.js';
import { tickLabels } from '../svg/tick-labels.js';
import { TYPE, textLine } from '../svg/text.js';
import type { Point } from './contour-lines.js';
import type { Projection } from './projection.js';
import type { ReliefData } from './relief-data.js';

export interface SliceFrame {
  readonly body: string[];
  /** Height of what stands below the slice. */
  readonly below: number;
}

/** Margin ticks with coordinates; for a triangle, corners and quarters of its sides. */
export function sliceFrame(data: ReliefData, projection: Projection): SliceFrame {
  return data.slice.kind === 'triangle' ? triangleFrame(data, projection) : coordinateFrame(data, projection);
}

const GAP = 10;
const TICK = 5;

function coordinateFrame({ slice }: ReliefData, { to, left, right, bottom, top, domain }: Projection): SliceFrame {
  const disc = slice.kind === 'bloch disc';
  const style = { size: TYPE.small, colour: 'ink2' } as const;
  const xs = scaleLinear(domain.x, [0, 1]).ticks(disc ? 4 : 5);
  const ys = scaleLinear(domain.y, [0, 1]).ticks(disc ? 4 : 5);
  const [xTexts, yTexts] = [tickTexts(xs), tickTexts(ys)];
  const places = xs.map((tick, k) => ({ x: to([tick, 0])[0], text: xTexts[k] ?? '' }));
  const across = [
    ...places.map(({ x }) => mark([[x, bottom + GAP], [x, bottom + GAP + TICK]])), // prettier-ignore
    ...tickLabels(places, [left - 3 * GAP, right + 3 * GAP]).map(({ x, text }) =>
      textLine(x, bottom + GAP + TICK + 12, text, { ...style, anchor: 'middle' }),
    ),
  ];
  const up = ys.flatMap((tick, k) => {
    const [, y] = to([0, tick]);
    return [
      mark([[left - GAP - TICK, y], [left - GAP, y]]), // prettier-ignore
      textLine(left - GAP - TICK - 5, y + 4, yTexts[k] ?? '', { ...style, anchor: 'end' }),
    ];
  });
  const lines = [mark([[left, bottom + GAP], [right, bottom + GAP]]), mark([[left - GAP, top], [left - GAP, bottom]])]; // prettier-ignore
  const names = [
    textLine(right + 16, bottom + GAP + 4, slice.axes[0], { size: TYPE.text, bold: true, anchor: 'middle' }),
    textLine(left - GAP, top - 9, slice.axes[1], { size: TYPE.text, bold: true, anchor: 'middle' }),
  ];
  return { body: [...lines, ...across, ...up, ...(disc ? names : [])], below: GAP + TICK + 14 };
}

function triangleFrame({ slice }: ReliefData, { to }: Projection): SliceFrame {
  const corners = slice.marks;
  const centre = to([0, 0]);
  const outward = (at: Point, by: number): Point => {
    const [dx, dy] = [at[0] - centre[0], at[1] - centre[1]];
    const length = Math.hypot(dx, dy);
    return [at[0] + (by * dx) / length, at[1] + (by * dy) / length];
  };
  const body = corners.flatMap(({ name, x, y }, k) => {
    const at = outward(to([x, y]), 16);
    const next = corners[(k + 1) % corners.length] ?? { x, y };
    const label = textLine(at[0], at[1] + 4, name, { bold: true, anchor: 'middle' });
    const middle = to([(x + next.x) / 2, (y + next.y) / 2]);
    const [nx, ny] = [outward(middle, 1)[0] - middle[0], outward(middle, 1)[1] - middle[1]];
    const quarters = [0.25, 0.5, 0.75].map((share) => {
      const [px, py] = to([x + share * (next.x - x), y + share * (next.y - y)]);
      return mark([[px, py], [px + TICK * nx, py + TICK * ny]]); // prettier-ignore
    });
    return [label, ...quarters];
  });
  return { body, below: 22 };
}

function mark(points: readonly Point[]): string {
  return element('path', { d: pathData(points), 'stroke-width': 0.8, ...paint({ stroke: 'ink' }) });
}
