import type { Evaluation } from "#engine/evaluation.ts";
import type { BlockHandle, Colleague, FieldPlace } from "../../blocks/block-handle.ts";
import { placeKey } from "../../blocks/block-handle.ts";

interface Standing {
  readonly fields: Readonly<Record<string, string>>;
  readonly readOnly?: boolean;
  readonly evaluation?: Evaluation;
  /** Who is in which field. */
  readonly colleagues?: Readonly<Record<string, readonly Colleague[]>>;
}

const nobody: readonly Colleague[] = [];
const nothing = () => undefined;
const unheard = () => nothing;

/** A block that stands still: its fields can be typed in, and nothing is kept. */
export function specimenHandle({
  fields,
  readOnly = false,
  evaluation,
  colleagues = {},
}: Standing): BlockHandle {
  return {
    blockId: "specimen",
    kind: "premises",
    fields,
    tables: {},
    readOnly,
    evaluation: evaluation ?? null,
    lastGood: null,
    isPending: () => false,
    longWork: () => null,
    stopLongWork: nothing,
    resumeLongWork: nothing,
    stopped: false,
    premisesChoices: [],
    standsOn: null,
    setStandsOn: nothing,
    premisesEvaluation: () => null,
    allBlocks: () => [],
    evaluationOf: () => null,
    onResults: unheard,
    setValue: nothing,
    addRow: () => "",
    removeRow: nothing,
    moveRow: nothing,
    paste: nothing,
    replaceRows: nothing,
    files: null,
    undo: nothing,
    redo: nothing,
    setFocus: nothing,
    colleaguesIn: (place: FieldPlace) => colleagues[placeKey(place)] ?? nobody,
    onColleagues: unheard,
    writerOf: () => null,
    addToPremises: () => undefined,
    rewriteUses: () => ({ entries: 0, formulas: 0 }),
    pinCount: () => 0,
    onPinCounts: unheard,
    goToNextPin: nothing,
  };
}
