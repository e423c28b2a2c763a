/** The expansion parameter along x: an expression in x and the scales of the premises, at any breakdown scale. */
import type { Problem } from "../evaluation.ts";
import { canonicalName } from "../notation/names.ts";
import { parse } from "../notation/parse.ts";
import { float, sigmaOf, unitText, type Quantity } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import type { ScaleRole, Theory } from "../premises/theory.ts";
import type { ExpansionParameter } from "./expansion-parameter.ts";

export interface ParameterAlong {
  /** Q at x, with the breakdown scale multiplied by `factor`. */
  at(x: number, factor?: number): number;
  /** With the uncertainty that the scales give it. */
  withSigma(x: number): ExpansionParameter;
  /** The scale that is estimated; null when Q names none. */
  readonly breakdown: BreakdownScale | null;
  /** Whether Q is exactly inverse to the breakdown scale, at every x. */
  readonly isInverse: boolean;
}
export interface BreakdownScale {
  readonly latex: string;
  /** As stated in the premises, in `unit`. */
  readonly stated: number;
  readonly unit: string;
  /** One `unit` in GeV to its power. */
  readonly unitSize: number;
  readonly quantity: Quantity;
}
export type ReadParameterAlong =
  | { readonly ok: true; readonly along: ParameterAlong }
  | { readonly ok: false; readonly problems: readonly Problem[] };

export interface AlongInputs {
  /** Expression for Q; "" is x over the heavy scale. */
  readonly q: string;
  /** Where its problems belong. */
  readonly path: Problem["path"];
  /** What x is called in it. */
  readonly variable: string;
  readonly xUnit: string;
  /** Symbol of the scale to estimate; "" is the heavy scale when there is one. */
  readonly breakdown: string;
  /** Points at which Q must be a positive number. */
  readonly x: readonly number[];
}

const none: Declared = { lookUp: () => null, symbols: [] };

/**
 * @example readParameterAlong({ q: "max(p, m)/Lambda", variable: "p", xUnit: "MeV", breakdown: "Lambda", … }, theory)
 * Problems: those of `readQuantity`; `variable-unreadable`, `x-unit-unreadable`, `q-needs-heavy`, `q-needs-premises`,
 * `q-has-units`, `q-not-positive-at`, `breakdown-unknown`, `scale-has-no-number`.
 */
export function readParameterAlong(inputs: AlongInputs, theory: Theory | null): ReadParameterAlong {
  const { path, variable } = inputs;
  const refuse = (code: string, facts: Problem["facts"] = {}, where = path): ReadParameterAlong => ({
    ok: false,
    problems: [{ code, path: where, facts }],
  });
  const name = readSymbol(variable);
  if (!name.ok) return refuse("variable-unreadable", { text: variable }, ["variable"]);
  const xUnit = unitOf(inputs.xUnit);
  if (!xUnit) return refuse("x-unit-unreadable", { text: inputs.xUnit }, ["data"]);
  const scales = theory ? declaredScales(theory) : none;
  const heavy = theory?.scales.filter(({ role }) => role === ("heavy" satisfies ScaleRole)) ?? [];
  const [onlyHeavy] = heavy.length === 1 ? heavy : [];
  const typed = inputs.q.trim() === "" ? onlyHeavy && `${variable}/${onlyHeavy.symbol}` : inputs.q;
  if (typed === undefined) return refuse(theory ? "q-needs-heavy" : "q-needs-premises");

  const symbol = inputs.breakdown.trim() === "" ? onlyHeavy?.symbol : symbolOf(inputs.breakdown);
  const found = symbol === undefined ? null : scales.lookUp(symbol);
  if (symbol === undefined || !found || "code" in found) {
    if (inputs.breakdown.trim() !== "")
      return refuse("breakdown-unknown", { text: inputs.breakdown }, ["breakdown"]);
  }
  const breakdown = found && !("code" in found) ? found : null;
  const read = (x: number, factor: number, exactScales: boolean) => {
    const declared: Declared = {
      symbols: [...scales.symbols, name.value.symbol],
      lookUp: (wanted) => {
        if (wanted === name.value.symbol) return { ...xUnit, value: x * xUnit.value, exact: null };
        const scale = wanted === symbol && breakdown ? times(breakdown, factor) : scales.lookUp(wanted);
        return exactScales || !scale || "code" in scale ? scale : { ...scale, spread: new Map() };
      },
    };
    return readQuantity(typed, declared, "q");
  };

  for (const x of inputs.x) {
    const reading = read(x, 1, false);
    if (!reading.ok) {
      const { code, facts } = reading.failure;
      const nameless = code === "unknown-symbol" && theory === null;
      return refuse(nameless ? "q-needs-premises" : code, { text: typed, ...facts });
    }
    const { quantity } = reading.value;
    if (quantity.energy.sign() !== 0) return refuse("q-has-units", { text: typed, unit: unitText(quantity) });
    if (!(quantity.value > 0)) return refuse("q-not-positive-at", { value: quantity.value, x });
  }
  const valueAt = (x: number, factor: number) => {
    const reading = read(x, factor, false);
    return reading.ok ? reading.value.quantity.value : NaN;
  };
  const probes = [inputs.x[0], inputs.x[Math.floor(inputs.x.length / 2)], inputs.x.at(-1)];
  const movesBy = (factor: number) => probes.map((x = NaN) => (valueAt(x, factor) / valueAt(x, 1)) * factor);
  const isInverse = [0.6, 1.7].every((factor) => movesBy(factor).every((one) => Math.abs(one - 1) < 1e-9));
  const depends = movesBy(1.7).some((one) => Math.abs(one - 1.7) > 1e-9);
  const alongEvery = (x: number) => read(x, 1, true);
  return {
    ok: true,
    along: {
      at: (x, factor = 1) => valueAt(x, factor),
      withSigma: (x) => {
        const reading = alongEvery(x);
        const latex = reading.ok ? reading.value.latex : "Q";
        if (!reading.ok) return { value: NaN, sigma: 0, latex };
        const { quantity } = reading.value;
        const sigma = sigmaOf(quantity) < 1e-13 * quantity.value ? 0 : sigmaOf(quantity);
        return { value: quantity.value, sigma, latex };
      },
      breakdown: breakdown && depends && symbol !== undefined ? describe(breakdown, symbol) : null,
      isInverse,
    },
  };
}

function times(quantity: Quantity, factor: number): Quantity {
  return { ...quantity, value: quantity.value * factor, exact: null };
}

/** One of a unit that a table names; a pure number for "". */
function unitOf(text: string): Quantity | null {
  if (text.trim() === "") return float(1);
  const reading = readQuantity(`1 ${text}`, none, "unit");
  return reading.ok ? reading.value.quantity : null;
}

function symbolOf(text: string): string | undefined {
  const tree = parse(text, { quantities: true });
  return tree.ok && tree.value.type === "name" ? canonicalName(tree.value.name) : undefined;
}

function describe(quantity: Quantity, symbol: string): BreakdownScale {
  const unit = unitText(quantity);
  const unitSize = unitOf(unit)?.value ?? 1;
  const name = readSymbol(symbol);
  return {
    latex: name.ok ? name.value.latex : symbol,
    stated: quantity.value / unitSize,
    unit,
    unitSize,
    quantity,
  };
}
