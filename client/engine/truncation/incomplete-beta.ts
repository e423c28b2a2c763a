/** The regularised incomplete beta function and the normal distribution: what the reference distributions are made of. */

/**
 * ln Γ(a) for a > 0: the recurrence up to a ≥ 20, then Stirling's series, whose first neglected term is below 1e-17
 * there (Abramowitz & Stegun 1964, 6.1.15 and 6.1.41).
 */
export function logGamma(a: number): number {
  let product = 0;
  let x = a;
  for (; x < 20; x += 1) product += Math.log(x);
  const u = 1 / (x * x);
  const series = (1 / 12 - u * (1 / 360 - u * (1 / 1260 - u * (1 / 1680 - u / 1188)))) / x;
  return (x - 0.5) * Math.log(x) - x + 0.5 * Math.log(2 * Math.PI) + series - product;
}

/** Continued fraction of the incomplete beta function by Lentz's method (Abramowitz & Stegun 1964, 26.5.8). */
export function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300;
  const kept = (value: number) => (Math.abs(value) < tiny ? tiny : value);
  let c = 1;
  let d = 1 / kept(1 - ((a + b) * x) / (a + 1));
  let fraction = d;
  for (let m = 1; m < 20_000; m += 1) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / kept(1 + even * d);
    c = kept(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / kept(1 + odd * d);
    c = kept(1 + odd / c);
    fraction *= d * c;
    if (Math.abs(d * c - 1) < 5e-16) break;
  }
  return fraction;
}

/**
 * I_x(a, b) and 1 − I_x(a, b), the smaller of them with its own relative accuracy; 0 ≤ x ≤ 1, a, b > 0.
 * @example incompleteBeta(0.4, 2.5, 1.5).below // 0.17392…
 */
export function incompleteBeta(x: number, a: number, b: number): { below: number; above: number } {
  if (x <= 0) return { below: 0, above: 1 };
  if (x >= 1) return { below: 1, above: 0 };
  const front = Math.exp(a * Math.log(x) + b * Math.log1p(-x) + logGamma(a + b) - logGamma(a) - logGamma(b));
  if (x < (a + 1) / (a + b + 2)) {
    const below = (front * betaFraction(x, a, b)) / a;
    return { below, above: 1 - below };
  }
  const above = (front * betaFraction(1 - x, b, a)) / b;
  return { below: 1 - above, above };
}

/**
 * Probability that D² is larger, where D² = N·F and F has Fisher's distribution with N and ν degrees of freedom: the
 * squared Mahalanobis distance of N values of a Student-t process. For ν → ∞ it is χ² with N degrees of freedom.
 * Source: Bastos, O'Hagan 2009, Technometrics 51, 425, equation 16.
 *
 * @example mahalanobisTail(6.3886, 1, 4) // 0.06483…
 */
export function mahalanobisTail(squared: number, count: number, nu: number): number {
  return incompleteBeta(squared / (nu + squared), count / 2, nu / 2).above;
}

/**
 * P(|Z| ≤ z) for a standard normal Z, z ≥ 0: erf(z/√2), by its series below 3 and the continued fraction of erfc above
 * (Abramowitz & Stegun 1964, 7.1.6 and 7.1.14).
 * @example normalCoverage(1) // 0.682689492137…
 */
export function normalCoverage(z: number): number {
  if (z > 9) return 1;
  const half = (z * z) / 2;
  const density = Math.sqrt(2 / Math.PI) * Math.exp(-half);
  if (z < 3) {
    let term = z;
    let sum = z;
    for (let n = 1; Math.abs(term) > 1e-17 * sum; n += 1) {
      term *= (z * z) / (2 * n + 1);
      sum += term;
    }
    return density * sum;
  }
  let fraction = z;
  for (let n = 60; n >= 1; n -= 1) fraction = z + n / fraction;
  return 1 - density / fraction;
}
