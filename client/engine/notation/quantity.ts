/**
 * Values with units and uncertainty. Uncertainties are Gaussian and propagated to first order; each quantity knows
 * how much every independent source contributes, so what occurs twice stays correlated with itself.
 */
import { Rational } from "../exact/rational.ts";
import { boundedPower, digitsOf } from "./constant.ts";
import type { NotationFailure } from "./failure.ts";
import { unitNamed } from "./units.ts";

export interface Quantity {
  /** In GeV to the power `energy`. */
  readonly value: number;
  /** The same exactly where it is rational and short, else null. */
  readonly exact: Rational | null;
  readonly energy: Rational;
  /** By independent source: what one standard deviation of it does to `value`, signed. */
  readonly spread: ReadonlyMap<string, number>;
  /** Units as they were written, with their powers, for showing the result. */
  readonly units: ReadonlyMap<string, Rational>;
}

const MOST_EXACT_DIGITS = 300;
const none: ReadonlyMap<string, never> = new Map<string, never>();

function withExact(exact: Rational | null, value: number, rest: Omit<Quantity, "value" | "exact">): Quantity {
  const kept = exact && digitsOf(exact) <= MOST_EXACT_DIGITS ? exact : null;
  return { value: kept ? kept.toFloat() : value, exact: kept, ...rest };
}

/** An exact pure number. */
export function number(value: Rational): Quantity {
  return withExact(value, value.toFloat(), { energy: Rational.zero, spread: none, units: none });
}
/** An inexact pure number, such as π. */
export function float(value: number): Quantity {
  return { value, exact: null, energy: Rational.zero, spread: none, units: none };
}
/** A number with standard uncertainty from one source. */
export function measured(value: Rational, sigma: Rational, source: string): Quantity {
  return { ...number(value), spread: new Map(sigma.sign() === 0 ? [] : [[source, sigma.toFloat()]]) };
}
/** One of a unit, or null when there is no unit of that name. */
export function oneOf(unitName: string): Quantity | null {
  const unit = unitNamed(unitName);
  if (!unit) return null;
  const energy = Rational.of(unit.energy);
  return withExact(unit.exact, unit.size, {
    energy,
    spread: none,
    units: new Map([[unitName, Rational.one]]),
  });
}

function combine<T>(
  a: ReadonlyMap<string, T>,
  b: ReadonlyMap<string, T>,
  join: (x: T | undefined, y: T | undefined) => T | null,
): Map<string, T> {
  const result = new Map<string, T>();
  for (const key of new Set([...a.keys(), ...b.keys()])) {
    const joined = join(a.get(key), b.get(key));
    if (joined !== null) result.set(key, joined);
  }
  return result;
}

/** x + y, and exactly nothing where both cancel up to rounding: m/Λ · Λ/p does not depend on Λ. */
function sumOf(x: number, y: number): number | null {
  const sum = x + y;
  return Math.abs(sum) <= 1e-12 * (Math.abs(x) + Math.abs(y)) ? null : sum;
}

export function times(a: Quantity, b: Quantity): Quantity {
  return withExact(a.exact && b.exact && a.exact.times(b.exact), a.value * b.value, {
    energy: a.energy.plus(b.energy),
    spread: combine(a.spread, b.spread, (x = 0, y = 0) => sumOf(x * b.value, y * a.value)),
    units: combine(a.units, b.units, (x = Rational.zero, y = Rational.zero) => {
      const sum = x.plus(y);
      return sum.sign() === 0 ? null : sum;
    }),
  });
}

/** Fails with `division-by-zero`, `root-of-negative`, `number-too-large`. */
export function power(base: Quantity, exponent: Rational): Quantity | NotationFailure {
  if (base.value === 0 && exponent.sign() < 0) return { code: "division-by-zero", facts: {} };
  if (base.value < 0 && !exponent.isInteger()) return { code: "root-of-negative", facts: {} };
  const by = exponent.toFloat();
  const value = base.value ** by;
  if (!Number.isFinite(value)) return { code: "number-too-large", facts: {} };
  const slope = exponent.sign() === 0 ? 0 : by * base.value ** (by - 1);
  // √x at x = 0 has no finite slope: first-order propagation says nothing there.
  if (!Number.isFinite(slope) && base.spread.size > 0) return { code: "division-by-zero", facts: {} };
  return withExact(base.exact && boundedPower(base.exact, exponent), value, {
    energy: base.energy.times(exponent),
    spread: new Map([...base.spread].map(([source, share]) => [source, share * slope])),
    units:
      exponent.sign() === 0
        ? none
        : new Map([...base.units].map(([unit, had]) => [unit, had.times(exponent)])),
  });
}

/** a + sign·b. Fails with `units-differ` when one is an energy to another power than the other. */
export function plus(a: Quantity, b: Quantity, sign: 1 | -1): Quantity | NotationFailure {
  if (!a.energy.equals(b.energy)) {
    return {
      code: "units-differ",
      facts: { left: unitText(a) || "a pure number", right: unitText(b) || "a pure number" },
    };
  }
  const exact = a.exact && b.exact && a.exact.plus(sign === 1 ? b.exact : b.exact.negated());
  return withExact(exact, a.value + sign * b.value, {
    energy: a.energy,
    spread: combine(a.spread, b.spread, (x = 0, y = 0) => sumOf(x, sign * y)),
    units: a.units.size > 0 ? a.units : b.units,
  });
}

/** "a ± b": b is one standard deviation from a source of its own. */
export function blur(a: Quantity, b: Quantity, source: string): Quantity | NotationFailure {
  const same = plus(a, b, 1);
  if ("code" in same) return same;
  return { ...a, spread: combine(a.spread, new Map([[source, Math.abs(b.value)]]), (x = 0, y = 0) => x + y) };
}

/** One standard deviation, in GeV to the power `energy`. */
export function sigmaOf(quantity: Quantity): number {
  return Math.hypot(...quantity.spread.values());
}

export interface Shown {
  readonly value: number;
  readonly sigma: number;
  /** "TeV", "fm^-1", "GeV^2", "" for a pure number. */
  readonly unit: string;
  readonly spread: Readonly<Record<string, number>>;
}

/** In the unit it was written in where there is one such, else in powers of the first unit of energy, else of GeV. */
export function shown(quantity: Quantity): Shown {
  const { unit, size } = shownUnit(quantity);
  return {
    value: quantity.value / size,
    sigma: sigmaOf(quantity) / size,
    unit,
    spread: Object.fromEntries([...quantity.spread].map(([source, share]) => [source, share / size])),
  };
}
/** The unit that `shown` would choose. */
export function unitText(quantity: Quantity): string {
  return shownUnit(quantity).unit;
}

function shownUnit(quantity: Quantity): { readonly unit: string; readonly size: number } {
  if (quantity.energy.sign() === 0) return { unit: "", size: 1 };
  const written = [...quantity.units];
  const [only] = written;
  const energies = written.map(([name]) => unitNamed(name)).filter((unit) => unit?.energy === 1);
  const chosen = written.length === 1 && only ? unitNamed(only[0]) : (energies[0] ?? unitNamed("GeV"));
  if (!chosen) throw new Error("every written unit is a known one, and GeV is");
  const exponent = quantity.energy.times(Rational.of(chosen.energy));
  const suffix = exponent.equals(Rational.one)
    ? ""
    : exponent.isInteger()
      ? `^${exponent.toString()}`
      : `^(${exponent.toString()})`;
  return { unit: chosen.name + suffix, size: chosen.size ** exponent.toFloat() };
}
