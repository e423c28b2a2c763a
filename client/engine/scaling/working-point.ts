/** Probe scale, heavy scale and Q = p/Λ, from roles or as typed. */
import type { Notice, Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { power, times, unitText, type Quantity } from "../notation/quantity.ts";
import { readQuantity } from "../notation/read-quantity.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import { declaredScales, quantityOfScale } from "../premises/declared-scales.ts";
import type { Theory } from "../premises/theory.ts";

export interface Point {
  readonly latex: string;
  /** Canonical symbol when it is a scale of the premises. */
  readonly symbol: string | null;
  readonly quantity: Quantity | null;
}
export interface WorkingPoint {
  readonly probe: Point | null;
  readonly heavy: Point | null;
  /** Q = p/Λ; null unless both have numbers of the same dimension. */
  readonly expansion: Quantity | null;
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
}

/**
 * Problems: those of the notation, `role-ambiguous`, `scale-not-positive`, `units-differ`. Notices: `probe-missing`, `heavy-missing`,
 * `scale-has-no-number` (by role), `probe-above-heavy`.
 */
export function readWorkingPoint(
  theory: Theory,
  typed: { readonly probe: string; readonly heavy: string },
): WorkingPoint {
  const problems: Problem[] = [];
  const notices: Notice[] = [];
  const readPoint = (role: "probe" | "heavy"): Point | null => {
    const text = typed[role].trim();
    if (text === "") return byRole(theory, role, problems, notices);
    const reading = readQuantity(text, declaredScales(theory), role);
    const symbol = readSymbol(text);
    const scale = symbol.ok ? theory.scales.find((one) => one.symbol === symbol.value.symbol) : undefined;
    const usual = role === "probe" ? "p" : "\\Lambda";
    const point = { latex: scale?.latex ?? usual, symbol: scale?.symbol ?? null };
    if (reading.ok) return { ...point, quantity: reading.value.quantity };
    problems.push({ code: reading.failure.code, path: [role], facts: reading.failure.facts });
    return scale ? { ...point, quantity: null } : null;
  };
  const [probe, heavy] = [readPoint("probe"), readPoint("heavy")];
  for (const [role, point] of [["probe", probe] as const, ["heavy", heavy] as const])
    if (point?.quantity && !(point.quantity.value > 0))
      problems.push({ code: "scale-not-positive", path: [role], facts: { symbol: point.latex } });
  const numbers = probe?.quantity && heavy?.quantity ? { p: probe.quantity, heavy: heavy.quantity } : null;
  if (numbers && !numbers.p.energy.equals(numbers.heavy.energy)) {
    const facts = {
      left: unitText(numbers.p) || "a pure number",
      right: unitText(numbers.heavy) || "a pure number",
      offset: 0,
    };
    problems.push({ code: "units-differ", path: ["probe"], facts });
  }
  const inverse = numbers && problems.length === 0 ? power(numbers.heavy, Rational.of(-1)) : null;
  const expansion = numbers && inverse && !("code" in inverse) ? times(numbers.p, inverse) : null;
  if (expansion && expansion.value >= 1)
    notices.push({
      code: "probe-above-heavy",
      path: ["probe"],
      facts: { ratio: Number(expansion.value.toPrecision(3)) },
    });
  return { probe, heavy, expansion, problems, notices };
}

function byRole(
  theory: Theory,
  role: "probe" | "heavy",
  problems: Problem[],
  notices: Notice[],
): Point | null {
  const [scale, ...others] = theory.scales.filter((one) => one.role === role);
  if (scale && others.length > 0) {
    const symbols = [scale, ...others].map(({ symbol }) => symbol).join(", ");
    problems.push({ code: "role-ambiguous", path: [role], facts: { role, symbols } });
    return null;
  }
  if (!scale) {
    notices.push({ code: role === "probe" ? "probe-missing" : "heavy-missing", path: [role], facts: {} });
    return null;
  }
  const quantity = quantityOfScale(scale);
  if (!quantity) notices.push({ code: "scale-has-no-number", path: [role], facts: { symbol: scale.symbol } });
  return { latex: scale.latex, symbol: scale.symbol, quantity };
}
