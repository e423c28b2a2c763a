/**
 * Numbers that behave like chance but are always the same: the bands expected from finite samples are made by drawing
 * from the model itself, and every machine must draw alike.
 */
export interface Chance {
  /** In (0, 1). */
  uniform(): number;
  normal(): number;
  /** χ² with ν > 0 degrees of freedom. */
  chiSquare(nu: number): number;
}

/** A linear congruential generator modulo 2³², its two outputs joined (constants: Knuth 1997, 3.3.4, table 1, line 16). */
export function chanceFrom(seed: number): Chance {
  let state = seed >>> 0;
  const next = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state;
  };
  // The low bits of such a generator repeat soon; only the high ones are used.
  const uniform = () => ((next() >>> 6) * 2 ** 26 + (next() >>> 6) + 0.5) / 2 ** 52;
  const normal = () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  const chiSquare = (nu: number) => 2 * gamma(nu / 2, uniform, normal);
  return { uniform, normal, chiSquare };
}

/** Marsaglia, Tsang 2000, ACM Trans. Math. Software 26, 363. */
function gamma(shape: number, uniform: () => number, normal: () => number): number {
  if (shape < 1) return gamma(shape + 1, uniform, normal) * uniform() ** (1 / shape);
  const d = shape - 1 / 3;
  const c = 1 / Math.sqrt(9 * d);
  for (;;) {
    const z = normal();
    const v = (1 + c * z) ** 3;
    if (v > 0 && Math.log(uniform()) < 0.5 * z * z + d - d * v + d * Math.log(v)) return d * v;
  }
}
