/** The superficially divergent amplitudes of a theory within caps, and those that something forbids. */
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import type { Theory } from "../premises/theory.ts";
import { countertermsOf } from "./counterterms.ts";
import { graphExists, internalLines } from "./graph-existence.ts";
import {
  addHalfEdges,
  conjugated,
  countOf,
  noHalfEdges,
  totalOf,
  weigh,
  type HalfEdges,
} from "./half-edges.ts";
import { describeLegs } from "./legs.ts";
import { isRetarded, vanishesInVacuum } from "./retarded.ts";
import { forbiddingSymmetry, isFermionOdd } from "./selection.ts";
import type { Amplitude, AmplitudeAtOrder, AmplitudeStatus } from "./value.ts";
import { numberOf, type SetIndex, type VertexSet } from "./vertex-sets.ts";

export interface Caps {
  readonly loops: number;
  readonly legs: number;
  readonly order: Rational;
}

/**
 * Every choice of up to `most` legs of the fields that `takesPart` names, one of each pair of Hermitian conjugates.
 * Null when there are more than `limit`.
 */
export function legChoices(
  theory: Theory,
  most: number,
  limit: number,
  takesPart: (field: number) => boolean = () => true,
): HalfEdges[] | null {
  let choices: HalfEdges[] = [noHalfEdges(theory)];
  theory.fields.forEach((field, f) => {
    if (!takesPart(f)) return;
    const sides = field.selfConjugate ? (["plain"] as const) : (["plain", "conjugate"] as const);
    for (const side of sides) {
      const single = { ...noHalfEdges(theory), [side]: theory.fields.map((_, g) => (g === f ? 1 : 0)) };
      if (choices.length > limit) return;
      choices = choices.flatMap((legs) => {
        const free = most - totalOf(legs);
        // Many of the first field come first, and more fields than conjugates: the order in which people list them.
        return Array.from({ length: free + 1 }, (_, n) => addHalfEdges(legs, single, free - n));
      });
    }
  });
  if (choices.length > limit) return null;
  const seen = new Set<string>();
  const keyOf = (legs: HalfEdges) => `${legs.plain.join(",")}|${legs.conjugate.join(",")}`;
  return choices.filter((legs) => {
    seen.add(keyOf(legs));
    const mirror = keyOf(conjugated(legs, theory));
    return mirror === keyOf(legs) || !seen.has(mirror);
  });
}

interface Found {
  readonly atOrders: readonly {
    readonly order: Rational;
    readonly omega: Rational;
    readonly loops: number;
    readonly set: VertexSet;
  }[];
  /** Whether graphs exist at all, and whether each of them vanishes in vacuum. */
  readonly anyGraph: boolean;
  readonly anyRetarded: boolean;
}

/** The largest degree at each order in 1/Λ, with the fewest loops that reach it, among graphs that exist. */
function bestGraphs(legs: HalfEdges, sets: SetIndex, caps: Caps, theory: Theory): Found {
  const bound = numberOf(theory.measure.minus(weigh(legs, theory, (field) => field.weight)));
  const best = new Map<string, Found["atOrders"][number]>();
  let anyGraph = false;
  let anyRetarded = false;
  // The vacuum has one graph without vertices: the free loop.
  const lone = totalOf(legs) === 0 ? sets.find(1, legs).find(({ vertices }) => vertices.length === 0) : null;
  // A line that only runs forward in time does not close on itself: some other field must.
  if (lone && theory.fields.every(isRetarded)) anyRetarded = true;
  else if (lone) {
    anyGraph = true;
    best.set("0", { order: Rational.zero, omega: bound, loops: 1, set: lone });
  }
  for (let loops = 1; loops <= caps.loops; loops += 1) {
    for (const set of sets.find(loops, legs)) {
      if (set.vertices.length === 0 || !hasEnough(set, legs)) continue;
      const omega = bound.minus(set.coefficients);
      const before = best.get(set.orderKey);
      if ((before && before.omega.compare(omega) >= 0) || (anyGraph && omega.sign() < 0)) continue;
      const lines = internalLines(set.vertices, legs, theory);
      if (graphExists(set.vertices, legs, lines, theory) !== "exists") continue;
      if (vanishesInVacuum(set.vertices, legs, theory)) {
        anyRetarded = true;
        continue;
      }
      anyGraph = true;
      if (omega.sign() >= 0) best.set(set.orderKey, { order: set.order, omega, loops, set });
    }
  }
  const atOrders = [...best.values()].sort((a, b) => a.order.compare(b.order));
  return { atOrders, anyGraph, anyRetarded };
}

/** Whether the vertices have the external legs: settled first, being quick. */
function hasEnough(set: VertexSet, legs: HalfEdges): boolean {
  return legs.plain.every((_, f) => countOf(set.edges, f) >= countOf(legs, f));
}

/** @returns null when the legs neither diverge nor would if something did not forbid it. */
export function amplitudeOf(
  legs: HalfEdges,
  sets: SetIndex,
  caps: Caps,
  theory: Theory,
  useSymmetries: boolean,
): Amplitude | null {
  const bound = numberOf(theory.measure.minus(weigh(legs, theory, (field) => field.weight)));
  if (bound.plus(caps.order).sign() < 0) return null;
  const broken = useSymmetries ? forbiddingSymmetry(legs, theory) : null;
  const odd = isFermionOdd(legs, theory);
  const found = odd || broken ? null : bestGraphs(legs, sets, caps, theory);
  const largest = found?.atOrders.reduce(
    (top, one) => (one.omega.compare(top.omega) > 0 ? one : top),
    found.atOrders[0] ?? { omega: bound },
  );
  if (found && found.atOrders.length > 0 && largest) {
    const omega = largest.omega;
    return {
      legs: describeLegs(legs, theory),
      status: "divergent",
      forbiddenBy: null,
      omega: shown(omega),
      verdict: omega.sign() === 0 ? "logarithmic" : "power",
      atOrders: found.atOrders.map(describeOrder),
      counterterms: countertermsOf(omega, legs, theory, useSymmetries),
    };
  }
  // Amplitudes that converge on their own are not listed, nor those that only irrelevant terms would make diverge.
  if (bound.sign() < 0 || found?.anyGraph) return null;
  return {
    legs: describeLegs(legs, theory),
    status: statusOf(odd, broken !== null, found?.anyRetarded ?? false),
    forbiddenBy: odd ? null : (broken?.name ?? null),
    omega: shown(bound),
    verdict: bound.sign() === 0 ? "logarithmic" : "power",
    atOrders: [],
    counterterms: [],
  };
}

function statusOf(odd: boolean, broken: boolean, retarded: boolean): AmplitudeStatus {
  if (odd) return "forbidden by fermion parity";
  if (broken) return "forbidden by symmetry";
  return retarded ? "vanishes in vacuum" : "no graph within the caps";
}

function describeOrder({ order, omega, loops, set }: Found["atOrders"][number]): AmplitudeAtOrder {
  return {
    order: shown(order),
    omega: shown(omega),
    loops,
    vertices: set.vertices.map(({ interaction: { term }, count }) => ({
      termRowId: term.rowId,
      latex: term.latex,
      count,
    })),
  };
}
