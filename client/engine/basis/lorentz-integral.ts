/**
 * Lorentz singlets of d = 4, modulo equations of motion and integration by parts, for every number of derivatives at
 * once: ∫ dμ 1/P(t; a, b) Π χ(t^k; a^k, b^k), with t counting derivatives (Henning, Lu, Melia, Murayama 2017). Complete
 * for operators of mass dimension above 4; below, conserved currents and free field strengths would be counted wrongly.
 */
import { exactLorentz, pack, type Monomials } from "./exact-lorentz.ts";
import { LONGEST_CYCLE } from "./gauge-integral.ts";
import { Multisets } from "./multisets.ts";

/** Kinds of quanta by their character without P: what is not a scalar. */
export const spins = ["left spinor", "right spinor", "left field strength", "right field strength"] as const;
export type Spin = (typeof spins)[number];
/** Twice the mass dimension of a field. */
export const doubledDimension: Readonly<Record<Spin | "scalar", number>> = {
  scalar: 2,
  "left spinor": 3,
  "right spinor": 3,
  "left field strength": 4,
  "right field strength": 4,
};

/** A character Σ c χ_A(a) χ_B(b) t^k by its terms: A and B are twice the spins. */
interface SpinTerm {
  readonly a: number;
  readonly b: number;
  readonly k: number;
  readonly coefficient: number;
}
interface Derivatives {
  readonly projected: Float64Array;
  readonly largest: number;
  readonly width: number;
}
/** A Laurent polynomial in a, b and t by packed exponents. */
type Sparse = ReadonlyMap<number, number>;

export class LorentzIntegral {
  /** Cycle lengths of scalars. */
  readonly scalars = new Multisets(LONGEST_CYCLE);
  /** Cycles of everything else: see `element`. */
  readonly others = new Multisets(spins.length * LONGEST_CYCLE);
  readonly #cycles = new Multisets(LONGEST_CYCLE);
  readonly #derivatives = new Map<number, Derivatives>();
  readonly #characters = new Map<number, Sparse>([[this.others.empty, new Map([[pack(0, 0, 0), 1]])]]);
  readonly #spins = new Map<number, readonly SpinTerm[]>();
  readonly #values = new Map<number, Float64Array>();

  /** @param doubled twice the largest mass dimension that is counted */
  constructor(
    private readonly doubled: number,
    private readonly exactBelow = 2 ** 53,
  ) {}

  element(spin: Spin, k: number): number {
    return spins.indexOf(spin) * LONGEST_CYCLE + k;
  }

  /** Numbers by derivatives, from 0 to as many as the largest dimension leaves room for. Integers; NaN where floats may not be. */
  value(others: number, scalars: number): Float64Array {
    const key = others * 2 ** 26 + scalars;
    const known = this.#values.get(key);
    if (known) return known;
    const value = this.#compute(others, scalars);
    this.#values.set(key, value);
    return value;
  }

  /** The same in big integers throughout. */
  exactValue(others: number, scalars: number): readonly bigint[] {
    const spinning = this.others.elementsOf(others).map((element) => {
      const spin = spins[Math.floor(element / LONGEST_CYCLE)] ?? "left spinor";
      return { spin, k: element % LONGEST_CYCLE };
    });
    const lengths = this.scalars.elementsOf(scalars);
    const base =
      spinning.reduce((sum, { spin, k }) => sum + k * doubledDimension[spin], 0) +
      2 * lengths.reduce((sum, k) => sum + k, 0);
    return exactLorentz(
      [...spinning.map(({ k }) => k), ...lengths],
      spinning.map(({ spin, k }) => characterOf(spin, k)),
      lengths,
      Math.max(0, Math.floor((this.doubled - base) / 2)),
    );
  }

