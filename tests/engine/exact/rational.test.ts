import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { Rational } from "#engine/exact/rational.ts";
import { rational, smallRational } from "./arbitraries.ts";

function holds<T extends readonly unknown[]>(
  arbitraries: { [K in keyof T]: fc.Arbitrary<T[K]> },
  law: (...values: T) => boolean,
): void {
  fc.assert(fc.property(fc.tuple(...arbitraries), (values) => law(...(values as unknown as T))));
}
const { zero, one } = Rational;

describe("rational numbers are a field", () => {
  it("adds and multiplies in any order and grouping", () => {
    holds(
      [rational, rational, rational],
      (a, b, c) =>
        a.plus(b).equals(b.plus(a)) &&
        a
          .plus(b)
          .plus(c)
          .equals(a.plus(b.plus(c))),
    );
    holds(
      [rational, rational, rational],
      (a, b, c) =>
        a.times(b).equals(b.times(a)) &&
        a
          .times(b)
          .times(c)
          .equals(a.times(b.times(c))),
    );
  });
  it("distributes, subtracts and divides back", () => {
    holds([rational, rational, rational], (a, b, c) =>
      a.times(b.plus(c)).equals(a.times(b).plus(a.times(c))),
    );
    holds([rational, rational], (a, b) => a.plus(b).minus(b).equals(a));
    holds([rational, rational], (a, b) => b.sign() === 0 || a.times(b).over(b).equals(a));
  });
  it("has 0 and 1", () => {
    holds(
      [rational],
      (a) => a.plus(zero).equals(a) && a.times(one).equals(a) && a.plus(a.negated()).equals(zero),
    );
  });
  it("is ordered as its differences are", () => {
    holds([rational, rational, rational], (a, b, c) => a.compare(b) === a.plus(c).compare(b.plus(c)));
    holds(
      [rational, rational],
      (a, b) => a.compare(b) === -b.compare(a) || (a.equals(b) && a.compare(b) === 0),
    );
  });
  it("has one form for each value", () => {
    holds(
      [rational, fc.bigInt({ min: 1n, max: 10n ** 9n })],
      (a, k) => Rational.of(a.numerator * k, a.denominator * k).toString() === a.toString(),
    );
    holds([rational], (a) => Rational.parse(a.toString())?.equals(a) === true);
  });
  it("raises to whole powers", () => {
    const exponent = fc.integer({ min: -8, max: 8 });
    holds(
      [smallRational, exponent, exponent],
      (a, m, n) =>
        a.sign() === 0 ||
        a
          .power(m)
          .times(a.power(n))
          .equals(a.power(m + n)),
    );
    expect(Rational.of(2, 3).power(-2).toString()).toBe("9/4");
  });
  it("floors to the integer not above", () => {
    holds([rational], (a) => {
      const floor = Rational.of(a.floor());
      return floor.compare(a) <= 0 && floor.plus(one).compare(a) > 0;
    });
  });
});

describe("reading a rational", () => {
  it.each([
    ["3", "3"],
    ["-3/2", "-3/2"],
    ["0.25", "1/4"],
    ["1.5e-3", "3/2000"],
    [".5", "1/2"],
    ["12345678901234567890123", "12345678901234567890123"],
    ["6/4", "3/2"],
  ])("%s is %s", (text, value) => expect(Rational.parse(text)?.toString()).toBe(value));
  it.each(["", "x", "1/0", "1//2", "1.2.3", "e5", "0x10", "1 2"])("%j is none", (text) =>
    expect(Rational.parse(text)).toBeNull(),
  );
});

describe("going to floating point", () => {
  it("agrees with division where that is exact", () => {
    holds(
      [fc.integer(), fc.integer({ min: 1, max: 2 ** 20 })],
      (n, m) => Rational.of(n, m).toFloat() === n / m,
    );
  });
  it("survives parts that overflow a double", () => {
    const huge = 10n ** 400n;
    expect(Rational.of(huge * 3n, huge * 2n + 1n).toFloat()).toBeCloseTo(1.5, 12);
  });
});
