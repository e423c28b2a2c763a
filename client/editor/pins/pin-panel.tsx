import type { Editor } from "@tiptap/core";
import { useId, useLayoutEffect, useRef } from "react";
import {
  formatScalar,
  numberStyles,
  parsePinFormat,
  signStyles,
  type PinFormat,
  type SignStyle,
} from "#engine/notebook/pin-format.ts";
import { readPinValue } from "#engine/notebook/pins.ts";
import type { NumberStyle } from "#engine/notation/float-text.ts";
import type { PinAttributes } from "#schema/block-structure.ts";
import { kindDescriptions } from "#engine/descriptions.ts";
import { TextWithMath } from "../../ui/math.tsx";
import { useBlockWorld, useReadOnly } from "../blocks/block-world.ts";
import { goToBlock } from "../blocks/block-places.ts";
import { acceptPin, reformatPin, removePin } from "./place-pin.ts";
import { movedWords, type PinState } from "./pin-view-state.ts";

interface Props {
  readonly editor: Editor;
  readonly pin: PinAttributes;
  readonly state: PinState;
  readonly getPosition: () => number | undefined;
  readonly onClose: () => void;
}

const styleWords: Readonly<Record<NumberStyle, string>> = {
  auto: "as the number is",
  plain: "plain",
  scientific: "power of ten",
  percent: "percent",
};
const signWords: Readonly<Record<SignStyle, string>> = {
  negative: "minus only",
  always: "plus or minus",
  both: "± before it",
};

/** What a pin is, where it comes from, and how it is shown. Escape closes it and goes back to the prose. */
export function PinPanel({ editor, pin, state, getPosition, onClose }: Props) {
  const world = useBlockWorld();
  const readOnly = useReadOnly();
  const panel = useRef<HTMLDivElement>(null);
  const id = useId();
  useLayoutEffect(() => {
    const element = panel.current;
    if (!element) return;
    // Under the pin, but never past the right edge of the page.
    const past = element.getBoundingClientRect().right - document.documentElement.clientWidth + 12;
    if (past > 0) element.style.left = `${-past}px`;
    element.focus();
  }, []);
  const block = world.directory.block(pin.blockId);
  const act = (change: (position: number) => void) => {
    const position = getPosition();
    if (position !== undefined) change(position);
  };
  const close = () => {
    onClose();
    editor.view.focus();
  };

  return (
    // A dialog that can hold the focus itself; its keys close it.
    // eslint-disable-next-line jsx-a11y-x/no-noninteractive-element-interactions -- see above
    <div
      ref={panel}
      className="pin-panel"
      data-pin-panel=""
      role="dialog"
      aria-labelledby={`${id}-title`}
      tabIndex={-1}
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === "Escape") close();
      }}
      onBlur={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget)) onClose();
      }}
    >
      <p id={`${id}-title`} className="pin-panel-title">
        {"label" in state ? <TextWithMath text={state.label} /> : "A pinned number"}
      </p>
      <p className="pin-panel-state">
        {state.status === "holds" && "It holds: its block says the same."}
        {state.status === "waiting" && "Its block has not been computed yet."}
        {state.status === "loose" && `It is loose: ${state.words}.`}
        {state.status === "moved" && `${movedWords(state.settled)}: was ${pin.text}, now ${state.now}.`}
      </p>
      {!readOnly && (
        <Format
          pin={pin}
          onChange={(format, text) => act((position) => reformatPin(editor, position, format, text))}
        />
      )}
      <div className="pin-panel-tools">
        {state.status === "moved" && !readOnly && (
          <button
            type="button"
            className="pin-link pin-panel-accept"
            onClick={() => {
              act((position) => acceptPin(world, editor, position));
              close();
            }}
          >
            accept {state.now}
          </button>
        )}
        {block && (
          <button
            type="button"
            className="pin-link"
            onClick={() => {
              onClose();
              goToBlock(editor, pin.blockId);
            }}
          >
            go to its block, {kindDescriptions[block.kind].title}
            {block.title === "" ? "" : ` “${block.title}”`}
          </button>
        )}
        {!readOnly && (
          <button
            type="button"
            className="pin-link"
            onClick={() => {
              act((position) => removePin(editor, position));
              close();
            }}
          >
            take the pin out
          </button>
        )}
      </div>
    </div>
  );
}

interface FormatProps {
  readonly pin: PinAttributes;
  readonly onChange: (format: PinFormat, text: string) => void;
}

function Format({ pin, onChange }: FormatProps) {
  const id = useId();
  const format = parsePinFormat(pin.format);
  const value = readPinValue(pin.value);
  if (!value || value.type === "word") return null;
  const change = (next: Partial<PinFormat>) => {
    const merged = { ...format, ...next };
    onChange(merged, formatScalar(value, merged));
  };
  const hasSigma = value.type === "number" && (value.sigma ?? 0) !== 0;
  const hasUnit = value.type === "number" && (value.unit ?? "") !== "";
  return (
    <div className="pin-format">
      <label htmlFor={`${id}-digits`}>significant digits</label>
      <select
        id={`${id}-digits`}
        value={format.digits ?? ""}
        onChange={(event) =>
          change({ digits: event.target.value === "" ? null : Number(event.target.value) })
        }
      >
        <option value="">as the number is</option>
        {Array.from({ length: 12 }, (_, index) => (
          <option key={index} value={index + 1}>
            {index + 1}
          </option>
        ))}
      </select>
      <label htmlFor={`${id}-style`}>style</label>
      <select
        id={`${id}-style`}
        value={format.style}
        onChange={(event) =>
          change({ style: numberStyles.find((style) => style === event.target.value) ?? "auto" })
        }
      >
        {numberStyles.map((style) => (
          <option key={style} value={style}>
            {styleWords[style]}
          </option>
        ))}
      </select>
      <label htmlFor={`${id}-sign`}>sign</label>
      <select
        id={`${id}-sign`}
        value={format.sign}
        onChange={(event) =>
          change({ sign: signStyles.find((sign) => sign === event.target.value) ?? "negative" })
        }
      >
        {signStyles.map((sign) => (
          <option key={sign} value={sign}>
            {signWords[sign]}
          </option>
        ))}
      </select>
      {hasSigma && (
        <label className="pin-format-tick">
          <input
            type="checkbox"
            checked={format.uncertainty}
            onChange={(event) => change({ uncertainty: event.target.checked })}
          />
          with uncertainty
        </label>
      )}
      {hasUnit && (
        <label className="pin-format-tick">
          <input
            type="checkbox"
            checked={format.unit}
            onChange={(event) => change({ unit: event.target.checked })}
          />
          with unit
        </label>
      )}
    </div>
  );
}
