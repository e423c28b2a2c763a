import type { StoredResult } from "#contract/api.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { useEditorState } from "@tiptap/react";
import { useMemo, useSyncExternalStore } from "react";
import { useBlockWorld } from "../../editor/blocks/block-world.ts";
import { useResultsStore } from "../../editor/evaluation/use-results.ts";
import { useNotebook } from "../../editor/notebook-context.ts";
import { CHECK_SHEET } from "./anchors.ts";
import { CheckEntry } from "./check-entry.tsx";
import { checkPin, type CheckState } from "./check-state.ts";
import { placedPins } from "./placed-pins.ts";

/** Every pinned number of the text in its order: where it stands, where it comes from, and whether that still agrees. */
export function CheckSheet({ stored }: { readonly stored: readonly StoredResult[] }) {
  const { editor } = useNotebook();
  const { directory } = useBlockWorld();
  const results = useResultsStore();
  // Any result may be the one that a pin names.
  useSyncExternalStore(results.subscribe, results.version);
  // A document is the same object until it changes; compared by its contents it would be walked whole, schema and all.
  const doc = useEditorState({
    editor,
    selector: ({ editor: now }) => now.state.doc,
    equalityFn: Object.is,
  });
  const pins = useMemo(() => placedPins(doc), [doc]);

  const known = new Map<string, Evaluation>(stored.map(({ key, evaluation }) => [key, evaluation]));
  for (const { id } of results.blocks()) {
    const { key, evaluation } = results.result(id);
    if (key !== null && evaluation) known.set(key, evaluation);
  }
  const checks = pins.map((placed) => ({
    placed,
    check: checkPin(
      placed.pin,
      directory.block(placed.pin.blockId) !== null,
      results.result(placed.pin.blockId),
      results.settled(placed.pin.blockId),
      (key) => known.get(key) ?? null,
    ),
  }));

  return (
    <section
      id={CHECK_SHEET}
      tabIndex={-1}
      aria-labelledby="check-sheet-title"
      className="check-sheet tick-rule"
    >
      <h2 id="check-sheet-title" className="check-sheet-title engraved">
        Check sheet
      </h2>
      {pins.length === 0 ? (
        <p className="check-sheet-note">The text takes no number from a block.</p>
      ) : (
        <>
          <p className="check-sheet-note">
            Every number that the text takes from a block, in the order of the text. <em>Recompute here</em>{" "}
            evaluates the block afresh in this browser, from its inputs alone, and compares to 12 digits.
          </p>
          <p role="status" className="check-sheet-summary">
            {sayChecks(checks.map(({ check }) => check))}
          </p>
          <ol className="check-entries">
            {checks.map(({ placed, check }) => (
              <CheckEntry
                key={placed.key}
                placed={placed}
                check={check}
                stored={stored.find(({ blockId }) => blockId === placed.pin.blockId)}
              />
            ))}
          </ol>
        </>
      )}
    </section>
  );
}

const order = ["holds", "moved", "loose", "unchecked", "waiting"] as const;
const words: Readonly<Record<CheckState["state"], (count: number) => string>> = {
  holds: (count) => (count === 1 ? "holds" : "hold"),
  moved: (count) => (count === 1 ? "has moved" : "have moved"),
  loose: (count) => (count === 1 ? "is loose" : "are loose"),
  unchecked: (count) => (count === 1 ? "is unchecked" : "are unchecked"),
  waiting: (count) => (count === 1 ? "is being computed" : "are being computed"),
};

/** @example sayChecks([{ state: "holds" }, { state: "holds" }]) // "2 numbers: 2 hold." */
export function sayChecks(checks: readonly CheckState[]): string {
  const parts = order.flatMap((state) => {
    const count = checks.filter((check) => check.state === state).length;
    return count === 0 ? [] : [`${count} ${words[state](count)}`];
  });
  return `${checks.length} ${checks.length === 1 ? "number" : "numbers"}: ${parts.join(", ")}.`;
}
