import { scaleLinear, scalePoint } from "d3-scale";
import { useId } from "react";
import type { Band, OrderEstimate, TruncationValue } from "#engine/truncation/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { useBlock } from "../block-handle.ts";
import { plotFrame } from "../parts/plot.tsx";
import { plain } from "../parts/plot-scales.ts";
import { textTo } from "../parts/number-text.ts";
import { CurveFigures } from "./curve-figures.tsx";
import { resolutionOf } from "./method-rows.ts";
import { ScrollBox } from "../parts/scroll-box.tsx";

/** At one point the bands order by order; with data along x all that is drawn there. */
export function BandsPlot({ value, stale }: ResultProps<TruncationValue>) {
  if (!value.curve) return <PointBands value={value} stale={stale} />;
  const [degree] = value.degrees;
  return (
    <CurveFigures
      curve={value.curve}
      highlighted={value.highlighted}
      unit={value.unit}
      degree={degree?.text ?? ""}
    />
  );
}

/** X order by order with the band of the chosen method around each: narrow and dark, wide and pale. */
function PointBands({ value }: ResultProps<TruncationValue>) {
  const { tables } = useBlock();
  const clip = useId();
  const names = new Map((tables["orders"] ?? []).map((row) => [row.id, row["name"] ?? ""]));
  const { highlighted, orders } = value;
  if (!highlighted || orders.length === 0) return null;
  const drawn = orders.map((order) => ({ order, bands: bandsOf(order, highlighted) }));
  const { width, height, left, top, bottom } = plotFrame;
  const right = 12;
  const [low, high] = rangeOf(drawn);
  const room = (high - low || Math.abs(high) || 1) * 0.06;
  const y = scaleLinear([low - room, high + room], [height - bottom, top]);
  const x = scalePoint(
    drawn.map(({ order }) => order.rowId),
    [left, width - right],
  ).padding(0.6);
  const half = Math.min(16, ((width - left - right) / drawn.length) * 0.3);
  const resolution = resolutionOf(value);
  return (
    <figure className="plot">
      <svg
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={`The quantity order by order with its truncation error, ${highlighted.method}`}
      >
        <clipPath id={clip}>
          <rect x={left} y={top} width={width - left - right} height={height - top - bottom} />
        </clipPath>
        {y.ticks(5).map((tick) => (
          <g key={tick} aria-hidden="true">
            <line className="plot-grid" x1={left} x2={width - right} y1={y(tick)} y2={y(tick)} />
            <text className="plot-tick-label" x={left - 6} y={y(tick) + 3.5} textAnchor="end">
              {plain(tick)}
            </text>
          </g>
        ))}
        {drawn.map(({ order, bands }) => {
          const middle = x(order.rowId) ?? left;
          return (
            <g key={order.rowId} aria-hidden="true">
              <g clipPath={`url(#${clip})`}>
                {[...bands].reverse().map((band, index) => (
                  <rect
                    key={band.degree ?? ""}
                    className={index === bands.length - 1 ? "plot-band-inner" : "plot-band-outer"}
                    x={middle - half}
                    width={2 * half}
                    y={y(order.value + band.halfWidth)}
                    height={Math.max(1, y(order.value - band.halfWidth) - y(order.value + band.halfWidth))}
                  />
                ))}
              </g>
              <line
                className="plot-value"
                x1={middle - half - 5}
                x2={middle + half + 5}
                y1={y(order.value)}
                y2={y(order.value)}
              />
              <text className="plot-tick-label" x={middle} y={height - bottom + 18} textAnchor="middle">
                {nameOf(order, names)}
              </text>
            </g>
          );
        })}
        {value.unit !== "" && (
          <text className="plot-axis-label" x={2} y={11} aria-hidden="true">
            {value.unit}
          </text>
        )}
      </svg>
      <details className="plot-table">
        <summary>as a table</summary>
        <ScrollBox what="table of the plot">
          <table className="block-table">
            <caption className="sr-only">The quantity order by order with its truncation error</caption>
            <thead>
              <tr>
                <th scope="col">order</th>
                <th scope="col" className="block-numeric">
                  X
                </th>
                {drawn.at(-1)?.bands.map(({ degree }) => (
                  <th key={degree ?? ""} scope="col" className="block-numeric">
                    ± {degree === null ? "" : `${degree} %`}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {drawn.map(({ order, bands }) => (
                <tr key={order.rowId}>
                  <th scope="row">{nameOf(order, names)}</th>
                  <td className="block-numeric">{textTo(order.value, resolution)}</td>
                  {bands.map(({ degree, halfWidth }) => (
                    <td key={degree ?? ""} className="block-numeric">
                      {textTo(halfWidth, resolution)}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollBox>
      </details>
    </figure>
  );
}

interface DrawnOrder {
  readonly order: OrderEstimate;
  readonly bands: readonly Band[];
}

/**
 * The lowest order's band may be a hundred times wider than the rest. With three orders or more it runs out of the
 * frame, so that the others can be told apart; its numbers are in the table.
 */
function rangeOf(drawn: readonly DrawnOrder[]): readonly [number, number] {
  const framing = drawn.length > 2 ? drawn.slice(1) : drawn;
  const reach = framing.map(({ bands }) => bands.at(-1)?.halfWidth ?? 0);
  const values = drawn.map(({ order }) => order.value);
  return [
    Math.min(...values, ...framing.map(({ order }, index) => order.value - (reach[index] ?? 0))),
    Math.max(...values, ...framing.map(({ order }, index) => order.value + (reach[index] ?? 0))),
  ];
}

/** The bands of the chosen method at one order, narrowest first. */
function bandsOf({ bands }: OrderEstimate, { method, omitted }: Band): Band[] {
  return bands
    .filter((band) => band.method === method && band.omitted === omitted)
    .sort((a, b) => a.halfWidth - b.halfWidth);
}

function nameOf({ rowId, order }: OrderEstimate, names: ReadonlyMap<string, string>): string {
  const name = names.get(rowId) ?? "";
  return name === "" ? `n = ${order}` : name;
}
