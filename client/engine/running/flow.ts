/** Runs all couplings of a block between its scales, from threshold to threshold. */
import type { Theory } from "../premises/theory.ts";
import { quantityOfScale } from "../premises/declared-scales.ts";
import { gaugeCoefficients, type GaugeCoefficients, type GaugeGroup, type Matter } from "./gauge.ts";
import { integrate, type Flow } from "./integrate.ts";
import type { Parameter } from "./model.ts";
import type { Polynomial } from "./polynomial.ts";
import type { RunningScales } from "./read-scales.ts";

export interface RunningSystem {
  readonly parameters: readonly {
    readonly parameter: Parameter;
    readonly slope: Polynomial;
    readonly start: number;
  }[];
  /** Names and numbers of scales that stand in slopes and do not run. */
  readonly constants: ReadonlyMap<string, number>;
  readonly groups: readonly (GaugeGroup & { readonly alpha: number })[];
  readonly matter: readonly Matter[];
  readonly gaugeLoops: 1 | 2;
}
export interface RunningResult {
  /** ln μ/μ₀ of each wanted scale and the state there: parameters, then α of the groups; null from a pole on. */
  readonly states: readonly (readonly number[] | null)[];
  readonly pole: { readonly scale: number; readonly component: number } | null;
  readonly thresholds: readonly { readonly scale: number; readonly names: readonly string[] }[];
}

const SIXTEEN_PI_SQUARED = 16 * Math.PI ** 2;

/** Those parameters whose slopes stand on numbers only: starts of all couplings in them and constants of all scales. */
export function runnable(
  parameters: readonly Parameter[],
  slopes: readonly Polynomial[],
  starts: ReadonlyMap<string, number>,
  theory: Theory | null,
): Pick<RunningSystem, "parameters" | "constants"> {
  const constants = new Map<string, number>([["pi", Math.PI]]);
  for (const scale of theory?.scales ?? []) {
    const quantity = quantityOfScale(scale);
    if (quantity) constants.set(scale.symbol, quantity.value);
  }
  let kept = parameters.flatMap((parameter, index) => {
    const start = starts.get(parameter.id);
    const slope = slopes[index];
    return start === undefined || !slope ? [] : [{ parameter, slope, start }];
  });
  for (let before = -1; before !== kept.length;) {
    before = kept.length;
    const known = new Set([...constants.keys(), ...kept.map(({ parameter }) => parameter.variable)]);
    kept = kept.filter(({ slope }) => [...slope.variables()].every((name) => known.has(name)));
  }
  return { parameters: kept, constants };
}

/** Slopes of parameters and α with respect to ln μ. */
function flowOf(system: RunningSystem, gauge: GaugeCoefficients): Flow {
  const count = system.parameters.length;
  const constants = [...system.constants];
  const order = [
    ...system.parameters.map(({ parameter }) => parameter.variable),
    ...constants.map(([name]) => name),
  ];
  const slopes = system.parameters.map(({ slope }) => slope.compile(order));
  const numbers = constants.map(([, value]) => value);
  const beta0 = gauge.beta0.map((one) => one.toFloat());
  const beta1 = gauge.beta1.map((row) => row.map((one) => one.toFloat()));
  return {
    sizes: [
      ...system.parameters.map(({ parameter, start }) =>
        parameter.energy.sign() === 0 ? Math.max(1, Math.abs(start)) : Math.abs(start) || 1,
      ),
      ...system.groups.map(() => 1),
    ],
    derivative: (y) => {
      const values = [...y.slice(0, count), ...numbers];
      const alphas = y.slice(count);
      return [
        ...slopes.map((slope) => slope(values) / SIXTEEN_PI_SQUARED),
        ...alphas.map((alpha, i) => {
          const second =
            system.gaugeLoops === 1
              ? 0
              : alphas.reduce((sum, other, j) => sum + ((beta1[i]?.[j] ?? 0) * other) / (4 * Math.PI), 0);
          return (-(alpha ** 2) / (2 * Math.PI)) * ((beta0[i] ?? 0) + second);
        }),
      ];
    },
  };
}

/** |β/g| of each dimensionless coupling at the first scale: at 1 or more, one loop says nothing. */
export function relativeSlopes(
  system: RunningSystem,
  scales: RunningScales,
): readonly { readonly latex: string; readonly size: number }[] {
  const matter = activeBetween(system.matter, scales.from, scales.from);
  const flow = flowOf(system, gaugeCoefficients(system.groups, matter));
  const start = startOf(system);
  const slopes = flow.derivative(start);
  const own = [
    ...system.parameters.map(({ parameter }) => ({
      latex: parameter.latex,
      counts: parameter.energy.sign() === 0 && parameter.legs <= 4,
    })),
    ...system.groups.map(({ latex }) => ({ latex, counts: true })),
  ];
  // A coupling next to zero may be driven by others; against 4π it is the drive that counts.
  return own.flatMap(({ latex, counts }, index) =>
    counts
      ? [{ latex, size: Math.abs((slopes[index] ?? 0) / Math.max(Math.abs(start[index] ?? 0), 1)) }]
      : [],
  );
}

function startOf({ parameters, groups }: RunningSystem): readonly number[] {
  return [...parameters.map(({ start }) => start), ...groups.map(({ alpha }) => alpha)];
}
function activeBetween(matter: readonly Matter[], low: number, high: number): readonly Matter[] {
  const middle = Math.sqrt(low * high);
  return matter.filter(({ mass }) => mass === null || mass <= middle * (1 + 1e-12));
}

/** `wanted` lies between the ends, in the order of travel. */
export function run(system: RunningSystem, scales: RunningScales, wanted: readonly number[]): RunningResult {
  const { from, to } = scales;
  const [low, high] = [Math.min(from, to), Math.max(from, to)];
  const masses = [
    ...new Set(
      system.matter.flatMap(({ mass }) => (mass !== null && mass > low && mass < high ? [mass] : [])),
    ),
  ];
  const ordered = masses.sort((a, b) => (from < to ? a - b : b - a));
  const corners = [from, ...ordered, to];
  const isForward = from < to;
  const states: (readonly number[] | null)[] = [];
  let state = startOf(system);
  let pole: RunningResult["pole"] = null;
  for (let leg = 0; leg + 1 < corners.length && !pole; leg++) {
    const [here = from, there = to] = [corners[leg], corners[leg + 1]];
    const flow = flowOf(system, gaugeCoefficients(system.groups, activeBetween(system.matter, here, there)));
    const inside = wanted
      .slice(states.length)
      .filter((scale) => (isForward ? scale <= there : scale >= there) || leg + 2 === corners.length);
    const ts = inside.map((scale) => Math.log(scale / from));
    const path = integrate(flow, state, Math.log(here / from), Math.log(there / from), ts);
    states.push(...path.states);
    if (path.pole) pole = { scale: from * Math.exp(path.pole.t), component: path.pole.component };
    else if (path.end) state = path.end;
  }
  return {
    states: [...states, ...wanted.slice(states.length).map(() => null)],
    pole,
    thresholds: ordered.map((scale) => ({
      scale,
      names: system.matter.filter(({ mass }) => mass === scale).map(({ name }) => name),
    })),
  };
}
