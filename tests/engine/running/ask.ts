import { evaluateRunning } from "#engine/running/evaluate.ts";
import { runningShape } from "#engine/running/inputs.ts";
import { schemaOf } from "#engine/shape.ts";
import { theoryFrom, type Sketch } from "../premises/state.ts";

type Typed = Readonly<Record<string, string>>;
export interface Question {
  readonly theory?: Sketch;
  readonly about?: "scales" | "4 - eps" | "3 - eps";
  readonly from?: string;
  readonly to?: string;
  readonly at?: readonly string[];
  readonly values?: Typed;
  readonly components?: Typed;
  readonly sign?: string;
  readonly gaugeLoops?: string;
  readonly epsilon?: string;
  readonly groups?: readonly Typed[];
  readonly content?: readonly Typed[];
}

const subjects = {
  scales: "running between two scales",
  "4 - eps": "fixed points in 4 − ε dimensions",
  "3 - eps": "fixed points in 3 − ε dimensions",
};

/** Rows are named by their place, "groups1"; values and components by what they are of. */
export function ask({
  theory,
  about = "scales",
  at,
  values,
  components,
  groups,
  content,
  ...fields
}: Question) {
  const rows = (name: string, list: readonly Typed[] = []) =>
    list.map((row, index) => ({ id: `${name}${index + 1}`, ...row }));
  const inputs = schemaOf(runningShape).parse({
    ...fields,
    about: subjects[about],
    at: rows(
      "at",
      at?.map((scale) => ({ scale })),
    ),
    values: rows(
      "values",
      Object.entries(values ?? {}).map(([coupling, value]) => ({ coupling, value })),
    ),
    components: rows(
      "components",
      Object.entries(components ?? {}).map(([field, count]) => ({ field, count })),
    ),
    groups: rows("groups", groups),
    content: rows("content", content),
  });
  return evaluateRunning(inputs, theory ? theoryFrom(theory) : null);
}
/** What 16π² β is, as LaTeX, by coupling. */
export function betas(question: Question): Readonly<Record<string, string>> {
  return Object.fromEntries((ask(question).value?.betas ?? []).map(({ id, rightLatex }) => [id, rightLatex]));
}
export function scalar(question: Question, id: string): number {
  const found = ask(question).scalars.find((one) => one.id === id)?.value;
  if (found?.type !== "number") throw new Error(`no number ${id}`);
  return found.value;
}
export const codes = (list: readonly { readonly code: string }[]) => list.map(({ code }) => code);

export const real = (...terms: readonly string[]): Sketch => ({ fields: { phi: "real scalar" }, terms });
