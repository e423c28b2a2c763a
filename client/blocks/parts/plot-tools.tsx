import { useState, type RefObject } from "react";
import { say } from "../../ui/notices.ts";
import { tableOf, type Curve, type PlotWords, type RangeBand } from "./plot-model.ts";
import type { AxisSpec } from "./plot-scales.ts";
import { ScrollBox } from "./scroll-box.tsx";

interface Props {
  readonly name: string;
  readonly heading: string;
  readonly curves: readonly Curve[];
  readonly bands: readonly RangeBand[];
  readonly words: PlotWords;
  readonly drawing: RefObject<SVGSVGElement | null>;
  readonly scales: readonly AxisScale[];
}
/** An axis that can be switched, and what it is now. */
export interface AxisScale {
  readonly axis: "x" | "y";
  readonly kind: AxisSpec["kind"];
  readonly choose: (kind: AxisSpec["kind"]) => void;
}

/** Below the drawing: its axes' scales, its numbers as a table, and the whole as a file. */
export function PlotTools({ name, heading, curves, bands, words, drawing, scales }: Props) {
  const [isOpen, setOpen] = useState(false);
  async function save(format: "SVG" | "PNG" | "CSV") {
    const { savePlot } = await import("./plot-file.ts");
    if (!drawing.current) return;
    const saved = await savePlot(format, drawing.current, name, tableOf(heading, curves, bands));
    if (!saved) say("This browser could not make a picture of the plot. The SVG holds the same.");
  }
  return (
    <div className="plot-tools">
      {scales.map(({ axis, kind, choose }) => (
        <button
          key={axis}
          type="button"
          className="block-link"
          aria-pressed={kind === "log"}
          onClick={() => choose(kind === "log" ? "linear" : "log")}
        >
          {axis} {kind === "log" ? "logarithmic" : "linear"}
          <span className="sr-only">, press for the {kind === "log" ? "linear" : "logarithmic"} scale</span>
        </button>
      ))}
      <span className="plot-files">
        save{" "}
        {(["SVG", "PNG", "CSV"] as const).map((format) => (
          <button key={format} type="button" className="block-link" onClick={() => void save(format)}>
            {format}
            <span className="sr-only"> of: {name}</span>
          </button>
        ))}
      </span>
      <details className="plot-table" onToggle={(event) => setOpen(event.currentTarget.open)}>
        <summary>as a table</summary>
        {isOpen && <NumberTable name={name} heading={heading} curves={curves} bands={bands} words={words} />}
      </details>
    </div>
  );
}

function NumberTable({
  name,
  heading,
  curves,
  bands,
  words,
}: Pick<Props, "name" | "heading" | "curves" | "bands" | "words">) {
  const { heads, rows } = tableOf(heading, curves, bands);
  return (
    <div className="plot-numbers">
      <ScrollBox what="table of the plot">
        <table className="block-table">
          <caption className="sr-only">{name}</caption>
          <thead>
            <tr>
              {heads.map((head, index) => (
                <th key={index} scope="col" {...(index === 0 ? {} : { className: "block-numeric" })}>
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(([x, ...values], index) => (
              <tr key={index}>
                <th scope="row">{words.x(x ?? 0)}</th>
                {values.map((value, column) => (
                  <td key={column} className="block-numeric">
                    {value === null ? "" : words.y(value)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollBox>
    </div>
  );
}
