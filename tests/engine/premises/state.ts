/** Premises as a person would type them, in one line each. Row ids: f1…, s1…, k1…, t1… in order. */
import { premisesShape, type PremisesInputs } from "#engine/premises/inputs.ts";
import { readTheory } from "#engine/premises/read-theory.ts";
import type { FieldKind, ScaleRole, Term, Theory } from "#engine/premises/theory.ts";
import { schemaOf } from "#engine/shape.ts";

export interface Sketch {
  readonly d?: string;
  /** Anisotropic when D is given. */
  readonly D?: string;
  readonly z?: string;
  readonly symmetries?: Readonly<Record<string, string>>;
  readonly fields?: Readonly<
    Record<
      string,
      FieldKind | { readonly kind: FieldKind; readonly dimension?: string; readonly charges?: string }
    >
  >;
  readonly scales?: Readonly<Record<string, string | readonly [value: string, role: ScaleRole]>>;
  readonly terms?: readonly (
    string | { readonly term: string; readonly natural?: string; readonly assigned?: string }
  )[];
}

export function premisesOf(sketch: Sketch): PremisesInputs {
  const { fields = {}, symmetries = {}, scales = {}, terms = [] } = sketch;
  return schemaOf(premisesShape).parse({
    geometry: sketch.D === undefined ? "isotropic" : "anisotropic",
    ...(sketch.d === undefined ? {} : { d: sketch.d }),
    ...(sketch.D === undefined ? {} : { D: sketch.D }),
    ...(sketch.z === undefined ? {} : { z: sketch.z }),
    fields: Object.entries(fields).map(([symbol, field], i) => ({
      id: `f${i + 1}`,
      symbol,
      ...(typeof field === "string" ? { kind: field } : field),
    })),
    symmetries: Object.entries(symmetries).map(([name, group], i) => ({ id: `s${i + 1}`, name, group })),
    scales: Object.entries(scales).map(([symbol, scale], i) => {
      const [value, role] = typeof scale === "string" ? [scale, "other"] : scale;
      return { id: `k${i + 1}`, symbol, value, role };
    }),
    terms: terms.map((term, i) => ({ id: `t${i + 1}`, ...(typeof term === "string" ? { term } : term) })),
  });
}

export function theoryFrom(sketch: Sketch): Theory {
  return readTheory(premisesOf(sketch));
}
/** The theory's only term, which must have been read. */
export function termOf(sketch: Sketch): Term {
  const theory = theoryFrom(sketch);
  const [term] = theory.terms;
  if (!term) throw new Error(JSON.stringify(theory.problems));
  return term;
}
/** "code at table/row/column", in order. */
export function problemsOf(sketch: Sketch): string[] {
  return theoryFrom(sketch).problems.map(({ code, path }) => `${code} at ${path.join("/")}`);
}
