/** What the shelf says about a notebook. */
import type { Evaluation } from "../evaluation.ts";
import type { BlockInstance, PinInstance } from "./block-instance.ts";
import { pinStatus } from "./pins.ts";

/**
 * The premises in a line: "d = 4 · 2 fields · 11 terms", "D = 3, z = 2 · 1 field · 3 terms"; "" without premises.
 * Of several Premises blocks the first is described and the others are counted.
 */
export function premisesLine(blocks: readonly BlockInstance[]): string {
  const [first, ...others] = blocks.filter(({ kind }) => kind === "premises");
  if (!first) return "";
  const field = (name: string) => {
    const value = first.inputs[name];
    return typeof value === "string" ? value.trim().slice(0, 40) : "";
  };
  const filled = (table: string, column: string) => {
    const rows = first.inputs[table];
    return typeof rows === "object" ? rows.filter((row) => (row[column] ?? "").trim() !== "").length : 0;
  };
  const spacetime =
    field("geometry") === "anisotropic" ? `D = ${field("D")}, z = ${field("z")}` : `d = ${field("d")}`;
  const parts = [
    spacetime,
    counted(filled("fields", "symbol"), "field"),
    counted(filled("terms", "term"), "term"),
  ];
  if (others.length > 0) parts.push(`${others.length} more premises`);
  return parts.join(" · ");
}

function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

export interface PinCounts {
  readonly moved: number;
  readonly loose: number;
}

export function countPins(
  pins: readonly PinInstance[],
  evaluations: ReadonlyMap<string, Evaluation>,
): PinCounts {
  const statuses = pins.map((pin) => pinStatus(pin, evaluations).status);
  return {
    moved: statuses.filter((status) => status === "moved").length,
    loose: statuses.filter((status) => status === "loose").length,
  };
}
