import { useState, type KeyboardEvent, type PointerEvent } from "react";
import type { Axis } from "./plot-scales.ts";
import { plotFrame, pointText, type Curve, type PlotWords, type RangeBand } from "./plot-model.ts";

/** A point that is being read: a curve, and a place on it. */
export interface ReadPoint {
  readonly curve: number;
  readonly index: number;
}

/** Reads a plot's values: the pointer takes the nearest point, and arrow keys step along a curve and between curves. */
export function usePlotReader(curves: readonly Curve[], x: Axis, y: Axis) {
  const [wanted, setWanted] = useState<ReadPoint | null>(null);
  // What is drawn may have changed since.
  const shown = wanted && curves[wanted.curve]?.points[wanted.index] ? wanted : null;
  return { shown, show: setWanted, nearest: (at: number, value: number) => nearest(curves, x, y, at, value) };
}

/** The point closest to a place of the drawing. */
export function nearest(
  curves: readonly Curve[],
  x: Axis,
  y: Axis,
  at: number,
  value: number,
): ReadPoint | null {
  let best: ReadPoint | null = null;
  let least = Infinity;
  for (const [curve, { points }] of curves.entries()) {
    for (const [index, point] of points.entries()) {
      const distance = Math.hypot(x.position(point[0]) - at, y.position(point[1]) - value);
      if (distance < least) [best, least] = [{ curve, index }, distance];
    }
  }
  return best;
}

/** Where a key leads: along the curve by one or ten, to its ends, or to the next curve at about the same x. */
export function stepped(curves: readonly Curve[], from: ReadPoint | null, key: string): ReadPoint | null {
  const at = from ?? { curve: 0, index: 0 };
  const points = curves[at.curve]?.points ?? [];
  const along = (index: number) => ({
    curve: at.curve,
    index: Math.max(0, Math.min(points.length - 1, index)),
  });
  const across = (curve: number) => {
    const other = curves[(curve + curves.length) % curves.length]?.points ?? [];
    const misses = other.map(([x]) => Math.abs(x - (points[at.index]?.[0] ?? 0)));
    return {
      curve: (curve + curves.length) % curves.length,
      index: misses.indexOf(Math.min(...misses)),
    };
  };
  switch (key) {
    case "ArrowRight":
      return from ? along(at.index + 1) : along(0);
    case "ArrowLeft":
      return from ? along(at.index - 1) : along(points.length - 1);
    case "PageUp":
      return along(at.index + 10);
    case "PageDown":
      return along(at.index - 10);
    case "Home":
      return along(0);
    case "End":
      return along(points.length - 1);
    case "ArrowUp":
      return across(at.curve - 1);
    case "ArrowDown":
      return across(at.curve + 1);
    default:
      return null;
  }
}

interface Props {
  readonly name: string;
  readonly xLabel: string;
  readonly curves: readonly Curve[];
  readonly bands: readonly RangeBand[];
  readonly words: PlotWords;
  readonly reader: ReturnType<typeof usePlotReader>;
}

/** Lies over the drawing, takes pointer and keys, and says the values of the point that is read. */
export function PlotReader({ name, xLabel, curves, bands, words, reader }: Props) {
  const { shown, show } = reader;
  const curve = curves[shown?.curve ?? 0];
  const text = shown && curve ? pointText(xLabel, curve, shown.index, bands, words) : "";
  function point(event: PointerEvent<HTMLDivElement>) {
    const box = event.currentTarget.getBoundingClientRect();
    if (box.width === 0) return;
    const scale = plotFrame.width / box.width;
    show(reader.nearest((event.clientX - box.left) * scale, (event.clientY - box.top) * scale));
  }
  function press(event: KeyboardEvent) {
    if (event.key === "Escape") return show(null);
    const next = stepped(curves, shown, event.key);
    if (!next) return;
    event.preventDefault();
    show(next);
  }
  return (
    <>
      <div
        className="plot-reader"
        role="slider"
        tabIndex={0}
        aria-label={`values of: ${name}. Left and right arrows step along a curve, up and down arrows between curves`}
        aria-valuemin={1}
        aria-valuemax={Math.max(1, curve?.points.length ?? 1)}
        aria-valuenow={(shown?.index ?? 0) + 1}
        aria-valuetext={text === "" ? "no point is chosen" : text}
        onPointerMove={point}
        onPointerDown={point}
        onPointerLeave={(event) => {
          if (document.activeElement !== event.currentTarget) show(null);
        }}
        onKeyDown={press}
        onBlur={() => show(null)}
      />
      {/* The slider says it to whoever listens. */}
      <p className="plot-reading" aria-hidden="true">
        {text}
      </p>
    </>
  );
}

/** The point that is read, in the drawing. */
export function ReadingMark({
  shown,
  curves,
  x,
  y,
}: {
  readonly shown: ReadPoint | null;
  readonly curves: readonly Curve[];
  readonly x: Axis;
  readonly y: Axis;
}) {
  const point = shown ? curves[shown.curve]?.points[shown.index] : undefined;
  if (!point) return null;
  return (
    <circle
      data-reading
      className="plot-reading-mark"
      cx={x.position(point[0])}
      cy={y.position(point[1])}
      r={5}
    />
  );
}
