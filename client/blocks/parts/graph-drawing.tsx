import type { GraphPictures } from "#engine/divergence/value.ts";
import type { Graph } from "#engine/graphs/graph.ts";
import "./graph-drawing.css";
import { layOut, type DrawnLine } from "./graph-layout.ts";
import { graphInWords } from "./graph-words.ts";
import { plainLatex } from "./plain-latex.ts";
import { arrowOn, linePath } from "./line-path.ts";

/** One graph, drawn by the conventions of the trade and told in words. */
export function GraphDrawing({
  graph,
  fields,
  kinds,
  numbered = false,
}: {
  readonly graph: Graph;
  readonly fields: GraphPictures["fields"];
  readonly kinds: GraphPictures["kinds"];
  /** Whether vertices carry their numbers, for the text beside the drawing. */
  readonly numbered?: boolean;
}) {
  const { width, height, vertices, lines, numbers, names } = layOut(graph);
  const named = sharesStyle(graph, fields);
  return (
    <svg
      className="graph-drawing"
      role="img"
      aria-label={graphInWords(graph, fields)}
      viewBox={`0 0 ${width.toFixed(1)} ${height.toFixed(1)}`}
      width={width.toFixed(0)}
      height={height.toFixed(0)}
    >
      {lines.map((line, n) => (
        <Line key={n} line={line} fields={fields} />
      ))}
      {vertices.map(({ x, y }, v) => (
        <Vertex key={v} x={x} y={y} mark={kinds[graph.vertices[v] ?? 0]?.mark ?? "vertex"} />
      ))}
      {numbered &&
        numbers.map(({ x, y }, v) => (
          <text key={v} className="graph-number" x={x} y={y}>
            {v + 1}
          </text>
        ))}
      {named &&
        names.map(({ x, y }, n) => (
          <text key={n} className="graph-name" x={x} y={y}>
            {plainLatex(fields[lines[n]?.field ?? 0]?.latex ?? "")}
          </text>
        ))}
    </svg>
  );
}

/** Lines are named only where two fields of the graph would look alike. */
function sharesStyle(graph: Graph, fields: GraphPictures["fields"]): boolean {
  const used = [...new Set([...graph.edges, ...graph.legs].map(({ field }) => field))];
  const looks = used.map((f) => `${fields[f]?.style ?? ""} ${String(fields[f]?.directed ?? false)}`);
  return new Set(looks).size < looks.length;
}

function Line({ line, fields }: { readonly line: DrawnLine; readonly fields: GraphPictures["fields"] }) {
  const field = fields[line.field];
  const style = field?.style ?? "solid";
  const path = linePath(line.curve, style);
  const arrow = field?.directed ? arrowOn(line.curve) : null;
  return (
    <>
      <path className={`graph-line graph-line-${style.replace(" ", "-")}`} d={path} />
      {style.startsWith("double") && <path className="graph-line-gap" d={path} />}
      {arrow && (
        <path
          className="graph-arrow"
          d="M4 0L-3.5 3.4L-3.5 -3.4Z"
          transform={`translate(${arrow.point.x.toFixed(1)} ${arrow.point.y.toFixed(1)}) rotate(${arrow.degrees.toFixed(0)})`}
        />
      )}
    </>
  );
}

function Vertex({
  x,
  y,
  mark,
}: {
  readonly x: number;
  readonly y: number;
  readonly mark: GraphPictures["kinds"][number]["mark"];
}) {
  if (mark !== "counterterm")
    return <circle className="graph-vertex" cx={x} cy={y} r={mark === "insertion" ? 4.6 : 2.2} />;
  const arm = 3.9;
  return (
    <g className="graph-counterterm">
      <circle cx={x} cy={y} r={5.5} />
      <path d={`M${x - arm} ${y - arm}L${x + arm} ${y + arm}M${x - arm} ${y + arm}L${x + arm} ${y - arm}`} />
    </g>
  );
}
