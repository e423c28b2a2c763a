/** Values of the ruler as they are typed into the premises and the plan. */

/** Three digits of the probe scale are as fine as a pointer is. */
export function roundedProbe(value: number): number {
  return Number(value.toPrecision(3));
}

export function roundedTarget(value: number): number {
  return Number(value.toPrecision(2));
}

/**
 * A probe scale with its unit. An uncertainty that it had stays what it was, in the digits of the value.
 * @example probeText(352, 0, "GeV") // "352 GeV"
 * @example probeText(352, 10, "GeV") // "352(10) GeV"
 */
export function probeText(value: number, sigma: number, unit: string): string {
  const places = sigma > 0 ? Math.min(12, Math.max(0, 1 - Math.floor(Math.log10(sigma)))) : 0;
  const number =
    sigma > 0 ? `${value.toFixed(places)}(${Math.round(sigma * 10 ** places)})` : String(roundedProbe(value));
  return unit === "" ? number : `${number} ${unit}`;
}

/** @example targetText(0.001) // "1e-3" */
export function targetText(value: number): string {
  return roundedTarget(value).toExponential().replace("e+", "e");
}
