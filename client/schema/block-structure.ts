/**
 * How a block sits in the shared document (ProseMirror JSON and Y.Xml alike):
 *
 *   { type: <kind name>, attrs: { blockId, standsOn, …one flat attribute per single field }, content: row* }
 *   { type: "row", attrs: { table, rowId, order }, content: cell* }
 *   { type: "cell", attrs: { field, value } }
 *
 * Every value is text in an attribute, so of two concurrent edits of one field the last wins whole and
 * no value arises that nobody typed; edits of different fields or rows both survive. Inputs are written
 * straight to the Y.XmlElement, never by a ProseMirror diff, so a row cannot be taken for its neighbour.
 * A missing cell means the column's initial value; of two cells for one field the last in the row counts.
 * `order` is a key compared as text; reordering writes it and moves nothing.
 */
export const rowNode = "row";
export const cellNode = "cell";
/** A computed value in prose: inline atom. */
export const pinNode = "pin";

/** Attributes every block has beside its single fields. */
export const blockAttributes = ["blockId", "standsOn"] as const;

export interface PinAttributes {
  readonly pinId: string;
  readonly blockId: string;
  /** `Scalar.id` in that block's evaluation. */
  readonly scalar: string;
  /** Key of the result the value was taken from. */
  readonly resultKey: string;
  /** Canonical JSON of the `ScalarValue`. */
  readonly value: string;
  /** What is shown, also with no result at hand: "0.109(14)". */
  readonly text: string;
  /** See engine/notebook/pin-format.ts. */
  readonly format: string;
}
