/** Finds, among the blocks of a notebook, what its ruler is drawn from. */
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { OrderPlanValue } from "#engine/plan/value.ts";
import type { PremisesValue } from "#engine/premises/value.ts";
import type { ScalingValue } from "#engine/scaling/value.ts";
import type { TruncationValue } from "#engine/truncation/value.ts";
import { useMemo, useSyncExternalStore } from "react";
import { useResultsStore } from "../editor/evaluation/use-results.ts";
import type { ResultsStore } from "../editor/evaluation/results-store.ts";
import { bandOf, modelOfPlan, modelOfScaling, type EstimateBand, type RulerModel } from "./ruler-model.ts";

export interface RulerSource {
  readonly model: RulerModel;
  /** The block the sizes come from: an Order plan, or else a Scaling block. */
  readonly blockId: string;
  readonly isPlan: boolean;
  readonly premisesId: string;
  readonly estimate: EstimateBand | null;
  /** As shown in the premises, "3.2(4) TeV"; null when it is no scale of theirs. */
  readonly heavyText: string | null;
  /** Where the probe scale is written: a row of the premises, or the plan's own field. */
  readonly probeAt: { readonly rowId: string } | "plan" | null;
}

export interface RulerChoice {
  readonly blockId: string;
  readonly title: string;
}

/** The plans of a notebook that have a result, else its Scaling blocks; and what is drawn for the one that is chosen. */
export function useRulerSource(chosen: string | null): {
  readonly source: RulerSource | null;
  readonly choices: readonly RulerChoice[];
} {
  const store = useResultsStore();
  const version = useSyncExternalStore(store.subscribe, store.version);
  // Results change in place; their version says when.
  return useMemo(() => {
    const blocks = store.blocks();
    const plans = blocks.filter(({ id, kind }) => kind === "orderPlan" && valueOf(store, id) !== null);
    const candidates =
      plans.length > 0
        ? plans
        : blocks.filter(({ id, kind }) => kind === "scaling" && valueOf(store, id) !== null);
    const block = candidates.find(({ id }) => id === chosen) ?? candidates[0];
    return {
      source: block ? sourceOf(store, block) : null,
      choices: candidates.map(({ id, inputs }, index) => {
        const title = inputs["title"];
        return {
          blockId: id,
          title: typeof title === "string" && title !== "" ? title : `plan ${index + 1}`,
        };
      }),
    };
  }, [store, version, chosen]);
}

function valueOf(store: ResultsStore, blockId: string): unknown {
  const { evaluation, lastGood } = store.result(blockId);
  return evaluation?.value ?? lastGood?.value ?? null;
}

function sourceOf(store: ResultsStore, block: BlockInstance): RulerSource | null {
  const premisesId = store.result(block.id).standsOn;
  // Each kind's value is what its engine folder gives.
  const premises = (premisesId && valueOf(store, premisesId)) as PremisesValue | null;
  if (premisesId === null || !premises) return null;
  const isPlan = block.kind === "orderPlan";
  const value = valueOf(store, block.id);
  const model = isPlan
    ? modelOfPlan(value as OrderPlanValue, premises)
    : modelOfScaling(value as ScalingValue);
  if (!model) return null;
  const [probeLatex, heavyLatex] = isPlan
    ? [(value as OrderPlanValue).probe.latex, (value as OrderPlanValue).heavy.latex]
    : [(value as ScalingValue).probe?.latex, (value as ScalingValue).heavy?.latex];
  const typed = block.inputs["probe"];
  const isLiteral = typeof typed === "string" && /^\s*[\d.]/.test(typed);
  const probe = premises.scales.find(({ latex }) => latex === probeLatex);
  return {
    model,
    blockId: block.id,
    isPlan,
    premisesId,
    estimate: estimateFor(store, premisesId),
    heavyText: premises.scales.find(({ latex }) => latex === heavyLatex)?.size?.text ?? null,
    probeAt: isLiteral ? "plan" : probe ? { rowId: probe.rowId } : null,
  };
}

/** The first Truncation error block that belongs to these premises, or to none. */
function estimateFor(store: ResultsStore, premisesId: string): EstimateBand | null {
  for (const { id, kind } of store.blocks()) {
    if (kind !== "truncationError") continue;
    const { standsOn } = store.result(id);
    const value = valueOf(store, id) as TruncationValue | null; // of this kind
    if (value && (standsOn === null || standsOn === premisesId)) return bandOf(value);
  }
  return null;
}
