import { element, escapeText } from './element.js';
import { paint, pictureStyle } from './palette.js';
import { TYPE, firstLines, textLine } from './text.js';

/** How a picture is to be embedded. */
export interface PictureOptions {
  /** Carries its own colours. False inside a page that gives the custom properties and `pictureRules` itself. */
  readonly standalone?: boolean;
  /** Prefix of the ids of title and description: unique in the page. */
  readonly id?: string;
}

export interface PictureParts {
  readonly kind: 'relief' | 'descent' | 'spectrum' | 'bracket';
  readonly width: number;
  readonly height: number;
  /** Short name, the text alternative's first line. */
  readonly name: string;
  /** What the picture shows, in words and numbers: the text alternative. */
  readonly description: string;
  readonly body: readonly string[];
}

const FACE = '"JetBrains Mono","DejaVu Sans Mono",ui-monospace,monospace';

/** Space between the neat-line and what it frames. */
export const MARGIN = 18;

/** A framed picture: ground, double neat-line, body, title and description for those who do not see it. */
export function picture(parts: PictureParts, { standalone = true, id = parts.kind }: PictureOptions = {}): string {
  const { kind, width, height, name, description, body } = parts;
  const svg = element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      viewBox: `0 0 ${Math.round(width)} ${Math.round(height)}`,
      width: Math.round(width),
      height: Math.round(height),
      class: `thalweg-picture ${kind}`,
      role: 'img',
      'aria-labelledby': `${id}-title ${id}-description`,
      'font-family': FACE,
    },
    element('title', { id: `${id}-title` }, escapeText(name)),
    element('desc', { id: `${id}-description` }, escapeText(description)),
    ...(standalone ? [`<style>${pictureStyle()}</style>`] : []),
    element('rect', { width, height, ...paint({ fill: 'ground' }) }),
    frame(width, height, 2.5, 'hair'),
    frame(width, height, 5.5, 'ink'),
    ...body,
  );
  return `${svg}\n`;
}

function frame(width: number, height: number, inset: number, stroke: 'hair' | 'ink'): string {
  const side = { x: inset, y: inset, width: width - 2 * inset, height: height - 2 * inset };
  return element('rect', { ...side, 'stroke-width': 1, ...paint({ stroke }) });
}

export interface Head {
  readonly lines: readonly string[];
  /** Baseline below which the body may begin. */
  readonly bottom: number;
}

const TITLE_LINES = 2;
const SUBTITLE_LINES = 3;

/** Title and what is drawn, at the top left. */
export function head(width: number, title: string, subtitle: string): Head {
  const room = width - 2 * MARGIN;
  let y = MARGIN + TYPE.title - 1;
  const lines: string[] = [];
  for (const line of firstLines(title, room, TITLE_LINES, TYPE.title)) {
    lines.push(textLine(MARGIN, y, line, { size: TYPE.title, bold: true }));
    y += 18;
  }
  for (const line of firstLines(subtitle, room, SUBTITLE_LINES, TYPE.small)) {
    lines.push(textLine(MARGIN, y, line, { size: TYPE.small, colour: 'ink2' }));
    y += 15;
  }
  return { lines, bottom: y - 8 };
}

/** Sentences at the foot, and the height they take. */
export function foot(width: number, top: number, sentences: readonly string[]): Head {
  const room = width - 2 * MARGIN;
  let y = top + 12;
  const lines = sentences.flatMap((sentence) =>
    firstLines(sentence, room, 4, TYPE.small).map((line) => {
      const text = textLine(MARGIN, y, line, { size: TYPE.small, colour: 'ink2' });
      y += 15;
      return text;
    }),
  );
  return { lines, bottom: y - 15 };
}
