/** How much there is to count, looked at before it is done. */
import { fieldClasses, type FieldClass } from "./classes.ts";
import type { Content } from "./content.ts";
import { partitionNumber } from "./cycle-types.ts";

/** More field contents would not fit into memory, whatever the patience. */
export const MOST_CLASSES_COUNTED = 600_000;
/** The same for Lorentz integrals: many identical quanta have very many cycle types. */
const MOST_INTEGRALS = 1_500_000;

/** Measured on one core of a shared machine, in seconds; only their order of magnitude matters. */
const PER_CLASS = 60e-6;
const PER_QUANTUM_OF_AN_INTEGRAL = 0.8e-6;
const PER_ENTRY_AND_FACTOR = 1.5e-9;

export interface Work {
  readonly classes: readonly FieldClass[];
  readonly seconds: number;
  readonly isTooMuch: boolean;
}

/** @param most twice the largest mass dimension */
export function amountOfWork(content: Content, most: number): Work {
  const classes: FieldClass[] = [];
  const sizes = new Set<number>();
  fieldClasses(content, most, (found) => {
    classes.push(found);
    sizes.add(found.powers.reduce((sum, power) => sum + power, 0));
    return classes.length <= MOST_CLASSES_COUNTED;
  });
  // An integral over momenta depends on how many quanta there are and on their cycles, whatever they are called.
  let integrals = 0;
  let seconds = classes.length * PER_CLASS;
  for (const quanta of sizes) {
    const number = partitionNumber(quanta);
    integrals += number;
    seconds +=
      number *
      (quanta * PER_QUANTUM_OF_AN_INTEGRAL + entries(content.d, quanta, most) * PER_ENTRY_AND_FACTOR);
  }
  return {
    classes,
    seconds,
    isTooMuch: classes.length > MOST_CLASSES_COUNTED || integrals > MOST_INTEGRALS,
  };
}

/** Entries of a series in derivatives and weights, each multiplied by the d factors of every quantum. */
function entries(d: number, quanta: number, most: number): number {
  const derivatives = Math.max(0, Math.floor((most - quanta * (d - 2)) / 2));
  const rank = Math.floor(d / 2);
  return (derivatives + 1) * (2 * derivatives + 3) ** rank * d * Math.min(quanta, derivatives);
}
