/**
 * The fixed instrument of a notebook. What is moved on it is tried here and by this person alone, drawn from the plan's
 * own numbers, until it is kept: then it is written into the premises like anything typed there.
 */
import { useEffect, useLayoutEffect, useMemo, useRef, useState, type KeyboardEvent } from "react";
import { sizeText } from "../blocks/parts/number-text.ts";
import { useBlockWorld, useReadOnly } from "../editor/blocks/block-world.ts";
import { keepReading } from "./keep-reading.ts";
import { MarkPanel } from "./mark-panel.tsx";
import { ProbeRail } from "./probe-rail.tsx";
import { readAt, type Reading, type ReadMark } from "./reading.ts";
import { rulerAxis } from "./ruler-axis.ts";
import type { RulerModel } from "./ruler-model.ts";
import { EDGE, labelOf, NOTE_FROM, placed, RulerScale } from "./ruler-scale.tsx";
import { useRulerSource, type RulerChoice, type RulerSource } from "./ruler-source.ts";
import { probeWords, ratioWords, targetWords } from "./ruler-words.ts";
import { saveSvg } from "./save-svg.ts";

const FEWEST_LEVELS = 3;
const MOST_LEVELS = 6;

export function OrderRuler() {
  const [chosen, setChosen] = useState<string | null>(null);
  const { source, choices } = useRulerSource(chosen);
  if (!source) return <EmptyRuler />;
  return <DrawnRuler source={source} choices={choices} onChoose={setChosen} />;
}

/** Says what it waits for, on the scale it will have. */
function EmptyRuler() {
  return (
    <p className="ruler-empty">
      The order ruler: a tick for every term, by its size at the probe scale. It needs Premises with a probe
      and a heavy scale, and an Order plan or a Scaling block.
    </p>
  );
}

interface DrawnProps {
  readonly source: RulerSource;
  readonly choices: readonly RulerChoice[];
  readonly onChoose: (blockId: string) => void;
}

/** Moved away from the kept values of one model; when that model is replaced, nothing is moved any more. */
interface Tried {
  readonly model: RulerModel;
  readonly probe: number;
  readonly target: number | null;
}

function DrawnRuler({ source, choices, onChoose }: DrawnProps) {
  const { model, estimate } = source;
  const world = useBlockWorld();
  const readOnly = useReadOnly();
  const frame = useRef<HTMLDivElement>(null);
  const drawing = useRef<SVGSVGElement>(null);
  const width = useWidth(frame);
  const [tried, setTried] = useState<Tried | null>(null);
  const [held, setHeld] = useState(false);
  const [withProducts, setWithProducts] = useState(false);
  const [opened, setOpened] = useState<string | null>(null);

  // Other values were kept: what was tried from the old ones is over, also when those are kept again.
  if (tried && !sameKept(tried.model, model)) setTried(null);
  const now = tried ?? { model, probe: model.probe.value, target: model.target };
  const isMoved = now.probe !== model.probe.value || now.target !== model.target;
  const reading = useMemo(() => readAt(model, now.probe, now.target), [model, now.probe, now.target]);
  const { axis, levels } = useMemo(() => layoutOf(model, width, withProducts), [model, width, withProducts]);
  const marks = shown(reading, withProducts).filter(
    ({ size }) => size <= 10 ** (axis.high + 0.15) && size >= 10 ** axis.low,
  );
  const beyond = shown(reading, withProducts).length - marks.length;
  const openedMark = reading.marks.find(({ mark }) => mark.id === opened) ?? null;
  const hasProducts = model.marks.some(({ insertions }) => insertions > 1);

  const tryValues = (change: Partial<Pick<Tried, "probe" | "target">>) =>
    setTried({ ...now, model, ...change });
  const keep = () => keepReading(world, source, now);
  const onKey = (event: KeyboardEvent) => {
    if (event.key === "Escape" && isMoved) {
      event.preventDefault();
      setTried(null);
    } else if (event.key === "Enter" && isMoved && !readOnly) {
      event.preventDefault();
      keep();
    } else if ((event.ctrlKey || event.metaKey) && event.key.toLowerCase() === "z") {
      event.preventDefault();
      if (event.shiftKey) world.session.history.redoOnce();
      else world.session.history.undoOnce();
    }
  };
  const caption = captionOf(source, reading);
  return (
    <div ref={frame} className="ruler-drawn">
      <RulerScale
        drawing={drawing}
        axis={axis}
        width={width}
        levels={levels}
        reading={reading}
        marks={marks}
        keptTarget={model.target}
        estimate={estimate}
        moving={held}
        opened={opened}
        onOpen={setOpened}
        onTarget={(target) => tryValues({ target })}
        onHold={setHeld}
        onKey={onKey}
      />
      <div className="ruler-row">
        <ProbeRail
          model={model}
          reading={reading}
          width={Math.min(300, width)}
          moving={held}
          onProbe={(probe) => tryValues({ probe })}
          onHold={setHeld}
          onKey={onKey}
        />
        <Values source={source} reading={reading} isNarrow={width < NOTE_FROM} />
        {/* Always there, so that nothing moves when they are needed. */}
        <span className="ruler-actions" hidden={!isMoved}>
          {!readOnly && (
            <button
              type="button"
              className="ruler-keep"
              aria-label={`keep in the premises: ${keptWords(model, reading)}`}
              onClick={keep}
            >
              keep in the premises
            </button>
          )}
          <button type="button" onClick={() => setTried(null)}>
            put back
          </button>
        </span>
        <span className="ruler-tools">
          {beyond > 0 && <span className="ruler-more">{beyond} off the scale</span>}
          {choices.length > 1 && (
            <select
              aria-label="The ruler shows"
              value={source.blockId}
              onChange={(event) => onChoose(event.target.value)}
            >
              {choices.map(({ blockId, title }) => (
                <option key={blockId} value={blockId}>
                  {title}
                </option>
              ))}
            </select>
          )}
          {hasProducts && (
            <button type="button" aria-pressed={withProducts} onClick={() => setWithProducts(!withProducts)}>
              products
            </button>
          )}
          <button
            type="button"
            aria-label="Save the ruler as SVG"
            onClick={() => {
              if (drawing.current) saveSvg(drawing.current, caption, document.title);
            }}
          >
            SVG
          </button>
        </span>
      </div>
      {openedMark && (
        <MarkPanel
          read={openedMark}
          source={source}
          isFirstOut={openedMark.mark.id === reading.firstOut?.mark.id}
          onClose={() => {
            setOpened(null);
            drawing.current?.querySelector<SVGElement>('.ruler-mark[tabindex="0"]')?.focus();
          }}
        />
      )}
    </div>
  );
}

