/** Reads the small parameters and the rules; without typed ones, those of the published counting that was chosen. */
import type { Problem } from "../evaluation.ts";
import { LinearForm } from "../exact/linear-form.ts";
import { readLinearForm } from "../notation/read-linear-form.ts";
import type { Quantity } from "../notation/quantity.ts";
import { readQuantity } from "../notation/read-quantity.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import type { Theory } from "../premises/theory.ts";
import { followsOf, type Follows } from "./follows.ts";
import type { CountingInputs, RuleSubject } from "./inputs.ts";
import type { PresetName } from "./preset-names.ts";
import { presetNamed, proposalOf, type Proposal, type RuleRow } from "./presets.ts";
import type { Weights } from "./weights.ts";

export interface Parameter {
  readonly id: string;
  readonly symbol: string;
  readonly latex: string;
  /** Null when it has no number. */
  readonly quantity: Quantity | null;
}
export interface Rules {
  readonly parameters: readonly Parameter[];
  /** By symbol of the field; `others` is the rule without a symbol. */
  readonly fields: ReadonlyMap<string, Weights>;
  readonly otherFields: Weights | null;
  readonly derivative: Weights | null;
  readonly timeDerivative: Weights | null;
  /** Couplings and scales; what has no rule, nor a rule without a symbol, counts nothing. */
  readonly symbols: ReadonlyMap<string, Weights>;
  readonly otherSymbols: Weights | null;
  readonly measure: Weights | null;
  /** Of ∫ d^d p; minus the measure unless a rule says otherwise. */
  readonly loop: Weights | null;
  /** By row id of the term. */
  readonly exceptions: ReadonlyMap<string, Weights>;
  readonly offset: Weights;
  /** By id of a parameter: its powers of the probe and heavy scale, where it is a power of them. */
  readonly follows: ReadonlyMap<string, Follows>;
  readonly preset: PresetName;
  /** Rows of the published counting, in as many parameters as there are. */
  readonly proposal: Proposal;
  /** Whether rules were typed that are not those of the published counting. */
  readonly isEdited: boolean;
}

export const MOST_PARAMETERS = 4;

/**
 * Problems: those of the notation, `weight-count`, `parameter-not-small`, `parameter-twice`, `parameters-too-many`,
 * `parameters-too-few`, `rule-twice`,
 * `rule-symbol-unknown`, `rule-symbol-needless`, `exception-unknown`, `parameter-not-a-number`.
 */
export function readRules(inputs: CountingInputs, theory: Theory, problems: Problem[]): Rules {
  const preset = presetNamed(inputs.preset);
  const published = proposalOf(preset, theory);
  const typed = inputs.rules.filter(({ weight, symbol }) => weight.trim() !== "" || symbol.trim() !== "");
  const named = withIds(published.parameters);
  const parameters = readParameters(inputs, named, theory, problems);
  const follows = followsOf(inputs.parameters.length === 0 ? named : inputs.parameters, theory);
  const proposal = { ...published, rules: fitted(published, parameters.length) };
  const proposed = withIds(proposal.rules);
  if (typed.length === 0 && parameters.length < published.parameters.length)
    problems.push({
      code: "parameters-too-few",
      path: ["parameters"],
      facts: {
        wanted: published.parameters.length,
        symbols: published.parameters.map(({ symbol }) => symbol).join(", "),
      },
    });
  const weightsAt = (text: string, path: readonly string[]) =>
    readWeights(text, parameters.length, theory, path, problems);
  const rules = readTable(typed.length === 0 ? proposed : typed, theory, weightsAt, problems);
  const exceptions = new Map<string, Weights>();
  for (const { id, term, weight } of inputs.exceptions) {
    if (term === "") continue;
    const path = ["exceptions", id, "weight"];
    if (!theory.terms.some(({ rowId }) => rowId === term)) {
      problems.push({ code: "exception-unknown", path: ["exceptions", id, "term"], facts: {} });
      continue;
    }
    const read = weightsAt(weight, path);
    if (read) exceptions.set(term, read);
  }
  const offset = inputs.offset.trim() === "" ? null : weightsAt(inputs.offset, ["offset"]);
  const none = parameters.map(() => LinearForm.zero);
  const isEdited = typed.length > 0 && !sameRows(typed, proposed);
  return { parameters, ...rules, follows, exceptions, offset: offset ?? none, preset, proposal, isEdited };
}

/** Rows of the published counting, with ids of their own. */
function withIds<Row>(rows: readonly Row[]) {
  return rows.map((row, index) => ({ id: `p${String(index + 1)}`, ...row }));
}

/** Published rules say nothing of parameters that were added, so what they name counts 0 there. */
function fitted({ rules }: Proposal, parameters: number): readonly RuleRow[] {
  return rules.map((rule) => {
    const exponents = rule.weight.split(", ");
    const weight = Array.from({ length: parameters }, (_, index) => exponents[index] ?? "0").join(", ");
    return { ...rule, weight };
  });
}

type RuleRows = readonly (RuleRow & { readonly id: string })[];
function sameRows(typed: RuleRows | CountingInputs["rules"], proposed: RuleRows): boolean {
  const text = ({ of, symbol, weight }: { of: string; symbol: string; weight: string }) =>
    `${of}|${symbol.trim()}|${weight.replaceAll(" ", "")}`;
  const known = new Set(proposed.map(text));
  return typed.length === proposed.length && typed.every((row) => known.has(text(row)));
}

