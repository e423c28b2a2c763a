/** Whether a block that was computed afresh says what is stored, and what the pin says. */
import type { StoredResult } from "#contract/api.ts";
import { roundFloat, type Evaluation } from "#engine/evaluation.ts";
import type { NotebookOutcome } from "#engine/notebook/evaluate-blocks.ts";
import { formatScalar, parsePinFormat } from "#engine/notebook/pin-format.ts";
import type { PinAttributes } from "#schema/block-structure.ts";
import { statusOf } from "../../editor/pins/pin-view-state.ts";

export interface Verdict {
  /** The number as recomputed, in the pin's format; null when the block no longer gives it. */
  readonly now: string | null;
  /** "other-inputs": what is stored belongs to inputs other than those on the page. */
  readonly stored: "agrees" | "differs" | "other-inputs" | "nothing";
  readonly pin: "agrees" | "differs" | "not-given";
}

export function verdictOf(
  { key, evaluation }: NotebookOutcome,
  stored: StoredResult | undefined,
  pin: PinAttributes,
): Verdict {
  const scalar = evaluation.scalars.find(({ id }) => id === pin.scalar);
  const { status } = statusOf(pin, evaluation);
  return {
    now: scalar ? formatScalar(scalar.value, parsePinFormat(pin.format)) : null,
    stored: compareStored(key, evaluation, stored),
    pin: status === "holds" ? "agrees" : status === "moved" ? "differs" : "not-given",
  };
}

function compareStored(key: string, fresh: Evaluation, stored: StoredResult | undefined): Verdict["stored"] {
  if (!stored) return "nothing";
  if (stored.key !== key) return "other-inputs";
  return isSameResult(fresh, stored.evaluation) ? "agrees" : "differs";
}

/** Value, numbers, problems and cautions, floats to 12 digits. The working is their derivation and not compared. */
export function isSameResult(a: Evaluation, b: Evaluation): boolean {
  return (["value", "scalars", "problems", "notices"] as const).every((part) => isSame(a[part], b[part]));
}

/** Plain JSON on both sides; a name that is missing and one that is undefined are the same, as they are in JSON. */
function isSame(a: unknown, b: unknown): boolean {
  if (typeof a === "number" && typeof b === "number") return roundFloat(a) + 0 === roundFloat(b) + 0;
  if (typeof a !== "object" || typeof b !== "object" || a === null || b === null) return a === b;
  if (Array.isArray(a) !== Array.isArray(b)) return false;
  const [left, right] = [new Map(Object.entries(a)), new Map(Object.entries(b))];
  return [...new Set([...left.keys(), ...right.keys()])].every((name) =>
    isSame(left.get(name), right.get(name)),
  );
}

/** One sentence or two for the reader. */
export function sayVerdict({ now, stored, pin }: Verdict, pinned: string): string {
  const found =
    now === null
      ? "Recomputed here, the block does not give this number."
      : pin === "agrees"
        ? `Recomputed here: ${now}. The pin agrees to 12 digits.`
        : `Recomputed here: ${now}. The pin says ${pinned}.`;
  return `${found} ${storedWords[stored]}`;
}

const storedWords: Readonly<Record<Verdict["stored"], string>> = {
  agrees: "The stored result agrees to 12 digits.",
  differs: "The stored result differs.",
  "other-inputs": "The stored result is of other inputs, so it was not compared.",
  nothing: "No result of this block is stored to compare with.",
};
