/** Gauge anomalies of the fermions: sums over left-handed spinors that vanish in a consistent gauge theory. */
import { Rational } from "../exact/rational.ts";
import type { Content, Quantum } from "./content.ts";
import type { Representation } from "./representations.ts";

export interface Anomaly {
  /** "SU(3)³", "SU(2)² U(1)". */
  readonly name: string;
  /** The coefficient for one flavour; "odd" for the global anomaly of SU(2) (Witten 1982). */
  readonly coefficient: string;
}

/**
 * Of SU(N) and those U(1) that an operator must be neutral under. Coefficients are normalised to the fundamental, with
 * n_f counted once: what does not vanish for one flavour does not for n_f.
 */
export function anomaliesOf(content: Content): readonly Anomaly[] {
  const spinors = content.quanta.filter(({ spin }) => spin === "left spinor");
  if (spinors.length === 0) return [];
  const gauged = content.charges
    .map((charge, index) => ({ ...charge, index }))
    .filter(({ modulo, kept }) => modulo === null && kept?.length === 1 && kept[0]?.sign() === 0);
  const found: Anomaly[] = [];
  const note = (name: string, sum: Rational) => {
    if (sum.sign() !== 0) found.push({ name, coefficient: sum.toString() });
  };
  content.gauge.forEach(({ n }, at) => {
    const group = `SU(${n})`;
    if (n > 2)
      note(
        `${group}³`,
        total(spinors, (spinor) => times(spinor, at, ({ anomaly }) => anomaly)),
      );
    else if (hasGlobalAnomaly(spinors, at)) found.push({ name: `${group}, global`, coefficient: "odd" });
    for (const { name, index } of gauged)
      note(
        `${group}² ${name}`,
        total(spinors, (spinor) => times(spinor, at, (r) => 2 * r.index).times(charge(spinor, index))),
      );
  });
  gauged.forEach((first, a) => {
    note(
      `gravity² ${first.name}`,
      total(spinors, (spinor) => components(spinor).times(charge(spinor, first.index))),
    );
    gauged.slice(a).forEach((second, b) => {
      gauged.slice(a + b).forEach((third) => {
        const names = [first, second, third].map(({ name }) => name).join(" ");
        note(
          names,
          total(spinors, (spinor) =>
            [first, second, third].reduce(
              (product, { index }) => product.times(charge(spinor, index)),
              components(spinor),
            ),
          ),
        );
      });
    });
  });
  return found;
}

const charge = ({ charges }: Quantum, index: number) => charges[index] ?? Rational.zero;

function copies({ flavours }: Quantum): number {
  return flavours === "symbolic" ? 1 : flavours;
}

function components(quantum: Quantum): Rational {
  const size = [...quantum.representations.map(({ dimension }) => dimension)].reduce((a, b) => a * b, 1);
  return Rational.of(size * copies(quantum));
}

/** A property of one representation, times the dimensions of all the others. */
function times(quantum: Quantum, at: number, property: (representation: Representation) => number): Rational {
  const own = quantum.representations[at];
  if (!own) return Rational.zero;
  return components(quantum)
    .over(Rational.of(own.dimension))
    .times(Rational.of(Math.round(property(own))));
}

function total(spinors: readonly Quantum[], of: (spinor: Quantum) => Rational): Rational {
  return spinors.reduce((sum, spinor) => sum.plus(of(spinor)), Rational.zero);
}

/** An odd number of half-integer indices: with n_f symbolic it is odd for odd n_f. */
function hasGlobalAnomaly(spinors: readonly Quantum[], at: number): boolean {
  const sum = total(spinors, (spinor) => times(spinor, at, ({ index }) => 2 * index));
  return !sum.over(Rational.of(2)).isInteger();
}
