import {
  useEffect,
  useEffectEvent,
  useId,
  useRef,
  type ClipboardEvent,
  type KeyboardEvent,
  type ReactNode,
} from "react";
import { classes } from "../../ui/classes.ts";
import { placeKey, useBlock, type FieldPlace } from "../block-handle.ts";
import { ColleagueMarks } from "./colleague-marks.tsx";
import { ProblemList, useProblemsAt } from "./problem-list.tsx";
import { ReplacedNotice } from "./replaced-notice.tsx";
import { sizeStyle } from "./size-style.ts";
import { useFieldDraft } from "./use-field-draft.ts";

interface Props {
  readonly place: FieldPlace;
  readonly label: string;
  /** Draws the label beside the field; without it the label is only read aloud, as in a table with headings. */
  readonly showLabel?: boolean;
  readonly placeholder?: string;
  /** How the value is understood, drawn over the text while nobody is in the field. */
  readonly reading?: ReactNode;
  readonly hint?: string;
  readonly notation?: boolean;
  readonly size?: number;
  readonly onEnter?: () => void;
  /** Takes Escape instead of the way back to what stood in the field. */
  readonly onEscape?: () => void;
  /** True when the paste was taken care of. */
  readonly onPasteText?: (text: string) => boolean;
}

/** One value of a block. Undo inside it is the notebook's own, never the browser's. */
export function TextField(props: Props) {
  const {
    place,
    label,
    showLabel = false,
    placeholder,
    reading,
    hint,
    notation = true,
    size,
    onEnter,
    onEscape,
    onPasteText,
  } = props;
  const { readOnly } = useBlock();
  const draft = useFieldDraft(place);
  const problems = useProblemsAt(place);
  const id = useId();
  const input = useRef<HTMLInputElement>(null);

  // The system's own undo, from a menu or a gesture. React's event of this name is another one.
  const onBeforeInput = useEffectEvent((event: InputEvent) => {
    if (event.inputType !== "historyUndo" && event.inputType !== "historyRedo") return;
    event.preventDefault();
    if (event.inputType === "historyUndo") draft.undo();
    else draft.redo();
  });
  useEffect(() => {
    const element = input.current;
    const listen = (event: InputEvent) => onBeforeInput(event);
    element?.addEventListener("beforeinput", listen);
    return () => element?.removeEventListener("beforeinput", listen);
  }, []);

  function onKeyDown(event: KeyboardEvent<HTMLInputElement>) {
    const undo = undoKey(event);
    if (undo) {
      event.preventDefault();
      draft[undo]();
    } else if (event.key === "Enter" && !event.nativeEvent.isComposing) {
      event.preventDefault();
      draft.commit();
      onEnter?.();
    } else if (event.key === "Escape") {
      // Taken here: a second Escape leaves the field for the block.
      if (onEscape || draft.restore()) event.stopPropagation();
      onEscape?.();
    }
  }
  function onPaste(event: ClipboardEvent<HTMLInputElement>) {
    if (onPasteText?.(event.clipboardData.getData("text/plain")) === true) event.preventDefault();
  }

  const described = [hint && `${id}-hint`, problems.length > 0 && `${id}-problems`].filter(Boolean).join(" ");
  return (
    <div className={classes("block-field", showLabel && "block-field-labelled")} data-place={placeKey(place)}>
      {showLabel && (
        <label className="block-label" htmlFor={id}>
          {label}
        </label>
      )}
      <div className="block-field-box" data-value={draft.text}>
        <input
          ref={input}
          id={id}
          type="text"
          aria-label={showLabel ? undefined : label}
          aria-describedby={described || undefined}
          aria-invalid={problems.length > 0 || undefined}
          autoComplete="off"
          autoCapitalize="off"
          spellCheck={false}
          readOnly={readOnly}
          placeholder={readOnly ? undefined : placeholder}
          style={sizeStyle(size)}
          value={draft.text}
          className={classes(
            "block-input",
            notation && "block-notation",
            reading !== undefined && "block-input-read",
          )}
          onChange={(event) => draft.type(event.target.value)}
          onFocus={draft.enter}
          onBlur={draft.leave}
          onKeyDown={onKeyDown}
          onPaste={onPaste}
        />
        {reading !== undefined && (
          <span className="block-reading" aria-hidden="true">
            {reading}
          </span>
        )}
        <ColleagueMarks place={place} />
      </div>
      {hint && (
        <span id={`${id}-hint`} className="block-hint">
          {hint}
        </span>
      )}
      <ReplacedNotice draft={draft} onChosen={() => input.current?.focus()} />
      <ProblemList id={`${id}-problems`} problems={problems} />
    </div>
  );
}

function undoKey(event: KeyboardEvent): "undo" | "redo" | null {
  if (!(event.ctrlKey || event.metaKey) || event.altKey) return null;
  const key = event.key.toLowerCase();
  if (key === "z") return event.shiftKey ? "redo" : "undo";
  return key === "y" && !event.shiftKey ? "redo" : null;
}
