/**
 * Yukawa couplings as products of left-handed two-component spinors. A Dirac field is two of them, χ and η:
 * ψ̄ψ = ηχ + h.c.; a Majorana or Weyl field is one. Matrices of spin have been dropped by the notation, so couplings
 * count as scalar ones, of one phase.
 */
import type { Field, Theory, Term } from "../premises/theory.ts";
import type { Monomial } from "../notation/monomial.ts";
import type { Spinor, YukawaEntry } from "./model.ts";

type Leg = Monomial["fields"][number] & { readonly field: Field };

export function isSpinor({ kind }: Field): boolean {
  return kind === "Weyl spinor" || kind === "Majorana spinor" || kind === "Dirac spinor";
}

const left = (symbol: string) => symbol;
const right = (symbol: string) => `${symbol}^c`;

export function spinorsOf(theory: Theory, copies: ReadonlyMap<string, number>): readonly Spinor[] {
  return theory.fields.filter(isSpinor).flatMap(({ symbol, kind }) => {
    const own = { copies: copies.get(symbol) ?? 1 };
    return kind === "Dirac spinor"
      ? [
          { name: left(symbol), ...own },
          { name: right(symbol), ...own },
        ]
      : [{ name: left(symbol), ...own }];
  });
}

/** The entries of a term, or the reason why it is left out. */
export function readYukawa(
  monomial: Monomial,
  theory: Theory,
  terms: readonly Term[],
): readonly YukawaEntry[] | string {
  const legs = monomial.fields.flatMap((leg): Leg[] => {
    const field = theory.fields.find(({ symbol }) => symbol === leg.symbol);
    return field ? [{ ...leg, field }] : [];
  });
  const boson = legs.find(({ field }) => !isSpinor(field));
  const spinning = legs
    .filter(({ field }) => isSpinor(field))
    .flatMap((leg) => (leg.count === 2 ? [leg, leg] : [leg]));
  const [one, two] = spinning;
  if (!boson || !one || !two) return "it is no potential and no Yukawa coupling";
  if (one.field.kind !== two.field.kind) return "its two fermions are of different kinds";
  const real = boson.field.selfConjugate;
  const [straight, flipped] = real
    ? [boson.symbol, boson.symbol]
    : boson.conjugated
      ? [`${boson.symbol}*`, boson.symbol]
      : [boson.symbol, `${boson.symbol}*`];
  const entry = (name: string, first: string, second: string): YukawaEntry => ({
    boson: name,
    first,
    second,
    coefficient: monomial.prefactor,
  });
  const unique = (entries: readonly YukawaEntry[]) =>
    entries.filter(
      (own, index) =>
        !entries.slice(0, index).some((other) => other.boson === own.boson && samePair(other, own)),
    );
  if (one.field.kind === "Majorana spinor")
    return unique([straight, flipped].map((name) => entry(name, left(one.symbol), left(two.symbol))));
  if (one.field.kind === "Dirac spinor") {
    const bar = spinning.find(({ conjugated }) => conjugated);
    const plain = spinning.find(({ conjugated }) => !conjugated);
    if (!bar || !plain) return "its fermion number is not conserved";
    return unique([
      entry(straight, right(bar.symbol), left(plain.symbol)),
      entry(flipped, right(plain.symbol), left(bar.symbol)),
    ]);
  }
  return readWeyl(one, two, straight, flipped, entry, terms, theory);
}

function samePair(a: YukawaEntry, b: YukawaEntry): boolean {
  return (a.first === b.first && a.second === b.second) || (a.first === b.second && a.second === b.first);
}

/** A barred and a plain Weyl field in one product have opposite chirality; the right-handed one counts by its conjugate. */
function readWeyl(
  one: Leg,
  two: Leg,
  straight: string,
  flipped: string,
  entry: (name: string, first: string, second: string) => YukawaEntry,
  terms: readonly Term[],
  theory: Theory,
): readonly YukawaEntry[] | string {
  const chirality = chiralities(terms, theory);
  if (!chirality) return "its fermions cannot be given a chirality";
  if (one.conjugated !== two.conjugated && one.symbol === two.symbol)
    return "a spinor of one chirality makes no such scalar";
  const plain = one.conjugated ? two : one;
  // The product is one of left-handed spinors when its plain field is left-handed; else its conjugate is.
  const isLeft =
    one.conjugated && two.conjugated ? chirality.get(one.symbol) === -1 : chirality.get(plain.symbol) !== -1;
  return [entry(isLeft ? straight : flipped, one.symbol, two.symbol)];
}

/** 1 for left-handed, −1 for right-handed Weyl fields; null when the terms contradict each other. */
function chiralities(terms: readonly Term[], theory: Theory): ReadonlyMap<string, 1 | -1> | null {
  const isWeyl = (symbol: string) =>
    theory.fields.some((field) => field.symbol === symbol && field.kind === "Weyl spinor");
  const links = terms.flatMap(({ monomial }) => {
    const legs = monomial.fields.filter(({ symbol }) => isWeyl(symbol));
    const [a, b] = legs;
    if (!a || !b || legs.length !== 2 || monomial.derivatives > 0 || a.symbol === b.symbol) return [];
    return [{ a: a.symbol, b: b.symbol, opposite: a.conjugated !== b.conjugated }];
  });
  const found = new Map<string, 1 | -1>();
  for (const { symbol } of theory.fields.filter((field) => isWeyl(field.symbol))) {
    if (!found.has(symbol)) found.set(symbol, 1);
    for (let changed = true; changed;) {
      changed = false;
      for (const { a, b, opposite } of links)
        for (const [from, to] of [
          [a, b],
          [b, a],
        ] as const) {
          const known = found.get(from);
          if (known === undefined) continue;
          const wanted = opposite ? (known === 1 ? -1 : 1) : known;
          const had = found.get(to);
          if (had === undefined) {
            found.set(to, wanted);
            changed = true;
          } else if (had !== wanted) return null;
        }
    }
  }
  return found;
}
