/** What a plot is made of, and what of it is told in words, in a table and in a file. */
import { plain } from "./plot-scales.ts";

export interface Curve {
  readonly key: string;
  /** For the legend at the curve's end: plain text. */
  readonly label: string;
  readonly points: readonly (readonly [number, number])[];
  /** 0, 1, 2, …: the dashes or shapes that tell curves apart without colour. */
  readonly style: number;
  /** A token of the palette, without its dashes: "irrelevant". */
  readonly color: PlotColor;
  /** Joined by a line unless said otherwise; one point alone is always a mark. "levels" are short level strokes. */
  readonly draw?: "line" | "marks" | "levels";
  /** Of each point: half the length of its error bar, or null. */
  readonly errors?: readonly (number | null)[];
}
export type PlotColor = "ink" | "relevant" | "marginal" | "irrelevant" | "hairline" | "tick";

export interface Guide {
  readonly axis: "x" | "y";
  readonly value: number;
  readonly label: string;
  readonly color: PlotColor;
}

/** A range of values at each x; null where it is interrupted. */
export interface RangeBand {
  readonly key: string;
  /** What the range is: "68 %". */
  readonly label: string;
  /** The curve it belongs to, by its key; without one it belongs to all. */
  readonly of?: string;
  readonly points: readonly (RangePoint | null)[];
  readonly tone: "outer" | "inner" | "core";
  /** Drawn as boxes that reach so far to both sides of each x, instead of one outline. */
  readonly box?: number;
}
export interface RangePoint {
  readonly x: number;
  readonly low: number;
  readonly high: number;
}

export const plotFrame = { width: 340, height: 208, left: 46, right: 62, top: 22, bottom: 38 } as const;
const dashes = ["", "7 3", "3 2.5", "1.5 3", "9 3 1.5 3", "5 2 1.5 2 1.5 2"];

export function dashOf(style: number): string {
  return dashes[style % dashes.length] ?? "";
}

/** The paths of marks about their middle: a disc, a square, a triangle, a diamond. */
const marks = [
  "M-3.2,0a3.2,3.2 0 1,0 6.4,0a3.2,3.2 0 1,0 -6.4,0Z",
  "M-2.9,-2.9H2.9V2.9H-2.9Z",
  "M0,-3.7L3.5,2.7H-3.5Z",
  "M0,-4L4,0L0,4L-4,0Z",
];
export function markOf(style: number): string {
  return marks[style % marks.length] ?? "";
}

/** How numbers of a plot are written: the value at a tick, and one on a curve. */
export interface PlotWords {
  readonly x: (value: number) => string;
  readonly y: (value: number) => string;
}
export const plainWords: PlotWords = { x: plain, y: plain };

/** The bands that say something at a point of a curve. */
export function rangesAt(bands: readonly RangeBand[], curve: string, x: number) {
  return bands.flatMap((band) => {
    if (band.of !== undefined && band.of !== curve) return [];
    const point = band.points.find((one) => one?.x === x);
    return point ? [{ label: band.label, low: point.low, high: point.high }] : [];
  });
}

/** "p (MeV) 150; n = 4: 11.3; 68 % from 11.1 to 11.5". */
export function pointText(
  xLabel: string,
  curve: Curve,
  index: number,
  bands: readonly RangeBand[],
  words: PlotWords,
): string {
  const [at, value] = curve.points[index] ?? [NaN, NaN];
  const error = curve.errors?.[index] ?? null;
  const own = `${curve.label === "" ? "" : `${curve.label}: `}${words.y(value)}${error === null ? "" : ` ± ${words.y(error)}`}`;
  const ranges = rangesAt(bands, curve.key, at).map(
    ({ label, low, high }) => `${label} from ${words.y(low)} to ${words.y(high)}`,
  );
  return [`${xLabel} ${words.x(at)}`, own, ...ranges].join("; ");
}

export interface PlotTable {
  readonly heads: readonly string[];
  /** The x, then one entry for each head after the first; null where there is nothing. */
  readonly rows: readonly (readonly (number | null)[])[];
}

/** Every number of the plot, a row for each x. Two points of one curve at the same x stand in rows of their own. */
export function tableOf(xLabel: string, curves: readonly Curve[], bands: readonly RangeBand[]): PlotTable {
  const nameOf = (key: string | undefined) => curves.find((curve) => curve.key === key)?.label ?? "";
  const heads = [xLabel];
  const rows = new Map<string, (number | null)[]>();
  const put = (x: number, nth: number, values: readonly (number | null)[]) => {
    const key = `${x} ${nth}`;
    const row = rows.get(key) ?? [x];
    for (const [index, value] of values.entries()) row[heads.length + index] = value;
    rows.set(key, row);
  };
  const counted = () => {
    const seen = new Map<number, number>();
    return (x: number) => {
      const nth = seen.get(x) ?? 0;
      seen.set(x, nth + 1);
      return nth;
    };
  };
  for (const { label, points, errors } of curves) {
    const nth = counted();
    for (const [index, [x, value]] of points.entries())
      put(x, nth(x), errors ? [value, errors[index] ?? null] : [value]);
    heads.push(label === "" ? "value" : label, ...(errors ? [`error of ${label}`] : []));
  }
  for (const { label, of, points } of bands) {
    const nth = counted();
    for (const point of points) if (point) put(point.x, nth(point.x), [point.low, point.high]);
    const whose = nameOf(of) === "" ? label : `${nameOf(of)}, ${label}`;
    heads.push(`${whose}, from`, `${whose}, to`);
  }
  const filled = [...rows.values()].map((row) => heads.map((_, index) => row[index] ?? null));
  return { heads, rows: filled.sort((a, b) => (a[0] ?? 0) - (b[0] ?? 0)) };
}

/** Whether everything drawn is positive along an axis, so that it has a logarithm. */
export function isPositive(axis: "x" | "y", curves: readonly Curve[]): boolean {
  return curves.every(({ points }) => points.every(([x, y]) => (axis === "x" ? x : y) > 0));
}
