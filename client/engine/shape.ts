/**
 * The shape of a block's inputs: single fields and tables of rows, all values typed text.
 * From one shape come the zod schema of the evaluate format, the attributes of the document node and the form.
 */
import * as z from "zod/mini";

export interface FieldSpec {
  /** The value of a field nobody has touched. */
  readonly initial: string;
  /** The only values allowed, for a choice; absent for free text. */
  readonly choices?: readonly string[];
  /** False for titles and notes: they never enter the key of a result. */
  readonly keyed: boolean;
  /** For a reference: the value is the id of a block of one of these kinds, or of any kind; "" means none. */
  readonly refersTo?: readonly string[] | "any";
}
export type Columns = Readonly<Record<string, FieldSpec>>;

export interface Shape<
  F extends Columns = Columns,
  T extends Readonly<Record<string, Columns>> = Readonly<Record<string, Columns>>,
> {
  readonly fields: F;
  readonly tables: T;
}

/** The inputs that a shape describes: text by field name, rows with ids by table name. */
export type InputsOf<S extends Shape> = { readonly [K in keyof S["fields"]]: string } & {
  readonly [K in keyof S["tables"]]: readonly ({ readonly id: string } & {
    readonly [C in keyof S["tables"][K]]: string;
  })[];
};

export function text(initial = ""): FieldSpec {
  return { initial, keyed: true };
}
export function note(initial = ""): FieldSpec {
  return { initial, keyed: false };
}
export function choice(first: string, ...others: string[]): FieldSpec {
  return { initial: first, choices: [first, ...others], keyed: true };
}
/** The id of another block whose result this one uses. */
export function reference(refersTo: readonly string[] | "any"): FieldSpec {
  return { initial: "", keyed: true, refersTo };
}
export function defineShape<F extends Columns, T extends Readonly<Record<string, Columns>>>(
  shape: Shape<F, T>,
): Shape<F, T> {
  return shape;
}

/** Numbers are accepted where text is meant, so that a file may say "d": 4. */
const typedText = z.pipe(z.union([z.string().check(z.maxLength(4000)), z.number()]), z.transform(String));

function fieldSchema(spec: FieldSpec) {
  const allowed = spec.choices;
  const base = allowed
    ? typedText.check(
        z.refine((value: string) => allowed.includes(value), {
          error: `must be one of: ${allowed.join(", ")}`,
        }),
      )
    : typedText;
  return z._default(base, spec.initial);
}

/** The zod schema of a shape: unknown fields are refused, missing ones take their initial value. */
export function schemaOf<S extends Shape>(shape: S): z.ZodMiniType<InputsOf<S>> {
  const members: Record<string, z.ZodMiniType> = {};
  for (const [name, spec] of Object.entries(shape.fields)) members[name] = fieldSchema(spec);
  for (const [name, columns] of Object.entries(shape.tables)) {
    const row: Record<string, z.ZodMiniType> = { id: z.string().check(z.minLength(1), z.maxLength(100)) };
    for (const [column, spec] of Object.entries(columns)) row[column] = fieldSchema(spec);
    members[name] = z._default(z.array(z.strictObject(row)).check(z.maxLength(2000)), []);
  }
  // The members are built from the shape, so the inferred type is exactly InputsOf<S>.
  return z.strictObject(members) as unknown as z.ZodMiniType<InputsOf<S>>;
}
