/** What each consistency check found, in a sentence. */
import { SAMPLES, type Checks, type CoverageCheck, type OrderCheck } from "./checks.ts";

export interface Finding {
  readonly check: "coverage" | "distance" | "pivoted" | "coefficients";
  /** Whether it speaks against the model at 95 %. */
  readonly against: boolean;
  readonly says: string;
}

export function describeFindings(checks: Checks): Finding[] {
  return [
    ...coverageFinding(checks),
    ...distanceFinding(checks.orders),
    ...pivotedFinding(checks.orders),
    coefficientsFinding(checks),
  ];
}

function coverageFinding({ coverage, beliefs }: Checks): Finding[] {
  if (coverage.length === 0) return [];
  // 68 % is not among the degrees checked; 70 % is the nearest.
  const at = beliefs.findIndex((belief) => Math.abs(belief - 0.7) < 1e-9);
  const outside = coverage.filter((one) => isOutside(one));
  const details = coverage.map(({ next, inside, expected }) => {
    const [low = NaN, high = NaN] = expected[at] ?? [];
    return `${percent(inside[at] ?? NaN)} to order ${next} (expected ${percent(low)} to ${percent(high)})`;
  });
  const verdict =
    outside.length === 0
      ? "The intervals cover the next shifts as often as they claim, within what so few independent points allow"
      : `The intervals before order ${list(outside.map(({ next }) => next))} cover ${directionOf(outside, beliefs)} than they claim`;
  return [
    {
      check: "coverage",
      against: outside.length > 0,
      says: `${verdict}: of the 70 % intervals, ${details.join(", ")}. The expected range is from ${SAMPLES} draws of the model.`,
    },
  ];
}

/** Outside the band at more than a quarter of the degrees of belief: at one or two it happens by itself. */
function isOutside({ inside, expected }: CoverageCheck): boolean {
  const misses = inside.filter((share, index) => {
    const [low = 0, high = 1] = expected[index] ?? [];
    return share < low || share > high;
  });
  return misses.length > inside.length / 4;
}

function directionOf(outside: readonly CoverageCheck[], beliefs: readonly number[]): string {
  const excess = outside.map(({ inside }) =>
    inside.reduce((sum, share, i) => sum + share - (beliefs[i] ?? 0), 0),
  );
  if (excess.every((one) => one < 0)) return "less";
  return excess.every((one) => one > 0) ? "more" : "more or less";
}

function distanceFinding(orders: readonly OrderCheck[]): Finding[] {
  const known = orders.filter(({ distance }) => Number.isFinite(distance));
  if (known.length === 0) return [];
  const more = known.filter(({ tail }) => tail < 0.025).map(({ order }) => order);
  const less = known.filter(({ tail }) => tail > 0.975).map(({ order }) => order);
  const parts = [
    ...(more.length > 0
      ? [`${orderOf(more)} ${more.length > 1 ? "shift" : "shifts"} more than these errors allow at 95 %`]
      : []),
    ...(less.length > 0
      ? [
          `${orderOf(less)} ${less.length > 1 ? "shift" : "shifts"} less than these errors would have it at 95 %`,
        ]
      : []),
  ];
  const says =
    parts.length === 0
      ? `Every order shifts as much as the others lead one to expect: all ${known.length} squared distances lie within their 95 % range.`
      : `${capital(parts.join("; "))}.`;
  return [{ check: "distance", against: parts.length > 0, says }];
}

function pivotedFinding(orders: readonly OrderCheck[]): Finding[] {
  const known = orders.filter(({ pivoted }) => pivoted.length > 0);
  const all = known.flatMap(({ pivoted, pivotedLimit }) =>
    pivoted.map((error) => Math.abs(error) / pivotedLimit),
  );
  if (all.length === 0) return [];
  const beyond = all.filter((error) => error > 1).length;
  // Binomial with 5 %: two standard deviations, and never fewer than one in excess.
  const most = Math.max(1, Math.floor(0.05 * all.length + 2 * Math.sqrt(0.05 * 0.95 * all.length)));
  const halves = known.map(({ pivoted }) => {
    const middle = Math.ceil(pivoted.length / 2);
    return [meanSquare(pivoted.slice(0, middle)), meanSquare(pivoted.slice(middle))] as const;
  });
  const early = mean(halves.map(([one]) => one));
  const late = mean(halves.map(([, other]) => other));
  const why =
    beyond <= most
      ? ""
      : late > 2 * early
        ? " The late ones are the larger, which speaks for a shorter length scale."
        : early > 2 * late
          ? " The early ones are the larger, which speaks for larger coefficients or another Q rather than another length scale."
          : "";
  return [
    {
      check: "pivoted",
      against: beyond > most,
      says: `${beyond} of ${all.length} pivoted-Cholesky errors lie beyond the 95 % lines; up to ${most} would be expected.${why}`,
    },
  ];
}

function coefficientsFinding({ withinSigma: [one, two] }: Checks): Finding {
  return {
    check: "coefficients",
    against: false,
    says: `${percent(one)} of the coefficients lie within ±1σ and ${percent(two)} within ±2σ; a normal distribution has 68 % and 95 %, but values along a curve are not independent.`,
  };
}

function meanSquare(values: readonly number[]): number {
  return mean(values.map((value) => value * value));
}
function mean(values: readonly number[]): number {
  return values.length === 0 ? 0 : values.reduce((sum, value) => sum + value, 0) / values.length;
}
function percent(share: number): string {
  return `${Math.round(100 * share)} %`;
}
function list(numbers: readonly number[]): string {
  return numbers.length < 2
    ? numbers.join("")
    : `${numbers.slice(0, -1).join(", ")} and ${numbers.at(-1) ?? ""}`;
}
function orderOf(numbers: readonly number[]): string {
  return `order${numbers.length > 1 ? "s" : ""} ${list(numbers)}`;
}
function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
