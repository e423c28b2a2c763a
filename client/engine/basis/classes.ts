/** Which products of fields can hold an operator at all: by dimension, statistics, charges and N-ality. */
import { Rational } from "../exact/rational.ts";
import type { Content, Quantum } from "./content.ts";
import { doubledDimension } from "./lorentz-integral.ts";

/** How many of each quantum, in the order of `Content.quanta`. */
export interface FieldClass {
  readonly powers: readonly number[];
  /** Twice the mass dimension without derivatives. */
  readonly doubled: number;
  /** 2 when it stands for its conjugate as well, whose numbers are the same. */
  readonly counts: 1 | 2;
}

/** What must add up, as integers: each entry modulo its modulus, or exactly where that is 0. */
interface Ledger {
  readonly moduli: readonly number[];
  readonly of: readonly (readonly number[])[];
  /** For each entry, the sums an operator may have; null for any. */
  readonly allowed: readonly (ReadonlySet<number> | null)[];
}

export function doubledOf({ spin }: Quantum, d: number): number {
  return spin === "scalar" ? d - 2 : doubledDimension[spin];
}

/**
 * @param most twice the largest mass dimension
 * @param visit told of each; false ends the search
 */
export function fieldClasses(content: Content, most: number, visit: (found: FieldClass) => boolean): void {
  const { quanta, d } = content;
  const ledger = ledgerOf(content);
  const sizes = quanta.map((quantum) => doubledOf(quantum, d));
  const reach = reachable(ledger, sizes, most);
  const isSymmetric = isSymmetricUnderConjugation(content);
  const powers = quanta.map(() => 0);
  let goesOn = true;
  const descend = (at: number, doubled: number, sums: readonly number[]) => {
    const suffix = reach[at];
    // The least that the fields to come need to make these sums allowed.
    const needed = suffix === undefined ? Infinity : leastFor(suffix, sums, ledger);
    if (doubled + needed > most) return;
    if (at === quanta.length) {
      if (doubled === 0) return;
      const order = isSymmetric ? compareWithConjugate(powers, quanta) : 0;
      if (order >= 0) goesOn = visit({ powers: [...powers], doubled, counts: order === 0 ? 1 : 2 });
      return;
    }
    const size = sizes[at] ?? 1;
    let current = sums;
    for (let power = 0; goesOn && doubled + power * size <= most; power++) {
      powers[at] = power;
      descend(at + 1, doubled + power * size, current);
      current = plus(current, ledger.of[at] ?? [], ledger.moduli);
    }
    powers[at] = 0;
  };
  descend(
    0,
    0,
    ledger.moduli.map(() => 0),
  );
}

/** Filters such as B = 1 keep a class and not its conjugate: then each is looked at by itself. */
function isSymmetricUnderConjugation({ charges }: Content): boolean {
  return charges.every(
    ({ kept, modulo }) =>
      kept === null ||
      kept.every((value) =>
        kept.some((other) => {
          const sum = value.plus(other);
          return modulo === null ? sum.sign() === 0 : sum.over(Rational.of(modulo)).isInteger();
        }),
      ),
  );
}

function ledgerOf({ quanta, gauge, charges }: Content): Ledger {
  // Charges become integers by their common denominator.
  const scales = charges.map(({ kept }, index) =>
    [...quanta.map((quantum) => quantum.charges[index]), ...(kept ?? [])].reduce(
      (lcm, charge) => leastCommon(lcm, Number(charge?.denominator ?? 1n)),
      1,
    ),
  );
  const whole = (value: { numerator: bigint; denominator: bigint } | undefined, scale: number) =>
    value === undefined ? 0 : Number((value.numerator * BigInt(scale)) / value.denominator);
  return {
    moduli: [
      2,
      ...gauge.map(({ n }) => n),
      ...charges.map(({ modulo }, at) => (modulo ?? 0) * (scales[at] ?? 1)),
    ],
    of: quanta.map((quantum) => [
      quantum.isFermion ? 1 : 0,
      ...quantum.representations.map(({ nality }) => nality),
      ...quantum.charges.map((charge, index) => whole(charge, scales[index] ?? 1)),
    ]),
    allowed: [
      new Set([0]),
      ...gauge.map(() => new Set([0])),
      ...charges.map(({ kept, modulo }, index) => {
        const scale = scales[index] ?? 1;
        if (kept === null) return null;
        return new Set(kept.map((value) => reduced(whole(value, scale), (modulo ?? 0) * scale)));
      }),
    ],
  };
}

function plus(
  sums: readonly number[],
  more: readonly number[],
  moduli: readonly number[],
): readonly number[] {
  return sums.map((sum, index) => reduced(sum + (more[index] ?? 0), moduli[index] ?? 0));
}
function reduced(value: number, modulus: number): number {
  return modulus === 0 ? value : ((value % modulus) + modulus) % modulus;
}
function leastCommon(a: number, b: number): number {
  let [x, y] = [a, b];
  while (y !== 0) [x, y] = [y, x % y];
  return (a / x) * b;
}

/** For the fields from each index on: every sum they can make, with the least dimension it takes. */
function reachable(
  ledger: Ledger,
  sizes: readonly number[],
  most: number,
): readonly ReadonlyMap<string, number>[] {
  const start = ledger.moduli.map(() => 0).join(",");
  const suffixes: ReadonlyMap<string, number>[] = [new Map([[start, 0]])];
  for (let at = sizes.length - 1; at >= 0; at--) {
    const size = sizes[at] ?? 1;
    const sums = new Map(suffixes[0]);
    let layer: ReadonlyMap<string, number> = sums;
    while (layer.size > 0) {
      const next = new Map<string, number>();
      for (const [text, least] of layer) {
        if (least + size > most) continue;
        const sum = plus(text.split(",").map(Number), ledger.of[at] ?? [], ledger.moduli).join(",");
        if ((sums.get(sum) ?? Infinity) <= least + size) continue;
        sums.set(sum, least + size);
        next.set(sum, least + size);
      }
      layer = next;
    }
    suffixes.unshift(sums);
  }
  return suffixes;
}

const remembered = new WeakMap<ReadonlyMap<string, number>, Map<string, number>>();

function leastFor(suffix: ReadonlyMap<string, number>, sums: readonly number[], ledger: Ledger): number {
  const known = remembered.get(suffix) ?? new Map<string, number>();
  remembered.set(suffix, known);
  const key = sums.join(",");
  const found = known.get(key);
  if (found !== undefined) return found;
  let least = Infinity;
  for (const [text, size] of suffix) {
    if (size >= least) continue;
    const total = plus(text.split(",").map(Number), sums, ledger.moduli);
    if (total.every((sum, index) => ledger.allowed[index]?.has(sum) ?? true)) least = size;
  }
  known.set(key, least);
  return least;
}

/** Positive when this class comes before its conjugate in the order of powers, 0 when it is its own conjugate. */
function compareWithConjugate(powers: readonly number[], quanta: readonly Quantum[]): number {
  for (const [index, power] of powers.entries()) {
    const difference = power - (powers[quanta[index]?.conjugate ?? index] ?? 0);
    if (difference !== 0) return difference;
  }
  return 0;
}
