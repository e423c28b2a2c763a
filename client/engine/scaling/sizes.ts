/** The relative size of a term at the probe scale, with the formula it comes from. */
import { Rational } from "../exact/rational.ts";
import type { LinearForm } from "../exact/linear-form.ts";
import type { NotationFailure } from "../notation/failure.ts";
import { float, number, power, times, type Quantity } from "../notation/quantity.ts";
import type { Term, Theory } from "../premises/theory.ts";
import { dimensionalAnalysis } from "./dimensional-analysis.ts";
import type { ScalingValue } from "./value.ts";
import type { WorkingPoint } from "./working-point.ts";

export interface Size {
  /** Null when something in it has no number. */
  readonly quantity: Quantity | null;
  readonly latex: string;
  readonly from: ScalingValue["rows"][number]["sizeFrom"];
}

/** A quantity, or null where a power of it does not exist or is out of range. */
function sound(result: Quantity | NotationFailure): Quantity | null {
  return "code" in result ? null : result;
}

/** "\left(\frac{p}{\Lambda}\right)^{2}"; "" for the zeroth power. */
export function ratioLatex(point: WorkingPoint, exponent: LinearForm): string {
  const text = exponent.toLatex();
  if (text === "0") return "";
  const ratio = `\\frac{${point.probe?.latex ?? "p"}}{${point.heavy?.latex ?? "\\Lambda"}}`;
  return text === "1" ? ratio : `\\left(${ratio}\\right)^{${text}}`;
}

/**
 * Natural size: the coefficient is ĝ Λ^(d − Δ), so at p the term has relative size ĝ (p/Λ)^(Δ − d). An assigned size
 * stands as typed. Naive dimensional analysis multiplies in its powers of 4π, couplings and light masses.
 */
export function sizeOf(
  term: Term,
  theory: Theory,
  point: WorkingPoint,
  counting: ScalingValue["counting"],
): Size {
  if (term.assigned) {
    const { value, sigma } = term.assigned;
    const quantity = { ...float(value), spread: new Map([[`${term.rowId}/assigned`, sigma]]) };
    return { quantity: Number.isNaN(value) ? null : quantity, latex: "\\text{assigned}", from: "assigned" };
  }
  const exponent = term.coefficient.times(-1);
  const rational = exponent.asRational();
  const ratio =
    rational && rational.sign() === 0
      ? number(Rational.one)
      : point.expansion && rational && sound(power(point.expansion, rational));
  const natural = Number.isNaN(term.natural) ? null : float(Math.abs(term.natural));
  const plain = natural && ratio && times(natural, ratio);
  const ghat =
    term.natural === 1
      ? ""
      : Number.isNaN(term.natural)
        ? "\\hat g"
        : String(Number(Math.abs(term.natural).toPrecision(6)));
  const factors = [ghat, ratioLatex(point, exponent)];
  if (counting === "natural size" || term.kinetic)
    return { quantity: plain, latex: joined(factors), from: "dimension" };
  const extra = dimensionalAnalysis(term, theory, point);
  return {
    quantity: plain && extra.quantity && times(plain, extra.quantity),
    latex: joined([ghat, ...extra.latex, ratioLatex(point, exponent)]),
    from: "naive dimensional analysis",
  };
}

function joined(factors: readonly string[]): string {
  const written = factors.filter((factor) => factor !== "");
  return written.length === 0 ? "1" : written.join("\\,");
}
