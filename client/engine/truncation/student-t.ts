/**
 * Two-sided quantiles of Student's t distribution for any real number of degrees of freedom.
 * Everything is done in w = ln(t²/ν), so that neither heavy tails nor small t lose digits.
 */
import { betaFraction } from "./incomplete-beta.ts";

/**
 * ln of Γ(a + ½)/Γ(a) for a > 0: the recurrence r(a) = r(a + 1)·a/(a + ½) up to a ≥ 20, then the asymptotic series,
 * whose first neglected term is below 1e-14 there. (Abramowitz & Stegun 1964, from 6.1.40; coefficients own derivation.)
 */
function logGammaStep(a: number): number {
  let shift = 0;
  let x = a;
  for (; x < 20; x += 1) shift += Math.log(x / (x + 0.5));
  const u = 1 / x;
  const u2 = u * u;
  return (
    shift +
    0.5 * Math.log(x) -
    u * (1 / 8 - u2 * (1 / 192 - u2 * (1 / 640 - u2 * (17 / 14336 - (u2 * 31) / 18432))))
  );
}

/** Probability inside and outside ±t, each with its own relative accuracy; w = ln(t²/ν). */
function coverage(w: number, nu: number): { inside: number; outside: number; slope: number } {
  const softplus = w > 0 ? w + Math.log1p(Math.exp(-w)) : Math.log1p(Math.exp(w));
  const x = 1 / (1 + Math.exp(-w));
  const y = 1 / (1 + Math.exp(w));
  // x^½ y^(ν/2) / B(½, ν/2), also d(inside)/dw.
  const slope = Math.exp(
    0.5 * (w - softplus) - (nu / 2) * softplus + logGammaStep(nu / 2) - 0.5 * Math.log(Math.PI),
  );
  if (x < 1.5 / (2.5 + nu / 2)) {
    const inside = (slope * betaFraction(x, 0.5, nu / 2)) / 0.5;
    return { inside, outside: 1 - inside, slope };
  }
  const outside = (slope * betaFraction(y, nu / 2, 0.5)) / (nu / 2);
  return { inside: 1 - outside, outside, slope };
}

/** Quantiles by probability and ν, each computed once: the same few occur at every order and every Q. */
export type Quantiles = (probability: number, nu: number) => number;
export function rememberQuantiles(): Quantiles {
  const known = new Map<string, number>();
  return (probability, nu) => {
    const name = `${probability} ${nu}`;
    const quantile = known.get(name) ?? studentHalfWidth(probability, nu);
    known.set(name, quantile);
    return quantile;
  };
}

/** Probability that |T| ≤ t for Student's t with ν > 0 degrees of freedom, t ≥ 0. */
export function studentCoverage(t: number, nu: number): number {
  return t === 0 ? 0 : coverage(2 * Math.log(t) - Math.log(nu), nu).inside;
}

/**
 * The t for which P(|T| ≤ t) = probability: the half-width of the central interval in units of the scale.
 *
 * @param probability two-sided degree of belief, strictly between 0 and 1
 * @param nu degrees of freedom, any real number in (0, 10⁶]
 * @returns t > 0; Infinity when it exceeds a double
 * @example studentHalfWidth(0.95, 3) // 3.18244630528…
 */
export function studentHalfWidth(probability: number, nu: number): number {
  if (!(probability > 0 && probability < 1 && nu > 0))
    throw new RangeError("a quantile needs 0 < p < 1 and ν > 0");
  const tail = 1 - probability;
  let low = -720;
  let high = 700;
  if (coverage(high, nu).outside > tail) return Infinity;
  let w = 0;
  for (let step = 0; step < 300; step += 1) {
    const { inside, outside, slope } = coverage(w, nu);
    // Solve for the logarithm of the smaller side, where Newton's step is nearly exact in both tails.
    const upper = tail < 0.5;
    const miss = upper ? Math.log(tail / outside) : Math.log(inside / probability);
    if (miss > 0) high = w;
    else low = w;
    const step = miss / (slope / (upper ? outside : inside));
    // Newton's method converges quadratically: after a step this small, what is left is rounding.
    if (Math.abs(step) < 1e-9) {
      w -= step;
      break;
    }
    w = w - step > low && w - step < high ? w - step : (low + high) / 2;
  }
  return Math.exp((w + Math.log(nu)) / 2);
}
