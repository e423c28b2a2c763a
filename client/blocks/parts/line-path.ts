/** The path of a drawn line: plain, wavy or curly along a curve. */
import type { LineStyle } from "#engine/divergence/value.ts";
import { pointOn, type Curve, type Point } from "./graph-layout.ts";

const SAMPLES = 96;
const WAVE = 7;
const WAVE_HEIGHT = 2.6;
const CURL = 6;
const CURL_HEIGHT = 3.4;

/** Points at equal distances along a curve, with the direction there. */
function evenly(
  curve: Curve,
  count: number,
): { readonly points: { point: Point; angle: number }[]; length: number } {
  const fine = Array.from({ length: SAMPLES + 1 }, (_, k) => pointOn(curve, k / SAMPLES));
  const lengths = [0];
  for (let k = 1; k <= SAMPLES; k += 1) {
    const [a, b] = [fine[k - 1], fine[k]];
    lengths.push((lengths[k - 1] ?? 0) + (a && b ? Math.hypot(b.x - a.x, b.y - a.y) : 0));
  }
  const length = lengths[SAMPLES] ?? 0;
  const points = Array.from({ length: count + 1 }, (_, n) => {
    const wanted = (length * n) / count;
    const k = Math.max(
      1,
      lengths.findIndex((reached) => reached >= wanted - 1e-9),
    );
    const [a, b] = [fine[k - 1], fine[k]];
    const [before, after] = [lengths[k - 1] ?? 0, lengths[k] ?? 0];
    const share = after > before ? (wanted - before) / (after - before) : 0;
    const [p, q] = [a ?? { x: 0, y: 0 }, b ?? { x: 0, y: 0 }];
    return {
      point: { x: p.x + share * (q.x - p.x), y: p.y + share * (q.y - p.y) },
      angle: Math.atan2(q.y - p.y, q.x - p.x),
    };
  });
  return { points, length };
}

function through(points: readonly Point[]): string {
  return points
    .map(
      ({ x, y }, n) =>
        `${n === 0 ? "M" : "L"}${String(Math.round(10 * x) / 10)} ${String(Math.round(10 * y) / 10)}`,
    )
    .join("");
}

/** @returns the `d` of an SVG path. */
export function linePath(curve: Curve, style: LineStyle): string {
  if (style !== "curly" && !style.endsWith("wavy")) {
    const [a, b, c, d] = curve.map(({ x, y }) => `${x.toFixed(1)} ${y.toFixed(1)}`);
    return `M${a ?? ""}C${b ?? ""} ${c ?? ""} ${d ?? ""}`;
  }
  const curly = style === "curly";
  const { length } = evenly(curve, 1);
  const periods = Math.max(2, Math.round(length / (curly ? CURL : WAVE)));
  const { points } = evenly(curve, periods * 12);
  return through(
    points.map(({ point, angle }, n) => {
      const phase = (2 * Math.PI * n) / 12;
      // Both ends meet the vertices: the curls begin and end on the line.
      const across = curly ? (CURL_HEIGHT * (1 - Math.cos(phase))) / 2 : WAVE_HEIGHT * Math.sin(phase);
      const along = curly ? -0.55 * CURL * Math.sin(phase) : 0;
      return {
        x: point.x + along * Math.cos(angle) - across * Math.sin(angle),
        y: point.y + along * Math.sin(angle) + across * Math.cos(angle),
      };
    }),
  );
}

/** Where an arrow sits, and where it points, in degrees. */
export function arrowOn(curve: Curve): { readonly point: Point; readonly degrees: number } {
  const before = pointOn(curve, 0.48);
  const point = pointOn(curve, 0.56);
  return { point, degrees: (180 / Math.PI) * Math.atan2(point.y - before.y, point.x - before.x) };
}
