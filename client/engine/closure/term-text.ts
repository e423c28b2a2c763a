/** A demanded operator as a row of the premises' terms: "c_1/Lambda^2 phi^6". */
import type { HalfEdges } from "../divergence/half-edges.ts";
import { isSpinor } from "../divergence/legs.ts";
import { Rational } from "../exact/rational.ts";
import type { Theory } from "../premises/theory.ts";
import type { Counterterm } from "../divergence/value.ts";

/** Names c_1, c_2, … that nothing in the premises bears, in order. */
export function freeCouplings({ fields, scales, terms }: Theory): () => string {
  const taken = new Set([
    ...fields.map(({ symbol }) => symbol),
    ...scales.map(({ symbol }) => symbol),
    ...terms.flatMap(({ monomial }) => monomial.coefficients.map(({ symbol }) => symbol)),
  ]);
  let number = 0;
  return () => {
    do number += 1;
    while (taken.has(`c_${number}`));
    return `c_${number}`;
  };
}

/** With a heavy scale declared, its power makes the coupling dimensionless when the operator is irrelevant. */
export function termText(
  coupling: string,
  counterterm: Counterterm,
  legs: HalfEdges,
  theory: Theory,
): string {
  const dimension = Rational.parse(counterterm.coefficient.text);
  const heavy = theory.scales.find(({ role }) => role === "heavy")?.symbol;
  const suppressed = heavy !== undefined && dimension?.isInteger() === true && dimension.sign() < 0;
  const power = suppressed ? dimension.negated().toString() : "";
  const scale = suppressed ? `/${heavy}${power === "1" ? "" : `^${power}`}` : "";
  return [`${coupling}${scale}`, ...derivativesOf(counterterm, theory), ...factorsOf(legs, theory)].join(" ");
}

function derivativesOf({ derivatives, timeDerivatives }: Counterterm, { spacetime }: Theory): string[] {
  const mark = (name: string, count: number) =>
    count === 0 ? [] : [count === 1 ? name : `${name}^${count}`];
  return [
    ...mark("partial_t", timeDerivatives),
    ...mark(spacetime.geometry === "isotropic" ? "partial" : "nabla", derivatives),
  ];
}

function factorsOf(legs: HalfEdges, theory: Theory): string[] {
  return theory.fields.flatMap((field, f) => {
    const word = (symbol: string, count: number) =>
      count === 0 ? [] : [count === 1 ? symbol : `${symbol}^${count}`];
    const bar = isSpinor(field) || field.kind === "ghost";
    return [
      ...word(bar ? `${field.symbol}bar` : `(${field.symbol}^\\dagger)`, legs.conjugate[f] ?? 0),
      ...word(field.symbol, legs.plain[f] ?? 0),
    ];
  });
}
