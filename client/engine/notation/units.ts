/** Units of energy and length in natural units, ħ = c = 1. Lengths count energy −1. */
import { Rational } from "../exact/rational.ts";

/**
 * ħc in GeV fm. Exact as a product in the SI of 2019: h c/(2π e) with h = 6.62607015e-34 J s, c = 299792458 m/s,
 * e = 1.602176634e-19 C; only π makes it irrational. CODATA 2022 gives 197.326 980 459 3… MeV fm.
 */
export const HBARC_GEV_FM = ((6.62607015e-34 * 299792458) / (2 * Math.PI * 1.602176634e-19)) * 1e6;

export interface Unit {
  readonly name: string;
  /** Power of energy: 1, or −1 for a length. */
  readonly energy: 1 | -1;
  /** In GeV or 1/GeV. */
  readonly size: number;
  /** The same exactly, where it is rational. */
  readonly exact: Rational | null;
}

function energy(name: string, tenPower: number): Unit {
  const exact = Rational.of(10).power(tenPower);
  return { name, energy: 1, size: exact.toFloat(), exact };
}
function length(name: string, femtometres: number): Unit {
  return { name, energy: -1, size: femtometres / HBARC_GEV_FM, exact: null };
}

const units: ReadonlyMap<string, Unit> = new Map(
  [
    energy("eV", -9),
    energy("keV", -6),
    energy("MeV", -3),
    energy("GeV", 0),
    energy("TeV", 3),
    energy("PeV", 6),
    length("am", 1e-3),
    length("fm", 1),
    length("pm", 1e3),
    length("nm", 1e6),
  ].map((unit) => [unit.name, unit]),
);

/** The unit of that name, or null. Names are case sensitive: MeV is no meV. */
export function unitNamed(name: string): Unit | null {
  return units.get(name) ?? null;
}
