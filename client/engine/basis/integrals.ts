/** The integrals of a count, by place: two multisets for the Lorentz group, then one for each other group. */
import type { Content, Quantum } from "./content.ts";
import { cycleTypes } from "./cycle-types.ts";
import { GaugeIntegral } from "./gauge-integral.ts";
import { LorentzIntegral } from "./lorentz-integral.ts";
import type { Multisets } from "./multisets.ts";
import { OrthogonalIntegral } from "./orthogonal-integral.ts";
import type { Representation } from "./representations.ts";
import { ScalarIntegral } from "./scalar-integral.ts";

/** Of one power of one quantum, a cycle type with all that does not depend on the integrals. */
export interface Choice {
  /** For each integral, the multiset of these cycles. */
  readonly multisets: readonly number[];
  /** Permutations of this type, times copies, with the sign of exchanged fermions. */
  readonly factor: bigint;
  /** The same as a float; above 2⁵³ it is not exact, and no sum with it is taken for exact. */
  readonly approximate: number;
  readonly flavourPower: number;
}

/** Places of the multisets that the Lorentz integral takes; those of the groups follow. */
const OTHERS = 0;
const SCALARS = 1;
const FIRST_GROUP = 2;

export class Integrals {
  readonly #lorentz: LorentzIntegral;
  readonly #scalarIntegral: ScalarIntegral | null;
  readonly #gauge: readonly GaugeIntegral[];
  /** For each gauge group, of each representation its place among the different ones. */
  readonly #numbers: readonly ReadonlyMap<Representation, number>[];
  readonly #orthogonal: readonly OrthogonalIntegral[];
  readonly #choices: (readonly Choice[])[][] = [];
  /** By place. */
  readonly multisets: readonly Multisets[];

  constructor(
    private readonly content: Content,
    most: number,
  ) {
    const { quanta, d, withParity } = content;
    this.#lorentz = new LorentzIntegral(most);
    const isUsual = d === 4 && !withParity && !quanta.some(({ pseudoscalar }) => pseudoscalar);
    this.#scalarIntegral = isUsual
      ? null
      : new ScalarIntegral(d, withParity, (count) => Math.floor((most - count * (d - 2)) / 2));
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
    this.multisets = [
      this.#lorentz.others,
      this.#scalarIntegral?.cycles ?? this.#lorentz.scalars,
      ...this.#gauge.map(({ multisets }) => multisets),
      ...this.#orthogonal.map(({ multisets }) => multisets),
    ];
  }

  /** The cycle types of a power of one quantum. */
  choices(at: number, power: number): readonly Choice[] {
    const ofQuantum = (this.#choices[at] ??= []);
    return (ofQuantum[power] ??= this.#choicesOf(this.content.quanta[at], power));
  }

  /** The integral over one group; NaN where a float is not known to hold it. */
  group(index: number, multiset: number): number {
    const gauge = this.#gauge[index];
    return gauge
      ? gauge.value(multiset)
      : (this.#orthogonal[index - this.#gauge.length]?.value(multiset) ?? 1);
  }

  exactGroup(index: number, multiset: number): bigint {
    const gauge = this.#gauge[index];
    return gauge ? gauge.exactValue(multiset) : BigInt(this.group(index, multiset));
  }

  get groups(): number {
    return this.#gauge.length + this.#orthogonal.length;
  }

  /** By number of derivatives. */
  vector(others: number, scalars: number): Float64Array {
    return this.#scalarIntegral?.value(scalars) ?? this.#lorentz.value(others, scalars);
  }

  exactVector(others: number, scalars: number): readonly bigint[] {
    return this.#scalarIntegral
      ? Array.from(this.#scalarIntegral.value(scalars), BigInt)
      : this.#lorentz.exactValue(others, scalars);
  }

  #choicesOf(quantum: Quantum | undefined, power: number): readonly Choice[] {
    if (!quantum) return [];
    const { flavours, isFermion } = quantum;
    return cycleTypes(power).map(({ cycles, permutations }) => {
      const sign = isFermion && (power - cycles.length) % 2 === 1 ? -1n : 1n;
      const copies = flavours === "symbolic" ? 1n : BigInt(flavours) ** BigInt(cycles.length);
      const factor = sign * copies * permutations;
      return {
        multisets: this.#enter(quantum, cycles),
        factor,
        approximate: Number(factor),
        flavourPower: flavours === "symbolic" ? cycles.length : 0,
      };
    });
  }

  #enter(quantum: Quantum, cycles: readonly number[]): readonly number[] {
    const found = this.multisets.map(({ empty }) => empty);
    const add = (place: number, element: number) => {
      found[place] = this.multisets[place]?.add(found[place] ?? 0, element) ?? 0;
    };
    for (const k of cycles) {
      if (quantum.spin !== "scalar") add(OTHERS, this.#lorentz.element(quantum.spin, k));
      else add(SCALARS, this.#scalarIntegral?.element(quantum.pseudoscalar, k) ?? k);
      for (const [index, integral] of this.#gauge.entries()) {
        const representation = quantum.representations[index];
        if (!representation || representation.dimension === 1) continue;
        add(FIRST_GROUP + index, integral.element(this.#numbers[index]?.get(representation) ?? 0, k));
      }
      for (const index of this.#orthogonal.keys())
        if (quantum.vectors[index]) add(FIRST_GROUP + this.#gauge.length + index, k);
    }
    return found;
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
