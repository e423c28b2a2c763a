/** How long a count of the Standard Model's operators takes, dimension by dimension, and the memory it needs. */
import { standardModel } from "#engine/basis/contents.ts";
import { basisCount } from "#engine/basis/kind.ts";
import { basisShape, type BasisInputs } from "#engine/basis/inputs.ts";
import { aloneContext } from "#engine/kind.ts";

const initial = Object.fromEntries(
  Object.entries(basisShape.fields).map(([name, spec]) => [name, spec.initial]),
) as unknown as BasisInputs; // every single field of the shape
/** CPU seconds and MB of a study in plain JavaScript, one core, a cold process, all classes with their polynomials. */
const aims: Readonly<Record<number, string>> = {
  8: "0.10 s, 52 MB",
  12: "0.4 s, 60 MB",
  15: "0.9 s, 87 MB",
  16: "1.3 s, 110 MB",
};

let before = 0;
for (const to of [6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16]) {
  const started = process.cpuUsage();
  const { value } = basisCount.evaluate(
    { ...initial, ...standardModel, to: String(to), patience: "however long it takes" },
    null,
    aloneContext,
  );
  const { user, system } = process.cpuUsage(started);
  const seconds = (user + system) / 1e6;
  const growth = before === 0 ? "" : `, ${(seconds / before).toFixed(1)} times one dimension less`;
  before = seconds;
  const megabytes = process.resourceUsage().maxRSS / 1024;
  const aim = aims[to] ? ` (aim ${aims[to]})` : "";
  process.stdout.write(
    `dimensions 5 to ${to}: ${seconds.toFixed(2)} s${growth}, ${megabytes.toFixed(0)} MB at most, ${value?.totals.at(-1)?.total.at ?? "?"} operators at the last${aim}\n`,
  );
}
