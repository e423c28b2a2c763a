/** Axes: a position for a number, ticks worth a label, and labels as people write them. */
import { scaleLinear, scaleLog } from "d3-scale";
import { superscript } from "#engine/notation/float-text.ts";

export interface AxisSpec {
  readonly label: string;
  readonly kind: "linear" | "log";
  readonly domain: readonly [number, number];
  /** Places with names, for an axis of things rather than numbers. */
  readonly ticks?: readonly { readonly value: number; readonly label: string }[];
}

export interface Axis {
  readonly kind: AxisSpec["kind"];
  readonly position: (value: number) => number;
  readonly ticks: readonly { readonly value: number; readonly label: string; readonly major: boolean }[];
  readonly domain: readonly [number, number];
}

/** At most about `count` labelled ticks. On a log axis whole powers of ten, or 1-2-5 steps over a short range. */
export function axisOf(spec: AxisSpec, range: readonly [number, number], count: number): Axis {
  if (spec.kind === "linear") {
    const scale = scaleLinear([...spec.domain], [...range]);
    const format = scale.tickFormat(count);
    return {
      kind: "linear",
      position: scale,
      domain: spec.domain,
      ticks: spec.ticks
        ? spec.ticks.map((tick) => ({ ...tick, major: false }))
        : scale.ticks(count).map((value) => ({ value, label: minus(format(value)), major: true })),
    };
  }
  const scale = scaleLog([...spec.domain], [...range]);
  return { kind: "log", position: scale, domain: spec.domain, ticks: logTicks(spec.domain, count) };
}

function logTicks([low, high]: readonly [number, number], count: number): Axis["ticks"] {
  const [first, last] = [Math.ceil(Math.log10(low) - 1e-9), Math.floor(Math.log10(high) + 1e-9)];
  const decades = last - first + 1;
  if (decades >= 3) {
    const step = Math.max(1, Math.ceil(decades / count));
    return Array.from({ length: decades }, (_, index) => {
      const power = first + index;
      return { value: 10 ** power, label: tenTo(power), major: (last - power) % step === 0 };
    }).map((tick) => (tick.major ? tick : { ...tick, label: "" }));
  }
  const ticks: { value: number; label: string; major: boolean }[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power++) {
    for (const digit of [1, 2, 3, 5]) {
      const value = digit * 10 ** power;
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9))
        ticks.push({ value, label: plain(value), major: true });
    }
  }
  return thinned(ticks, count);
}

function thinned(ticks: Axis["ticks"], count: number): Axis["ticks"] {
  const step = Math.ceil(ticks.length / Math.max(1, count));
  return ticks.map((tick, index) => (index % step === 0 ? tick : { ...tick, label: "" }));
}

/** "10⁻³". */
export function tenTo(power: number): string {
  return `10${superscript(String(power))}`;
}

/** "Q³", "Q^(3/2)". */
export function powerOf(symbol: string, exponent: string): string {
  return /^-?\d+$/.test(exponent) ? symbol + superscript(exponent) : `${symbol}^(${exponent})`;
}

/** A number as a label: short, with a power of ten where zeros would pile up. */
export function plain(value: number): string {
  if (value === 0) return "0";
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e5) return minus(String(Number(value.toPrecision(4))));
  const power = Math.floor(Math.log10(size));
  const digits = Number((value / 10 ** power).toPrecision(3));
  return digits === 1 ? tenTo(power) : `${minus(String(digits))}×${tenTo(power)}`;
}

function minus(text: string): string {
  return text.replace(/^-/, "−");
}
