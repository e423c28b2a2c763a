/** What a Truncation error block gives along x; all numbers are floats of 12 digits. */
import type { Density } from "./density.ts";
import type { Finding } from "./findings.ts";
import type { Method, Omitted } from "./shape.ts";

/** A density with the prior limits and the stated value it belongs to. */
export interface DrawnDensity extends Density {
  readonly unit: string;
}

/** Lists have one entry for each drawn x; null where there is none. */
export interface CurveValue {
  /** What x is called, in LaTeX. */
  readonly variable: string;
  readonly xUnit: string;
  /** The x at which the methods stand side by side. */
  readonly at: number;
  readonly count: number;
  /** At most 120 of the points, evenly spread. */
  readonly x: readonly number[];
  readonly q: readonly (number | null)[];
  readonly orders: readonly {
    readonly order: number;
    readonly used: boolean;
    readonly values: readonly (number | null)[];
    readonly coefficients: readonly (number | null)[];
  }[];
  /** Every method after the last order, and the highlighted one after each. */
  readonly bands: readonly BandAlong[];
  readonly measured: readonly { readonly x: number; readonly value: number; readonly error: number | null }[];
  /** How many measured values lie in the intervals of the highlighted method, by order and degree of belief. */
  readonly covered: readonly Covered[];
  /** One standard deviation of the coefficients; null when there are none. */
  readonly spread: number | null;
  readonly correlated: CorrelatedValue | null;
}

export interface Covered {
  readonly order: number;
  readonly degree: string;
  readonly inside: number;
  readonly count: number;
}

export interface BandAlong {
  readonly method: Method;
  readonly omitted: Omitted;
  readonly degree: string | null;
  readonly order: number;
  readonly halfWidths: readonly (number | null)[];
}

export interface CorrelatedValue {
  /** How many of the points were fitted, and how far apart they are. */
  readonly points: number;
  readonly spacing: number;
  /** The length scale used for the bands and checks. */
  readonly length: number;
  /** Its posterior; null when it was given. */
  readonly lengthPosterior: DrawnDensity | null;
  readonly breakdown: {
    readonly latex: string;
    readonly stated: number;
    readonly posterior: DrawnDensity;
    /** Of each observable alone, on the same grid, by name; empty for one observable. */
    readonly alone: readonly { readonly name: string; readonly density: readonly number[] }[];
  } | null;
  readonly nu: number;
  readonly tau2: number;
  readonly nugget: number;
  readonly condition: number;
  readonly checks: {
    readonly x: readonly number[];
    readonly beliefs: readonly number[];
    readonly coverage: readonly {
      readonly order: number;
      readonly next: number;
      readonly inside: readonly number[];
      readonly expected: readonly (readonly [number, number])[];
    }[];
    readonly orders: readonly {
      readonly order: number;
      readonly distance: number;
      readonly tail: number;
      readonly expected: readonly [number, number];
      readonly pivoted: readonly number[];
      readonly pivotedLimit: number;
    }[];
  };
  readonly findings: readonly Finding[];
}
