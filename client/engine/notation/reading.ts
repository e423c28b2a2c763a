/** A monomial under construction, with the operations that reading a product needs. Immutable. */
import { Rational } from "../exact/rational.ts";
import { boundedPower, digitsOf, MOST_DIGITS } from "./constant.ts";
import type { NotationFailure } from "./failure.ts";
import type { Monomial } from "./monomial.ts";

export interface Reading {
  readonly prefactor: Rational;
  /** Power of i. */
  readonly phase: number;
  readonly coefficients: ReadonlyMap<string, Rational>;
  /** Legs by symbol: as written, and conjugated. */
  readonly fields: ReadonlyMap<string, { readonly straight: number; readonly conjugated: number }>;
  readonly derivatives: number;
  readonly timeDerivatives: number;
}
/** The code of a failure and its facts, to which the reader adds the place. */
export type Refusal = NotationFailure;

const LARGEST_FIELD_POWER = 1000;
const LARGEST_POWER = Rational.of(1000);
const half = Rational.of(1, 2);

export const unit: Reading = {
  prefactor: Rational.one,
  phase: 0,
  coefficients: new Map(),
  fields: new Map(),
  derivatives: 0,
  timeDerivatives: 0,
};

export function isNumber(reading: Reading): boolean {
  return !hasLegs(reading) && reading.coefficients.size === 0 && reading.phase === 0;
}
/** Whether fields or derivatives occur. */
export function hasLegs(reading: Reading): boolean {
  return reading.fields.size > 0 || reading.derivatives > 0 || reading.timeDerivatives > 0;
}

export function multiply(a: Reading, b: Reading): Reading | Refusal {
  const fields = new Map(a.fields);
  for (const [symbol, legs] of b.fields) {
    const had = fields.get(symbol) ?? { straight: 0, conjugated: 0 };
    fields.set(symbol, {
      straight: had.straight + legs.straight,
      conjugated: had.conjugated + legs.conjugated,
    });
  }
  const coefficients = new Map(a.coefficients);
  for (const [symbol, power] of b.coefficients) {
    const sum = power.plus(coefficients.get(symbol) ?? Rational.zero);
    if (sum.sign() === 0) coefficients.delete(symbol);
    else coefficients.set(symbol, sum);
  }
  return bounded({
    prefactor: a.prefactor.times(b.prefactor),
    phase: (a.phase + b.phase) % 4,
    coefficients,
    fields,
    derivatives: a.derivatives + b.derivatives,
    timeDerivatives: a.timeDerivatives + b.timeDerivatives,
  });
}

/** Refuses what is too large to be meant. */
function bounded(reading: Reading): Reading | Refusal {
  if (digitsOf(reading.prefactor) > MOST_DIGITS) return { code: "number-too-large", facts: {} };
  for (const [symbol, legs] of reading.fields)
    if (legs.straight + legs.conjugated > LARGEST_FIELD_POWER)
      return { code: "field-power-too-large", facts: { symbol, most: LARGEST_FIELD_POWER } };
  for (const [symbol, power] of reading.coefficients)
    if (power.absolute().compare(LARGEST_POWER) > 0)
      return { code: "power-too-large", facts: { symbol, most: 1000 } };
  if (reading.derivatives + reading.timeDerivatives > LARGEST_FIELD_POWER)
    return { code: "power-too-large", facts: { symbol: "∂", most: LARGEST_FIELD_POWER } };
  return reading;
}