function readParameters(
  inputs: CountingInputs,
  proposed: CountingInputs["parameters"] | readonly { id: string; symbol: string; value: string }[],
  theory: Theory,
  problems: Problem[],
): readonly Parameter[] {
  const typed = inputs.parameters.filter(({ symbol, value }) => symbol.trim() !== "" || value.trim() !== "");
  const rows = typed.length === 0 ? proposed : typed;
  if (rows.length > MOST_PARAMETERS)
    problems.push({ code: "parameters-too-many", path: ["parameters"], facts: { most: MOST_PARAMETERS } });
  const seen = new Set<string>();
  return rows.slice(0, MOST_PARAMETERS).map(({ id, symbol, value }) => {
    const read = readSymbol(symbol);
    if (!read.ok)
      problems.push({
        code: read.failure.code,
        path: ["parameters", id, "symbol"],
        facts: { text: symbol, ...read.failure.facts },
      });
    const name = read.ok ? read.value.symbol : symbol;
    if (seen.has(name))
      problems.push({ code: "parameter-twice", path: ["parameters", id, "symbol"], facts: { symbol: name } });
    seen.add(name);
    return {
      id,
      symbol: name,
      latex: read.ok ? read.value.latex : "\\lambda",
      quantity: readValue(value, id, theory, problems),
    };
  });
}

function readValue(text: string, id: string, theory: Theory, problems: Problem[]): Quantity | null {
  if (text.trim() === "") return null;
  const path = ["parameters", id, "value"];
  const read = readQuantity(text, declaredScales(theory), id);
  if (!read.ok) {
    problems.push({ code: read.failure.code, path, facts: { text, ...read.failure.facts } });
    return null;
  }
  const { quantity } = read.value;
  if (quantity.energy.sign() !== 0) {
    problems.push({ code: "parameter-not-a-number", path, facts: { text } });
    return null;
  }
  if (!(quantity.value > 0 && quantity.value < 1)) {
    problems.push({
      code: "parameter-not-small",
      path,
      facts: { value: Number(quantity.value.toPrecision(3)) },
    });
    return null;
  }
  return quantity;
}

/** Dimension symbols as the premises have them: their number, or themselves. */
function dimensionSymbols({ spacetime }: Theory): ReadonlyMap<string, LinearForm> {
  return spacetime.geometry === "isotropic"
    ? new Map([["d", spacetime.d]])
    : new Map([
        ["D", spacetime.D],
        ["z", spacetime.z],
      ]);
}

function readWeights(
  text: string,
  parameters: number,
  theory: Theory,
  path: readonly string[],
  problems: Problem[],
): Weights | null {
  const parts = text.split(",");
  if (text.trim() === "" || parts.length !== parameters) {
    problems.push({
      code: "weight-count",
      path,
      facts: { found: text.trim() === "" ? 0 : parts.length, wanted: parameters },
    });
    return null;
  }
  const symbols = dimensionSymbols(theory);
  const weights: LinearForm[] = [];
  for (const part of parts) {
    const read = readLinearForm(part, symbols);
    if (read.ok) weights.push(read.value);
    else {
      problems.push({ code: read.failure.code, path, facts: { text: part, ...read.failure.facts } });
      return null;
    }
  }
  return weights;
}

type Table = Omit<
  Rules,
  "parameters" | "follows" | "exceptions" | "offset" | "preset" | "proposal" | "isEdited"
>;

function readTable(
  rows: RuleRows | CountingInputs["rules"],
  theory: Theory,
  weightsAt: (text: string, path: readonly string[]) => Weights | null,
  problems: Problem[],
): Table {
  const fields = new Map<string, Weights>();
  const symbols = new Map<string, Weights>();
  const single = new Map<string, Weights>();
  const seen = new Set<string>();
  for (const { id, of, symbol, weight } of rows) {
    const at = (column: string) => ["rules", id, column];
    const named = of === "field" || of === "coupling or scale";
    const typed = symbol.trim();
    if (!named && typed !== "")
      problems.push({ code: "rule-symbol-needless", path: at("symbol"), facts: { text: typed, of } });
    const name = typed === "" ? "" : canonical(typed);
    if (named && name === null) {
      problems.push({ code: "symbol-unreadable", path: at("symbol"), facts: { text: typed } });
      continue;
    }
    if (named && name !== null && name !== "" && !isKnown(name, of, theory)) {
      problems.push({ code: "rule-symbol-unknown", path: at("symbol"), facts: { text: typed, of } });
      continue;
    }
    const key = `${of} ${named ? (name ?? "") : ""}`;
    if (seen.has(key)) {
      problems.push({ code: "rule-twice", path: at("of"), facts: { of, text: typed } });
      continue;
    }
    seen.add(key);
    const weights = weightsAt(weight, at("weight"));
    if (!weights) continue;
    if (of === "field" && name !== null && name !== "") fields.set(name, weights);
    else if (of === "coupling or scale" && name !== null && name !== "") symbols.set(name, weights);
    else single.set(of, weights);
  }
  const measure = single.get("measure") ?? null;
  return {
    fields,
    otherFields: single.get("field") ?? null,
    derivative: single.get("derivative") ?? null,
    timeDerivative: single.get("time derivative") ?? single.get("derivative") ?? null,
    symbols,
    otherSymbols: single.get("coupling or scale") ?? null,
    measure,
    loop: single.get("loop") ?? (measure && measure.map((one) => one.times(-1))),
  };
}

/** Whether the premises have it: a field, or what stands in a coefficient or among the scales. */
function isKnown(name: string, of: RuleSubject, { fields, scales, terms }: Theory): boolean {
  return of === "field"
    ? fields.some(({ symbol }) => symbol === name)
    : scales.some(({ symbol }) => symbol === name) ||
        terms.some(({ monomial }) => monomial.coefficients.some(({ symbol }) => symbol === name));
}

function canonical(text: string): string | null {
  const read = readSymbol(text);
  return read.ok ? read.value.symbol : null;
}
