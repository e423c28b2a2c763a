/** Does what the worker does, in the test's own thread, and answers later as a worker would. */
import { createEvaluationCore } from "../../../client/editor/evaluation/evaluation-core.ts";
import type { WorkerLike } from "../../../client/editor/evaluation/evaluation-client.ts";

export function workerInProcess(): WorkerLike {
  const core = createEvaluationCore();
  let ended = false;
  const worker: WorkerLike = {
    onmessage: null,
    onerror: null,
    postMessage(request) {
      core.hear(structuredClone(request));
      setTimeout(() => {
        if (!ended) worker.onmessage?.(new MessageEvent("message", { data: structuredClone(core.answer()) }));
      }, 0);
    },
    terminate() {
      ended = true;
    },
  };
  return worker;
}
