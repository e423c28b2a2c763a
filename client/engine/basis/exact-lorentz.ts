/** The integral over momenta in big integers, for the few products whose floats would not be exact. Slow. */
/** A character by its terms: exponents of a, b and t, and how often. */
export type Monomials = readonly (readonly [x: number, y: number, k: number, coefficient: number])[];

/** Packs exponents |x|, |y| < 512 and 0 ≤ k < 512. */
export const pack = (x: number, y: number, k: number) => ((x + 512) * 1024 + y + 512) * 512 + k;

/**
 * ∫ dμ 1/P(t; a, b) Π P(t^k; a^k, b^k) Π (characters without P), as `LorentzIntegral` has it in floats.
 * @param lengths of all cycles
 * @param characters of what is not a scalar
 * @param scalars lengths of the cycles of scalars
 * @param most derivatives
 */
export function exactLorentz(
  lengths: readonly number[],
  characters: readonly Monomials[],
  scalars: readonly number[],
  most: number,
): readonly bigint[] {
  const side = 2 * most + 3;
  const layer = side * side;
  const series = Array.from({ length: (most + 1) * layer }, () => 0n);
  series[(most + 1) * side + most + 1] = 1n;
  const ones = lengths.filter((k) => k === 1).length;
  const shifts = (k: number) => [k * side + k, k * side - k, -k * side + k, -k * side - k];
  const passes = [
    ...lengths.filter((k) => k > 1 && k <= most),
    ...Array.from({ length: ones - 1 > 0 ? ones - 1 : 0 }, () => 1),
  ];
  for (const k of most > 0 ? passes : []) for (const shift of shifts(k)) divide(series, k, shift, layer);
  if (ones === 0 && most > 0) for (const shift of shifts(1)) timesOneMinus(series, shift, layer);

  let numerator = new Map([[pack(0, 0, 0), 1n]]);
  for (const factor of characters) {
    const product = new Map<number, bigint>();
    for (const [packed, coefficient] of numerator)
      for (const [x, y, t, c] of factor) {
        if ((packed % 512) + t > most) continue;
        const key = packed + (x * 1024 + y) * 512 + t;
        product.set(key, (product.get(key) ?? 0n) + BigInt(c) * coefficient);
      }
    numerator = product;
  }

  // The Haar measure of both SU(2): (1 − a²)(1 − b²), and the term without a and b.
  const value = Array.from({ length: most + 1 }, () => 0n);
  const at = (x: number, y: number, k: number) =>
    Math.abs(x) > most + 1 || Math.abs(y) > most + 1
      ? 0n
      : (series[k * layer + (x + most + 1) * side + y + most + 1] ?? 0n);
  for (const [packed, coefficient] of numerator) {
    const k = packed % 512;
    const y = (Math.floor(packed / 512) % 1024) - 512;
    const x = Math.floor(packed / (512 * 1024)) - 512;
    for (let total = k; total <= most; total++)
      value[total] =
        (value[total] ?? 0n) +
        coefficient *
          (at(-x, -y, total - k) -
            at(-x - 2, -y, total - k) -
            at(-x, -y - 2, total - k) +
            at(-x - 2, -y - 2, total - k));
  }
  for (const k of scalars)
    for (let total = most; total >= 2 * k; total--)
      value[total] = (value[total] ?? 0n) - (value[total - 2 * k] ?? 0n);
  return value;
}

/** Divides by 1 − t^k a^{±k} b^{±k}, in place. */
function divide(series: bigint[], k: number, shift: number, layer: number): void {
  for (let index = k * layer; index < series.length; index++) {
    const from = index - k * layer - shift;
    if (Math.floor(from / layer) !== Math.floor(index / layer) - k) continue;
    const value = series[from] ?? 0n;
    if (value !== 0n) series[index] = (series[index] ?? 0n) + value;
  }
}

function timesOneMinus(series: bigint[], shift: number, layer: number): void {
  for (let index = series.length - 1; index >= layer; index--) {
    const from = index - layer - shift;
    if (Math.floor(from / layer) !== Math.floor(index / layer) - 1) continue;
    const value = series[from] ?? 0n;
    if (value !== 0n) series[index] = (series[index] ?? 0n) - value;
  }
}
