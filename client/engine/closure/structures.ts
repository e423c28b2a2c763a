/**
 * How many independent operators given fields and derivatives have, modulo integration by parts and equations of motion:
 * for scalars the polynomials in Mandelstam invariants, for spinors of d = 4 the singlets of the Hilbert series (Henning,
 * Lu, Melia, Murayama 2017). A Dirac spinor is a left- and a right-handed one.
 */
import { cycleTypes, factorial } from "../basis/cycle-types.ts";
import { LorentzIntegral } from "../basis/lorentz-integral.ts";
import { largestScalarDimension, ScalarIntegral } from "../basis/scalar-integral.ts";
import type { HalfEdges } from "../divergence/half-edges.ts";
import type { Theory } from "../premises/theory.ts";

type Spin = "scalar" | "left spinor" | "right spinor";
interface Power {
  readonly spin: Spin;
  readonly count: number;
}

/** Beyond these counting takes long. */
const MOST_LEGS = 10;
const MOST_DERIVATIVES = 12;

export class Structures {
  readonly #d: number | null;
  readonly #scalars: ScalarIntegral | null;
  readonly #spinors: LorentzIntegral | null;

  /** @param most derivatives that will be asked about; beyond twelve nothing is counted */
  constructor(
    private readonly theory: Theory,
    most: number,
  ) {
    const reach = Math.min(most, MOST_DERIVATIVES);
    const d = theory.spacetime.geometry === "isotropic" ? theory.spacetime.d.asRational() : null;
    this.#d = d?.isInteger() ? d.toFloat() : null;
    this.#scalars =
      this.#d !== null && this.#d >= 3 && this.#d <= largestScalarDimension
        ? new ScalarIntegral(this.#d, true, () => reach)
        : null;
    this.#spinors = this.#d === 4 ? new LorentzIntegral(2 * (2 * MOST_LEGS + reach)) : null;
  }

  /**
   * @param legs three or more: with two there are kinetic and mass terms, which are no question of counting
   * @returns null where fields other than scalars and spinors, the dimension or the size leave it undecided
   * @example φ⁴ with four derivatives in d = 4: 1; with two: 0
   */
  count(legs: HalfEdges, derivatives: number): number | null {
    const total = [...legs.plain, ...legs.conjugate].reduce((sum, count) => sum + count, 0);
    if (total > MOST_LEGS || derivatives > MOST_DERIVATIVES) return null;
    const choices = this.#powers(legs);
    if (!choices) return null;
    const onlyScalars = choices.every((powers) => powers.every(({ spin }) => spin === "scalar"));
    if (onlyScalars ? !this.#scalars : !this.#spinors) return null;
    return choices.reduce((sum, powers) => sum + this.#countOf(powers, derivatives, onlyScalars), 0);
  }

  /** The powers of chiral fields: one list for each way to share Dirac and Majorana legs out among left and right. */
  #powers(legs: HalfEdges): Power[][] | null {
    let choices: Power[][] = [[]];
    for (const [f, { kind, selfConjugate }] of this.theory.fields.entries()) {
      const [plain, conjugate] = [legs.plain[f] ?? 0, legs.conjugate[f] ?? 0];
      if (plain + conjugate === 0) continue;
      const parts = waysOf(kind, plain, conjugate, selfConjugate);
      if (!parts) return null;
      choices = choices.flatMap((powers) => parts.map((part) => [...powers, ...part]));
    }
    return choices;
  }

  #countOf(powers: readonly Power[], derivatives: number, onlyScalars: boolean): number {
    let sum = 0;
    const used = powers.filter(({ count }) => count > 0);
    const descend = (at: number, weight: number, scalars: number, others: number): void => {
      const power = used[at];
      if (!power) {
        const values = onlyScalars ? this.#scalars?.value(scalars) : this.#spinors?.value(others, scalars);
        sum += weight * (values?.[derivatives] ?? 0);
        return;
      }
      for (const { cycles, permutations } of cycleTypes(power.count)) {
        const sign = power.spin !== "scalar" && (power.count - cycles.length) % 2 === 1 ? -1 : 1;
        let [s, o] = [scalars, others];
        for (const k of cycles) {
          if (power.spin !== "scalar" && this.#spinors)
            o = this.#spinors.others.add(o, this.#spinors.element(power.spin, k));
          else if (onlyScalars && this.#scalars)
            s = this.#scalars.cycles.add(s, this.#scalars.element(false, k));
          else if (this.#spinors) s = this.#spinors.scalars.add(s, k);
        }
        descend(at + 1, weight * sign * Number(permutations), s, o);
      }
    };
    descend(0, 1, 0, 0);
    return Math.round(sum / used.reduce((product, { count }) => product * Number(factorial(count)), 1));
  }
}

/** Null for kinds that are neither scalars nor relativistic spinors. */
function waysOf(
  kind: Theory["fields"][number]["kind"],
  plain: number,
  conjugate: number,
  selfConjugate: boolean,
): Power[][] | null {
  const split = (count: number, inner: (left: number, right: number) => Power[]) =>
    Array.from({ length: count + 1 }, (_, left) => inner(left, count - left));
  switch (kind) {
    case "real scalar":
    case "complex scalar":
      return [
        [
          { spin: "scalar", count: plain },
          { spin: "scalar", count: conjugate },
        ],
      ];
    case "Weyl spinor":
      return [
        [
          { spin: "left spinor", count: plain },
          { spin: "right spinor", count: conjugate },
        ],
      ];
    case "Majorana spinor":
      return split(plain, (left, right) => [
        { spin: "left spinor", count: left },
        { spin: "right spinor", count: right },
      ]);
    case "Dirac spinor":
      if (selfConjugate) return null;
      // ψ_L and ψ_R of ψ; of its conjugate the Hermitian conjugates, which have the other handedness.
      return split(plain, (left, right) => [
        { spin: "left spinor", count: left },
        { spin: "right spinor", count: right },
      ]).flatMap((one) =>
        split(conjugate, (right, left) => [
          { spin: "right spinor", count: right },
          { spin: "left spinor", count: left },
        ]).map((other) => [...one, ...other]),
      );
    default:
      return null;
  }
}
