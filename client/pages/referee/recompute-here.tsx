import type { StoredResult } from "#contract/api.ts";
import type { Progress } from "#engine/kind.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { neededFor } from "#engine/notebook/references.ts";
import type { PinAttributes } from "#schema/block-structure.ts";
import { useEffect, useRef, useState } from "react";
import { useBlocks } from "../../editor/evaluation/use-results.ts";
import { Button } from "../../ui/button.tsx";
import { sayProgress } from "../../blocks/block-state.ts";
import { recompute, type Recomputation } from "./recompute.ts";
import { sayVerdict, verdictOf } from "./verdict.ts";

interface Props {
  readonly pin: PinAttributes;
  readonly stored: StoredResult | undefined;
}
interface Found {
  readonly recomputation: Recomputation;
  /** The blocks it was computed from: the same objects for as long as their inputs stay. */
  readonly from: readonly BlockInstance[];
}

/** Computes the block anew in a fresh worker and says whether that agrees. Inputs that change take the answer back. */
export function RecomputeHere({ pin, stored }: Props) {
  const blocks = useBlocks();
  const [found, setFound] = useState<Found | null>(null);
  const [progress, setProgress] = useState<Progress | "starting" | null>(null);
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);

  async function compute() {
    const stop = new AbortController();
    running.current = stop;
    setProgress("starting");
    const from = neededFor(pin.blockId, blocks);
    const recomputation = await recompute(pin.blockId, blocks, {
      onProgress: setProgress,
      signal: stop.signal,
    });
    // Gone from the page, or begun again since.
    if (running.current !== stop) return;
    running.current = null;
    setProgress(null);
    setFound({ recomputation, from });
  }
  const computing = progress !== null;
  const current = found && isSameList(found.from, neededFor(pin.blockId, blocks)) ? found : null;
  const words = current && say(current.recomputation, stored, pin);

  return (
    <>
      <Button
        className="check-recompute text-small"
        busy={computing}
        busyLabel={progress === null || progress === "starting" ? "computing" : sayProgress(progress)}
        aria-label={`recompute here: ${pin.text}`}
        onClick={() => void compute()}
      >
        recompute here
      </Button>
      {computing && (
        <button type="button" className="text-small underline" onClick={() => running.current?.abort()}>
          stop
        </button>
      )}
      <p role="status" className="check-verdict" data-agrees={words?.agrees}>
        {words?.sentence ?? (found && !computing ? "The inputs have changed since it was recomputed." : "")}
      </p>
    </>
  );
}

function say(recomputation: Recomputation, stored: StoredResult | undefined, pin: PinAttributes) {
  if (!recomputation.done)
    return { sentence: `It could not be recomputed: ${recomputation.words}.`, agrees: false };
  const verdict = verdictOf(recomputation.outcome, stored, pin);
  return {
    sentence: sayVerdict(verdict, pin.text),
    agrees: verdict.pin === "agrees" && verdict.stored !== "differs",
  };
}

function isSameList(a: readonly BlockInstance[], b: readonly BlockInstance[]): boolean {
  return a.length === b.length && a.every((block, index) => block === b[index]);
}
