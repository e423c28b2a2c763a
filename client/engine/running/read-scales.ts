/** The scales of a Running block and the values its couplings start from. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { readPlainName } from "../notation/rename.ts";
import { canonicalName } from "../notation/names.ts";
import { number, power, shown, times, type Quantity } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import { quantityOfScale } from "../premises/declared-scales.ts";
import type { Theory } from "../premises/theory.ts";
import type { RunningInputs } from "./inputs.ts";
import type { Parameter } from "./model.ts";

export interface RunningScales {
  /** In GeV, or pure numbers. */
  readonly from: number;
  readonly to: number;
  /** By row. */
  readonly at: readonly { readonly id: string; readonly value: number }[];
  /** Of the first scale: "TeV", and its size in GeV. */
  readonly unit: { readonly name: string; readonly size: number };
  /** Whether scales are energies rather than pure numbers. */
  readonly energies: boolean;
  readonly latex: { readonly from: string; readonly to: string };
}

/**
 * Problems: those of the notation, `scale-not-positive`, `units-differ`, `running-scales-same`. Null without both ends.
 */
export function readScales(
  inputs: RunningInputs,
  theory: Theory | null,
  declared: Declared,
  problems: Problem[],
): RunningScales | null {
  const read = (text: string, path: Problem["path"]): Quantity | null => {
    const reading = readQuantity(text, declared, path.join("/"));
    if (!reading.ok) {
      problems.push({ code: reading.failure.code, path, facts: reading.failure.facts });
      return null;
    }
    if (reading.value.quantity.value > 0) return reading.value.quantity;
    problems.push({ code: "scale-not-positive", path, facts: { symbol: text.trim() } });
    return null;
  };
  const end = (field: "from" | "to"): Quantity | null => {
    if (inputs[field].trim() !== "") return read(inputs[field], [field]);
    const scales = theory?.scales.filter(({ role }) => role === (field === "from" ? "heavy" : "probe")) ?? [];
    const [only] = scales;
    return only && scales.length === 1 ? quantityOfScale(only) : null;
  };
  const [from, to] = [end("from"), end("to")];
  if (!from || !to) return null;
  const isAlike = (one: Quantity, path: Problem["path"]) => {
    if (one.energy.equals(from.energy)) return true;
    const name = (quantity: Quantity) => shown(quantity).unit || "a pure number";
    problems.push({ code: "units-differ", path, facts: { left: name(from), right: name(one), offset: 0 } });
    return false;
  };
  if (!isAlike(to, ["to"])) return null;
  if (from.value === to.value) {
    problems.push({ code: "running-scales-same", path: ["to"], facts: {} });
    return null;
  }
  const at = inputs.at.flatMap(({ id, scale }) => {
    if (scale.trim() === "") return [];
    const quantity = read(scale, ["at", id, "scale"]);
    return quantity && isAlike(quantity, ["at", id, "scale"]) ? [{ id, value: quantity.value }] : [];
  });
  const [low, high] = [Math.min(from.value, to.value), Math.max(from.value, to.value)];
  const inside = at.filter(({ id, value }) => {
    if (value >= low && value <= high) return true;
    problems.push({ code: "running-scale-outside", path: ["at", id, "scale"], facts: {} });
    return false;
  });
  const written = shown(from);
  return {
    from: from.value,
    to: to.value,
    at: inside,
    unit: { name: written.unit, size: from.value / written.value },
    energies: from.energy.sign() !== 0,
    latex: { from: scaleLatex(inputs.from, theory, "\\mu_0"), to: scaleLatex(inputs.to, theory, "\\mu") },
  };
}

function scaleLatex(text: string, theory: Theory | null, usual: string): string {
  return theory?.scales.find(({ symbol }) => symbol === text.trim())?.latex ?? usual;
}

/** "m ^2" and "lambda*v" as identifiers of parameters; null when it is no product of names with whole powers. */
export function parameterId(typed: string): string | null {
  const pieces = typed.trim().split(/(?:\s*\*\s*|\s+)(?!\^)/);
  const names = pieces.map((piece) => {
    const [, base = "", power = "1"] = /^(.*?)(?:\s*\^\s*\{?(-?\d+)\}?)?$/.exec(piece) ?? [];
    const name = readPlainName(base);
    return name === null ? null : canonicalName(name) + (power === "1" ? "" : `^${power}`);
  });
  return names.includes(null) || names.length === 0 ? null : names.sort().join(" ");
}

/**
 * Value of each parameter at the first scale, in GeV to its power, from the rows of the block, else from scales of the
 * premises. Problems: `running-coupling-unknown`, `running-coupling-twice`, `running-value-dimension`, of the notation.
 */
export function readStarts(
  inputs: RunningInputs,
  theory: Theory | null,
  parameters: readonly Parameter[],
  declared: Declared,
  energies: boolean,
  problems: Problem[],
): ReadonlyMap<string, number> {
  const starts = new Map<string, number>();
  for (const parameter of parameters) {
    const value = productOf(parameter, theory);
    if (value) starts.set(parameter.id, value.value);
  }
  const seen = new Set<string>();
  for (const row of inputs.values) {
    if (row.coupling.trim() === "" && row.value.trim() === "") continue;
    const refuse = (column: string, code: string, facts: Problem["facts"]) => {
      problems.push({ code, path: ["values", row.id, column], facts });
    };
    const id = parameterId(row.coupling);
    const parameter = parameters.find((one) => one.id === id);
    if (!parameter) {
      const known = parameters.map((one) => one.id).join(", ");
      refuse("coupling", "running-coupling-unknown", { text: row.coupling, known });
      continue;
    }
    if (seen.has(parameter.id)) {
      refuse("coupling", "running-coupling-twice", { text: row.coupling });
      continue;
    }
    seen.add(parameter.id);
    if (row.value.trim() === "") continue;
    const reading = readQuantity(row.value, declared, `values/${row.id}/value`);
    if (!reading.ok) {
      refuse("value", reading.failure.code, reading.failure.facts);
      continue;
    }
    const { quantity } = reading.value;
    const wanted = energies ? parameter.energy : Rational.zero;
    if (!quantity.energy.equals(wanted)) {
      refuse("value", "running-value-dimension", { text: row.value, power: wanted.toString() });
      continue;
    }
    starts.set(parameter.id, quantity.value);
  }
  return starts;
}

/** The parameter as a product of scales with numbers, or null. */
function productOf({ factors }: Parameter, theory: Theory | null): Quantity | null {
  return factors.reduce<Quantity | null>((product, factor) => {
    const scale = theory?.scales.find(({ symbol }) => symbol === factor.symbol);
    const quantity = scale ? quantityOfScale(scale) : null;
    const raised = quantity && power(quantity, factor.power);
    return product && raised && !("code" in raised) ? times(product, raised) : null;
  }, number(Rational.one));
}
