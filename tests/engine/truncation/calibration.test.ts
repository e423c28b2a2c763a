import { describe, expect, it } from "vitest";
import { chanceFrom } from "#engine/truncation/chance.ts";
import { checkConsistency } from "#engine/truncation/checks.ts";
import { colour } from "#engine/truncation/cholesky.ts";
import type { CoefficientsAlong } from "#engine/truncation/coefficients-along.ts";
import { studentHalfWidth } from "#engine/truncation/student-t.ts";
import { jointPosterior } from "#engine/truncation/joint-posterior.ts";
import { factorOf } from "#engine/truncation/kernel.ts";
import { ternTrap, ternTrapBreakdown, ternTrapTable } from "#engine/truncation/tern-trap.ts";
import { evaluateCurve, ternTable } from "./curve-block.ts";
import { scalar } from "./truncation-block.ts";

// Draws with fixed seeds: these tests always see the same numbers. The bounds are what a binomial with so many trials
// gives in 999 of 1000 cases, so that a statement that is wrong by much cannot pass.

const degrees = [
  { text: "68", probability: 0.68 },
  { text: "95", probability: 0.95 },
];
const prior = { nu0: 0.5, tau0: 1 };
const [points, length, breakdown] = [24, 60, 600];
const x = Array.from({ length: points }, (_, index) => 60 + (300 * index) / (points - 1));
const ordersKnown = [1, 2, 3, 4];

/** Coefficients drawn from the model itself, with 20 further orders of which the truncation error is made. */
function draw(seed: number): { coefficients: CoefficientsAlong; truth: readonly number[] } {
  const chance = chanceFrom(seed);
  const { factor } = factorOf(x, length, 1e-10);
  const one = () =>
    colour(
      factor,
      Float64Array.from({ length: points }, () => chance.normal()),
    );
  const q = x.map((at) => at / breakdown);
  const coefficients: CoefficientsAlong = {
    x,
    q,
    reference: x.map(() => 1),
    orders: ordersKnown.map((order) => ({ order, power: order, values: one() })),
    left: { incomplete: 0, zeroReference: 0, beyondOne: 0, outOfRange: 0 },
  };
  const rest = Array.from({ length: 20 }, (_, index) => ({ order: 5 + index, values: one() }));
  const truth = q.map((at, point) =>
    rest.reduce((sum, { order, values }) => sum + (values[point] ?? 0) * at ** order, 0),
  );
  return { coefficients, truth };
}

