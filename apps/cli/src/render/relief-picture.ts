import type { ReliefDocument } from '@thalweg/format';
import { relief } from '@thalweg/pictures';
import { UNTITLED } from './model-line.js';

/** κ over a slice as an SVG picture. */
export function reliefPicture({ model, mean, slice, grid, lowest, reference }: ReliefDocument): string {
  return relief({ title: model.title ?? UNTITLED, mean, slice, grid, lowest, reference });
}
