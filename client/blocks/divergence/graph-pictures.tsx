import { useState } from "react";
import type { GraphPicture, GraphPictures as Pictures, NestedDivergence } from "#engine/divergence/value.ts";
import { Formula } from "../../ui/math.tsx";
import { GraphDrawing } from "../parts/graph-drawing.tsx";

const AT_FIRST = 6;
const EACH_TIME = 12;

/** The graphs with the chosen vertices and legs: drawn, with their symmetry factors and nested divergences. */
export function GraphPictures({ pictures }: { readonly pictures: Pictures }) {
  const [most, setMost] = useState(AT_FIRST);
  const { list, count } = pictures;
  const rest = list.length - most;
  return (
    <section aria-label="Graphs">
      <p className="block-line">{countWords(pictures)}</p>
      <div className="graph-list">
        {list.slice(0, most).map((graph, n) => (
          <GraphFigure key={n} graph={graph} pictures={pictures} />
        ))}
      </div>
      {rest > 0 && (
        <button type="button" className="block-link" onClick={() => setMost(most + EACH_TIME)}>
          {Math.min(rest, EACH_TIME)} more
        </button>
      )}
      {rest <= 0 && count > list.length && (
        <p className="block-line">The other {count - list.length} are counted and not drawn.</p>
      )}
    </section>
  );
}

function countWords(pictures: Pictures): string {
  return `${foundWords(pictures)}${leftOutWords(pictures)}`;
}

/** What the list does not show because somebody asked so. */
function leftOutWords({ leftOut = "nothing", cancelled = null }: Pictures): string {
  const without = leftOut === "nothing" ? "" : ` Those with ${leftOut} are left out.`;
  if (cancelled === null) return without;
  const furry =
    cancelled === 0
      ? "None cancels by charge conjugation."
      : `${String(cancelled)} more ${cancelled === 1 ? "cancels" : "cancel"} by charge conjugation (Furry 1937): a closed fermion line with an odd number of vector vertices, run through both ways.`;
  return `${without} ${furry} That supposes pure vector couplings that commute.`;
}

function foundWords({ count, complete, irreducible, labelled }: Pictures): string {
  const what = irreducible ? "one-particle irreducible" : "connected";
  const legs = labelled ? "legs told apart" : "legs of one field interchangeable";
  if (!complete)
    return count === 0
      ? "Too many graphs to look through while you type: none is drawn."
      : `More than ${String(count)} ${what} graphs, too many to look through while you type; ${legs}.`;
  const none = irreducible ? "" : " None is one-particle irreducible.";
  return `${String(count)} ${what} ${count === 1 ? "graph" : "graphs"}, ${legs}.${none}`;
}

function GraphFigure({ graph, pictures }: { readonly graph: GraphPicture; readonly pictures: Pictures }) {
  const { nested, symmetry, labellings } = graph;
  return (
    <figure>
      <GraphDrawing
        graph={graph}
        fields={pictures.fields}
        kinds={pictures.kinds}
        numbered={graph.vertices.length > 1 && (nested?.length ?? 0) > 0}
      />
      <figcaption>
        <Formula latex={`S = ${symmetry}`} />
        {labellings !== "1" && `, ${labellings} channels`}
        {nested === null
          ? "; subgraphs not looked at"
          : nested.length > 0 && (
              <ul className="block-plain-list" aria-label="Divergent subgraphs">
                {grouped(nested).map((words) => (
                  <li key={words}>{words}</li>
                ))}
              </ul>
            )}
      </figcaption>
    </figure>
  );
}

/** "2 lines at 1, 2: ω = 0, 3 ways": one line for each subgraph, those past the fourth counted. */
function grouped(nested: readonly NestedDivergence[]): string[] {
  const SHOWN = 4;
  const words = nested
    .slice(0, SHOWN)
    .map(({ vertices, lines, omega, ways }) =>
      [
        `inside: ${String(lines)} ${lines === 1 ? "line" : "lines"} at ${vertices.map((v) => String(v + 1)).join(", ")}`,
        `: ω = ${omega.text}`,
        ways > 1 ? `, ${String(ways)} ways` : "",
      ].join(""),
    );
  return nested.length > SHOWN ? [...words, `and ${String(nested.length - SHOWN)} more`] : words;
}
