/** LaTeX of the legs and derivatives of a monomial, without its coefficient: what counting sees of a term. */
import type { FieldFactor, Monomial } from "./monomial.ts";
import { symbolLatex } from "./symbol-latex.ts";

interface DrawnField {
  readonly symbol: string;
  readonly latex: string;
  readonly kind: string;
}

const barredKinds = /spinor|static heavy|spin 3\/2|ghost/;

function raised(body: string, power: number): string {
  return power === 1 ? body : `${body}^{${power}}`;
}

/**
 * Derivatives first, then the fields in the order of the theory: "\partial^{2}\phi^{4}".
 * A conjugate wears a bar when the field is fermionic, a dagger otherwise.
 * @example operatorLatex({ fields: [{ symbol: "phi", conjugated: false, count: 4 }], derivatives: 2, timeDerivatives: 0 }, fields, "isotropic") // "\\partial^{2}\\phi^{4}"
 */
export function operatorLatex(
  operator: {
    readonly fields: readonly FieldFactor[];
    readonly derivatives: number;
    readonly timeDerivatives: number;
  },
  fields: readonly DrawnField[],
  geometry: "isotropic" | "anisotropic",
): string {
  const legs = fields.flatMap(({ symbol, latex, kind }) => {
    const count = (conjugated: boolean) =>
      operator.fields.reduce(
        (sum, leg) => sum + (leg.symbol === symbol && leg.conjugated === conjugated ? leg.count : 0),
        0,
      );
    const [bars, straight] = [count(true), count(false)];
    const barred = barredKinds.test(kind)
      ? `\\bar{${latex}}`
      : bars > 1
        ? `(${latex}^\\dagger)`
        : `${latex}^\\dagger`;
    return [...(bars > 0 ? [raised(barred, bars)] : []), ...(straight > 0 ? [raised(latex, straight)] : [])];
  });
  const signs = [
    ...(operator.timeDerivatives > 0 ? [raised("\\partial_t", operator.timeDerivatives)] : []),
    ...(operator.derivatives > 0
      ? [raised(geometry === "anisotropic" ? "\\nabla" : "\\partial", operator.derivatives)]
      : []),
  ];
  return [...signs, ...legs].join(" ");
}

/**
 * The couplings and scales of a monomial with their powers, without its number: "\frac{c_6}{\Lambda^{2}}"; "1" if none.
 */
export function coefficientLatex({ coefficients }: Pick<Monomial, "coefficients">): string {
  const side = (sign: 1 | -1) =>
    coefficients
      .filter(({ power }) => power.sign() === sign)
      .map(({ symbol, power }) => {
        const size = power.absolute();
        return size.toString() === "1" ? symbolLatex(symbol) : `${symbolLatex(symbol)}^{${size.toString()}}`;
      })
      .join("\\,");
  const [over, under] = [side(1), side(-1)];
  return under === "" ? over || "1" : `\\frac{${over || "1"}}{${under}}`;
}
