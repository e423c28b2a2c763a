/** The graduation: whole decades of relative size, the largest at the left. */
export interface RulerAxis {
  /** Powers of ten at the two ends: { high: 0, low: -6 } runs from 1 to a millionth. */
  readonly high: number;
  readonly low: number;
  readonly left: number;
  readonly right: number;
}

export interface Graduation {
  readonly x: number;
  readonly length: "long" | "middle" | "short";
  /** Power of ten to write below; null for the ticks between. */
  readonly power: number | null;
}

const FEWEST_DECADES = 4;
const MOST_DECADES = 14;

/** Ends that hold all sizes and leave a decade beyond the target for what is left out. */
export function rulerAxis(
  sizes: readonly number[],
  target: number | null,
  [left, right]: readonly [number, number],
): RulerAxis {
  const logs = sizes.map(Math.log10).filter(Number.isFinite);
  const high = Math.min(6, Math.max(0, Math.ceil(Math.max(0, ...logs) - 0.1)));
  const ends = [...logs, ...(target === null ? [] : [Math.log10(target) - 1])];
  const lowest = Math.floor(Math.min(...ends, high - FEWEST_DECADES) + 0.02);
  return { high, low: Math.max(lowest, high - MOST_DECADES), left, right };
}

export function positionOf(axis: RulerAxis, size: number): number {
  return axis.left + ((axis.high - Math.log10(size)) / (axis.high - axis.low)) * (axis.right - axis.left);
}

export function sizeAtPosition(axis: RulerAxis, x: number): number {
  return 10 ** (axis.high - ((x - axis.left) / (axis.right - axis.left)) * (axis.high - axis.low));
}

/** Ticks at 1, 2, …, 9 of every decade; fewer where a decade is narrow. */
export function graduations(axis: RulerAxis): readonly Graduation[] {
  const perDecade = (axis.right - axis.left) / (axis.high - axis.low);
  const digits = perDecade > 80 ? [9, 8, 7, 6, 5, 4, 3, 2] : perDecade > 32 ? [5, 2] : [];
  const every = perDecade > 30 ? 1 : 2;
  const ticks: Graduation[] = [];
  for (let power = axis.high; power >= axis.low; power -= 1) {
    ticks.push({
      x: positionOf(axis, 10 ** power),
      length: "long",
      power: (axis.high - power) % every === 0 ? power : null,
    });
    if (power === axis.low) break;
    for (const digit of digits)
      ticks.push({
        x: positionOf(axis, digit * 10 ** (power - 1)),
        length: digit === 5 ? "middle" : "short",
        power: null,
      });
  }
  return ticks;
}