describe("the correlated model, on data drawn from it", () => {
  const trials = Array.from({ length: 60 }, (_, index) => {
    const { coefficients, truth } = draw(100 + 37 * index);
    const belief = { logPrior: () => 0, range: [Math.log(0.25), Math.log(4)] as const, stated: breakdown };
    const observable = { coefficients, parameterAt: null, nugget: 1e-8 };
    const posterior = jointPosterior([observable], [null], prior, belief, degrees, () => undefined);
    const fitted = posterior?.fitted[0]?.coefficients;
    if (!posterior?.breakdown || !posterior.length || !fitted) throw new Error("there is a posterior");
    return { posterior, truth, coefficients, checks: checkConsistency(fitted, posterior.chosen, prior) };
  });
  const share = (holds: (trial: (typeof trials)[number]) => boolean) =>
    trials.filter(holds).length / trials.length;
  const covers = (interval: { low: number; high: number } | undefined, value: number) =>
    interval !== undefined && interval.low < value && value < interval.high;

  it("has the breakdown scale in its 68 % and 95 % intervals as often as that says", () => {
    const at68 = share(({ posterior }) => covers(posterior.breakdown?.intervals[0], breakdown));
    const at95 = share(({ posterior }) => covers(posterior.breakdown?.intervals[1], breakdown));
    expect(at68).toBeGreaterThan(0.47);
    expect(at68).toBeLessThan(0.87);
    expect(at95).toBeGreaterThan(0.84);
  });

  it("has the length scale in its intervals as often as that says", () => {
    const at68 = share(({ posterior }) => covers(posterior.length?.intervals[0], length));
    expect(at68).toBeGreaterThan(0.47);
    expect(at68).toBeLessThan(0.87);
    expect(share(({ posterior }) => covers(posterior.length?.intervals[1], length))).toBeGreaterThan(0.84);
  });

  it("has the true truncation error in its 68 % intervals about as often", () => {
    const inside = trials.map(({ posterior, truth, coefficients }) => {
      const { squares } = posterior.chosen;
      const count = posterior.fitted[0]?.coefficients.x.length ?? 0;
      const nu = prior.nu0 + squares.length * count;
      const tau2 = (prior.nu0 + squares.reduce((sum, one) => sum + one, 0)) / nu;
      const quantile = studentHalfWidth(0.68, nu);
      const hits = coefficients.q.filter((q, point) => {
        const scale = Math.sqrt((tau2 * q ** 10) / (1 - q * q));
        return Math.abs(truth[point] ?? 0) <= quantile * scale;
      });
      return hits.length / points;
    });
    // Sixty curves of about six independent pieces each.
    const mean = inside.reduce((sum, one) => sum + one, 0) / inside.length;
    expect(mean).toBeGreaterThan(0.6);
    expect(mean).toBeLessThan(0.76);
  });

  it("finds the distance of one order in twenty beyond its 95 % range", () => {
    const tails = trials.flatMap(({ checks }) => checks.orders.map(({ tail }) => tail));
    const beyond = tails.filter((tail) => tail < 0.025 || tail > 0.975).length / tails.length;
    expect(tails).toHaveLength(60 * ordersKnown.length);
    expect(beyond).toBeGreaterThan(0.008);
    expect(beyond).toBeLessThan(0.11);
  });

  it("has as many pivoted-Cholesky errors beyond their 95 % lines as that says", () => {
    const errors = trials.flatMap(({ checks }) =>
      checks.orders.flatMap(({ pivoted, pivotedLimit }) =>
        pivoted.map((one) => Math.abs(one) / pivotedLimit),
      ),
    );
    const beyond = errors.filter((one) => one > 1).length / errors.length;
    expect(beyond).toBeGreaterThan(0.035);
    expect(beyond).toBeLessThan(0.065);
  });

  it("expects of finite samples what they show: the shares lie in the band about 95 times of 100", () => {
    const hits = trials.flatMap(({ checks }) =>
      checks.coverage.flatMap(({ inside, expected }) =>
        inside.map(
          (one, belief) => one >= (expected[belief]?.[0] ?? 2) && one <= (expected[belief]?.[1] ?? -1),
        ),
      ),
    );
    const within = hits.filter(Boolean).length / hits.length;
    expect(within).toBeGreaterThan(0.9);
    expect(within).toBeLessThanOrEqual(1);
  });
});

describe("the invented observable of the demonstration", () => {
  it("is covered by the stated 68 % intervals at about 68 of 100 points and orders", () => {
    const { p, orders, exact } = ternTrap(31, 4);
    for (const method of ["conjugate prior", "correlated along x"]) {
      const result = evaluateCurve({ d: ternTable(31, 4) }, { q: "p/(600 MeV)", method });
      expect(result.value?.curve?.x).toEqual(p);
      const bands = (result.value?.curve?.bands ?? []).filter(
        (band) =>
          band.method === method &&
          band.omitted === "all omitted orders" &&
          band.degree === "68" &&
          band.order > 0,
      );
      expect(bands).toHaveLength(4);
      const hits = bands.flatMap(({ order, halfWidths }) =>
        p.map((_, at) => Math.abs((exact[at] ?? 0) - (orders[order]?.[at] ?? 0)) <= (halfWidths[at] ?? -1)),
      );
      const share = hits.filter(Boolean).length / hits.length;
      expect(scalar(result, "covered/68")).toBeCloseTo(share, 11);
      expect(share).toBeGreaterThan(0.6);
      expect(share).toBeLessThan(0.76);
    }
  });

  it("is a table to paste: a header, and a line for each p", () => {
    const [header, first, ...rest] = ternTrapTable(5, 2).trim().split("\n");
    expect(header).toBe("p (MeV),X0 (mb),X1 (mb),X2 (mb),exact (mb)");
    expect(first?.split(",").map(Number)).toEqual([
      60,
      ...[0, 1, 2].map((n) => Number(ternTrap(5, 2).orders[n]?.[0]?.toPrecision(8))),
      Number(ternTrap(5, 2).exact[0]?.toPrecision(8)),
    ]);
    expect(rest).toHaveLength(4);
  });

  it("has all its orders: what is left after the thirtieth is below the digits told", () => {
    const { p, exact } = ternTrap(31, 4);
    const { orders } = ternTrap(31, 25);
    p.forEach((at, index) => {
      const left = Math.abs((orders[25]?.[index] ?? 0) - (exact[index] ?? 0));
      expect(left).toBeLessThan((4000 / at) * 10 * (at / ternTrapBreakdown) ** 26);
    });
  });
});
