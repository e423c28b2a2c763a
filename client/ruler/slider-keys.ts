/** Keys of a slider whose values are multiplied, not added: every step is the same distance on a logarithmic scale. */
export interface SliderRange {
  readonly low: number;
  readonly high: number;
  /** Factor of one arrow key, and of Page Up and Page Down. */
  readonly step: number;
  readonly leap: number;
}

/** The value that a key asks for; null when the key is none of the slider's. */
export function valueAfterKey(key: string, value: number, range: SliderRange): number | null {
  const factors: Readonly<Record<string, number>> = {
    ArrowRight: range.step,
    ArrowUp: range.step,
    ArrowLeft: 1 / range.step,
    ArrowDown: 1 / range.step,
    PageUp: range.leap,
    PageDown: 1 / range.leap,
  };
  const factor = factors[key];
  if (factor !== undefined) return within(value * factor, range);
  if (key === "Home") return range.low;
  return key === "End" ? range.high : null;
}

export function within(value: number, { low, high }: Pick<SliderRange, "low" | "high">): number {
  return Math.min(high, Math.max(low, value));
}
