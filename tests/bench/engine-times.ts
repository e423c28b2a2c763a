/** How long the engine alone takes for a notebook, in Node.js. */
import { performance } from "node:perf_hooks";
import { kindNames } from "#engine/kind.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { evaluateNotebook } from "#engine/notebook/evaluate-notebook.ts";
import { hundredBlocks, withHeavyScale } from "./hundred-blocks.ts";
import { columns, median, milliseconds } from "./figures.ts";

const ROUNDS = 15;
/** What the compiler has not seen is slower than what people work with after the first minute: both are told. */
const COLD_ROUNDS = 2;

interface Run {
  readonly ms: number;
  /** How many blocks had no result yet. */
  readonly computed: number;
}

function run(blocks: readonly BlockInstance[], memo: Map<string, Evaluation>): Run {
  const before = memo.size;
  const start = performance.now();
  evaluateNotebook(blocks, {
    memo,
    onInternalError: (error) => {
      throw error;
    },
  });
  return { ms: performance.now() - start, computed: memo.size - before };
}

export function printEngineTimes(): void {
  const blocks = hundredBlocks();
  const everything: Run[] = [];
  const ownInput: Run[] = [];
  const byKind = new Map(kindNames.map((kind) => [kind, [] as number[]]));
  for (let round = 0; round < COLD_ROUNDS + ROUNDS; round += 1) {
    const changed = withHeavyScale(blocks, `3.${round}1(4) TeV`);
    const memo = new Map<string, Evaluation>();
    everything.push(run(changed, memo));
    const last = changed.at(-1);
    if (!last) throw new Error("the notebook has blocks");
    const typedIn = { ...last, inputs: { ...last.inputs, q: `0.1${round}` } };
    ownInput.push(run([...changed.slice(0, -1), typedIn], memo));
    for (const [kind, times] of byKind) {
      const own = changed.filter((block) => block.kind === kind || block.kind === "premises");
      times.push(run(own, new Map()).ms);
    }
  }
  const warm = <Item>(all: readonly Item[]) => all.slice(COLD_ROUNDS);
  const premiseMs = median(warm(everything).map(({ ms }) => ms));
  const inputMs = median(warm(ownInput).map(({ ms }) => ms));
  console.log(
    `engine alone, Node.js ${process.versions.node}, median of ${ROUNDS}; 100 blocks on one Premises\n`,
  );
  const count = (runs: readonly Run[]) => `${runs.at(-1)?.computed ?? 0} of ${blocks.length}`;
  columns([
    ["what changed", "computed", "time", "ratio to everything"],
    ["a premise, first time", count(everything), milliseconds(everything[0]?.ms), ""],
    ["a premise, second time", count(everything), milliseconds(everything[1]?.ms), ""],
    ["a premise", count(everything), milliseconds(premiseMs), "1"],
    ["one block's input", count(ownInput), milliseconds(inputMs), (inputMs / premiseMs).toFixed(2)],
  ]);
  console.log("");
  columns([
    ["kind", "blocks", "time", "share"],
    ...[...byKind].map(([kind, times]) => {
      const ms = median(warm(times));
      const number = blocks.filter((block) => block.kind === kind).length;
      return [kind, String(number), milliseconds(ms), (ms / premiseMs).toFixed(2)];
    }),
  ]);
}
