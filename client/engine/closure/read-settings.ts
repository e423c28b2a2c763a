/** The caps, the regulator and the shift symmetry, as typed. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { Theory } from "../premises/theory.ts";
import type { ClosureInputs } from "./inputs.ts";

export interface Settings {
  readonly cutoff: boolean;
  readonly massless: boolean;
  readonly useSymmetries: boolean;
  readonly order: Rational;
  readonly loops: number;
  /** Null: as many as the order leaves room for. */
  readonly legs: number | null;
  /** For each field, whether its shift is a symmetry. */
  readonly shift: readonly boolean[];
}

const MOST_LOOPS = 4;
export const MOST_LEGS = 12;
const MOST_ORDER = 12;

/** Problems: `cap-unreadable`, `shift-unknown`, `shift-not-scalar`. */
export function readSettings(inputs: ClosureInputs, theory: Theory, problems: Problem[]): Settings {
  const whole = (field: "maxLoops" | "maxLegs", most: number): number | null => {
    const typed = inputs[field].trim();
    if (typed === "") return null;
    const value = /^\d{1,4}$/.test(typed) ? Number(typed) : -1;
    if (value < 1 || value > most)
      problems.push({ code: "cap-unreadable", path: [field], facts: { text: typed, most } });
    return value;
  };
  const typed = inputs.maxOrder.trim();
  const order = typed === "" ? Rational.of(2) : Rational.parse(typed);
  const fits = order !== null && order.sign() >= 0 && order.compare(Rational.of(MOST_ORDER)) <= 0;
  if (!fits)
    problems.push({ code: "cap-unreadable", path: ["maxOrder"], facts: { text: typed, most: MOST_ORDER } });
  return {
    cutoff: inputs.regulator === "cutoff",
    massless: inputs.regulator !== "cutoff" && inputs.masses !== "kept as light parameters",
    useSymmetries: inputs.symmetries === "yes",
    order: fits ? order : Rational.zero,
    loops: whole("maxLoops", MOST_LOOPS) ?? 2,
    legs: whole("maxLegs", MOST_LEGS),
    shift: readShift(inputs.shift, theory, problems),
  };
}

const shifted: readonly Theory["fields"][number]["kind"][] = [
  "real scalar",
  "complex scalar",
  "anisotropic scalar",
];

function readShift(text: string, { fields }: Theory, problems: Problem[]): boolean[] {
  const names = text.split(/[,;\s]+/).filter((name) => name !== "");
  const found = fields.map(() => false);
  for (const name of names) {
    const bare = name.replace(/^\\/, "");
    const index = fields.findIndex(({ symbol }) => symbol === bare);
    const field = fields[index];
    if (!field) problems.push({ code: "shift-unknown", path: ["shift"], facts: { text: name } });
    else if (!shifted.includes(field.kind))
      problems.push({
        code: "shift-not-scalar",
        path: ["shift"],
        facts: { latex: field.latex, kind: field.kind },
      });
    else found[index] = true;
  }
  return found;
}
