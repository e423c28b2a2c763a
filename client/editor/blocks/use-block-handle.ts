/** The handle that a block's form and result are given, over the shared document and the results. */
import { useMemo, useSyncExternalStore } from "react";
import type * as Y from "yjs";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance, BlockRow } from "#engine/notebook/block-instance.ts";
import { choosePremises } from "#engine/notebook/choose-premises.ts";
import { placeKey, type BlockHandle, type FieldPlace } from "../../blocks/block-handle.ts";
import { useBlockResult, useEvaluatorState } from "../evaluation/use-results.ts";
import { newId } from "../new-id.ts";
import { placePinAtCaret } from "../pins/place-pin.ts";
import { goToNextPinOf, onPinCounts, pinCountOf } from "../pins/use-pin-counts.ts";
import { cellElement, orderedRows } from "./block-elements.ts";
import { useBlockWorld, useReadOnly, type BlockWorld } from "./block-world.ts";
import { changeInputs, insertRows, moveRow, removeRow, writeCell, writeField } from "./block-writes.ts";
import { pasteInto } from "./paste-rows.ts";
import { rewriteUses } from "./rename-uses.ts";

/** Null once the block is gone. */
export function useBlockHandle(blockId: string): BlockHandle | null {
  const world = useBlockWorld();
  const { directory } = world;
  const block = useSyncExternalStore(directory.subscribe, () => directory.block(blockId));
  const premises = useSyncExternalStore(directory.subscribe, directory.premises);
  const result = useBlockResult(blockId);
  const stopped = useEvaluatorState().state !== "working";
  const readOnly = useReadOnly();
  const changes = useMemo(() => changesOf(world, blockId), [world, blockId]);
  const standsOn = useSyncExternalStore(directory.subscribe, () => standsOnOf(world, blockId));
  const { evaluation, lastGood } = result;
  return useMemo(() => {
    if (!block) return null;
    return {
      ...changes,
      ...valuesOf(block),
      blockId,
      kind: block.kind,
      readOnly,
      evaluation,
      lastGood: evaluation?.value == null ? lastGood : null,
      stopped,
      premisesChoices: premises,
      standsOn,
    };
  }, [block, evaluation, lastGood, stopped, readOnly, changes, premises, standsOn, blockId]);
}

function standsOnOf({ directory }: BlockWorld, blockId: string): string | null {
  const block = directory.block(blockId);
  const choice = block && choosePremises(block, directory.blocks());
  return choice && "found" in choice ? (choice.found?.id ?? null) : null;
}

function valuesOf({ kind, inputs }: BlockInstance): Pick<BlockHandle, "fields" | "tables"> {
  const { shape } = kindDescriptions[kind];
  const fields: Record<string, string> = {};
  const tables: Record<string, readonly BlockRow[]> = {};
  for (const name of Object.keys(shape.fields)) {
    const value = inputs[name];
    if (typeof value === "string") fields[name] = value;
  }
  for (const name of Object.keys(shape.tables)) {
    const value = inputs[name];
    if (typeof value === "object") tables[name] = value;
  }
  return { fields, tables };
}

type Changes = Pick<
  BlockHandle,
  | "setStandsOn"
  | "setValue"
  | "addRow"
  | "removeRow"
  | "moveRow"
  | "paste"
  | "replaceRows"
  | "files"
  | "undo"
  | "redo"
  | "setFocus"
  | "colleaguesIn"
  | "onColleagues"
  | "writerOf"
  | "pin"
  | "pinCount"
  | "onPinCounts"
  | "goToNextPin"
  | "rewriteUses"
  | "addToPremises"
  | "isPending"
  | "premisesEvaluation"
  | "longWork"
  | "stopLongWork"
  | "resumeLongWork"
  | "allBlocks"
  | "evaluationOf"
  | "onResults"
>;

