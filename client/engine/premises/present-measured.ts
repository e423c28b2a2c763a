import { roundFloat } from "../evaluation.ts";
import { measuredText } from "../notation/measured.ts";
import type { Measured } from "./value.ts";

/** A value with uncertainty and unit, rounded for the engine's edge, with its text. */
export function presentMeasured(value: number, sigma: number, unit: string): Measured {
  return { value: roundFloat(value), sigma: roundFloat(sigma), unit, text: measuredText(value, sigma, unit) };
}

/** Digits of an estimate that has no uncertainty of its own. */
export const ESTIMATE_DIGITS = 3;

/** An estimated size, a pure number: no more digits than an estimate deserves. */
export function presentEstimate(value: number, sigma: number): Measured {
  const text = measuredText(value, sigma, "", ESTIMATE_DIGITS);
  return { value: roundFloat(value), sigma: roundFloat(sigma), unit: "", text };
}
