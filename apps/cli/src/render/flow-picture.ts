import type { FlowDocument } from '@thalweg/format';
import { descent } from '@thalweg/pictures';
import { UNTITLED } from './model-line.js';

/** A flow as an SVG picture. */
export function flowPicture({ model, points, bounds }: FlowDocument): string {
  return descent({ title: model.title ?? UNTITLED, primitive: model.primitive === true, points, bounds });
}
