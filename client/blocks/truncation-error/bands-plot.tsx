import type { Band, OrderEstimate, TruncationValue } from "#engine/truncation/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { useBlock } from "../block-handle.ts";
import { Plot } from "../parts/plot.tsx";
import { textTo } from "../parts/number-text.ts";
import { CurveFigures } from "./curve-figures.tsx";
import { resolutionOf } from "./method-rows.ts";

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
  const names = new Map((tables["orders"] ?? []).map((row) => [row.id, row["name"] ?? ""]));
  const { highlighted, orders } = value;
  if (!highlighted || orders.length === 0) return null;
  const drawn = orders.map((order) => ({ order, bands: bandsOf(order, highlighted) }));
  const [low, high] = rangeOf(drawn);
  const room = (high - low || Math.abs(high) || 1) * 0.06;
  const resolution = resolutionOf(value);
  const degrees = drawn.at(-1)?.bands ?? [];
  const nameAt = (place: number) => {
    const one = orders[place];
    return one ? nameOf(one, names) : "";
  };
  return (
    <Plot
      name={`The quantity order by order with its truncation error, ${highlighted.method}`}
      x={{
        kind: "linear",
        label: "",
        domain: [-0.6, orders.length - 0.4],
        ticks: orders.map((_, place) => ({ value: place, label: nameAt(place) })),
      }}
      y={{ kind: "linear", label: value.unit, domain: [low - room, high + room] }}
      curves={[
        {
          key: "X",
          label: "X",
          points: orders.map((order, place) => [place, order.value] as const),
          style: 0,
          color: "ink",
          draw: "levels",
        },
      ]}
      bands={[...degrees].reverse().map(({ degree }, index) => ({
        key: degree ?? "band",
        label: degree === null ? "band" : `${degree} %`,
        points: drawn.map(({ order, bands }, place) => {
          const half = bands.find((one) => one.degree === degree)?.halfWidth;
          return half === undefined ? null : { x: place, low: order.value - half, high: order.value + half };
        }),
        tone: index === degrees.length - 1 ? "core" : "outer",
        box: BOX,
      }))}
      table={{ x: "order" }}
      words={{ x: nameAt, y: (one) => textTo(one, resolution) }}
    />
  );
}

/** Half the width of a band, in steps from order to order. */
const BOX = 0.22;

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
