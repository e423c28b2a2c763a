/** What the ruler says aloud and beside its scale. */
import { plain, tenTo } from "../blocks/parts/plot-scales.ts";
import { sizeText, textTo, withUnit } from "../blocks/parts/number-text.ts";
import type { Reading, ReadMark } from "./reading.ts";
import type { RulerModel } from "./ruler-model.ts";

export function probeWords(model: RulerModel, probe: number): string {
  return withUnit(plain(Number(probe.toPrecision(3))), model.probe.unit);
}

export function ratioWords(model: RulerModel, reading: Reading): string {
  const sigma = (model.Q.sigma / model.Q.value) * reading.Q;
  if (!(sigma > 0)) return sizeText(reading.Q, 3);
  const places = Math.max(0, 1 - Math.floor(Math.log10(sigma)));
  return places > 9
    ? sizeText(reading.Q, 3)
    : `${textTo(reading.Q, sigma)}(${Math.round(sigma * 10 ** places)})`;
}

/** "10⁻³", "2.5 × 10⁻³". */
export function targetWords(target: number): string {
  const power = Math.log10(target);
  return Math.abs(power - Math.round(power)) < 1e-9 ? tenTo(Math.round(power)) : sizeText(target, 2);
}

/** After each step of a slider: the value first, then what follows from it. */
export function spokenReading(value: string, reading: Reading): string {
  if (reading.target === null) return `${value}, expansion parameter ${sizeText(reading.Q, 3)}`;
  if (!reading.order) return `${value}, the target is not reached by the listed terms`;
  const first = reading.firstOut;
  const out = first
    ? `first left out ${first.mark.spoken}, size ${sizeText(first.size)}`
    : "no listed term is left out";
  return `${value}, through order ${reading.order.text}, ${out}`;
}

export function markName({ mark, size, included }: ReadMark, isFirstOut: boolean): string {
  const many = mark.insertions > 1 ? "product of insertions" : mark.scalingClass;
  const place = isFirstOut ? "first left out" : included ? "kept" : "left out";
  return `${mark.spoken}, ${many}, size ${sizeText(size)}${mark.assigned ? " given by hand" : ""}, ${place}`;
}
