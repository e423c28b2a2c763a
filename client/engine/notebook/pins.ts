/** Whether a pinned number still agrees with its block. */
import { roundFloat, type Evaluation, type Scalar, type ScalarValue } from "../evaluation.ts";
import type { PinInstance } from "./block-instance.ts";

export type PinStatus =
  | { readonly status: "holds"; readonly scalar: Scalar }
  /** `was` is null when the pin's own record cannot be read. */
  | { readonly status: "moved"; readonly was: ScalarValue | null; readonly now: Scalar }
  | { readonly status: "loose"; readonly why: "block-gone" | "block-in-error" | "scalar-gone" };

/** Exact and word by their text; floats by value, uncertainty and unit, rounded to 12 digits. */
export function isSameScalar(a: ScalarValue, b: ScalarValue): boolean {
  if (a.type === "number" && b.type === "number") {
    return (
      Object.is(roundFloat(a.value) + 0, roundFloat(b.value) + 0) &&
      roundFloat(a.sigma ?? 0) === roundFloat(b.sigma ?? 0) &&
      (a.unit ?? "") === (b.unit ?? "")
    );
  }
  return a.type !== "number" && b.type !== "number" && a.type === b.type && a.text === b.text;
}

/** Reads the value a pin carries; null when it is not the JSON of a `ScalarValue`. */
export function readPinValue(json: string): ScalarValue | null {
  let value: unknown;
  try {
    value = JSON.parse(json);
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
  if (typeof value !== "object" || value === null) return null;
  const { type, text, value: number, sigma, unit } = value as Record<string, unknown>; // any object may be read by name
  if ((type === "exact" || type === "word") && typeof text === "string") return { type, text };
  if (type !== "number" || typeof number !== "number") return null;
  return {
    type,
    value: number,
    ...(typeof sigma === "number" ? { sigma } : {}),
    ...(typeof unit === "string" ? { unit } : {}),
  };
}

/**
 * Compares a pin with the present evaluation of its block.
 *
 * @param evaluations by block id; a block that is not among them is gone
 */
export function pinStatus(
  pin: Pick<PinInstance, "blockId" | "scalar" | "value">,
  evaluations: ReadonlyMap<string, Evaluation>,
): PinStatus {
  const evaluation = evaluations.get(pin.blockId);
  if (!evaluation) return { status: "loose", why: "block-gone" };
  if (evaluation.value === null) return { status: "loose", why: "block-in-error" };
  const now = evaluation.scalars.find(({ id }) => id === pin.scalar);
  if (!now) return { status: "loose", why: "scalar-gone" };
  const was = readPinValue(pin.value);
  return was && isSameScalar(was, now.value)
    ? { status: "holds", scalar: now }
    : { status: "moved", was, now };
}
