import { forKind, type BlockParts } from "../block-parts.ts";
import { DivergenceForm } from "./divergence-form.tsx";
import { DivergenceResult } from "./divergence-result.tsx";

export const divergenceParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: DivergenceForm,
  Result: forKind(DivergenceResult),
};
