/** How long truncation errors along x take in the engine alone: 500 points of 6 orders. */
import { performance } from "node:perf_hooks";
import { chanceFrom } from "#engine/truncation/chance.ts";
import { colour } from "#engine/truncation/cholesky.ts";
import { factorOf } from "#engine/truncation/kernel.ts";
import type { TruncationInputs } from "#engine/truncation/shape.ts";
import { evaluateCurve, ternTable, type Table } from "../engine/truncation/curve-block.ts";
import { theoryOf } from "../engine/theory-builder.ts";
import { columns, median, milliseconds } from "./figures.ts";

const ROUNDS = 5;
const POINTS = 500;
const ORDERS = 6;

const theory = (breakdown: number) =>
  theoryOf({
    fields: {},
    terms: {},
    scales: [
      { symbol: "Lambda", role: "heavy", value: breakdown, unit: "MeV" },
      { symbol: "m", role: "light", value: 138, unit: "MeV" },
    ],
  });

/** Coefficients that change from point to point, so that every point is fitted: the dearest case there is. */
function rough(): Table {
  const x = Array.from({ length: POINTS }, (_, index) => 60 + (300 * index) / (POINTS - 1));
  const { factor } = factorOf(x, (300 / POINTS) * 1.2, 1e-6);
  const chance = chanceFrom(7);
  let sum: readonly number[] = x.map(() => 10);
  const orders: Record<number, readonly number[]> = { 0: sum };
  for (let n = 1; n <= ORDERS; n += 1) {
    const c = colour(
      factor,
      Float64Array.from(x, () => chance.normal()),
    );
    sum = sum.map((so, index) => so + 10 * (c[index] ?? 0) * ((x[index] ?? 0) / 600) ** n);
    orders[n] = sum;
  }
  return { x, orders };
}

export function printTruncationTimes(): void {
  const smooth = ternTable(POINTS, ORDERS);
  const dear = rough();
  const correlated = { method: "correlated along x" };
  const cases: readonly (readonly [string, Table, Partial<TruncationInputs>, string])[] = [
    ["point methods", smooth, {}, "50 ms"],
    ["point methods, max(p, m)/Lambda", smooth, { q: "max(p, m)/Lambda" }, "50 ms"],
    ["prior sets A, B, C beside them", smooth, { sets: "with sets A, B, C" }, ""],
    ["correlated, smooth coefficients", smooth, correlated, "2 s"],
    ["correlated, every point fitted", dear, correlated, "2 s"],
    [
      "the same, Q not inverse to the breakdown scale",
      dear,
      { ...correlated, q: "p/(Lambda + m/10)", breakdown: "Lambda" },
      "2 s",
    ],
  ];
  console.log(`truncation errors along x, ${POINTS} points of ${ORDERS} orders, median of ${ROUNDS}\n`);
  columns([
    ["what is computed", "points fitted", "first", "time", "aim"],
    ...cases.map(([name, table, inputs, aim]) => {
      const times: number[] = [];
      let fitted = "";
      for (let round = 0; round <= ROUNDS; round += 1) {
        const start = performance.now();
        const { value, problems } = evaluateCurve({ d: table }, inputs, theory(600 + round));
        times.push(performance.now() - start);
        if (!value) throw new Error(problems.map(({ code }) => code).join(", "));
        fitted = String(value.curve?.correlated?.points ?? "");
      }
      return [name, fitted, milliseconds(times[0]), milliseconds(median(times.slice(1))), aim];
    }),
  ]);
}
