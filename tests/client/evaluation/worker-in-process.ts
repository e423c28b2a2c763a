/** Does what the worker does, in the test's own thread, and answers later as a worker would. */
import { kinds } from "#engine/kinds.ts";
import { createEvaluationCore } from "../../../client/editor/evaluation/evaluation-core.ts";
import type { WorkerLike } from "../../../client/editor/evaluation/evaluation-client.ts";
import type { WorkerMessage } from "../../../client/editor/evaluation/evaluation-messages.ts";

export function workerInProcess(): WorkerLike {
  let ended = false;
  const say = (message: WorkerMessage) => {
    if (!ended) worker.onmessage?.(new MessageEvent("message", { data: structuredClone(message) }));
  };
  const core = createEvaluationCore({ kindOf: (kind) => kinds[kind], onProgress: say });
  const worker: WorkerLike = {
    onmessage: null,
    onerror: null,
    postMessage(request) {
      core.hear(structuredClone(request));
      setTimeout(() => {
        if (!ended) say(core.answer());
      }, 0);
    },
    terminate() {
      ended = true;
    },
  };
  return worker;
}
