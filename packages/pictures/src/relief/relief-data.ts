/** κ over a slice of state space as it is drawn: what `thalweg.relief/1` holds of it. */
export interface ReliefData {
  /** Title of the model. */
  readonly title: string;
  /** Operator mean of the metric. */
  readonly mean: string;
  readonly slice: {
    readonly kind: 'bloch disc' | 'triangle' | 'plane';
    /** Names of the coordinates; empty where they have none. */
    readonly axes: readonly [string, string];
    /** Corners, or states that the plane was laid through. */
    readonly marks: readonly { readonly name: string; readonly x: number; readonly y: number }[];
  };
  readonly grid: ReliefField;
  /** Null where κ was resolved nowhere. */
  readonly lowest: { readonly x: number; readonly y: number; readonly kappa: number; readonly atRim: boolean } | null;
  /** The reference state, where it lies in the slice. */
  readonly reference: { readonly x: number; readonly y: number } | null;
}

/** A function on `rings` rings of `rays` points, index ring·rays + ray, the first ring a single point; null where not defined. */
export interface ReliefField {
  readonly rings: number;
  readonly rays: number;
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
  readonly kappa: ArrayLike<number | null>;
  /** Boundary of state space, a closed polygon. */
  readonly rimX: ArrayLike<number>;
  readonly rimY: ArrayLike<number>;
}
