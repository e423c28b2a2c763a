/**
 * Numbers of independent operators by field content and derivatives, modulo integration by parts and equations of
 * motion, from the Hilbert series (Henning, Lu, Melia, Murayama 2015, 2017) taken apart by cycle types: a power of a
 * field is a sum over partitions, and every integral depends only on which representations occur at which powers.
 */
import type { Progress } from "../kind.ts";
import { Rational } from "../exact/rational.ts";
import { fieldClasses, type FieldClass } from "./classes.ts";
import type { Content, Quantum } from "./content.ts";
import { cycleTypes, factorial } from "./cycle-types.ts";
import { FlavourPolynomial } from "./flavour-polynomial.ts";
import { GaugeIntegral } from "./gauge-integral.ts";
import { LorentzIntegral } from "./lorentz-integral.ts";
import { OrthogonalIntegral } from "./orthogonal-integral.ts";
import type { Representation } from "./representations.ts";
import { ScalarIntegral } from "./scalar-integral.ts";

export interface CountedClass extends FieldClass {
  /** By number of derivatives, those that are not zero. For one of the conjugate pair. */
  readonly numbers: readonly { readonly derivatives: number; readonly number: FlavourPolynomial }[];
}

/** Float64 is exact below; a class whose terms add up to more is done again in big integers. */
const EXACT_BELOW = 2 ** 53;

/**
 * @param least, most twice the mass dimension, inclusive; the count is complete above the dimension of spacetime only
 * @param tell told how far it is, once per class
 */
export function countOperators(
  content: Content,
  least: number,
  most: number,
  tell: (progress: Progress) => void,
): readonly CountedClass[] {
  const classes: FieldClass[] = [];
  fieldClasses(content, most, (found) => classes.push(found) > 0);
  const counter = new Counter(content, most);
  // Rising dimension, so that progress means something.
  classes.sort((a, b) => a.doubled - b.doubled);
  return classes.flatMap((found, index) => {
    tell({ done: index, of: classes.length, part: `fields of dimension ${found.doubled / 2}` });
    const numbers = counter
      .count(found)
      .map((number, derivatives) => ({ derivatives, number }))
      // At and below the dimension of spacetime these are no counts.
      .filter(({ derivatives, number }) => found.doubled + 2 * derivatives >= least && !number.isZero());
    for (const { number } of numbers) assertWhole(number);
    return numbers.length === 0 ? [] : [{ ...found, numbers }];
  });
}

/** Where the cycles of one quantum are written down: one number of a multiset for each integral. */
interface Entries {
  readonly others: number;
  readonly scalars: number;
  readonly gauge: readonly number[];
  readonly vectors: readonly number[];
}

/** One product of cycle types: its weight, and the same by its factors for when the weight is too large to be exact. */
interface Term {
  readonly weight: number;
  /** Valid until the next term. */
  readonly factors: readonly bigint[];
  readonly values: readonly number[];
  readonly flavourPower: number;
  readonly vector: Float64Array;
}

class Counter {
  readonly #lorentz: LorentzIntegral;
  readonly #scalarIntegral: ScalarIntegral | null;
  readonly #gauge: readonly GaugeIntegral[];
  /** For each gauge group, of each representation its place among the different ones. */
  readonly #numbers: readonly ReadonlyMap<Representation, number>[];
  readonly #orthogonal: readonly OrthogonalIntegral[];

