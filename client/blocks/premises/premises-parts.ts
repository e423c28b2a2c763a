import { premisesLine } from "#engine/notebook/summary.ts";
import type { BlockParts } from "../block-parts.ts";
import { PremisesForm } from "./premises-form.tsx";

export const premisesParts: BlockParts = {
  titleField: "name",
  titleHint: "name of the theory",
  Form: PremisesForm,
  summary: ({ blockId, kind, fields, tables }) =>
    premisesLine([
      { id: blockId, kind, standsOn: null, inputs: { ...fields, ...tables }, title: "", problems: [] },
    ]),
};
