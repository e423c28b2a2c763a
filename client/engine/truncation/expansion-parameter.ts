/** Reads the expansion parameter Q: a number with or without uncertainty, or from the scales of the premises. */
import type { Problem } from "../evaluation.ts";
import { sigmaOf, unitText } from "../notation/quantity.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import type { ScaleRole, Theory } from "../premises/theory.ts";

export interface ExpansionParameter {
  readonly value: number;
  /** Standard uncertainty; uncertainties are propagated to first order. */
  readonly sigma: number;
  /** The expression as read; "Q" when it is a bare number. */
  readonly latex: string;
}
export type ReadExpansionParameter =
  | { readonly ok: true; readonly q: ExpansionParameter }
  | { readonly ok: false; readonly problems: readonly Problem[] };

const nothing: Declared = { lookUp: () => null, symbols: [] };

/**
 * @param text "0.3", "0.30(5)", "p/Lambda", "max(p, m)/Lambda"; "" is the probe scale over the heavy scale
 * Problems, all at the field q: those of `readQuantity`, and `q-needs-premises`, `q-needs-roles`,
 * `scale-has-no-number`, `q-has-units`, `q-not-positive`.
 */
export function readExpansionParameter(text: string, theory: Theory | null): ReadExpansionParameter {
  const typed = text.trim() === "" ? ratioOfRoles(theory) : text;
  if (typeof typed !== "string") return { ok: false, problems: [typed] };
  const reading = readQuantity(typed, theory ? declaredScales(theory) : nothing, "q");
  if (!reading.ok) {
    const { code, facts } = reading.failure;
    const isNameless = code === "unknown-symbol" && theory === null;
    return refuse(isNameless ? "q-needs-premises" : code, { text: typed, ...facts });
  }
  const { quantity, latex } = reading.value;
  if (quantity.energy.sign() !== 0) return refuse("q-has-units", { text: typed, unit: unitText(quantity) });
  if (!(quantity.value > 0)) return refuse("q-not-positive", { value: quantity.value });
  const isNumber = quantity.exact !== null && !/[A-Za-z\\]/.test(typed.replace(/\\pm|\d[eE][+-]?\d/g, ""));
  // Uncertainties that cancel leave a rest of rounding, which is none.
  const sigma = sigmaOf(quantity) < 1e-13 * quantity.value ? 0 : sigmaOf(quantity);
  return { ok: true, q: { value: quantity.value, sigma, latex: isNumber ? "Q" : latex } };
}

function refuse(code: string, facts: Problem["facts"] = {}): ReadExpansionParameter {
  return { ok: false, problems: [problem(code, facts)] };
}
function problem(code: string, facts: Problem["facts"] = {}): Problem {
  return { code, path: ["q"], facts };
}

/** "p/Lambda" from the one probe and the one heavy scale. */
function ratioOfRoles(theory: Theory | null): string | Problem {
  if (!theory) return problem("q-needs-premises");
  const withRole = (role: ScaleRole) => theory.scales.filter((scale) => scale.role === role);
  const [probe, ...otherProbes] = withRole("probe");
  const [heavy, ...otherHeavy] = withRole("heavy");
  if (!probe || !heavy || otherProbes.length + otherHeavy.length > 0) return problem("q-needs-roles");
  return `${probe.symbol}/${heavy.symbol}`;
}
