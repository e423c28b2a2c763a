/** The local operators that can absorb an overall divergence of degree ω with given external legs. */
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import type { Theory } from "../premises/theory.ts";
import { contracts, legsThat } from "./contraction.ts";
import {
  conjugated,
  countOf,
  halfEdgesOf,
  netOf,
  sameHalfEdges,
  totalOf,
  weigh,
  type HalfEdges,
} from "./half-edges.ts";
import { isSpinor, productLatex, productText } from "./legs.ts";
import { forbiddingSymmetry } from "./selection.ts";
import type { Counterterm } from "./value.ts";

/** Past this degree a list would be longer than anyone reads; the first ones are those of highest derivative. */
const MOST_DERIVATIVES = 40;

/** Whether the premises hold a mass term that mixes chiralities, so that odd powers of a fermion mass may appear. */
export function breaksChirality(theory: Theory): boolean {
  return theory.terms.some((term) => {
    const edges = halfEdgesOf(term.monomial, theory);
    const spinorLegs = edges
      ? legsThat(edges, theory, (field) => isSpinor(field) && field.kind !== "static heavy field")
      : 0;
    return (
      !term.kinetic &&
      edges !== null &&
      totalOf(edges) === 2 &&
      spinorLegs === 2 &&
      term.derivativeWeight.equals(LinearForm.zero)
    );
  });
}

interface Derivatives {
  readonly space: number;
  readonly time: number;
  readonly weight: Rational;
  /** Whether masses can make up the rest of the dimension analytically; else only a power of a cutoff can. */
  readonly analytic: boolean;
}

/** Every number of derivatives of weight up to ω that the legs can contract. */
function derivativesUpTo(omega: Rational, legs: HalfEdges, theory: Theory): Derivatives[] {
  const spinors = legsThat(legs, theory, isSpinor);
  const time = theory.spacetime.geometry === "anisotropic" ? theory.spacetime.z.asRational() : null;
  const schroedinger = legsThat(legs, theory, ({ kind }) => kind === "Schrödinger field") > 0;
  const oddMasses = breaksChirality(theory) || spinors > 0;
  const found: Derivatives[] = [];
  const most = Math.min(MOST_DERIVATIVES, Number(omega.floor()));
  const mostInTime =
    time && time.sign() > 0 ? Math.min(MOST_DERIVATIVES, Number(omega.over(time).floor())) : 0;
  for (let inTime = 0; inTime <= mostInTime; inTime += 1) {
    for (let inSpace = 0; inSpace <= most; inSpace += 1) {
      const weight = Rational.of(inSpace).plus(time ? time.times(Rational.of(inTime)) : Rational.zero);
      const rest = omega.minus(weight);
      if (rest.sign() < 0) continue;
      // The derivative of the vacuum energy is zero, and of a single field a total derivative.
      if (totalOf(legs) < 2 && inSpace + inTime > 0) continue;
      if (!contracts(legs, inSpace, theory)) continue;
      if (time && !schroedinger && spinors === 0 && inTime % 2 !== 0) continue;
      found.push({
        space: inSpace,
        time: inTime,
        weight,
        analytic: isAnalytic(rest, time, schroedinger, oddMasses),
      });
    }
  }
  return found.sort((a, b) => b.weight.compare(a.weight));
}

/** The rest of the dimension is made up by m², by m where chirality is broken, by energies for Schrödinger fields. */
export function isAnalytic(
  rest: Rational,
  time: Rational | null,
  schroedinger: boolean,
  oddMasses: boolean,
): boolean {
  if (time && schroedinger) return rest.over(time).isInteger();
  if (!rest.isInteger()) return false;
  return oddMasses || rest.over(Rational.of(2)).isInteger();
}

/** A massive vector that meets only conserved currents keeps the Ward identities of a photon. */
function hasWardIdentity({ kind }: Theory["fields"][number]): boolean {
  return kind === "gauge potential" || kind === "massive vector, conserved current";
}

/** Whether gauge potentials meet themselves in some term: then the theory is not abelian. */
function gaugeSelfInteracts(theory: Theory): boolean {
  return theory.terms.some((term) => {
    const edges = halfEdgesOf(term.monomial, theory);
    return edges !== null && legsThat(edges, theory, ({ kind }) => kind === "gauge potential") > 2;
  });
}

/**
 * "excluded": only legs of gauge potentials, or of massive vectors with a conserved current, with too few derivatives for
 * a field strength on each leg (abelian) or for two field strengths in all. "restricted": such or ghost legs among others.
 */
