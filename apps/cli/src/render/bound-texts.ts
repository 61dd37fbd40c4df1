import { bracketText, type ConstantId } from '@thalweg/core';
import { endValue, type EndDocument } from '@thalweg/format';

/** The two ends of a bracket as text, in units of `unit`; a dash where nothing is known. */
export function boundTexts(
  constant: ConstantId,
  { lower, upper }: { readonly lower: EndDocument | null; readonly upper: EndDocument | null },
  closed: boolean,
  unit = 1,
): { readonly lower: string; readonly upper: string } {
  const scaled = (end: EndDocument | null) =>
    end && {
      value: endValue(constant, end) / unit,
      ...(end.margin === undefined ? {} : { margin: end.margin / unit }),
    };
  const texts = bracketText(scaled(lower), scaled(upper), closed);
  return { lower: texts.lower ?? '—', upper: texts.upper ?? '—' };
}
