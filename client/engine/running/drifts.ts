/** Which way a marginal coupling goes: what splits "marginal" into marginally relevant and marginally irrelevant. */
import type { RunningContext } from "./evaluate.ts";
import type { Parameter } from "./model.ts";
import type { Polynomial } from "./polynomial.ts";
import type { TermDrift } from "./value.ts";

/**
 * By the sign of β/g at the values given. Without values, couplings count as positive, and a drift is told only where
 * every part of β has one sign.
 */
export function driftsOf(
  { model, betas }: RunningContext,
  starts: ReadonlyMap<string, number>,
): readonly TermDrift[] {
  return model.parameters.flatMap((parameter, index) => {
    const slope = betas?.slopes[index];
    if (!slope || parameter.energy.sign() !== 0) return [];
    const drift = driftOf(parameter, slope, model.parameters, starts);
    return parameter.rowIds.map((rowId) => ({ rowId, drift }));
  });
}

function driftOf(
  parameter: Parameter,
  slope: Polynomial,
  parameters: readonly Parameter[],
  starts: ReadonlyMap<string, number>,
): TermDrift["drift"] {
  if (slope.isZero()) return "stays";
  const order = parameters.map(({ variable }) => variable);
  const values = parameters.map(({ id }) => starts.get(id));
  const isKnown = [...slope.variables()].every((name) => values[order.indexOf(name)] !== undefined);
  const own = starts.get(parameter.id);
  if (isKnown && own !== undefined && own !== 0)
    return signed(slope.compile(order)(values.map((value) => value ?? 0)) / own);
  const signs = new Set(slope.parts().map(({ coefficient }) => coefficient.sign()));
  const [sign, ...others] = signs;
  return sign === undefined || others.length > 0 ? null : signed(sign);
}

function signed(value: number): TermDrift["drift"] {
  return value > 0 ? "grows with energy" : value < 0 ? "fades with energy" : "stays";
}
