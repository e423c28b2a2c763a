/** The derivation of every dimension, in the notebook's own symbols. */
import type { WorkingStep } from "../evaluation.ts";
import type { LinearForm } from "../exact/linear-form.ts";
import { measuredLatex } from "../notation/measured.ts";
import { operatorLatex } from "../notation/operator-latex.ts";
import { canonicalDimensionLatex } from "./field-rules.ts";
import type { Field, Term, Theory } from "./theory.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

/** "d = 4", "D = 3,\; z = 2"; a dimension left symbolic stands alone. */
export function spacetimeLatex({ spacetime }: Theory): string {
  const one = (symbol: string, form: LinearForm) =>
    form.asRational() ? `${symbol} = ${form.toLatex()}` : symbol;
  if (spacetime.geometry === "isotropic") return one("d", spacetime.d);
  return `${one("D", spacetime.D)},\\; ${one("z", spacetime.z)}`;
}

export function premisesWorking(theory: Theory, expressions: ReadonlyMap<string, string>): WorkingStep[] {
  return [
    heading("Spacetime"),
    prose(
      theory.spacetime.geometry === "isotropic"
        ? `In units $\\hbar = c = 1$ lengths count $-1$ and derivatives $+1$; the action $\\int d^{d}x\\,\\mathcal{L}$ is dimensionless, so every term of $\\mathcal{L}$ has dimension $d$.`
        : `Space counts $[x] = -1$ and time $[t] = -z$, so $[\\nabla] = 1$ and $[\\partial_t] = z$; the action $\\int dt\\,d^{D}x\\,\\mathcal{L}$ is dimensionless, so every term of $\\mathcal{L}$ has dimension $D + z$.`,
    ),
    formula(spacetimeLatex(theory)),
    ...fieldSteps(theory),
    ...termSteps(theory),
    ...scaleSteps(theory, expressions),
  ];
}

function fieldSteps(theory: Theory): WorkingStep[] {
  if (theory.fields.length === 0) return [];
  return [
    heading("Fields"),
    prose(
      "The kinetic term fixes the dimension of a field; its propagator, $\\sim p^{2\\delta - d}$, fixes its ultraviolet weight $\\delta$.".replace(
        "- d}",
        theory.spacetime.geometry === "isotropic" ? "- d}" : "- (D + z)}",
      ),
    ),
    ...theory.fields.map((field) => formula(fieldLatex(field, theory))),
  ];
}

function fieldLatex({ latex, kind, dimension, weight, overridden }: Field, { spacetime }: Theory): string {
  const rule = canonicalDimensionLatex(kind, spacetime.geometry);
  const value = dimension.toLatex();
  const stated =
    overridden || rule === null ? `[${latex}] = ${value}\\quad\\text{(as stated)}` : `[${latex}] = ${rule}`;
  const number = !overridden && rule !== null && dimension.asRational() ? ` = ${value}` : "";
  const surplus = weight.equals(dimension) ? "" : `,\\qquad \\delta_{${latex}} = ${weight.toLatex()}`;
  return stated + number + surplus;
}

function termSteps(theory: Theory): WorkingStep[] {
  if (theory.terms.length === 0) return [];
  const measure = theory.spacetime.geometry === "isotropic" ? "d" : "D + z";
  return [
    heading("Terms"),
    prose(
      `A term counts its legs and derivatives, $\\Delta$; the rest of $${measure}$ is the dimension of its whole coefficient.`,
    ),
    ...theory.terms.map((term) => formula(dimensionLatex(term, theory))),
  ];
}

/** "\Delta\!\left(\phi^4\right) = 4[\phi] = 4,\qquad d - \Delta = 0". */
export function dimensionLatex(term: Term, theory: Theory): string {
  const measure = theory.spacetime.geometry === "isotropic" ? "d" : "D + z";
  const { derivatives, timeDerivatives } = term.monomial;
  const legs = theory.fields.flatMap((field) => {
    const count = term.monomial.fields.reduce(
      (sum, leg) => sum + (leg.symbol === field.symbol ? leg.count : 0),
      0,
    );
    return count === 0 ? [] : [`${count === 1 ? "" : count}[${field.latex}]`];
  });
  const parts = [
    ...legs,
    ...(derivatives > 0 ? [String(derivatives)] : []),
    ...(timeDerivatives > 0 ? [timeDerivatives === 1 ? "z" : `${timeDerivatives}z`] : []),
  ];
  const rest = measure === "d" ? "d - \\Delta" : "D + z - \\Delta";
  return `\\Delta\\!\\left(${operatorLatex(term.monomial, theory.fields, theory.spacetime.geometry)}\\right) = ${parts.join(" + ")} = ${term.dimension.toLatex()},\\qquad ${rest} = ${term.coefficient.toLatex()}`;
}

function scaleSteps(theory: Theory, expressions: ReadonlyMap<string, string>): WorkingStep[] {
  const valued = theory.scales.filter(({ value }) => value !== null);
  if (valued.length === 0) return [];
  return [
    heading("Scales"),
    prose(
      "Uncertainties are independent standard deviations, propagated to first order; a scale that occurs twice stays correlated with itself.",
    ),
    ...valued.map(({ symbol, latex, value, sigma, unit }) => {
      const number = measuredLatex(value ?? 0, sigma, unit);
      const expression = expressions.get(symbol) ?? number;
      // A literal is its own expression; only what was computed shows both.
      return formula(
        /\\frac|[A-Za-z]\^|\\sqrt|\\,\\[A-Za-z]+$/.test(expression) && expression !== number
          ? `${latex} = ${expression} = ${number}`
          : `${latex} = ${number}`,
      );
    }),
  ];
}
