import { lazy } from "react";
import { forKind, type BlockParts } from "../block-parts.ts";

export const dataParts: BlockParts = {
  titleField: "title",
  titleHint: "title",
  Form: lazy(async () => ({ default: (await import("./data-form.tsx")).DataForm })),
  Result: forKind(lazy(async () => ({ default: (await import("./data-result.tsx")).DataResult }))),
};
