import type { DivergenceValue } from "#engine/divergence/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { GraphResult } from "./graph-result.tsx";
import { TheoryResult } from "./theory-result.tsx";

export function DivergenceResult({ value }: ResultProps<DivergenceValue>) {
  return value.mode === "one graph" ? <GraphResult value={value} /> : <TheoryResult value={value} />;
}