  constructor(
    private readonly content: Content,
    private readonly most: number,
  ) {
    const { quanta, d, withParity } = content;
    this.#lorentz = new LorentzIntegral(most);
    const isUsual = d === 4 && !withParity && !quanta.some(({ pseudoscalar }) => pseudoscalar);
    this.#scalarIntegral = isUsual
      ? null
      : new ScalarIntegral(d, withParity, (quanta) => Math.floor((most - quanta * (d - 2)) / 2));
    const different = content.gauge.map((_, index) => distinct(quanta, index));
    this.#numbers = different.map(
      (all, index) =>
        new Map(
          quanta.flatMap(({ representations }) => {
            const own = representations[index];
            return own ? [[own, all.findIndex(({ name }) => name === own.name)] as const] : [];
          }),
        ),
    );
    this.#gauge = content.gauge.map(({ n }, index) => new GaugeIntegral(n, different[index] ?? []));
    this.#orthogonal = content.orthogonal.map(({ n }) => new OrthogonalIntegral(n));
  }

  /** By number of derivatives. */
  count(found: FieldClass): FlavourPolynomial[] {
    const derivatives = Math.floor((this.most - found.doubled) / 2) + 1;
    const sums = this.#sum(found, derivatives);
    const arrangements = found.powers.reduce((product, power) => product * factorial(power), 1n);
    return Array.from({ length: derivatives }, (_, k) =>
      FlavourPolynomial.of(sums.map((byDerivatives) => Rational.of(byDerivatives[k] ?? 0n, arrangements))),
    );
  }

  /** Sums [power of n_f][derivatives] before the division by Π n_i!. */
  #sum(found: FieldClass, derivatives: number): bigint[][] {
    const floats: Float64Array[] = [];
    let largest = 0;
    this.#terms(found, ({ weight, flavourPower, vector }) => {
      const sums = (floats[flavourPower] ??= new Float64Array(derivatives));
      let size = 0;
      for (let k = 0; k < derivatives; k++) {
        const term = weight * (vector[k] ?? 0);
        sums[k] = (sums[k] ?? 0) + term;
        size = Math.max(size, Math.abs(term));
      }
      largest += size;
    });
    if (largest < EXACT_BELOW)
      return Array.from(floats, (sums: Float64Array | undefined) =>
        Array.from(sums ?? [], (sum) => BigInt(sum)),
      );
    const exact: bigint[][] = [];
    this.#terms(found, ({ factors, values, flavourPower, vector }) => {
      const sums = (exact[flavourPower] ??= Array.from({ length: derivatives }, () => 0n));
      const weight = [...factors, ...values.map(BigInt)].reduce((product, factor) => product * factor, 1n);
      for (let k = 0; k < derivatives; k++) sums[k] = (sums[k] ?? 0n) + weight * BigInt(vector[k] ?? 0);
    });
    return Array.from(exact, (sums: bigint[] | undefined) => sums ?? []);
  }

  /** Every choice of a cycle type for each power. */
  #terms({ powers }: FieldClass, note: (term: Term) => void): void {
    const { quanta } = this.content;
    const factors: bigint[] = [];
    const descend = (at: number, weight: number, flavourPower: number, entries: Entries) => {
      if (at === quanta.length) {
        const values = [
          ...this.#gauge.map((gauge, index) => gauge.value(entries.gauge[index] ?? 0)),
          ...this.#orthogonal.map((group, index) => group.value(entries.vectors[index] ?? 0)),
        ];
        if (values.includes(0)) return;
        const vector =
          this.#scalarIntegral?.value(entries.scalars) ??
          this.#lorentz.value(entries.others, entries.scalars);
        note({
          weight: values.reduce((product, value) => product * value, weight),
          factors,
          values,
          flavourPower,
          vector,
        });
        return;
      }
      const power = powers[at] ?? 0;
      const quantum = quanta[at];
      if (power === 0 || !quantum) return descend(at + 1, weight, flavourPower, entries);
      for (const { cycles, permutations } of cycleTypes(power)) {
        const sign = quantum.isFermion && (power - cycles.length) % 2 === 1 ? -1n : 1n;
        const copies =
          quantum.flavours === "symbolic" ? 1n : BigInt(quantum.flavours) ** BigInt(cycles.length);
        const factor = sign * copies * permutations;
        factors.push(factor);
        descend(
          at + 1,
          weight * Number(factor),
          flavourPower + (quantum.flavours === "symbolic" ? cycles.length : 0),
          this.#enter(entries, quantum, cycles),
        );
        factors.pop();
      }
    };
    descend(0, 1, 0, {
      others: 0,
      scalars: 0,
      gauge: this.#gauge.map(() => 0),
      vectors: this.#orthogonal.map(() => 0),
    });
  }

  #enter(entries: Entries, quantum: Quantum, cycles: readonly number[]): Entries {
    let { others, scalars } = entries;
    const gauge = [...entries.gauge];
    const vectors = [...entries.vectors];
    for (const k of cycles) {
      if (quantum.spin !== "scalar")
        others = this.#lorentz.others.add(others, this.#lorentz.element(quantum.spin, k));
      else if (this.#scalarIntegral)
        scalars = this.#scalarIntegral.cycles.add(
          scalars,
          this.#scalarIntegral.element(quantum.pseudoscalar, k),
        );
      else scalars = this.#lorentz.scalars.add(scalars, k);
      for (const [index, integral] of this.#gauge.entries()) {
        const representation = quantum.representations[index];
        if (!representation || representation.dimension === 1) continue;
        const number = this.#numbers[index]?.get(representation) ?? 0;
        gauge[index] = integral.multisets.add(gauge[index] ?? 0, integral.element(number, k));
      }
      for (const [index, group] of this.#orthogonal.entries())
        if (quantum.vectors[index]) vectors[index] = group.multisets.add(vectors[index] ?? 0, k);
    }
    return { others, scalars, gauge, vectors };
  }
}

function distinct(quanta: readonly Quantum[], index: number): readonly Representation[] {
  const found = new Map<string, Representation>();
  for (const { representations } of quanta) {
    const representation = representations[index];
    if (representation) found.set(representation.name, representation);
  }
  return [...found.values()];
}

/** A count that is no count, for any number of flavours, is a mistake of ours. */
function assertWhole(polynomial: FlavourPolynomial): void {
  for (let flavours = 0; flavours <= polynomial.degree() + 1; flavours++) {
    const value = polynomial.at(flavours);
    if (!value.isInteger() || value.sign() < 0)
      throw new Error(`${polynomial.toString()} operators cannot be, at n_f = ${flavours}`);
  }
}
