/** Points, ranges and labels for the plots along x. */
import { plainLatex } from "../parts/plain-latex.ts";

/** The points that have a value. */
export function pointsOf(
  x: readonly number[],
  values: readonly (number | null)[],
): (readonly [number, number])[] {
  return x.flatMap((at, index) => {
    const value = values[index] ?? null;
    return value === null ? [] : [[at, value] as const];
  });
}

/** From the least to the largest of some values, with a little room around. */
export function rangeOf(values: readonly number[], room = 0.06): readonly [number, number] {
  const finite = values.filter(Number.isFinite);
  if (finite.length === 0) return [0, 1];
  const [low, high] = [Math.min(...finite), Math.max(...finite)];
  const space = (high - low || Math.abs(high) || 1) * room;
  return [low - space, high + space];
}

/** The ends of a list of x, apart even when there is one only. */
export function spanOf(x: readonly number[]): readonly [number, number] {
  const [low, high] = [x[0] ?? 0, x.at(-1) ?? 1];
  return low < high ? [low, high] : [low - 1, high + 1];
}

/** "p (MeV)": LaTeX of a name as plain text, with its unit. */
export function axisLabel(name: string, unit: string): string {
  const plain = plainLatex(name);
  return unit === "" ? plain : `${plain} (${unit})`;
}
