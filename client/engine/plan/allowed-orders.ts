/** The step between orders at which local operators exist at all, given fields and symmetries. */
import { Rational } from "../exact/rational.ts";
import type { Theory } from "../premises/theory.ts";
import { legChoices } from "../divergence/amplitudes.ts";
import { contracts } from "../divergence/contraction.ts";
import { halfEdgesOf, netOf, totalOf, weigh } from "../divergence/half-edges.ts";
import { isRetarded } from "../divergence/retarded.ts";
import { forbiddingSymmetry, isFermionOdd } from "../divergence/selection.ts";

/** Orders are looked at from just above 0 to here: what is allowed beyond follows the same step. */
export const HIGHEST_LOOKED_AT = 4;
const MOST_LEGS = 16;
const MOST_CHOICES = 20_000;

/** Largest number that divides both a whole number of times; 0 divides nothing and is passed over. */
export function commonStep(a: Rational, b: Rational): Rational {
  let [large, small] = a.compare(b) > 0 ? [a, b] : [b, a];
  while (small.sign() > 0)
    [large, small] = [small, large.minus(small.times(Rational.of(large.over(small).floor())))];
  return large;
}

/**
 * Every order in (0, 4] at which an operator exists that symmetries, fermion parity and
 * contraction of indices allow. Schrödinger and static fields keep their number where every listed term does, as Galilean
 * invariance asks (Bargmann 1954, Ann. Math. 59, 1).
 * Bilinear operators are not counted, as equations of motion turn them into kinetic and mass terms; other redundant
 * ones are: at worst the step comes out too small, never too large.
 *
 * @returns null when a dimension is no number above 0, or there are too many fields to look through.
 */
export function allowedOrders(theory: Theory): readonly Rational[] | null {
  const known = knownOrders.get(theory);
  if (known !== undefined) return known;
  const found = findAllowedOrders(theory);
  knownOrders.set(theory, found);
  return found;
}

/** Theories never change, and every plan of a notebook asks for the same one. */
const knownOrders = new WeakMap<Theory, readonly Rational[] | null>();

function findAllowedOrders(theory: Theory): Rational[] | null {
  const measure = theory.measure.asRational();
  const weights = theory.fields.map(({ dimension }) => dimension.asRational());
  const time = theory.spacetime.geometry === "anisotropic" ? theory.spacetime.z.asRational() : null;
  if (!measure || weights.length === 0 || weights.some((weight) => !weight || weight.sign() <= 0))
    return null;
  const highest = measure.plus(Rational.of(HIGHEST_LOOKED_AT));
  const lightest = weights.reduce(
    (least, weight) => (weight && least && weight.compare(least) < 0 ? weight : least),
    weights[0] ?? null,
  );
  const most = lightest ? Math.min(MOST_LEGS, Number(highest.over(lightest).floor())) : 0;
  const choices = legChoices(theory, most, MOST_CHOICES);
  if (!choices) return null;
  const kept = keptNumbers(theory);
  const found = new Map<string, Rational>();
  for (const legs of choices) {
    if (totalOf(legs) < 3 || kept.some((f) => netOf(legs, theory)[f] !== 0)) continue;
    if (isFermionOdd(legs, theory) || forbiddingSymmetry(legs, theory)) continue;
    const fields = weigh(legs, theory, ({ dimension }) => dimension).asRational() ?? highest;
    for (let inTime = 0; inTime === 0 || (time && inTime <= HIGHEST_LOOKED_AT); inTime += 1) {
      for (let space = 0; ; space += 1) {
        const weight = Rational.of(space).plus(time ? time.times(Rational.of(inTime)) : Rational.zero);
        const order = fields.plus(weight).minus(measure);
        if (order.compare(Rational.of(HIGHEST_LOOKED_AT)) > 0) break;
        if (order.sign() > 0 && contracts(legs, space, theory)) found.set(order.toString(), order);
      }
    }
  }
  return [...found.values()].sort((a, b) => a.compare(b));
}

/** Fields that only run forward in time and whose number every listed term conserves. */
function keptNumbers(theory: Theory): number[] {
  const nets = theory.terms.flatMap(({ monomial }) => {
    const edges = halfEdgesOf(monomial, theory);
    return edges ? [netOf(edges, theory)] : [];
  });
  return theory.fields.flatMap((field, f) =>
    isRetarded(field) && nets.every((net) => net[f] === 0) ? [f] : [],
  );
}

/**
 * Greatest step that reaches every allowed order: 2 for scalars with φ → −φ in d = 4, 1 as soon as spinors can flip
 * chirality. Null when there are none.
 */
export function stepOfOrders(orders: readonly Rational[]): Rational | null {
  return orders.length === 0 ? null : orders.reduce(commonStep);
}
