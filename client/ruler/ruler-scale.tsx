/** The scale itself: graduation, marks with their labels, the hairline, and what lies beyond it. */
import { useRef, type KeyboardEvent, type RefObject } from "react";
import { tenTo } from "../blocks/parts/plot-scales.ts";
import { sizeText } from "../blocks/parts/number-text.ts";
import { classes } from "../ui/classes.ts";
import { roundedTarget } from "./kept-text.ts";
import { labelWidth, NOTE_SCALE } from "./short-label.ts";
import { LABEL_GAP, placeLabels, type PlacedLabel } from "./place-labels.ts";
import type { Reading, ReadMark } from "./reading.ts";
import { graduations, positionOf, sizeAtPosition, type RulerAxis } from "./ruler-axis.ts";
import type { EstimateBand } from "./ruler-model.ts";
import { markName, spokenReading, targetWords } from "./ruler-words.ts";
import { useDrag } from "./use-drag.ts";
import { valueAfterKey, within } from "./slider-keys.ts";

const CAPTION = 26;
const LEVEL = 16;
const STRIP = 12;
export const EDGE = 24;
const shapes = {
  relevant: "M0 -5 5 4H-5z",
  marginal: "M0 -5 5 0 0 5-5 0z",
  irrelevant: "M-5 -4H5L0 5z",
} as const;

/** From the foot of the strip to the middle of the hairline's grip, clear of the numerals. */
const GRIP = 23;
/** Narrower than this, the first term left out is named below the scale and not on it. */
export const NOTE_FROM = 640;

export const scaleHeight = (levels: number) => CAPTION + levels * LEVEL + 4 + STRIP + GRIP + 7;

interface Props {
  readonly drawing: RefObject<SVGSVGElement | null>;
  readonly axis: RulerAxis;
  readonly width: number;
  readonly levels: number;
  readonly reading: Reading;
  readonly marks: readonly ReadMark[];
  /** The hairline's kept place: labels leave it free, and stay where they are while it is moved. */
  readonly keptTarget: number | null;
  readonly estimate: EstimateBand | null;
  readonly moving: boolean;
  readonly opened: string | null;
  readonly onOpen: (markId: string | null) => void;
  readonly onTarget: (target: number) => void;
  readonly onHold: (held: boolean) => void;
  readonly onKey: (event: KeyboardEvent) => void;
}

export function labelOf({ mark }: ReadMark): string {
  return mark.insertions > 1 && mark.rowIds.length === 1 ? `${mark.label} twice` : mark.label;
}

const noteOf = ({ size }: ReadMark) => ` ← first left out, ${sizeText(size)}`;

/** Labels of what is drawn, at the levels there are. */
export function placed(
  marks: readonly ReadMark[],
  firstOut: ReadMark | null,
  axis: RulerAxis,
  levels: number,
  keptTarget: number | null,
): ReadonlyMap<string, PlacedLabel> {
  const hasNote = axis.right + EDGE >= NOTE_FROM;
  const wanted = marks.map((read) => {
    const least = labelWidth(labelOf(read));
    const note = hasNote && read.mark.id === firstOut?.mark.id ? NOTE_SCALE * labelWidth(noteOf(read)) : 0;
    return { id: read.mark.id, x: positionOf(axis, read.size), width: least + note, least };
  });
  const line = keptTarget === null ? null : positionOf(axis, keptTarget);
  const room = { levels, left: axis.left - 18, right: axis.right + EDGE, line };
  return new Map(placeLabels(wanted, room).map((label) => [label.id, label]));
}

