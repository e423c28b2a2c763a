/** What one tick of the ruler stands for, and the ways from it: its row, and the sentences that rely on it. */
import { useEffect, useEffectEvent, useRef } from "react";
import { sizeText } from "../blocks/parts/number-text.ts";
import { ClassMark } from "../blocks/parts/class-mark.tsx";
import { useNotebook } from "../editor/notebook-context.ts";
import { Formula } from "../ui/math.tsx";
import { goToRow, goToSentence, sentencesOf } from "./pinned-sentences.ts";
import type { ReadMark } from "./reading.ts";
import type { RulerSource } from "./ruler-source.ts";

interface Props {
  readonly read: ReadMark;
  readonly source: RulerSource;
  readonly isFirstOut: boolean;
  readonly onClose: () => void;
}

export function MarkPanel({ read, source, isFirstOut, onClose }: Props) {
  const { editor } = useNotebook();
  const panel = useRef<HTMLDivElement>(null);
  const { mark, size } = read;
  const sentences = sentencesOf(editor, read, source, isFirstOut);
  const close = useEffectEvent(onClose);
  useEffect(() => {
    const element = panel.current;
    element?.querySelector("button")?.focus();
    const closeByKey = (event: KeyboardEvent) => {
      if (event.key !== "Escape") return;
      event.stopPropagation();
      close();
    };
    element?.addEventListener("keydown", closeByKey);
    return () => element?.removeEventListener("keydown", closeByKey);
  }, [mark.id]);
  return (
    <div ref={panel} className="ruler-panel" role="group" aria-label={`${mark.spoken}: where it stands`}>
      <p className="ruler-panel-term">
        <Formula latex={mark.latex} /> <ClassMark scalingClass={mark.scalingClass} />{" "}
        <span>size {sizeText(size)}</span>
      </p>
      <ul>
        {mark.rowIds.map((rowId) => (
          <li key={rowId}>
            <button type="button" onClick={() => goToRow(editor, source.premisesId, rowId)}>
              its row in the premises{mark.rowIds.length > 1 ? ` (${rowId})` : ""}
            </button>
          </li>
        ))}
        {sentences.map(({ position, words }) => (
          <li key={position}>
            <button type="button" onClick={() => goToSentence(editor, position)}>
              {words}
            </button>
          </li>
        ))}
        {sentences.length === 0 && <li className="ruler-panel-none">No sentence pins a number of it.</li>}
      </ul>
      <button type="button" className="ruler-panel-close" onClick={onClose}>
        close
      </button>
    </div>
  );
}
