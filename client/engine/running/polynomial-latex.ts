/** β functions in the symbols of the notebook. */
import { Rational } from "../exact/rational.ts";
import { coefficientLatex } from "../notation/operator-latex.ts";
import type { CoefficientFactor } from "../notation/monomial.ts";
import type { Parameter } from "./model.ts";
import type { Part, Polynomial } from "./polynomial.ts";

/** Parameters go back into the couplings they are made of, so that m² times m² is m⁴. */
function factorsOf({ powers }: Part, parameters: readonly Parameter[]): readonly CoefficientFactor[] {
  const total = new Map<string, Rational>();
  const add = (symbol: string, power: Rational) =>
    total.set(symbol, (total.get(symbol) ?? Rational.zero).plus(power));
  for (const [name, power] of powers) {
    const parameter = parameters.find(({ variable }) => variable === name);
    if (!parameter) add(name, Rational.of(power));
    else for (const factor of parameter.factors) add(factor.symbol, factor.power.times(Rational.of(power)));
  }
  const order = [
    ...new Set(inOrder(parameters).flatMap(({ factors }) => factors.map(({ symbol }) => symbol))),
  ];
  const place = (symbol: string) => (order.includes(symbol) ? order.indexOf(symbol) : order.length);
  return [...total]
    .filter(([, power]) => power.sign() !== 0)
    .map(([symbol, power]) => ({ symbol, power }))
    .sort((a, b) => place(a.symbol) - place(b.symbol));
}

/** Pure numbers before masses and the like. */
function inOrder(parameters: readonly Parameter[]): readonly Parameter[] {
  const rank = ({ energy }: Parameter) => (energy.sign() === 0 ? 0 : energy.sign() < 0 ? 1 : 2);
  return [...parameters].sort((a, b) => rank(a) - rank(b));
}

function partLatex(part: Part, parameters: readonly Parameter[]): string {
  const size = part.coefficient.absolute();
  const body = coefficientLatex({ coefficients: factorsOf(part, parameters) });
  if (body === "1") return size.toLatex();
  if (size.equals(Rational.one)) return body;
  return `${size.toLatex()}\\,${body}`;
}

/** "3\,\lambda^{2} + \frac{m^{2}\,c}{\Lambda^{2}}"; "0" for none. */
export function polynomialLatex(polynomial: Polynomial, parameters: readonly Parameter[]): string {
  const order = inOrder(parameters);
  // Masses come late, scales that stand last.
  const weight = (name: string, power: number) => {
    const place = order.findIndex(({ variable }) => variable === name);
    if (place < 0) return Math.abs(power) * 10_000;
    return (place + ((order[place]?.energy.sign() ?? 0) > 0 ? 100 : 0)) * power;
  };
  const rank = ({ powers }: Part) => [...powers].reduce((sum, [name, power]) => sum + weight(name, power), 0);
  const parts = [...polynomial.parts()].sort((a, b) => rank(a) - rank(b));
  if (parts.length === 0) return "0";
  return parts
    .map((part, index) => {
      const sign = part.coefficient.sign() < 0 ? "-" : index === 0 ? "" : "+";
      return index === 0 ? `${sign}${partLatex(part, parameters)}` : `${sign} ${partLatex(part, parameters)}`;
    })
    .join(" ");
}
