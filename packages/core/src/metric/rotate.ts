interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** out = U* V U for N×N matrices (U null: V itself); scratch holds at least 2N² numbers; out may be V. */
export function rotateInto(out: Parts, v: Parts, u: Parts | null, n: number, scratch: Float64Array): void {
  conjugateInto(out, v, u, n, scratch, true);
}

/** out = U V U*, the way back. */
export function rotateBackInto(out: Parts, v: Parts, u: Parts | null, n: number, scratch: Float64Array): void {
  conjugateInto(out, v, u, n, scratch, false);
}

/** out = W* V W with W = U, or U* when not `inwards`: W_kj sits at k·down + j·across, its imaginary part times the sign. */
function conjugateInto(
  out: Parts,
  { re: vr, im: vi }: Parts,
  u: Parts | null,
  n: number,
  scratch: Float64Array,
  inwards: boolean,
): void {
  if (!u) {
    out.re.set(vr);
    out.im.set(vi);
    return;
  }
  const { re: ur, im: ui } = u;
  const nn = n * n;
  const down = inwards ? n : 1;
  const across = inwards ? 1 : n;
  const sign = inwards ? 1 : -1;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0, at = i * n, w = j * across; k < n; k++, at++, w += down) {
        const wi = sign * ui[w];
        re += vr[at] * ur[w] - vi[at] * wi;
        im += vr[at] * wi + vi[at] * ur[w];
      }
      scratch[i * n + j] = re;
      scratch[nn + i * n + j] = im;
    }
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0, at = j, w = i * across; k < n; k++, at += n, w += down) {
        const wi = sign * ui[w];
        re += ur[w] * scratch[at] + wi * scratch[nn + at];
        im += ur[w] * scratch[nn + at] - wi * scratch[at];
      }
      out.re[i * n + j] = re;
      out.im[i * n + j] = im;
    }
  }
}
