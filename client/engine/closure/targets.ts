/** The operators that could be demanded within the caps: legs and derivatives that symmetries allow. */
import { legChoices } from "../divergence/amplitudes.ts";
import { countertermsOf } from "../divergence/counterterms.ts";
import { legsThat } from "../divergence/contraction.ts";
import { countOf, totalOf, type HalfEdges } from "../divergence/half-edges.ts";
import { describeLegs, isSpinor } from "../divergence/legs.ts";
import { forbiddingSymmetry, isFermionOdd } from "../divergence/selection.ts";
import type { Counterterm, Legs } from "../divergence/value.ts";
import { Rational } from "../exact/rational.ts";
import { weightOf, type Frame } from "./frame.ts";

/** Fields and a number of derivatives. Numbers in units of the frame. */
export interface Candidate {
  readonly key: string;
  readonly counterterm: Counterterm;
  /** Weight of the derivatives. */
  readonly weight: number;
  /** [g] of its coefficient with ultraviolet weights. */
  readonly coefficient: number;
}

export interface Target {
  readonly legs: HalfEdges;
  readonly described: Legs;
  readonly total: number;
  readonly counts: readonly number[];
  /** Measure minus the weight of the legs: ω before anything is inserted. */
  readonly bound: number;
  /** Whether they are two spinors: without derivatives then a mass term, which breaks chirality. */
  readonly spinorPair: boolean;
  readonly schroedinger: boolean;
  /** Most derivatives first. */
  readonly candidates: readonly Candidate[];
}

const MOST_CHOICES = 20_000;

/** The vacuum energy is no operator of fields and is not among them. @returns null when there are too many. */
export function targetsOf(frame: Frame): Target[] | null {
  const { theory, settings, units, insertions } = frame;
  const takesPart = (f: number) => insertions.some(({ counts }) => (counts[f] ?? 0) > 0);
  const choices = legChoices(theory, frame.mostLegs, MOST_CHOICES, takesPart);
  if (!choices) return null;
  const antighosts = antighostsShift(frame);
  return choices.flatMap((legs) => {
    const bound = frame.measure - weightOf(legs, frame);
    const largest = bound + frame.mostOrder;
    if (totalOf(legs) === 0 || largest < 0 || isFermionOdd(legs, theory)) return [];
    if (settings.useSymmetries && forbiddingSymmetry(legs, theory)) return [];
    const described = describeLegs(legs, theory);
    const shiftLegs = theory.fields.reduce(
      (sum, _, f) => sum + (settings.shift[f] ? countOf(legs, f) : 0),
      0,
    );
    const omega = units.exact(largest);
    const candidates = countertermsOf(omega, legs, theory, settings.useSymmetries).flatMap(
      (counterterm): Candidate[] => {
        const { derivatives, timeDerivatives, gauge, massPower } = counterterm;
        const ghostLegs = antighosts.reduce((sum, f) => sum + (legs.conjugate[f] ?? 0), 0);
        if (gauge === "excluded" || derivatives + timeDerivatives < shiftLegs + ghostLegs) return [];
        const weight = units.whole(omega.minus(Rational.parse(massPower.text) ?? Rational.zero));
        const marks = `${timeDerivatives > 0 ? `t${timeDerivatives}` : ""}d${derivatives}`;
        return [{ key: `${described.key}/${marks}`, counterterm, weight, coefficient: bound - weight }];
      },
    );
    if (candidates.length === 0) return [];
    return [
      {
        legs,
        described,
        total: totalOf(legs),
        counts: theory.fields.map((_, f) => countOf(legs, f)),
        bound,
        spinorPair:
          totalOf(legs) === 2 &&
          legsThat(legs, theory, (field) => isSpinor(field) && field.kind !== "static heavy field") === 2,
        schroedinger: legsThat(legs, theory, ({ kind }) => kind === "Schrödinger field") > 0,
        candidates,
      },
    ];
  });
}

/**
 * Ghosts whose antighost always stands with a derivative, as in covariant gauges: one factors out of every graph for each
 * external antighost, so operators with fewer are not demanded (from memory: Collins 1984, chapter 12).
 */
function antighostsShift({ theory, units, insertions }: Frame): number[] {
  const one = units.whole(Rational.one);
  return theory.fields.flatMap(({ kind }, f) => {
    const withIt = insertions.filter(({ edges }) => (edges.conjugate[f] ?? 0) > 0);
    const shifts = withIt.every(({ edges, derivatives }) => derivatives >= one * (edges.conjugate[f] ?? 0));
    return kind === "ghost" && withIt.length > 0 && shifts ? [f] : [];
  });
}