export function RulerScale(props: Props) {
  const { drawing, axis, width, levels, reading, marks, estimate, moving, opened } = props;
  const height = scaleHeight(levels);
  const hasNote = width >= NOTE_FROM;
  const floor = CAPTION + levels * LEVEL + 4;
  const { target, firstOut } = reading;
  const hairline = target === null ? null : positionOf(axis, target);
  const labels = placed(marks, firstOut, axis, levels, props.keptTarget);
  const current = opened ?? marks[0]?.mark.id ?? null;
  const ticks = graduations(axis);
  return (
    <svg
      ref={drawing}
      className={classes("ruler-scale", moving && "is-moving")}
      viewBox={`0 0 ${width} ${height}`}
      role="group"
      aria-label="Terms by their estimated size"
      onKeyDown={walk}
    >
      {hairline !== null && (
        <path className="ruler-beyond" d={hatching(hairline, axis.right + EDGE, floor, floor + STRIP)} />
      )}
      {estimate && <Estimate band={estimate} axis={axis} floor={floor} />}
      <path className="ruler-line" d={`M0 ${floor}H${width}`} />
      <path className="ruler-foot" d={`M0 ${floor + STRIP}H${width}`} />
      {ticks.map(({ x, length }) => (
        <path
          key={x}
          className={`ruler-tick is-${length}`}
          d={`M${x.toFixed(1)} ${floor}v${length === "long" ? STRIP : length === "middle" ? 8 : 5}`}
        />
      ))}
      {target !== null && hairline !== null && (
        <Hairline {...props} target={target} x={hairline} floor={floor} />
      )}
      {ticks.map(
        ({ x, power }) =>
          power !== null && (
            <text key={x} className="ruler-power" x={x} y={floor + STRIP + 13} textAnchor="middle">
              {tenTo(power)}
            </text>
          ),
      )}
      {marks.map(({ mark: { id } }) => {
        const { x, level } = labels.get(id) ?? nowhere;
        return (
          <path
            key={id}
            className="ruler-stem"
            style={{ transform: `translateX(${x.toFixed(2)}px)` }}
            d={`M0 ${floor}V${floor - heightOf(level)}`}
          />
        );
      })}
      {marks.map((read) => (
        <Mark
          key={read.mark.id}
          read={read}
          floor={floor}
          place={labels.get(read.mark.id) ?? nowhere}
          isFirstOut={read.mark.id === firstOut?.mark.id}
          current={read.mark.id === current}
          opened={read.mark.id === opened}
          onOpen={() => props.onOpen(read.mark.id === opened ? null : read.mark.id)}
        />
      ))}
      <g aria-hidden="true">
        {marks.map((read) => (
          <Label
            key={read.mark.id}
            read={read}
            place={labels.get(read.mark.id) ?? nowhere}
            note={hasNote && read.mark.id === firstOut?.mark.id ? noteOf(read) : null}
            floor={floor}
          />
        ))}
      </g>
    </svg>
  );
}

/** Arrows go from mark to mark, along the scale: only one of them is a stop of the Tab key. */
function walk(event: KeyboardEvent<SVGSVGElement>): void {
  const marks = [...event.currentTarget.querySelectorAll<SVGElement>(".ruler-mark")];
  const at = marks.findIndex((mark) => mark === document.activeElement);
  const step = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }[event.key];
  if (at === -1 || step === undefined) return;
  event.preventDefault();
  marks[(at + step + marks.length) % marks.length]?.focus();
}

const nowhere: PlacedLabel = { id: "", x: 0, level: 0, side: null, isCut: true };
const heightOf = (level: number) => 11 + level * LEVEL;

interface MarkProps {
  readonly read: ReadMark;
  readonly floor: number;
  readonly place: PlacedLabel;
  readonly isFirstOut: boolean;
  readonly current: boolean;
  readonly opened: boolean;
  readonly onOpen: () => void;
}

function Mark({ read, floor, place, isFirstOut, current, opened, onOpen }: MarkProps) {
  const { mark, included } = read;
  const height = heightOf(place.level);
  const words = place.side === null ? 0 : labelWidth(labelOf(read));
  return (
    <g
      className={classes(
        "ruler-mark",
        `is-${mark.scalingClass}`,
        !included && "is-out",
        isFirstOut && "is-first-out",
      )}
      style={{ transform: `translateX(${place.x.toFixed(2)}px)` }}
      role="button"
      tabIndex={current ? 0 : -1}
      aria-label={markName(read, isFirstOut)}
      aria-expanded={opened}
      onClick={onOpen}
      onKeyDown={(event) => {
        if (event.key !== "Enter" && event.key !== " ") return;
        event.preventDefault();
        onOpen();
      }}
    >
      <title>{markName(read, isFirstOut)}</title>
      {/* Its words belong to what can be pressed. */}
      <rect
        data-hand=""
        className="ruler-touch"
        x={place.side === "left" ? -12 - words : -12}
        y={floor - height - (words === 0 ? 12 : 8)}
        width={24 + words}
        height={words === 0 ? 24 : 16}
      />
      <path
        className="ruler-shape"
        d={shapes[mark.scalingClass]}
        transform={`translate(0 ${floor - height})`}
      />
    </g>
  );
}

