/** The colours of a picture: by day (a survey map) and by night (a bathymetric chart). */
export const COLOURS = {
  ground: { day: '#f2f5f1', night: '#0b1a21' },
  ink: { day: '#15201d', night: '#e4ece9' },
  ink2: { day: '#4c5b56', night: '#9db2b0' },
  hair: { day: '#b7c2bb', night: '#2b4550' },
  contour: { day: '#a05a28', night: '#cf8a52' },
  water: { day: '#175a86', night: '#80c3e8' },
  land: { day: '#e6ede2', night: '#102a31' },
  proved: { day: '#17624a', night: '#74d1ab' },
} as const;

export type Colour = keyof typeof COLOURS;

/**
 * The style of a picture that stands alone: colours as custom properties, by night where the reader's system asks for it, on
 * white paper in print. Every element also carries its day colour as an attribute, for readers of SVG without custom properties.
 */
export function pictureStyle(): string {
  const tokens = (of: (colour: Colour) => string): string =>
    (Object.keys(COLOURS) as Colour[]).map((colour) => `--${colour}:${of(colour)}`).join(';');
  const day = tokens((colour) => COLOURS[colour].day);
  const night = tokens((colour) => COLOURS[colour].night);
  return [
    `.thalweg-picture{${day}}`,
    `@media screen and (prefers-color-scheme:dark){.thalweg-picture{${night}}}`,
    `@media print{.thalweg-picture{--ground:#fff;--land:#fff}}`,
    classRules(),
  ].join('\n');
}

/** The rules alone, for a page that gives the custom properties itself. */
export function classRules(): string {
  const rules = (Object.keys(COLOURS) as Colour[]).flatMap((colour) => [
    `.thalweg-picture .f-${colour}{fill:var(--${colour})}`,
    `.thalweg-picture .s-${colour}{stroke:var(--${colour})}`,
  ]);
  return rules.join('\n');
}

export interface Paint {
  readonly fill?: Colour;
  readonly stroke?: Colour;
}

/** Attributes that colour an element: classes, and the day colour for readers that know no custom properties. */
export function paint({ fill, stroke }: Paint): Record<'class' | 'fill' | 'stroke', string | undefined> {
  const classes = [fill && `f-${fill}`, stroke && `s-${stroke}`].filter(Boolean).join(' ');
  return {
    class: classes === '' ? undefined : classes,
    fill: fill ? COLOURS[fill].day : 'none',
    stroke: stroke ? COLOURS[stroke].day : undefined,
  };
}
