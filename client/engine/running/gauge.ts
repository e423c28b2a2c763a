/**
 * Gauge β functions from field content (Gross and Wilczek 1973; Politzer 1973; Caswell 1974; Jones 1974, 1982; for
 * several groups Machacek and Vaughn 1983), per Weyl fermion and complex scalar:
 *   μ dα_i/dμ = −(α_i²/2π) [β₀_i + Σ_j β₁_ij α_j/4π],
 *   β₀ = 11/3 C(G) − 2/3 Σ T(F) − 1/3 Σ T(S),
 *   β₁_ij = δ_ij [34/3 C(G)² − C(G) (10/3 Σ T(F) + 2/3 Σ T(S))] − Σ_F 2 C_j T_i − Σ_S 4 C_j T_i.
 * T of one field counts the components it has under the other groups. A Dirac fermion is two Weyl ones, a real scalar
 * half a complex one.
 */
import { Rational } from "../exact/rational.ts";
import type { contentKinds } from "./inputs.ts";

export interface GaugeGroup {
  readonly rowId: string;
  /** N of SU(N); 1 for U(1). */
  readonly n: number;
  readonly name: string;
  readonly symbol: string;
  readonly latex: string;
  readonly given: "g" | "alpha";
  /** α at the first scale; null when not given. */
  readonly alpha: number | null;
}
export interface Matter {
  readonly rowId: string;
  readonly name: string;
  readonly kind: (typeof contentKinds)[number];
  readonly copies: Rational;
  /** One per group: dimension, index T and Casimir C of its representation; for U(1) the charge squared, twice. */
  readonly charges: readonly {
    readonly dimension: Rational;
    readonly index: Rational;
    readonly casimir: Rational;
  }[];
  /** Threshold in GeV, or a pure number; null: always there. */
  readonly mass: number | null;
}
export interface GaugeCoefficients {
  readonly beta0: readonly Rational[];
  /** β₁_ij by row i and column j. */
  readonly beta1: readonly (readonly Rational[])[];
}

const fraction = (over: number, under: number) => Rational.of(over, under);

/** Number of Weyl fermions (κ of each is 1) or complex scalars. */
function multiplicity({ kind, copies }: Matter): Rational {
  const each =
    kind === "Dirac fermion" ? Rational.of(2) : kind === "real scalar" ? Rational.of(1, 2) : Rational.one;
  return copies.times(each);
}
function isFermion({ kind }: Matter): boolean {
  return kind === "Weyl fermion" || kind === "Dirac fermion";
}

/** T_i of all components of a field: its index times the dimensions under the other groups. */
function wholeIndex(matter: Matter, group: number): Rational {
  return matter.charges.reduce(
    (product, charge, index) => product.times(index === group ? charge.index : charge.dimension),
    multiplicity(matter),
  );
}

/** β₀ and β₁ of each group; of SU(3) with six Dirac triplets 7 and 26. */
export function gaugeCoefficients(
  groups: readonly GaugeGroup[],
  matter: readonly Matter[],
): GaugeCoefficients {
  const adjoint = groups.map(({ n }) => (n === 1 ? Rational.zero : Rational.of(n)));
  const sumOf = (fermions: boolean, weight: (one: Matter) => Rational) =>
    matter
      .filter((one) => isFermion(one) === fermions)
      .reduce((total, one) => total.plus(weight(one)), Rational.zero);
  const total = (fermions: boolean, i: number) => sumOf(fermions, (one) => wholeIndex(one, i));
  return {
    beta0: groups.map((_, i) => {
      const own = (adjoint[i] ?? Rational.zero).times(fraction(11, 3));
      return own.minus(total(true, i).times(fraction(2, 3))).minus(total(false, i).times(fraction(1, 3)));
    }),
    beta1: groups.map((_, i) =>
      groups.map((__, j) => {
        const own = adjoint[i] ?? Rational.zero;
        const crossed = (fermions: boolean) =>
          sumOf(fermions, (one) => wholeIndex(one, i).times(one.charges[j]?.casimir ?? Rational.zero));
        const mixed = crossed(true)
          .times(Rational.of(2))
          .plus(crossed(false).times(Rational.of(4)));
        if (i !== j) return mixed.negated();
        const bosons = own.times(own).times(fraction(34, 3));
        const loops = total(true, i)
          .times(fraction(10, 3))
          .plus(total(false, i).times(fraction(2, 3)));
        return bosons.minus(own.times(loops)).minus(mixed);
      }),
    ),
  };
}
