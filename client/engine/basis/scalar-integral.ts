/**
 * The same for scalars in d dimensions, 2 ≤ d ≤ 6, with or without parity: ∫ dμ_{SO(d)} or O(d) of
 * det(1 − t g) Π_k (1 − t^{2k}) / det(1 − t^k g^k), as a constant term on the maximal torus.
 */
import { LONGEST_CYCLE } from "./gauge-integral.ts";
import { Multisets } from "./multisets.ts";

/** One eigenvalue of g: ±x^v. */
interface Eigenvalue {
  readonly sign: 1 | -1;
  readonly exponent: readonly number[];
}
/** A component of O(d): eigenvalues of g^k, and the factors 1 − x^α of its measure. */
interface Component {
  readonly rank: number;
  readonly roots: readonly (readonly number[])[];
  eigenvalues(k: number): readonly Eigenvalue[];
}

export const largestScalarDimension = 6;

export class ScalarIntegral {
  /** Cycles of scalars, and apart from them those of pseudoscalars: the length, plus `LONGEST_CYCLE` for those. */
  readonly cycles = new Multisets(2 * LONGEST_CYCLE);
  readonly #values = new Map<number, Float64Array>();
  readonly #components: readonly Component[];

  /** @param mostDerivatives for the smallest product that occurs */
  constructor(
    d: number,
    private readonly withParity: boolean,
    private readonly mostDerivatives: (quanta: number) => number,
  ) {
    this.#components = withParity ? [rotations(d), reflections(d)] : [rotations(d)];
  }

  element(pseudo: boolean, k: number): number {
    return k + (pseudo ? LONGEST_CYCLE : 0);
  }

  value(cycles: number): Float64Array {
    const known = this.#values.get(cycles);
    if (known) return known;
    const elements = this.cycles.elementsOf(cycles);
    const lengths = elements.map((element) => element % LONGEST_CYCLE);
    const most = this.mostDerivatives(lengths.reduce((sum, k) => sum + k, 0));
    const [plain, odd] = this.#components.map((component) => constantTerm(component, lengths, most));
    const value = plain ?? new Float64Array(0);
    if (odd) {
      // A pseudoscalar changes sign once for each turn of its cycle.
      const flips = elements.filter((element) => element >= LONGEST_CYCLE && element % 2 === 1).length;
      const sign = flips % 2 === 0 ? 1 : -1;
      for (let k = 0; k <= most; k++) value[k] = ((value[k] ?? 0) + sign * (odd[k] ?? 0)) / 2;
    }
    this.#values.set(cycles, value);
    return value;
  }
}

const unit = (rank: number, index: number, value: number) =>
  Array.from({ length: rank }, (_, at) => (at === index ? value : 0));

function pairs(rank: number): number[][] {
  const found: number[][] = [];
  for (let i = 0; i < rank; i++)
    for (let j = i + 1; j < rank; j++)
      for (const sign of [1, -1])
        found.push(Array.from({ length: rank }, (_, at) => (at === i ? 1 : at === j ? sign : 0)));
  return found;
}

/** SO(d): x_i and 1/x_i, and 1 for odd d. Positive roots of D_r or B_r. */
function rotations(d: number): Component {
  const rank = Math.floor(d / 2);
  const short = d % 2 === 1 ? Array.from({ length: rank }, (_, index) => unit(rank, index, 1)) : [];
  return {
    rank,
    roots: [...pairs(rank), ...short],
    eigenvalues: (k) => [
      ...torus(rank, k),
      ...(d % 2 === 1 ? [{ sign: 1, exponent: unit(rank, -1, 0) } as const] : []),
    ],
  };
}

/** The other component. For odd d it is −SO(d); for even d two eigenvalues are 1 and −1, and the measure that of Sp(d−2). */
function reflections(d: number): Component {
  if (d % 2 === 1) {
    const turning = rotations(d);
    return {
      ...turning,
      eigenvalues: (k) =>
        turning.eigenvalues(k).map(({ sign, exponent }) => ({
          sign: (k % 2 === 1 ? -sign : sign) as 1 | -1, // a product of signs
          exponent,
        })),
    };
  }
  const rank = d / 2 - 1;
  return {
    rank,
    roots: [...pairs(rank), ...Array.from({ length: rank }, (_, index) => unit(rank, index, 2))],
    eigenvalues: (k) => [
      ...torus(rank, k),
      { sign: 1, exponent: unit(rank, -1, 0) },
      { sign: k % 2 === 1 ? -1 : 1, exponent: unit(rank, -1, 0) },
    ],
  };
}

function torus(rank: number, k: number): Eigenvalue[] {
  return Array.from({ length: rank }, (_, index) => index).flatMap((index) => [
    { sign: 1 as const, exponent: unit(rank, index, k) },
    { sign: 1 as const, exponent: unit(rank, index, -k) },
  ]);
}

function constantTerm(component: Component, lengths: readonly number[], most: number): Float64Array {
  const { rank, roots, eigenvalues } = component;
  // Every power of t brings at most one unit of each exponent; the measure adds those of its roots.
  const reach = most + roots.reduce((sum, root) => sum + Math.max(0, ...root.map(Math.abs)), 0);
  const side = 2 * reach + 1;
  const layer = side ** rank;
  const series = new Float64Array((most + 1) * layer);
  const offset = (exponent: readonly number[]) => exponent.reduce((sum, value) => sum * side + value, 0);
  const origin = offset(Array.from({ length: rank }, () => reach));
  series[origin] = 1;
  // The measure first, in the lowest layer, then everything else stays within `reach`.
  for (const root of roots) times(series, layer, 0, offset(root), -1);
  const ones = lengths.filter((k) => k === 1).length;
  for (const k of lengths) {
    if (k > most) continue;
    for (const { sign, exponent } of k === 1 ? [] : eigenvalues(k))
      divide(series, layer, k, offset(exponent), sign);
  }
  if (most > 0) {
    for (const { sign, exponent } of eigenvalues(1)) {
      for (let one = 1; one < ones; one++) divide(series, layer, 1, offset(exponent), sign);
      if (ones === 0) times(series, layer, 1, offset(exponent), -sign);
    }
  }
  const value = new Float64Array(most + 1);
  for (let k = 0; k <= most; k++) value[k] = series[k * layer + origin] ?? 0;
  for (const k of lengths)
    for (let total = most; total >= 2 * k; total--)
      value[total] = (value[total] ?? 0) - (value[total - 2 * k] ?? 0);
  return value;
}

/** Times 1 + c t^k x^shift, in place. */
function times(series: Float64Array, layer: number, k: number, shift: number, c: number): void {
  const step = k * layer + shift;
  const add = (index: number) => {
    const from = index - step;
    if (from < 0 || Math.floor(from / layer) !== Math.floor(index / layer) - k) return;
    series[index] = (series[index] ?? 0) + c * (series[from] ?? 0);
  };
  // What is read must not have been written yet.
  if (step > 0) for (let index = series.length - 1; index >= 0; index--) add(index);
  else for (let index = 0; index < series.length; index++) add(index);
}

/** Divided by 1 − sign t^k x^shift, in place. */
function divide(series: Float64Array, layer: number, k: number, shift: number, sign: number): void {
  const step = k * layer + shift;
  for (let index = k * layer; index < series.length; index++) {
    const from = index - step;
    if (from < 0 || Math.floor(from / layer) !== Math.floor(index / layer) - k) continue;
    series[index] = (series[index] ?? 0) + sign * (series[from] ?? 0);
  }
}
