/** Whether a demanded operator is independent of others, where that can be decided. */
import { countOf } from "../divergence/half-edges.ts";
import { isSpinor } from "../divergence/legs.ts";
import type { Theory } from "../premises/theory.ts";
import type { Candidate, Target } from "./targets.ts";
import type { Structures } from "./structures.ts";
import type { Independence } from "./value.ts";

export interface Decision {
  readonly independence: Independence;
  readonly structures: number | null;
}

const undecided: Decision = { independence: "not decided", structures: null };

/**
 * One leg is not decided: a shift of the field may remove it. Of two legs the mass is independent and the kinetic term a
 * normalisation; more derivatives are removed by the equation of motion, and kinetic mixing by a redefinition of fields.
 * Three and more are counted. A shift symmetry allows only some of what is counted: with five or more legs a count above
 * zero then decides nothing.
 */
export function independenceOf(
  { legs, total, described }: Target,
  { counterterm }: Candidate,
  theory: Theory,
  shift: readonly boolean[],
  structures: Structures,
): Decision {
  const { derivatives, timeDerivatives, kinetic, gauge } = counterterm;
  const decided = (independence: Independence, count: number | null = null): Decision => ({
    independence,
    structures: count,
  });
  if (kinetic && derivatives + timeDerivatives > 0) return decided("normalisation");
  if (gauge !== "none" || theory.spacetime.geometry === "anisotropic" || total < 2) return undecided;
  const isUsual = described.fields.every(({ fieldRowId }) => {
    const field = theory.fields.find(({ rowId }) => rowId === fieldRowId);
    return (
      field?.kind.endsWith(" scalar") ||
      (field && isSpinor(field) && field.kind !== "static heavy field" && !field.kind.includes("3/2"))
    );
  });
  if (total === 2) {
    if (!isUsual) return undecided;
    return derivatives === 0 ? decided("independent", 1) : decided("redundant", 0);
  }
  const count = structures.count(legs, derivatives);
  if (count === null) return undecided;
  if (count === 0) return decided("redundant", 0);
  const shiftLegs = theory.fields.some((_, f) => shift[f] && countOf(legs, f) > 0);
  return shiftLegs && total > 4 ? undecided : decided("independent", count);
}