function gaugeStatus(legs: HalfEdges, derivatives: number, theory: Theory): Counterterm["gauge"] {
  const potentials = legsThat(legs, theory, hasWardIdentity);
  const ghosts = legsThat(legs, theory, ({ kind }) => kind === "ghost");
  if (potentials + ghosts === 0) return "none";
  if (potentials < totalOf(legs)) return "restricted";
  const needed = gaugeSelfInteracts(theory) ? 4 - potentials : Math.max(potentials, 4 - potentials);
  return derivatives < needed ? "excluded" : "restricted";
}

/** Row of the term with these legs and derivatives; a squared field strength stands for two potentials and two derivatives. */
function writtenAs(legs: HalfEdges, { space, time }: Derivatives, theory: Theory): string | null {
  const mirror = conjugated(legs, theory);
  const written = theory.terms.find(({ monomial }) => {
    if (monomial.derivatives !== space || monomial.timeDerivatives !== time) return false;
    const edges = halfEdgesOf(monomial, theory);
    return edges !== null && (sameHalfEdges(edges, legs) || sameHalfEdges(edges, mirror));
  });
  if (written) return written.rowId;
  const potentials = legsThat(legs, theory, ({ kind }) => kind === "gauge potential");
  if (potentials !== 2 || totalOf(legs) !== 2 || space !== 2) return null;
  const squared = theory.terms.find(({ kinetic, monomial }) => {
    const edges = halfEdgesOf(monomial, theory);
    return (
      kinetic && edges !== null && legsThat(edges, theory, ({ kind }) => kind === "field strength") === 2
    );
  });
  return squared?.rowId ?? null;
}

const massive: readonly Theory["fields"][number]["kind"][] = [
  "massive vector",
  "massive vector, conserved current",
  "massive spin 3/2",
];

/** Two legs of one field and a coefficient of dimension 0, or the mass of a massive kind: what the kind supposes. */
function isKinetic(legs: HalfEdges, coefficient: LinearForm, derivatives: number, theory: Theory): boolean {
  const alone = theory.fields.findIndex((_, f) => countOf(legs, f) === 2);
  const kind = theory.fields[alone]?.kind;
  const neutral = netOf(legs, theory).every((net) => net === 0);
  const isMass = derivatives === 0 && kind !== undefined && massive.includes(kind);
  return totalOf(legs) === 2 && alone >= 0 && neutral && (isMass || coefficient.equals(LinearForm.zero));
}

/** @param omega a number; for ω < 0 there are none. Highest derivative first. */
export function countertermsOf(
  omega: Rational,
  legs: HalfEdges,
  theory: Theory,
  useSymmetries: boolean,
): Counterterm[] {
  if (omega.sign() < 0) return [];
  const fields = weigh(legs, theory, (field) => field.dimension);
  const allowed = !useSymmetries || forbiddingSymmetry(legs, theory) === null;
  return derivativesUpTo(omega, legs, theory).map((derivatives) => {
    const { space, time, weight } = derivatives;
    const dimension = fields.plus(LinearForm.constant(weight));
    const coefficient = theory.measure.minus(dimension);
    const order = coefficient.asRational();
    const gradient = theory.spacetime.geometry === "isotropic" ? "\\partial" : "\\nabla";
    const marks = [
      ...(time > 0 ? [time === 1 ? "\\partial_t" : `\\partial_t^{${time}}`] : []),
      ...(space > 0 ? [space === 1 ? gradient : `${gradient}^{${space}}`] : []),
    ];
    const words = [
      time > 0 ? `d_t^${time}` : "",
      space > 0 ? `d^${space}` : "",
      productText(legs, theory) || "1",
    ];
    return {
      latex: [...marks, productLatex(legs, theory)].join("\\,"),
      text: words
        .filter((word) => word !== "")
        .join(" ")
        .replaceAll("^1 ", " "),
      derivatives: space,
      timeDerivatives: time,
      massPower: shown(omega.minus(weight)),
      analytic: derivatives.analytic,
      dimension: shown(dimension),
      coefficient: shown(coefficient),
      order: shown(order && order.sign() < 0 ? order.negated() : Rational.zero),
      kinetic: isKinetic(legs, coefficient, space + time, theory),
      presentAs: writtenAs(legs, derivatives, theory),
      allowed,
      gauge: gaugeStatus(legs, space, theory),
    };
  });
}
