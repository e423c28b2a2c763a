/**
 * How long a count of the Standard Model's operators takes, dimension by dimension, and the memory it needs: each in a
 * process of its own that has computed nothing before. A fixed loop in the same process says how fast the machine is now.
 */
import { execFileSync } from "node:child_process";
import { standardModel } from "#engine/basis/contents.ts";
import { basisCount } from "#engine/basis/kind.ts";
import { basisShape, type BasisInputs } from "#engine/basis/inputs.ts";
import { aloneContext } from "#engine/kind.ts";

interface Measured {
  readonly seconds: number;
  readonly calibration: number;
  readonly megabytes: number;
  readonly last: string;
}
/** CPU seconds and MB of a study in plain JavaScript, one core, a cold process, all classes with their polynomials. */
const aims: Readonly<Record<number, string>> = {
  8: "0.10 s, 52 MB",
  12: "0.4 s, 60 MB",
  15: "0.9 s, 87 MB",
  16: "1.3 s, 110 MB",
};

function cpuSeconds(work: () => void): number {
  const started = process.cpuUsage();
  work();
  const { user, system } = process.cpuUsage(started);
  return (user + system) / 1e6;
}

function measure(to: string): Measured {
  const initial = Object.fromEntries(
    Object.entries(basisShape.fields).map(([name, spec]) => [name, spec.initial]),
  ) as unknown as BasisInputs; // every single field of the shape
  const calibration = cpuSeconds(() => {
    let sum = 0;
    for (let index = 0; index < 1e8; index++) sum = (sum * 31 + index) % 65_537;
    if (sum < 0) throw new Error("a remainder of positive numbers");
  });
  let last = "?";
  const seconds = cpuSeconds(() => {
    const inputs = { ...initial, ...standardModel, to, patience: "however long it takes" };
    last = basisCount.evaluate(inputs, null, aloneContext).value?.totals.at(-1)?.total.at ?? "?";
  });
  return { seconds, calibration, megabytes: process.resourceUsage().maxRSS / 1024, last };
}

function report(): void {
  let before: Measured | null = null;
  for (const to of [6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16]) {
    const output = execFileSync(process.execPath, [...process.execArgv, import.meta.filename, String(to)], {
      encoding: "utf8",
    });
    const found = JSON.parse(output) as Measured; // what this same file writes
    const growth = before
      ? ` (${(found.seconds / before.seconds).toFixed(1)} times the time and ${(found.megabytes / before.megabytes).toFixed(1)} times the memory of one dimension less)`
      : "";
    before = found;
    const aim = aims[to] ? `, aim ${aims[to]}` : "";
    process.stdout.write(
      `dimensions 5 to ${to}: ${found.seconds.toFixed(2)} s, ${found.megabytes.toFixed(0)} MB${growth}${aim}; fixed loop ${found.calibration.toFixed(2)} s; ${found.last} operators at the last\n`,
    );
  }
}

const asked = process.argv[2];
if (asked === undefined) report();
else process.stdout.write(JSON.stringify(measure(asked)));