  #compute(others: number, scalars: number): Float64Array {
    const spinning = this.others.elementsOf(others);
    const lengths = this.scalars.elementsOf(scalars);
    let cycles = this.#cycles.empty;
    let base = 0;
    for (const element of spinning) {
      const k = element % LONGEST_CYCLE;
      cycles = this.#cycles.add(cycles, k);
      base += k * doubledDimension[spins[Math.floor(element / LONGEST_CYCLE)] ?? "left spinor"];
    }
    for (const k of lengths) {
      cycles = this.#cycles.add(cycles, k);
      base += 2 * k;
    }
    const most = Math.floor((this.doubled - base) / 2);
    const value = new Float64Array(Math.max(0, most + 1));
    if (most < 0) return value;
    const { projected, largest, width } = this.#derivativesOf(cycles);
    let size = 0;
    for (const { a, b, k, coefficient } of this.#spinsOf(others)) {
      if (a >= width || b >= width) continue;
      size += Math.abs(coefficient);
      for (let total = k; total <= most; total++)
        value[total] =
          (value[total] ?? 0) + coefficient * (projected[((total - k) * width + a) * width + b] ?? 0);
    }
    const bound = size * largest * 2 ** lengths.filter((k) => 2 * k <= most).length;
    if (!(bound < this.exactBelow)) return value.fill(NaN);
    // A scalar's equation of motion: one factor 1 − t^{2k} for each cycle.
    for (const k of lengths)
      for (let total = most; total >= 2 * k; total--)
        value[total] = (value[total] ?? 0) - (value[total - 2 * k] ?? 0);
    return value;
  }

  /** Π_k P(t^k; a^k, b^k) / P(t; a, b), on spins: [t][A][B] of the given width. */
  #derivativesOf(cycles: number): Derivatives {
    const known = this.#derivatives.get(cycles);
    if (known) return known;
    const lengths = this.#cycles.elementsOf(cycles);
    const quanta = lengths.reduce((sum, k) => sum + k, 0);
    const most = Math.max(0, Math.floor(this.doubled / 2) - quanta);
    const { projected, size } = projectDerivatives(lengths, most);
    const largest = size < this.exactBelow ? largestOf(projected) : NaN;
    const found = { projected, largest, width: most + 1 };
    this.#derivatives.set(cycles, found);
    return found;
  }

  #spinsOf(others: number): readonly SpinTerm[] {
    const known = this.#spins.get(others);
    if (known) return known;
    const character = this.#characterOf(others);
    const terms: SpinTerm[] = [];
    const at = (x: number, y: number, k: number) => character.get(pack(x, y, k)) ?? 0;
    // Subtracting neighbours can leave something where the character itself has nothing.
    const places = new Set<number>();
    for (const packed of character.keys())
      for (const shift of [pack(0, 0, 0), pack(2, 0, 0), pack(0, 2, 0), pack(2, 2, 0)])
        places.add(packed - shift + pack(0, 0, 0));
    for (const place of places) {
      const k = place % 512;
      const b = (Math.floor(place / 512) % 1024) - 512;
      const a = Math.floor(place / (512 * 1024)) - 512;
      if (a < 0 || b < 0) continue;
      const coefficient = at(a, b, k) - at(a + 2, b, k) - at(a, b + 2, k) + at(a + 2, b + 2, k);
      if (coefficient !== 0) terms.push({ a, b, k, coefficient });
    }
    this.#spins.set(others, terms);
    return terms;
  }

  #characterOf(others: number): Sparse {
    const known = this.#characters.get(others);
    if (known) return known;
    const elements = this.others.elementsOf(others);
    let before = this.others.empty;
    for (const element of elements.slice(0, -1)) before = this.others.add(before, element);
    const last = elements.at(-1) ?? 0;
    const factor = characterOf(
      spins[Math.floor(last / LONGEST_CYCLE)] ?? "left spinor",
      last % LONGEST_CYCLE,
    );
    const product = multiply(this.#characterOf(before), factor, Math.floor(this.doubled / 2));
    this.#characters.set(others, product);
    return product;
  }
}

