/** The numbers of a theory that a closure adds up, as whole multiples of one unit, and the terms that are inserted. */
import {
  conjugated,
  countOf,
  netOf,
  sameHalfEdges,
  totalOf,
  type HalfEdges,
} from "../divergence/half-edges.ts";
import { interactionTerms } from "../divergence/vertex-sets.ts";
import { vertexMark } from "../divergence/line-styles.ts";
import type { VertexMark } from "../divergence/value.ts";
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { Term, Theory } from "../premises/theory.ts";
import { canHaveMass } from "./masses.ts";
import { MOST_LEGS, type Settings } from "./read-settings.ts";
import { Units } from "./units.ts";

/** A term of the premises, or an operator that was demanded, as a vertex. All numbers in units of the frame. */
export interface Insertion {
  readonly key: string;
  readonly termRowId: string | null;
  readonly latex: string;
  readonly mark: VertexMark;
  readonly edges: HalfEdges;
  /** Whether its Hermitian conjugate is another vertex. */
  readonly hasMirror: boolean;
  /** Legs by field, and in all. */
  readonly counts: readonly number[];
  readonly legs: number;
  /** [g] with ultraviolet weights, the order in 1/Λ of one insertion, and the weight of its derivatives. */
  readonly coefficient: number;
  readonly order: number;
  readonly derivatives: number;
}

export interface Frame {
  readonly theory: Theory;
  readonly settings: Settings;
  readonly units: Units;
  readonly measure: number;
  /** Ultraviolet weight of each field. */
  readonly weights: readonly number[];
  readonly mostOrder: number;
  readonly mostLegs: number;
  /** Legs that operators within the order can have, when the cap cuts some off. */
  readonly legsBeyond: number | null;
  readonly canHaveMass: readonly boolean[];
  readonly insertions: readonly Insertion[];
}

/** Where a shift by a constant costs a derivative, each such leg weighs one more. */
const NO_BOUND = 6;

/** @returns null when a dimension is symbolic. Problems: `closure-term-forbidden`, `closure-term-breaks-shift`. */
export function frameOf(theory: Theory, settings: Settings, problems: Problem[]): Frame | null {
  const measure = theory.measure.asRational();
  const weights = theory.fields.map(({ weight }) => weight.asRational());
  const terms = interactionTerms(theory);
  const coefficients = terms.map(({ term }) => term.ultravioletCoefficient.asRational());
  const z = theory.spacetime.geometry === "anisotropic" ? theory.spacetime.z.asRational() : Rational.one;
  const all = [measure, z, ...weights, ...coefficients];
  if (!measure || all.some((number) => number === null)) return null;
  const units = new Units([
    Rational.one,
    settings.order,
    ...all.filter((number): number is Rational => number !== null),
    ...terms.flatMap(({ term }) => term.derivativeWeight.asRational() ?? []),
  ]);
  const whole = (number: Rational | null) => units.whole(number ?? Rational.zero);
  const used = terms.filter(({ term, edges }) => isUsed(term, edges, theory, settings, problems));
  const bound = legsWithin(theory, settings, measure, weights, used);
  const mostLegs = settings.legs ?? bound ?? NO_BOUND;
  return {
    theory,
    settings,
    units,
    measure: whole(measure),
    weights: weights.map(whole),
    mostOrder: whole(settings.order),
    mostLegs,
    legsBeyond: bound !== null && bound > mostLegs ? bound : null,
    canHaveMass: theory.fields.map((_, f) => canHaveMass(f, theory, settings)),
    insertions: used.flatMap(({ term, edges }) => {
      const coefficient = whole(term.ultravioletCoefficient.asRational());
      return canMatter(edges, coefficient, theory)
        ? [
            {
              key: term.rowId,
              termRowId: term.rowId,
              latex: term.latex,
              mark: vertexMark(term, theory),
              ...legsOf(edges, theory),
              coefficient,
              order: Math.max(0, -coefficient),
              derivatives: whole(term.derivativeWeight.asRational()),
            },
          ]
        : [];
    }),
  };
}

export function legsOf(
  edges: HalfEdges,
  theory: Theory,
): Pick<Insertion, "edges" | "hasMirror" | "counts" | "legs"> {
  return {
    edges,
    hasMirror: !sameHalfEdges(edges, conjugated(edges, theory)),
    counts: theory.fields.map((_, f) => countOf(edges, f)),
    legs: totalOf(edges),
  };
}

/**
 * Masses and kinetic terms lower ω and change neither loops nor legs. A bilinear that turns one field into another, or
 * breaks a number, is different: with it there are graphs that were not there before.
 */
export function canMatter(edges: HalfEdges, coefficient: number, theory: Theory): boolean {
  if (totalOf(edges) !== 2 || coefficient < 0) return totalOf(edges) >= 2;
  const joins = theory.fields.some((_, f) => countOf(edges, f) === 2) && isNeutral(edges, theory);
  return coefficient > 0 && !joins;
}

function isNeutral(edges: HalfEdges, theory: Theory): boolean {
  return netOf(edges, theory).every((net) => net === 0);
}

function isUsed(
  term: Term,
  edges: HalfEdges,
  theory: Theory,
  settings: Settings,
  problems: Problem[],
): boolean {
  const refuse = (code: string): false => {
    problems.push({ code, path: ["standsOn"], facts: { latex: term.latex } });
    return false;
  };
  if (settings.useSymmetries && !term.allowed) return refuse("closure-term-forbidden");
  const shiftLegs = theory.fields.reduce((sum, _, f) => sum + (settings.shift[f] ? countOf(edges, f) : 0), 0);
  const { derivatives, timeDerivatives } = term.monomial;
  return derivatives + timeDerivatives >= shiftLegs || refuse("closure-term-breaks-shift");
}

/** The most legs of an operator of dimension measure + order; null where a field costs nothing. */
function legsWithin(
  theory: Theory,
  settings: Settings,
  measure: Rational,
  weights: readonly (Rational | null)[],
  used: readonly { readonly edges: HalfEdges }[],
): number | null {
  const costs = theory.fields.flatMap((_, f) => {
    const weight = weights[f];
    if (!weight || !used.some(({ edges }) => countOf(edges, f) > 0)) return [];
    return [settings.shift[f] ? weight.plus(Rational.one) : weight];
  });
  const least = costs.reduce<Rational | null>(
    (lowest, cost) => (lowest === null || cost.compare(lowest) < 0 ? cost : lowest),
    null,
  );
  if (!least || least.sign() <= 0) return null;
  return Math.min(MOST_LEGS, Number(measure.plus(settings.order).over(least).floor()));
}

/** Σ n_f δ_f of legs, in units. */
export function weightOf(edges: HalfEdges, { theory, weights }: Frame): number {
  return theory.fields.reduce((sum, _, f) => sum + countOf(edges, f) * (weights[f] ?? 0), 0);
}