/** reading^exponent; legs allow whole powers from zero up only. */
export function raise(reading: Reading, exponent: Rational): Reading | Refusal {
  if (hasLegs(reading)) {
    const symbol = [...reading.fields.keys()][0] ?? "∂";
    if (exponent.sign() < 0)
      return { code: "negative-field-power", facts: { symbol, power: exponent.toString() } };
    if (!exponent.isInteger())
      return { code: "fractional-field-power", facts: { symbol, power: exponent.toString() } };
    if (exponent.compare(LARGEST_POWER) > 0)
      return { code: "field-power-too-large", facts: { symbol, most: LARGEST_FIELD_POWER } };
  }
  const times = exponent.toFloat();
  const prefactor = raiseNumber(reading.prefactor, exponent);
  if ("code" in prefactor) return prefactor;
  let coefficients = new Map(
    [...reading.coefficients].map(([symbol, power]) => [symbol, power.times(exponent)] as const),
  );
  if (exponent.sign() === 0) coefficients = new Map();
  const raised: Reading = {
    prefactor: prefactor.exact,
    // The phase of a root is a matter of convention, and counting sees no phases.
    phase: exponent.isInteger() ? (((reading.phase * Number(exponent.numerator % 4n)) % 4) + 4) % 4 : 0,
    coefficients,
    fields: new Map(
      exponent.sign() === 0
        ? []
        : [...reading.fields].map(([symbol, legs]) => [
            symbol,
            { straight: legs.straight * times, conjugated: legs.conjugated * times },
          ]),
    ),
    derivatives: hasLegs(reading) ? reading.derivatives * times : 0,
    timeDerivatives: hasLegs(reading) ? reading.timeDerivatives * times : 0,
  };
  return multiply(raised, { ...unit, coefficients: prefactor.roots });
}

/** A rational to a rational power: exact where it is exact, else its numerator and denominator as coefficients. */
function raiseNumber(
  base: Rational,
  exponent: Rational,
): { exact: Rational; roots: ReadonlyMap<string, Rational> } | Refusal {
  if (base.sign() === 0 && exponent.sign() < 0) return { code: "division-by-zero", facts: {} };
  if (exponent.isInteger()) {
    const exact = boundedPower(base, exponent);
    return exact ? { exact, roots: new Map() } : { code: "number-too-large", facts: {} };
  }
  if (base.sign() < 0) return { code: "root-of-negative", facts: { text: base.toString() } };
  const squared = exponent.times(Rational.of(2));
  const root = squared.isInteger() ? squareRoot(base) : null;
  const exact = root && boundedPower(root, exponent.over(half));
  if (exact) return { exact, roots: new Map() };
  const roots = new Map<string, Rational>();
  if (base.numerator !== 1n) roots.set(String(base.numerator), exponent);
  if (base.denominator !== 1n) roots.set(String(base.denominator), exponent.negated());
  return { exact: Rational.one, roots };
}

function squareRoot(value: Rational): Rational | null {
  const over = wholeRoot(value.numerator);
  const under = wholeRoot(value.denominator);
  return over !== null && under !== null ? Rational.of(over, under) : null;
}
function wholeRoot(square: bigint): bigint | null {
  // Newton's iteration from above descends to the floor of the root.
  if (square < 2n) return square;
  let guess = 1n << BigInt(Math.ceil(square.toString(2).length / 2));
  for (let next = (guess + square / guess) / 2n; next < guess; next = (guess + square / guess) / 2n)
    guess = next;
  return guess * guess === square ? guess : null;
}

/** Every leg for its conjugate; `selfConjugate` fields stay. */
export function conjugate(reading: Reading, selfConjugate: (symbol: string) => boolean): Reading {
  const fields = new Map(
    [...reading.fields].map(([symbol, legs]) => [
      symbol,
      selfConjugate(symbol) ? legs : { straight: legs.conjugated, conjugated: legs.straight },
    ]),
  );
  return { ...reading, phase: (4 - reading.phase) % 4, fields };
}

/** The finished monomial: symbols in order of appearance, even powers of i folded into the sign. */
export function toMonomial(reading: Reading): Monomial {
  const coefficients = [...reading.coefficients].map(([symbol, power]) => ({ symbol, power }));
  if (reading.phase % 2 === 1) coefficients.unshift({ symbol: "i", power: Rational.one });
  return {
    prefactor: reading.phase >= 2 ? reading.prefactor.negated() : reading.prefactor,
    coefficients,
    fields: [...reading.fields].flatMap(([symbol, legs]) => [
      ...(legs.conjugated > 0 ? [{ symbol, conjugated: true, count: legs.conjugated }] : []),
      ...(legs.straight > 0 ? [{ symbol, conjugated: false, count: legs.straight }] : []),
    ]),
    derivatives: reading.derivatives,
    timeDerivatives: reading.timeDerivatives,
  };
}