/** The character of one field without P, at the k-th power of everything. */
export function characterOf(spin: Spin, k: number): Monomials {
  const [one, other]: readonly [Monomials, Monomials] = [
    [
      [k, 0, 0, 1],
      [-k, 0, 0, 1],
    ],
    [
      [0, k, 0, 1],
      [0, -k, 0, 1],
    ],
  ];
  if (spin === "left spinor" || spin === "right spinor") {
    const [own, opposite] = spin === "left spinor" ? [one, other] : [other, one];
    return [...own, ...opposite.map(([x, y, , c]) => [x, y, k, -c] as const)];
  }
  const left = spin === "left field strength";
  const own = (power: number) => (left ? ([2 * power * k, 0] as const) : ([0, 2 * power * k] as const));
  const both: Monomials = [-1, 1].flatMap((s) => [-1, 1].map((r) => [s * k, r * k, k, -1] as const));
  return [...[-1, 0, 1].map((power) => [...own(power), 0, 1] as const), ...both, [0, 0, 2 * k, 1]];
}

function multiply(character: Sparse, factor: Monomials, most: number): Sparse {
  const product = new Map<number, number>();
  let size = 0;
  for (const [packed, coefficient] of character) {
    const k = packed % 512;
    size += Math.abs(coefficient);
    for (const [x, y, t, c] of factor) {
      if (k + t > most) continue;
      // Packed exponents add like numbers, since none of them overflows.
      const key = packed + (x * 1024 + y) * 512 + t;
      product.set(key, (product.get(key) ?? 0) + c * coefficient);
    }
  }
  // Each of these terms, and no more than four of their sums in a spin.
  if (4 * size * factor.length >= 2 ** 53) for (const key of product.keys()) product.set(key, NaN);
  return product;
}

function projectDerivatives(lengths: readonly number[], most: number) {
  const side = 2 * most + 3;
  const layer = side * side;
  const series = new Float64Array((most + 1) * layer);
  series[(most + 1) * side + most + 1] = 1;
  const pass = (k: number, sign: 1 | -1) => {
    for (const shift of [k * side + k, k * side - k, -k * side + k, -k * side - k]) {
      if (sign === 1) divide(series, k * layer, shift, layer);
      else timesOneMinus(series, k * layer, shift, layer);
    }
  };
  // One cycle of length 1 is what 1/P takes away.
  const ones = lengths.filter((k) => k === 1).length;
  for (const k of lengths) if (k > 1 && k <= most) pass(k, 1);
  for (let one = 1; one < ones; one++) if (most > 0) pass(1, 1);
  // Nothing has been taken away so far: the largest is the largest there ever was. What follows adds at most 64 of them.
  const size = 64 * largestOf(series);
  if (ones === 0 && most > 0) pass(1, -1);
  const width = most + 1;
  const projected = new Float64Array(width * width * width);
  const at = (k: number, a: number, b: number) =>
    a > most + 1 || b > most + 1 ? 0 : (series[k * layer + (a + most + 1) * side + b + most + 1] ?? 0);
  for (let k = 0; k <= most; k++)
    for (let a = 0; a <= most; a++)
      for (let b = 0; b <= most; b++)
        projected[(k * width + a) * width + b] =
          at(k, a, b) - at(k, a + 2, b) - at(k, a, b + 2) + at(k, a + 2, b + 2);
  return { projected, size };
}

function largestOf(values: Iterable<number>): number {
  let largest = 0;
  for (const value of values) largest = Math.max(largest, Math.abs(value));
  return largest;
}

/** Divides by 1 − t^k a^{±k} b^{±k}, in place: exponents never leave the array, since |x|, |y| ≤ power of t. */
function divide(series: Float64Array, step: number, shift: number, layer: number): void {
  for (let index = step; index < series.length; index++) {
    const from = index - step - shift;
    // The neighbour lies in the layer of the lower power; outside of it there is nothing.
    if (Math.floor(from / layer) !== Math.floor(index / layer) - step / layer) continue;
    const value = series[from] ?? 0;
    if (value !== 0) series[index] = (series[index] ?? 0) + value;
  }
}

function timesOneMinus(series: Float64Array, step: number, shift: number, layer: number): void {
  for (let index = series.length - 1; index >= step; index--) {
    const from = index - step - shift;
    if (Math.floor(from / layer) !== Math.floor(index / layer) - step / layer) continue;
    const value = series[from] ?? 0;
    if (value !== 0) series[index] = (series[index] ?? 0) - value;
  }
}