interface ValuesProps {
  readonly source: RulerSource;
  readonly reading: Reading;
  readonly isNarrow: boolean;
}

function Values({ source, reading, isNarrow }: ValuesProps) {
  const { model, heavyText } = source;
  return (
    <span className="ruler-values">
      <strong>
        {model.probe.name} = {probeWords(model, reading.probe)}
      </strong>{" "}
      <span>
        {model.heavy.name} = {heavyText ?? probeWords(model, model.heavy.value)}
      </span>{" "}
      <span>
        {model.probe.name}/{model.heavy.name} = {ratioWords(model, reading)}
      </span>
      {reading.target !== null && (
        <>
          {" "}
          <span>{reading.order ? `through order ${reading.order.text}` : "target not reached"}</span>
        </>
      )}
      {isNarrow && reading.firstOut && (
        <>
          {" "}
          <span>
            first left out <i className="font-prose">{labelOf(reading.firstOut)}</i>,{" "}
            {sizeText(reading.firstOut.size)}
          </span>
        </>
      )}
    </span>
  );
}

function keptWords(model: RulerModel, { probe, target }: Reading): string {
  return [
    ...(probe === model.probe.value ? [] : [probeWords(model, probe)]),
    ...(target === null || target === model.target ? [] : [`target ${targetWords(target)}`]),
  ].join(" and ");
}

function captionOf({ model, heavyText }: RulerSource, reading: Reading): string {
  const values = [
    `${model.probe.name} = ${probeWords(model, reading.probe)}`,
    `${model.heavy.name} = ${heavyText ?? probeWords(model, model.heavy.value)}`,
    `${model.probe.name}/${model.heavy.name} = ${ratioWords(model, reading)}`,
    ...(reading.target === null ? [] : [`target ${targetWords(reading.target)}`]),
  ];
  return values.join(",  ");
}

/** Every term, the first left out whatever it is, and products on request. */
function shown({ marks, firstOut }: Reading, withProducts: boolean): readonly ReadMark[] {
  return marks.filter(({ mark }) => withProducts || mark.insertions === 1 || mark.id === firstOut?.mark.id);
}

/** The scale and its levels are those of the kept values: nothing jumps while a hand is moved. */
function layoutOf(model: RulerModel, width: number, withProducts: boolean) {
  const kept = readAt(model, model.probe.value, model.target);
  const marks = shown(kept, withProducts);
  const sizes = marks.map(({ size }) => size);
  const axis = rulerAxis(sizes, model.target, [EDGE, width - EDGE]);
  for (let levels = FEWEST_LEVELS; levels < MOST_LEVELS; levels += 1) {
    const labels = placed(marks, kept.firstOut, axis, levels, model.target);
    if ([...labels.values()].every(({ side }) => side !== null)) return { axis, levels };
  }
  return { axis, levels: MOST_LEVELS };
}

function sameKept(one: RulerModel, other: RulerModel): boolean {
  return one.probe.value === other.probe.value && one.target === other.target;
}

/** The width of the frame in px, before the first paint and whenever it changes. */
function useWidth(frame: { readonly current: HTMLElement | null }): number {
  const [width, setWidth] = useState(1040);
  useLayoutEffect(() => {
    const measured = frame.current?.clientWidth ?? 0;
    // eslint-disable-next-line react-hooks/set-state-in-effect -- the page's layout is an outside system
    if (measured > 0) setWidth(measured);
  }, [frame]);
  useEffect(() => {
    const element = frame.current;
    if (!element || typeof ResizeObserver === "undefined") return;
    const watch = new ResizeObserver(() => {
      if (element.clientWidth > 0) setWidth(element.clientWidth);
    });
    watch.observe(element);
    return () => watch.disconnect();
  }, [frame]);
  return width;
}
