/** Reads the single fields of an Order plan other than the scales. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { OrderPlanInputs } from "./inputs.ts";

const MOST_INSERTIONS = 6;
const LARGEST_CAP = 24;

export interface PlanSettings {
  /** Relative accuracy wanted, between 0 and 1. */
  readonly target: number;
  readonly insertions: number;
  readonly cap: Rational;
}

/** "1e-3", "1/1000", "0.1 %", "0.1%": exactly, or null. */
export function readTarget(text: string): Rational | null {
  const percent = /^(.*?)\s*%\s*$/.exec(text);
  const value = Rational.parse(percent?.[1] ?? text);
  return value && percent ? value.over(Rational.of(100)) : value;
}

export function readSettings(inputs: OrderPlanInputs, problems: Problem[]): PlanSettings {
  const wrong = (code: string, field: string, text: string, facts: Problem["facts"] = {}) =>
    problems.push({ code, path: [field], facts: { text, ...facts } });

  const target = readTarget(inputs.target)?.toFloat() ?? NaN;
  if (!(target > 0 && target < 1)) wrong("plan-target-unreadable", "target", inputs.target);

  const typed = inputs.insertions.trim() === "" ? "2" : inputs.insertions.trim();
  const insertions = /^\d{1,3}$/.test(typed) ? Number(typed) : 0;
  if (insertions < 1 || insertions > MOST_INSERTIONS)
    wrong("plan-insertions-unreadable", "insertions", inputs.insertions, { most: MOST_INSERTIONS });

  const cap = inputs.cap.trim() === "" ? Rational.of(8) : Rational.parse(inputs.cap);
  const fits = cap !== null && cap.sign() > 0 && cap.compare(Rational.of(LARGEST_CAP)) <= 0;
  if (!fits) wrong("plan-cap-unreadable", "cap", inputs.cap, { most: LARGEST_CAP });
  return { target, insertions, cap: fits ? cap : Rational.one };
}
