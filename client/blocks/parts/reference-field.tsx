import { kindDescriptions } from "#engine/descriptions.ts";
import type { FieldSpec } from "#engine/shape.ts";
import { useBlock, useEvaluationOf, useOtherBlocks, type FieldPlace } from "../block-handle.ts";
import { ChoiceField } from "./choice-field.tsx";
import { plainLatex } from "./plain-latex.ts";

interface Props {
  readonly place: FieldPlace;
  readonly label: string;
  readonly showLabel?: boolean;
  readonly hint?: string;
  /** What no block at all means here. */
  readonly none?: string;
}

/** Another block of the notebook whose result is used: of the kinds that the block's shape allows there. */
export function ReferenceField({ none = "none", ...field }: Props) {
  const { kind } = useBlock();
  const others = useOtherBlocks();
  const allowed = specAt(kindDescriptions[kind].shape, field.place)?.refersTo ?? [];
  const options = others
    .filter((other) => allowed === "any" || allowed.includes(other.kind))
    .map((other) => ({ value: other.id, label: nameOf(other) }));
  return <ChoiceField {...field} options={[{ value: "", label: none }, ...options]} />;
}

/** A number of the block that a reference field names. */
export function ScalarField({ blockId, ...field }: Props & { readonly blockId: string }) {
  const evaluation = useEvaluationOf(blockId);
  const options = (evaluation?.scalars ?? []).map(({ id, label }) => ({
    value: id,
    label: plainLatex(label),
  }));
  return <ChoiceField {...field} options={[{ value: "", label: "choose a number" }, ...options]} />;
}

function nameOf(block: { readonly kind: keyof typeof kindDescriptions; readonly title: string }): string {
  const { title } = kindDescriptions[block.kind];
  return block.title.trim() === "" ? title : `${title}: ${block.title}`;
}

function specAt(
  shape: (typeof kindDescriptions)[keyof typeof kindDescriptions]["shape"],
  place: FieldPlace,
): FieldSpec | undefined {
  return "field" in place ? shape.fields[place.field] : shape.tables[place.table]?.[place.column];
}
