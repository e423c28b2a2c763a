/** How long it takes to enumerate graphs: all irreducible φ⁴ graphs with four legs, and a theory of φ³, φ⁴ and φ⁶. */
import { performance } from "node:perf_hooks";
import { scalarGraphs, weightOf } from "../engine/graphs/count-graphs.ts";
import { columns, milliseconds } from "./figures.ts";

const irreducible = { onlyOneParticleIrreducible: true };

/** Every choice of φ³, φ⁴ and φ⁶ vertices with L loops and E legs: Σ (n − 2) = 2L − 2 + E. */
function mixtures(order: number): Record<number, number>[] {
  const found: Record<number, number>[] = [];
  for (let six = 0; 4 * six <= order; six += 1) {
    for (let four = 0; 4 * six + 2 * four <= order; four += 1) {
      found.push({ 3: order - 4 * six - 2 * four, 4: four, 6: six });
    }
  }
  return found;
}

function timed(name: string, target: string, work: () => number): string[] {
  const start = performance.now();
  const count = work();
  return [name, String(count), milliseconds(performance.now() - start), target];
}

export function printGraphTimes(): void {
  const upTo = (loops: number) =>
    Array.from({ length: loops }, (_, n) => scalarGraphs({ 4: n + 2 }, 4, irreducible).length).reduce(
      (a, b) => a + b,
      0,
    );
  upTo(3);
  console.log("graphs, once each with exact symmetry factors; first runs\n");
  columns([
    ["what", "graphs", "time", "wanted"],
    timed("φ⁴, 4 legs, 1 to 4 loops", "200 ms", () => upTo(4)),
    timed("φ⁴, 4 legs, 1 to 6 loops", "2 s", () => upTo(6)),
    timed("φ³, φ⁴, φ⁶, up to 4 legs and 4 loops, with their sums", "10 s", () => {
      let count = 0;
      for (let loops = 1; loops <= 4; loops += 1) {
        for (let legs = 0; legs <= 4; legs += 1) {
          for (const vertices of mixtures(2 * loops - 2 + legs)) {
            const graphs = scalarGraphs(vertices, legs, irreducible);
            weightOf(graphs);
            count += graphs.length;
          }
        }
      }
      return count;
    }),
  ]);
}
