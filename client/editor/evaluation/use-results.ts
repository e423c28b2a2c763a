/** Reading results in components. Each hook draws its component again only when what it reads has changed. */
import { createContext, useContext, useSyncExternalStore } from "react";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { EvaluatorState } from "./evaluation-client.ts";
import type { BlockResult, ResultsStore, Settled } from "./results-store.ts";

export const ResultsContext = createContext<ResultsStore | null>(null);

export function useResultsStore(): ResultsStore {
  const store = useContext(ResultsContext);
  if (!store) throw new Error("results are read inside a notebook");
  return store;
}

export function useBlockResult(blockId: string): BlockResult {
  const store = useResultsStore();
  return useSyncExternalStore(store.subscribe, () => store.result(blockId));
}

export function useSettled(blockId: string): Settled | null {
  const store = useResultsStore();
  return useSyncExternalStore(store.subscribe, () => store.settled(blockId));
}

export function useBlocks(): readonly BlockInstance[] {
  const store = useResultsStore();
  return useSyncExternalStore(store.subscribe, store.blocks);
}

export function useEvaluatorState(): EvaluatorState {
  const store = useResultsStore();
  return useSyncExternalStore(store.subscribe, store.evaluator);
}
