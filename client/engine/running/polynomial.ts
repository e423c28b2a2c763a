/** Polynomials with rational coefficients in named variables: potentials and β functions. Immutable. */
import { Rational } from "../exact/rational.ts";

export interface Part {
  readonly coefficient: Rational;
  /** Whole powers by variable, none zero, in the order of the names; negative for scales that stand below a line. */
  readonly powers: ReadonlyMap<string, number>;
}

function keyOf(powers: ReadonlyMap<string, number>): string {
  return [...powers].map(([name, power]) => `${name}^${power}`).join(" ");
}
function sorted(powers: Iterable<readonly [string, number]>): Map<string, number> {
  return new Map(
    [...powers].filter(([, power]) => power !== 0).sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)),
  );
}

export class Polynomial {
  static readonly zero = new Polynomial(new Map());
  private constructor(private readonly byKey: ReadonlyMap<string, Part>) {}

  static constant(value: Rational | number): Polynomial {
    return Polynomial.monomial(typeof value === "number" ? Rational.of(value) : value, []);
  }
  /** @example Polynomial.monomial(Rational.of(1, 24), [["phi", 4]]) // φ⁴/24 */
  static monomial(coefficient: Rational, powers: Iterable<readonly [string, number]>): Polynomial {
    if (coefficient.sign() === 0) return Polynomial.zero;
    const own = sorted(powers);
    return new Polynomial(new Map([[keyOf(own), { coefficient, powers: own }]]));
  }
  static variable(name: string): Polynomial {
    return Polynomial.monomial(Rational.one, [[name, 1]]);
  }
  static sum(polynomials: Iterable<Polynomial>): Polynomial {
    const byKey = new Map<string, Part>();
    for (const one of polynomials)
      for (const [key, part] of one.byKey) {
        const known = byKey.get(key);
        byKey.set(key, known ? { ...part, coefficient: known.coefficient.plus(part.coefficient) } : part);
      }
    return new Polynomial(new Map([...byKey].filter(([, { coefficient }]) => coefficient.sign() !== 0)));
  }

  parts(): readonly Part[] {
    return [...this.byKey.values()];
  }
  isZero(): boolean {
    return this.byKey.size === 0;
  }
  plus(other: Polynomial): Polynomial {
    return Polynomial.sum([this, other]);
  }
  minus(other: Polynomial): Polynomial {
    return this.plus(other.scaled(Rational.of(-1)));
  }
  scaled(by: Rational): Polynomial {
    return this.map(({ coefficient, powers }) => ({ coefficient: coefficient.times(by), powers }));
  }
  times(other: Polynomial): Polynomial {
    return Polynomial.sum(this.parts().map((part) => other.shifted(part)));
  }
  /** Times a single part. */
  shifted(by: Part): Polynomial {
    return this.map(({ coefficient, powers }) => {
      const joined = new Map(powers);
      for (const [name, power] of by.powers) joined.set(name, (joined.get(name) ?? 0) + power);
      return { coefficient: coefficient.times(by.coefficient), powers: sorted(joined) };
    });
  }
  derivative(name: string): Polynomial {
    return this.map(({ coefficient, powers }) => {
      const power = powers.get(name) ?? 0;
      return {
        coefficient: coefficient.times(Rational.of(power)),
        powers: sorted(new Map(powers).set(name, power - 1)),
      };
    });
  }
  /** Whether every part has this variable to an even power. */
  isEvenIn(name: string): boolean {
    return this.parts().every(({ powers }) => (powers.get(name) ?? 0) % 2 === 0);
  }
  equals(other: Polynomial): boolean {
    return this.minus(other).isZero();
  }
  variables(): ReadonlySet<string> {
    return new Set(this.parts().flatMap(({ powers }) => [...powers.keys()]));
  }
  /** By the part in `inner` variables: what stands before each of their products. */
  collect(
    isInner: (name: string) => boolean,
  ): ReadonlyMap<string, { readonly inner: Part; readonly rest: Polynomial }> {
    const groups = new Map<string, { inner: Part; rest: Polynomial[] }>();
    for (const { coefficient, powers } of this.parts()) {
      const own = sorted([...powers].filter(([name]) => isInner(name)));
      const rest = Polynomial.monomial(
        coefficient,
        [...powers].filter(([name]) => !isInner(name)),
      );
      const key = keyOf(own);
      const group = groups.get(key) ?? { inner: { coefficient: Rational.one, powers: own }, rest: [] };
      group.rest.push(rest);
      groups.set(key, group);
    }
    return new Map([...groups].map(([key, { inner, rest }]) => [key, { inner, rest: Polynomial.sum(rest) }]));
  }
  /** As a function of the variables in order; variables not among them must not occur. */
  compile(order: readonly string[]): (values: readonly number[]) => number {
    const parts = this.parts().map(({ coefficient, powers }) => ({
      coefficient: coefficient.toFloat(),
      factors: [...powers].map(([name, power]) => {
        const index = order.indexOf(name);
        if (index < 0) throw new Error(`no value for the variable ${name}`);
        return { index, power };
      }),
    }));
    return (values) =>
      parts.reduce(
        (sum, { coefficient, factors }) =>
          sum +
          factors.reduce(
            (product, { index, power }) => product * (values[index] ?? NaN) ** power,
            coefficient,
          ),
        0,
      );
  }
  private map(change: (part: Part) => Part): Polynomial {
    const byKey = new Map<string, Part>();
    for (const part of this.parts()) {
      const changed = change(part);
      if (changed.coefficient.sign() === 0) continue;
      const key = keyOf(changed.powers);
      const known = byKey.get(key);
      byKey.set(
        key,
        known ? { ...changed, coefficient: known.coefficient.plus(changed.coefficient) } : changed,
      );
    }
    return new Polynomial(new Map([...byKey].filter(([, { coefficient }]) => coefficient.sign() !== 0)));
  }
}
