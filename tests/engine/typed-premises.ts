/** Premises as a person types them, read into a theory: rows get ids from their position. */
import { premisesShape } from "#engine/premises/inputs.ts";
import { readTheory } from "#engine/premises/read-theory.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { schemaOf } from "#engine/shape.ts";

/** `typed({ fields: ["chi|real scalar||odd"], … })`: columns in the order of the shape, separated by "|". */
export function typed(given: {
  readonly d?: string;
  readonly D?: string;
  readonly z?: string;
  readonly fields: readonly string[];
  readonly symmetries?: readonly string[];
  readonly scales?: readonly string[];
  readonly terms: readonly string[];
}): Theory {
  const rows = (prefix: string, lines: readonly string[] | undefined, columns: readonly string[]) =>
    (lines ?? []).map((line, n) => ({
      id: `${prefix}${n + 1}`,
      ...Object.fromEntries(line.split("|").map((text, c) => [columns[c] ?? "meaning", text.trim()])),
    }));
  const inputs = schemaOf(premisesShape).parse({
    geometry: given.D === undefined ? "isotropic" : "anisotropic",
    ...(given.d === undefined ? {} : { d: given.d }),
    ...(given.D === undefined ? {} : { D: given.D, z: given.z ?? "2" }),
    fields: rows("f", given.fields, ["symbol", "kind", "dimension", "charges"]),
    symmetries: rows("s", given.symmetries, ["name", "group"]),
    scales: rows("k", given.scales, ["symbol", "value", "role"]),
    terms: rows("t", given.terms, ["term", "natural", "assigned"]),
  });
  return readTheory(inputs);
}
