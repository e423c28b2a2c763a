/** Floats of a result as text, where the engine gives only the number. */
import { superscript } from "#engine/notation/float-text.ts";
import { defaultPinFormat, formatScalar } from "#engine/notebook/pin-format.ts";

/** As a pin of it would read. */
export function sizeText(value: number, digits = 2): string {
  return formatScalar({ type: "number", value }, { ...defaultPinFormat, digits });
}

export function withUnit(text: string, unit: string): string {
  return unit === ""
    ? text
    : `${text} ${unit.replace(/\^(-?\d+)/g, (_, power: string) => superscript(power))}`;
}

/** As many digits after the mark as make `resolution` two digits: 8.0312 with an error of 0.048 is "8.031". */
export function textTo(value: number, resolution: number, unit = ""): string {
  const hasResolution = resolution > 0 && Number.isFinite(resolution);
  const places = hasResolution ? Math.min(12, Math.max(0, 1 - Math.floor(Math.log10(resolution)))) : 3;
  const size = Math.abs(value);
  if (size !== 0 && (size < 1e-3 || size >= 1e6)) return withUnit(sizeText(value, 3), unit);
  return withUnit(value.toFixed(places).replace(/^-/, "−"), unit);
}
