/** The rail of the probe scale: from a tenth of p to the heavy scale, with a hand that can be moved. */
import { useRef, type KeyboardEvent } from "react";
import { classes } from "../ui/classes.ts";
import { roundedProbe } from "./kept-text.ts";
import { plain } from "../blocks/parts/plot-scales.ts";
import type { Reading } from "./reading.ts";
import type { RulerModel } from "./ruler-model.ts";
import { probeWords, spokenReading } from "./ruler-words.ts";
import { useDrag } from "./use-drag.ts";
import { valueAfterKey, within } from "./slider-keys.ts";

const HEIGHT = 30;
const EDGE = 10;

interface Props {
  readonly model: RulerModel;
  readonly reading: Reading;
  readonly width: number;
  readonly moving: boolean;
  readonly onProbe: (probe: number) => void;
  readonly onHold: (held: boolean) => void;
  readonly onKey: (event: KeyboardEvent) => void;
}

export function ProbeRail({ model, reading, width, moving, onProbe, onHold, onKey }: Props) {
  const rail = useRef<SVGSVGElement>(null);
  const kept = model.probe.value;
  const range = { low: kept / 10, high: Math.max(kept, model.heavy.value * 0.97), step: 1.02, leap: 1.25 };
  const span = Math.log(range.high / range.low);
  const position = (probe: number) => EDGE + (Math.log(probe / range.low) / span) * (width - 2 * EDGE);
  const drag = useDrag((clientX) => {
    const box = rail.current?.getBoundingClientRect();
    if (!box || box.width === 0) return;
    const share = (((clientX - box.left) / box.width) * width - EDGE) / (width - 2 * EDGE);
    onProbe(roundedProbe(within(range.low * Math.exp(share * span), range)));
  }, onHold);
  const x = position(within(reading.probe, range));
  return (
    <svg
      ref={rail}
      className={classes("ruler-rail", moving && "is-moving")}
      viewBox={`0 0 ${width} ${HEIGHT}`}
      width={width}
      height={HEIGHT}
      {...drag}
    >
      <path className="ruler-rail-edge" d={`M.5 8.5H${width - 0.5}V${HEIGHT - 0.5}H.5z`} />
      <g aria-hidden="true">
        {marksOf(range.low, range.high, position).map(({ value, x: at, label }) => (
          <g key={value}>
            <path className="ruler-tick" d={`M${at.toFixed(1)} 8.5v${label === "" ? 3 : 5}`} />
            <text className="ruler-power" x={at} y={HEIGHT - 5} textAnchor="middle">
              {label}
            </text>
          </g>
        ))}
      </g>
      <g
        className="ruler-hand"
        style={{ transform: `translateX(${x.toFixed(2)}px)` }}
        role="slider"
        tabIndex={0}
        aria-label={`Probe scale ${model.probe.name}`}
        aria-orientation="horizontal"
        aria-valuemin={roundedProbe(range.low)}
        aria-valuemax={roundedProbe(range.high)}
        aria-valuenow={reading.probe}
        aria-valuetext={spokenReading(probeWords(model, reading.probe), reading)}
        onKeyDown={(event) => {
          const next = valueAfterKey(event.key, reading.probe, range);
          if (next === null) {
            onKey(event);
            return;
          }
          event.preventDefault();
          event.stopPropagation();
          onProbe(roundedProbe(next));
        }}
      >
        <rect className="ruler-touch" x={-12} y={0} width={24} height={HEIGHT} />
        <path className="ruler-pointer" d="M-5 1H5L0 9zM0 8V29" />
      </g>
    </svg>
  );
}

/** Ticks at 1, 2, 3, 5 of each decade; those have words that fit beside the one before. */
function marksOf(low: number, high: number, position: (value: number) => number) {
  const found: { value: number; x: number; label: string }[] = [];
  let free = Number.NEGATIVE_INFINITY;
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power += 1) {
    for (const digit of [1, 2, 3, 5]) {
      const value = Number(`${digit}e${power}`);
      if (value < low || value > high) continue;
      const x = position(value);
      const label = plain(value);
      const half = label.length * 3.6;
      const fits = x - half > free && x - half > 0;
      if (fits) free = x + half + 6;
      found.push({ value, x, label: fits ? label : "" });
    }
  }
  return found;
}
