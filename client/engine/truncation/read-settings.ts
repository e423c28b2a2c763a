/** Reads the single fields of the block other than the expansion parameter. */
import type { Notice, Problem } from "../evaluation.ts";
import { readNumber } from "./read-orders.ts";
import { isPriorSet, setChoices, typedOr, type TruncationInputs } from "./shape.ts";
import type { Degree, PriorSettings } from "./value.ts";

const MOST_DEGREES = 6;
/** Larger priors would only repeat the normal distribution, and the quantile is tested up to here. */
const LARGEST_NU0 = 1e5;

export interface Settings {
  readonly degrees: readonly Degree[];
  readonly nu0: number;
  readonly tau0: number;
  /** X_ref as given; null stands for the value of the lowest order. */
  readonly reference: number | null;
  /** Null when no prior set is asked for. */
  readonly sets: PriorSettings | null;
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
}

const MOST_TERMS = 60;

export function readSettings(inputs: TruncationInputs): Settings {
  const problems: Problem[] = [];
  const notices: Notice[] = [];
  const wrong = (code: string, field: string, text: string, facts: Record<string, string | number> = {}) =>
    problems.push({ code, path: [field], facts: { text, ...facts } });

  const degrees: Degree[] = [];
  for (const part of inputs.belief.split(/[,;\s]+/).filter((piece) => piece !== "" && piece !== "%")) {
    const percent = readNumber(part.replace(/%$/, ""))?.toFloat() ?? NaN;
    if (!(percent > 0 && percent < 100)) wrong("belief-unreadable", "belief", part);
    else if (!degrees.some(({ text }) => text === String(percent))) {
      degrees.push({ text: String(percent), probability: percent / 100 });
      if (percent < 1)
        notices.push({ code: "belief-below-one-percent", path: ["belief"], facts: { text: part } });
    }
  }
  if (degrees.length === 0 && problems.length === 0) wrong("belief-missing", "belief", inputs.belief);
  if (degrees.length > MOST_DEGREES)
    wrong("belief-too-many", "belief", inputs.belief, { most: MOST_DEGREES });

  const nu0 = readNumber(inputs.nu0)?.toFloat() ?? NaN;
  if (!(nu0 >= 0 && nu0 <= LARGEST_NU0)) wrong("nu0-unreadable", "nu0", inputs.nu0, { largest: LARGEST_NU0 });
  const tau0 = readNumber(inputs.tau0)?.toFloat() ?? NaN;
  if (!(tau0 > 0)) wrong("tau0-unreadable", "tau0", inputs.tau0);

  const isLowest = /^(lo|)$/i.test(inputs.reference.trim());
  const reference = isLowest ? null : (readNumber(inputs.reference)?.toFloat() ?? NaN);
  if (reference !== null && Number.isNaN(reference))
    wrong("reference-unreadable", "reference", inputs.reference);
  if (reference === 0) wrong("reference-zero", "reference", inputs.reference);
  const sets = wantsSets(inputs) ? readSets(inputs, wrong) : null;
  return { degrees, nu0, tau0, reference, sets, problems, notices };
}

function wantsSets({ sets, method }: TruncationInputs): boolean {
  return sets === setChoices[1] || isPriorSet(method);
}

type Wrong = (code: string, field: string, text: string, facts?: Record<string, string | number>) => unknown;

function readSets(inputs: TruncationInputs, wrong: Wrong): PriorSettings {
  const positive = (field: "cbarLow" | "cbarHigh" | "cbarWidth") => {
    const value = readNumber(typedOr(inputs, field))?.toFloat() ?? NaN;
    if (!(value > 0)) wrong("cbar-unreadable", field, inputs[field]);
    return value;
  };
  const [low, high, sigma] = [positive("cbarLow"), positive("cbarHigh"), positive("cbarWidth")];
  if (low >= high) wrong("cbar-limits-reversed", "cbarHigh", typedOr(inputs, "cbarHigh"), { low });
  const typed = inputs.terms.trim();
  const terms = typed === "" ? null : /^\d{1,3}$/.test(typed) ? Number(typed) : 0;
  if (terms !== null && (terms < 1 || terms > MOST_TERMS))
    wrong("terms-unreadable", "terms", inputs.terms, { most: MOST_TERMS });
  return { low, high, sigma, terms };
}
