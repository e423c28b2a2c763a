/** Finds the probe and the heavy scale, and the expansion parameter they make. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { power, shown, sigmaOf, times, unitText, type Quantity } from "../notation/quantity.ts";
import { readQuantity } from "../notation/read-quantity.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import type { Theory } from "../premises/theory.ts";
import type { OrderPlanInputs } from "./inputs.ts";

export interface PlanScaleRead {
  readonly quantity: Quantity;
  readonly latex: string;
  /** In the unit it was given in. */
  readonly value: number;
  readonly sigma: number;
  readonly unit: string;
}
export interface PlanScales {
  readonly probe: PlanScaleRead;
  readonly heavy: PlanScaleRead;
  /** Q = p/Λ with its uncertainty; a scale that occurs in both stays correlated with itself. */
  readonly Q: number;
  readonly sigmaQ: number;
}

/** @returns null when something is wrong; then it is among the problems. */
export function readScales(inputs: OrderPlanInputs, theory: Theory, problems: Problem[]): PlanScales | null {
  const probe = readScale("probe", inputs.probe, theory, problems);
  const heavy = readScale("heavy", inputs.heavy, theory, problems);
  if (!probe || !heavy) return null;
  const inverse = power(heavy.quantity, Rational.of(-1));
  const ratio = "code" in inverse ? null : times(probe.quantity, inverse);
  if (!ratio || ratio.energy.sign() !== 0) {
    const facts = { probe: probe.unit || "a pure number", heavy: heavy.unit || "a pure number" };
    problems.push({ code: "plan-scales-differ", path: ["probe"], facts });
    return null;
  }
  return { probe, heavy, Q: ratio.value, sigmaQ: sigmaOf(ratio) };
}

function readScale(
  role: "probe" | "heavy",
  typed: string,
  theory: Theory,
  problems: Problem[],
): PlanScaleRead | null {
  const wrong = (code: string, facts: Problem["facts"]): null => {
    problems.push({ code, path: [role], facts });
    return null;
  };
  const candidates = theory.scales.filter((scale) => scale.role === role);
  const [only, ...others] = candidates;
  if (typed.trim() === "" && others.length > 0)
    return wrong("plan-scale-ambiguous", {
      role,
      symbols: candidates.map(({ symbol }) => symbol).join(", "),
    });
  if (typed.trim() === "" && !only) return wrong("plan-scale-missing", { role });
  const text = typed.trim() === "" ? (only?.symbol ?? "") : typed;
  const read = readQuantity(text, declaredScales(theory), role);
  if (!read.ok) return wrong(read.failure.code, { text, ...read.failure.facts });
  const { quantity, latex } = read.value;
  if (!(quantity.value > 0)) return wrong("plan-scale-not-positive", { role, value: quantity.value });
  const { value, sigma } = shown(quantity);
  return {
    quantity,
    latex: isLiteral(text) ? (role === "probe" ? "p" : "\\Lambda") : latex,
    value,
    sigma,
    unit: unitText(quantity),
  };
}

/** "250 GeV" has no name of its own: it goes by the role's usual letter. */
function isLiteral(text: string): boolean {
  return /^\s*[\d.]/.test(text);
}