interface LabelProps {
  readonly read: ReadMark;
  readonly place: PlacedLabel;
  readonly note: string | null;
  readonly floor: number;
}

/** Outside the mark's button, whose name says more than this. */
function Label({ read, place, note, floor }: LabelProps) {
  if (place.side === null) return null;
  const toRight = place.side === "right";
  return (
    <text
      className={classes("ruler-label", !read.included && "is-out")}
      style={{ transform: `translateX(${place.x.toFixed(2)}px)` }}
      x={toRight ? LABEL_GAP : -LABEL_GAP}
      y={floor - heightOf(place.level) + 4}
      textAnchor={toRight ? "start" : "end"}
    >
      {labelOf(read)}
      {note !== null && !place.isCut && <tspan className="ruler-note">{note}</tspan>}
    </text>
  );
}

function Estimate({
  band,
  axis,
  floor,
}: {
  readonly band: EstimateBand;
  readonly axis: RulerAxis;
  readonly floor: number;
}) {
  const clamp = (size: number) => Math.min(axis.right, Math.max(axis.left, positionOf(axis, size)));
  const [from, to] = [clamp(band.high), clamp(band.low)];
  const words = `${band.words}: ${sizeText(band.low)} to ${sizeText(band.high)}`;
  return (
    <rect
      className="ruler-estimate"
      x={from}
      y={floor + 1}
      width={Math.max(2, to - from)}
      height={STRIP - 2}
      role="img"
      aria-label={words}
    >
      <title>{words}</title>
    </rect>
  );
}

function Hairline(props: Props & { readonly target: number; readonly x: number; readonly floor: number }) {
  const { axis, reading, drawing, target, x, floor, width, onTarget, onHold, onKey } = props;
  const range = {
    low: 10 ** axis.low,
    high: Math.min(0.5, 10 ** axis.high),
    step: 10 ** 0.05,
    leap: 10 ** 0.5,
  };
  const hand = useRef<SVGGElement>(null);
  const drag = useDrag((clientX) => {
    const box = drawing.current?.getBoundingClientRect();
    if (!box || box.width === 0) return;
    const size = sizeAtPosition(axis, ((clientX - box.left) / box.width) * width);
    onTarget(roundedTarget(within(size, range)));
  }, onHold);
  const words = `target ${targetWords(target)}`;
  // Near the right edge the words stand on the other side of the hairline.
  const toRight = x < width - 120;
  return (
    <g
      ref={hand}
      className="ruler-hairline"
      style={{ transform: `translateX(${x.toFixed(2)}px)` }}
      role="slider"
      tabIndex={0}
      aria-label="Target accuracy"
      aria-orientation="horizontal"
      aria-valuemin={Math.log10(range.low)}
      aria-valuemax={Math.log10(range.high)}
      aria-valuenow={Number(Math.log10(target).toFixed(3))}
      aria-valuetext={spokenReading(words, reading)}
      onKeyDown={(event) => {
        // To the right is smaller on this scale, and the key follows the hand.
        const key = { ArrowRight: "ArrowLeft", ArrowLeft: "ArrowRight" }[event.key] ?? event.key;
        const next = valueAfterKey(key, target, range);
        if (next === null) {
          onKey(event);
          return;
        }
        event.preventDefault();
        event.stopPropagation();
        onTarget(roundedTarget(next));
      }}
      {...drag}
    >
      <rect data-hand="" className="ruler-touch" x={-12} y={0} width={24} height={floor + STRIP + GRIP + 6} />
      <path className="ruler-hair" d={`M0 2V${floor + STRIP + GRIP - 5}`} />
      <circle className="ruler-grip" cy={floor + STRIP + GRIP} r={5} />
      <text className="ruler-target" x={toRight ? 7 : -7} y={11} textAnchor={toRight ? "start" : "end"}>
        {words}
      </text>
      <text className="ruler-target-note" x={toRight ? 7 : -7} y={23} textAnchor={toRight ? "start" : "end"}>
        left out beyond
      </text>
    </g>
  );
}

/** Strokes at 45° between two heights: a pattern would not survive every printer, and none lies under a label. */
function hatching(from: number, to: number, top: number, bottom: number): string {
  const rise = bottom - top;
  const strokes: string[] = [];
  for (let x = from + 2; x < to - rise; x += 6) strokes.push(`M${x.toFixed(1)} ${bottom}l${rise} ${-rise}`);
  return strokes.join("");
}
