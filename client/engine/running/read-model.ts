/** Reads what runs out of a theory: the potential and the Yukawa couplings of its terms. */
import type { Notice, Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { CoefficientFactor, Monomial } from "../notation/monomial.ts";
import { coefficientLatex } from "../notation/operator-latex.ts";
import { forbidding } from "../premises/read-terms.ts";
import type { Field, Scale, Term, Theory } from "../premises/theory.ts";
import {
  parameterVariable,
  type Model,
  type Parameter,
  type ScalarVariable,
  type YukawaEntry,
} from "./model.ts";
import { Polynomial, type Part } from "./polynomial.ts";
import { isSpinor, readYukawa, spinorsOf } from "./read-yukawa.ts";

export interface ModelReading {
  readonly model: Model;
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
}
export interface ModelOptions {
  /** By field symbol; 1 where nothing is said. */
  readonly components: ReadonlyMap<string, number>;
  /** −1 when the premises write the Lagrangian, −V. */
  readonly sign: 1 | -1;
}

/**
 * Problems: `coupling-at-two-scales`, `components-odd`, `components-of-complex`. Notices: `running-left-out` with the
 * reason, `fermion-mass-left-out`, `term-forbidden`, `hermitian-conjugate-added`.
 */
export function readModel(theory: Theory, options: ModelOptions): ModelReading {
  const notices: Notice[] = [];
  const scalars = scalarsOf(theory, options.components);
  const spinors = spinorsOf(theory, options.components);
  const drafts = new Map<string, Draft>();
  const leaveOut = (term: Term, reason: string) =>
    notices.push({ code: "running-left-out", path: [], facts: { term: term.latex, reason } });
  for (const term of theory.terms) {
    if (term.kinetic) continue;
    const forbiddenBy = forbidding(term.monomial, theory.fields, theory.symmetries);
    if (forbiddenBy.length > 0) {
      const symmetries = forbiddenBy.map(({ name }) => name).join(", ");
      notices.push({ code: "term-forbidden", path: [], facts: { term: term.latex, symmetries } });
      continue;
    }
    const place = placeOf(term.monomial, theory);
    if (place !== "potential" && place !== "yukawa") {
      if (place === "fermion mass")
        notices.push({ code: "fermion-mass-left-out", path: [], facts: { term: term.latex } });
      else leaveOut(term, place);
      continue;
    }
    const split = splitCoefficient(term.monomial.coefficients, theory.scales);
    if (typeof split === "string") {
      leaveOut(term, split);
      continue;
    }
    const yukawa = place === "yukawa" ? readYukawa(term.monomial, theory, theory.terms) : [];
    if (typeof yukawa === "string") {
      leaveOut(term, yukawa);
      continue;
    }
    note(drafts, term, split, yukawa, theory, options.sign, place === "potential", notices);
  }
  const problems = [...scaleProblems(drafts), ...componentProblems(theory, scalars, drafts)];
  return {
    model: { scalars, spinors, parameters: [...drafts.values()].map(finished) },
    problems,
    notices,
  };
}

interface Draft extends Omit<Parameter, "operator" | "legs" | "variable"> {
  readonly operators: Polynomial[];
  readonly rowIds: string[];
  readonly yukawa: YukawaEntry[];
  readonly otherScale: boolean;
  readonly legs: number[];
}

function finished({ operators, otherScale: _, legs, ...draft }: Draft): Parameter {
  return {
    ...draft,
    variable: parameterVariable(draft.id),
    operator: Polynomial.sum(operators),
    legs: Math.min(...legs),
  };
}

function scalarsOf(theory: Theory, components: ReadonlyMap<string, number>): readonly ScalarVariable[] {
  return theory.fields.flatMap((field): ScalarVariable[] => {
    if (field.kind !== "real scalar" && field.kind !== "complex scalar") return [];
    const count = components.get(field.symbol) ?? 1;
    if (field.selfConjugate)
      return [{ name: field.symbol, conjugate: field.symbol, latex: field.latex, components: count }];
    const barred = `${field.symbol}*`;
    return [
      { name: field.symbol, conjugate: barred, latex: field.latex, components: 1 },
      { name: barred, conjugate: field.symbol, latex: `${field.latex}^\\dagger`, components: 1 },
    ];
  });
}

function isScalar(field: Field | undefined): boolean {
  return field?.kind === "real scalar" || field?.kind === "complex scalar";
}

/** Where a term belongs, or why it belongs nowhere here. */
function placeOf({ fields, derivatives, timeDerivatives }: Monomial, theory: Theory): string {
  const legs = fields.map((leg) => ({
    ...leg,
    field: theory.fields.find(({ symbol }) => symbol === leg.symbol),
  }));
  if (derivatives + timeDerivatives > 0) return "it has derivatives";
  if (legs.length === 0) return "it has no fields";
  if (legs.every(({ field }) => isScalar(field))) return "potential";
  const spinning = legs.filter(({ field }) => field && isSpinor(field));
  const spins = spinning.reduce((sum, { count }) => sum + count, 0);
  const rest = legs.filter((leg) => !spinning.includes(leg));
  if (spins !== 2 || !rest.every(({ field }) => isScalar(field)))
    return "it is no potential and no Yukawa coupling";
  const bosons = rest.reduce((sum, { count }) => sum + count, 0);
  if (bosons === 0) return "fermion mass";
  return bosons === 1 ? "yukawa" : "its fermions couple to more than one scalar";
}

interface Split {
  readonly factors: readonly CoefficientFactor[];
  readonly scale: Part;
}

/** What of a coefficient runs: couplings and masses do; heavy scales, scales below the line and π do not. */
function splitCoefficient(
  coefficients: readonly CoefficientFactor[],
  scales: readonly Scale[],
): Split | string {
  if (coefficients.some(({ power }) => !power.isInteger())) return "its coefficient has a fractional power";
  const isHeavy = (symbol: string) =>
    scales.some((scale) => scale.symbol === symbol && scale.role === "heavy");
  const stands = ({ symbol, power }: CoefficientFactor) =>
    symbol === "pi" || power.sign() < 0 || isHeavy(symbol);
  const factors = coefficients.filter((factor) => factor.symbol !== "i" && !stands(factor));
  const scale = coefficients.filter((factor) => factor.symbol !== "i" && stands(factor));
  // Λ²φ² has no other coupling than Λ² itself.
  const runs =
    factors.length > 0 ? factors : scale.filter(({ symbol, power }) => symbol !== "pi" && power.sign() > 0);
  if (runs.length === 0) return "its coefficient is a number; give it a coupling";
  const powers = new Map(
    scale.filter((factor) => !runs.includes(factor)).map(({ symbol, power }) => [symbol, power.toFloat()]),
  );
  return { factors: runs, scale: { coefficient: Rational.one, powers } };
}

/** "m^2", "lambda v". */
export function idOf(factors: readonly CoefficientFactor[]): string {
  return factors
    .map(({ symbol, power }) => (power.equals(Rational.one) ? symbol : `${symbol}^${power.toString()}`))
    .sort()
    .join(" ");
}

function note(
  drafts: Map<string, Draft>,
  term: Term,
  { factors, scale }: Split,
  yukawa: readonly YukawaEntry[],
  theory: Theory,
  sign: 1 | -1,
  isPotential: boolean,
  notices: Notice[],
): void {
  const id = idOf(factors);
  const known = drafts.get(id);
  const prefactor = term.monomial.prefactor.times(Rational.of(sign));
  const operator = isPotential ? operatorOf(term, prefactor, theory, notices) : Polynomial.zero;
  const entries = yukawa.map((entry) => ({
    ...entry,
    coefficient: entry.coefficient.times(Rational.of(sign)),
  }));
  const legs = term.monomial.fields.reduce((sum, { count }) => sum + count, 0);
  const outside = [...scale.powers].reduce(
    (sum, [symbol, power]) => sum.plus(energyOf(symbol, theory.scales).times(Rational.of(power))),
    Rational.zero,
  );
  const spinorLegs = isPotential ? 0 : 2;
  const energy = Rational.of(8 - 2 * legs - spinorLegs, 2).minus(outside);
  const draft: Draft = known ?? {
    id,
    latex: coefficientLatex({ coefficients: factors }),
    factors,
    scale,
    rowIds: [],
    operators: [],
    yukawa: [],
    energy,
    otherScale: false,
    legs: [],
  };
  draft.rowIds.push(term.rowId);
  draft.operators.push(operator);
  draft.yukawa.push(...entries);
  draft.legs.push(legs);
  const same = text(draft.scale) === text(scale) && isPotential === (draft.yukawa.length === 0);
  drafts.set(id, same ? draft : { ...draft, otherScale: true });
}

function text({ powers }: Part): string {
  return [...powers]
    .map(([name, power]) => `${name}^${power}`)
    .sort()
    .join(" ");
}

/** Undeclared couplings and π are pure numbers; a scale is an energy unless its value says otherwise. */
function energyOf(symbol: string, scales: readonly Scale[]): Rational {
  const scale = scales.find((one) => one.symbol === symbol);
  if (!scale) return Rational.zero;
  return scale.value !== null && scale.unit === "" ? Rational.zero : Rational.one;
}

/** The term as a polynomial, with its Hermitian conjugate where it is not its own and no other row has it. */
function operatorOf(term: Term, prefactor: Rational, theory: Theory, notices: Notice[]): Polynomial {
  const powersOf = (flip: boolean) => {
    const powers = new Map<string, number>();
    for (const { symbol, conjugated, count } of term.monomial.fields) {
      const real = theory.fields.find((field) => field.symbol === symbol)?.selfConjugate ?? true;
      const name = !real && conjugated !== flip ? `${symbol}*` : symbol;
      powers.set(name, (powers.get(name) ?? 0) + count);
    }
    return powers;
  };
  const own = Polynomial.monomial(prefactor, powersOf(false));
  const conjugate = Polynomial.monomial(prefactor, powersOf(true));
  const written = theory.terms.some(
    (other) => other !== term && isConjugate(other.monomial, term.monomial, theory),
  );
  if (own.equals(conjugate) || written) return own;
  notices.push({ code: "hermitian-conjugate-added", path: [], facts: { term: term.latex } });
  return own.plus(conjugate);
}

function isConjugate(a: Monomial, b: Monomial, theory: Theory): boolean {
  if (idOf(a.coefficients) !== idOf(b.coefficients) || a.derivatives + b.derivatives > 0) return false;
  const legs = (monomial: Monomial, flip: boolean) =>
    monomial.fields
      .map(({ symbol, conjugated, count }) => {
        const real = theory.fields.find((field) => field.symbol === symbol)?.selfConjugate ?? true;
        return `${symbol} ${!real && conjugated !== flip} ${count}`;
      })
      .sort()
      .join();
  return legs(a, true) === legs(b, false);
}

function scaleProblems(drafts: ReadonlyMap<string, Draft>): Problem[] {
  return [...drafts.values()].flatMap(({ otherScale, latex }): Problem[] =>
    otherScale ? [{ code: "coupling-at-two-scales", path: ["standsOn"], facts: { symbol: latex } }] : [],
  );
}

/** A vector of N components enters by its length, so by even powers only. */
function componentProblems(
  theory: Theory,
  scalars: readonly ScalarVariable[],
  drafts: ReadonlyMap<string, Draft>,
): Problem[] {
  const operators = Polynomial.sum([...drafts.values()].flatMap((draft) => draft.operators));
  const coupled = new Set([...drafts.values()].flatMap(({ yukawa }) => yukawa.map(({ boson }) => boson)));
  return scalars.flatMap((scalar): Problem[] => {
    if (scalar.components === 1) return [];
    if (coupled.has(scalar.name))
      return [{ code: "components-with-yukawa", path: ["components"], facts: { symbol: scalar.latex } }];
    return operators.isEvenIn(scalar.name)
      ? []
      : [{ code: "components-odd", path: ["components"], facts: { symbol: scalar.latex } }];
  });
}