/** Everything a block's form may do. None of it changes while the block stays the same. */
function changesOf(world: BlockWorld, blockId: string): Changes {
  const { directory, presence, results, session } = world;

  function change(act: (element: Y.XmlElement, block: BlockInstance) => void, id = blockId): void {
    const element = directory.element(id);
    const block = directory.block(id);
    // A colleague may have deleted the block an instant ago; a demoted person's form may still be closing.
    if (!element || !block || session.state().readOnly) return;
    changeInputs(element, () => act(element, block));
  }

  return {
    setStandsOn: (premisesId) => change((element) => writeField(element, "standsOn", premisesId)),
    setValue: (place, value) =>
      change((element) => {
        if ("field" in place) writeField(element, place.field, value);
        else writeCell(element, place.table, place.rowId, place.column, value);
      }),
    addRow(table, values = {}, afterRowId) {
      const id = newId();
      change((element, { kind }) =>
        insertRows(element, kindDescriptions[kind], table, [{ id, values }], afterRowId ?? null),
      );
      return id;
    },
    removeRow: (table, rowId) => change((element) => removeRow(element, table, rowId)),
    moveRow: (table, rowId, beforeRowId) => change((element) => moveRow(element, table, rowId, beforeRowId)),
    paste: (grid) => change((element, { kind }) => pasteInto(element, kindDescriptions[kind], grid, newId)),
    files: filesAddress(session),
    replaceRows: (tables, fields = {}) =>
      change((element, { kind }) => {
        for (const [field, value] of Object.entries(fields)) writeField(element, field, value);
        for (const [table, rows] of Object.entries(tables)) {
          for (const { id } of orderedRows(element, table)) removeRow(element, table, id);
          const fresh = rows.map((values) => ({ id: newId(), values }));
          insertRows(element, kindDescriptions[kind], table, fresh, null);
        }
      }),
    undo: () => void session.history.undoOnce(),
    redo: () => void session.history.redoOnce(),
    setFocus(place) {
      if (place) presence.enter(blockId, placeKey(place));
      else presence.leave(blockId);
    },
    isPending: () => results.isPending(blockId),
    premisesEvaluation() {
      const standsOn = standsOnOf(world, blockId);
      const result = standsOn === null ? null : results.result(standsOn);
      return result && (result.lastGood ?? result.evaluation);
    },
    longWork: () => results.longWork(blockId),
    stopLongWork: () => results.stopLongWork(blockId),
    resumeLongWork: () => results.resumeLongWork(blockId),
    allBlocks: results.blocks,
    evaluationOf(otherId) {
      const result = results.result(otherId);
      return result.lastGood ?? result.evaluation;
    },
    onResults: results.subscribe,
    colleaguesIn: (place) => presence.inField(blockId, placeKey(place)),
    onColleagues: presence.subscribe,
    writerOf(place) {
      const clientId = writerOf(directory.element(blockId), place);
      return clientId === null ? "someone" : presence.nameOf(clientId);
    },
    addToPremises(table, rows) {
      const premisesId = standsOnOf(world, blockId);
      if (premisesId === null) return;
      change((element, { kind }) => {
        const fresh = rows.map((values) => ({ id: newId(), values }));
        insertRows(element, kindDescriptions[kind], table, fresh, null);
      }, premisesId);
    },
    rewriteUses: (rewriting, apply) => rewriteUses(world, blockId, rewriting, apply),
    pinCount: () => pinCountOf(blockId),
    onPinCounts,
    goToNextPin() {
      const editor = world.editor();
      if (editor) goToNextPinOf(editor, blockId);
    },
    pin: (scalarId) => placePinAtCaret(world, blockId, scalarId),
  };
}

function filesAddress({ notebookId, source }: BlockWorld["session"]): string | null {
  if (source.mode === "scratch") return null;
  return source.mode === "referee"
    ? `/api/referee/${encodeURIComponent(source.token)}/attachments`
    : `/api/notebooks/${notebookId}/attachments`;
}

/** The client of the shared document that wrote the value as it stands. */
function writerOf(block: Y.XmlElement | null, place: FieldPlace): number | null {
  if (!block) return null;
  if ("field" in place) return clientOf(block, place.field);
  const row = orderedRows(block, place.table).find(({ id }) => id === place.rowId);
  const cell = row && cellElement(row.element, place.column);
  return cell ? clientOf(cell, "value") : null;
}

/** Yjs keeps attributes as items that carry their writer's client id; `_map` is where, in the version we pin. */
function clientOf(element: Y.XmlElement, attribute: string): number | null {
  return element._map.get(attribute)?.id.client ?? null;
}
