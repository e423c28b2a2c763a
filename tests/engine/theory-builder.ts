/** Small theories stated by hand, so that a case about counting is one line. Dimensions follow from the kinds. */
import { LinearForm } from "#engine/exact/linear-form.ts";
import { Rational } from "#engine/exact/rational.ts";
import type { Monomial } from "#engine/notation/monomial.ts";
import type { Field, FieldKind, Scale, Spacetime, Symmetry, Term, Theory } from "#engine/premises/theory.ts";

/** "4", "8/3", or a symbol: "d". */
function form(text: string | number, symbol: "d" | "D" | "z"): LinearForm {
  if (text === symbol) return LinearForm.symbol(symbol);
  const value = Rational.parse(String(text));
  if (!value) throw new Error(`not a number: ${text}`);
  return LinearForm.constant(value);
}

export interface FieldSketch {
  readonly kind: FieldKind;
  readonly charges?: readonly number[];
}
export interface TermSketch {
  /** "phi4", "psi~ psi A", "h3": factor symbols with a count; "~" is the conjugate. */
  readonly fields: string;
  readonly derivatives?: number;
  readonly timeDerivatives?: number;
  readonly natural?: number;
  readonly assigned?: readonly [value: number, sigma: number];
  readonly kinetic?: boolean;
}
export interface TheorySketch {
  readonly d?: string | number;
  readonly D?: string | number;
  readonly z?: string | number;
  readonly symmetries?: readonly (number | "U(1)")[];
  readonly fields: Readonly<Record<string, FieldKind | FieldSketch>>;
  readonly terms: Readonly<Record<string, TermSketch | string>>;
  readonly scales?: readonly Partial<Scale>[];
}

const selfConjugate: readonly FieldKind[] = [
  "real scalar",
  "Majorana spinor",
  "gauge potential",
  "massive vector",
  "massive vector, conserved current",
  "metric fluctuation",
  "field strength",
  "anisotropic scalar",
];
const bosons: readonly FieldKind[] = [
  ...selfConjugate.filter((kind) => kind !== "Majorana spinor"),
  "complex scalar",
  "Schrödinger field",
];

/** Canonical dimensions and ultraviolet weights: (d − 2)/2, (d − 1)/2, d/2, D/2, (D − z)/2. */
function dimensionsOf(kind: FieldKind, space: Spacetime): { dimension: LinearForm; weight: LinearForm } {
  const half = Rational.of(1, 2);
  const both = (value: LinearForm) => ({ dimension: value, weight: value });
  if (space.geometry === "anisotropic") {
    const { D, z } = space;
    return both((kind === "anisotropic scalar" ? D.minus(z) : D).times(half));
  }
  const lower = (by: number) => space.d.minus(LinearForm.constant(by)).times(half);
  if (kind === "massive vector") return { dimension: lower(2), weight: lower(0) };
  if (kind === "massive spin 3/2") return { dimension: lower(1), weight: lower(-1) };
  if (kind === "field strength") return both(lower(0));
  return both(bosons.includes(kind) || kind === "ghost" ? lower(2) : lower(1));
}

function readFactors(text: string): Monomial["fields"] {
  return text
    .split(" ")
    .filter((word) => word !== "")
    .map((word) => {
      const [, symbol = "", bar = "", count = ""] = /^([A-Za-z]+)(~?)(\d*)$/.exec(word) ?? [];
      if (symbol === "") throw new Error(`not a factor: ${word}`);
      return { symbol, conjugated: bar !== "", count: count === "" ? 1 : Number(count) };
    });
}

export function theoryOf(sketch: TheorySketch): Theory {
  const spacetime: Spacetime =
    sketch.D === undefined
      ? { geometry: "isotropic", d: form(sketch.d ?? 4, "d") }
      : { geometry: "anisotropic", D: form(sketch.D, "D"), z: form(sketch.z ?? 2, "z") };
  const measure = spacetime.geometry === "isotropic" ? spacetime.d : spacetime.D.plus(spacetime.z);
  const symmetries = (sketch.symmetries ?? []).map((group, index): Symmetry => ({
    rowId: `s${index + 1}`,
    name: group === "U(1)" ? "U(1)" : `Z${group}`,
    modulus: group === "U(1)" ? null : BigInt(group),
  }));
  const fields = Object.entries(sketch.fields).map(([symbol, given], index): Field => {
    const { kind, charges = [] } = typeof given === "string" ? { kind: given } : given;
    return {
      rowId: `f${index + 1}`,
      symbol,
      latex: symbol.length > 1 ? `\\${symbol}` : symbol,
      kind,
      statistics: bosons.includes(kind) ? "boson" : "fermion",
      selfConjugate: selfConjugate.includes(kind),
      ...dimensionsOf(kind, spacetime),
      overridden: false,
      charges: symmetries.map((_, s) => Rational.of(charges[s] ?? 0)),
    };
  });
  const terms = Object.entries(sketch.terms).map(([rowId, given]): Term => {
    const term: TermSketch = typeof given === "string" ? { fields: given } : given;
    const factors = readFactors(term.fields);
    const time = term.timeDerivatives ?? 0;
    const z = spacetime.geometry === "anisotropic" ? spacetime.z : LinearForm.constant(1);
    const derivativeWeight = LinearForm.constant(term.derivatives ?? 0).plus(z.times(time));
    const weigh = (read: (field: Field) => LinearForm) =>
      factors.reduce((sum, { symbol, count }) => {
        const field = fields.find((one) => one.symbol === symbol);
        if (!field) throw new Error(`no field ${symbol}`);
        return sum.plus(read(field).times(count));
      }, derivativeWeight);
    const dimension = weigh((field) => field.dimension);
    return {
      rowId,
      monomial: {
        prefactor: Rational.one,
        coefficients: [],
        fields: factors,
        derivatives: term.derivatives ?? 0,
        timeDerivatives: time,
      },
      latex: term.fields,
      dimension,
      coefficient: measure.minus(dimension),
      ultravioletCoefficient: measure.minus(weigh((field) => field.weight)),
      derivativeWeight,
      natural: term.natural ?? 1,
      assigned: term.assigned ? { value: term.assigned[0], sigma: term.assigned[1] } : null,
      kinetic: term.kinetic ?? false,
      allowed: true,
    };
  });
  const scales = (sketch.scales ?? []).map((scale, index): Scale => ({
    rowId: `k${index + 1}`,
    symbol: "",
    latex: scale.symbol ?? "",
    role: "other",
    value: null,
    sigma: 0,
    unit: "",
    gev: null,
    ...scale,
  }));
  return { name: "", spacetime, measure, symmetries, fields, scales, terms, problems: [] };
}

/** A scale in GeV: `gev("p", "probe", 350, 20)`. */
export function gev(symbol: string, role: Scale["role"], value: number, sigma = 0): Partial<Scale> {
  return { symbol, role, value, sigma, unit: "GeV", gev: { value, sigma } };
}
