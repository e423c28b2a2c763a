/** Evaluates blocks off the main thread. Requests that arrive while it is busy are taken together: only the newest state is computed. */
import { createEvaluationCore } from "./evaluation-core.ts";
import type { EvaluationRequest, WorkerMessage } from "./evaluation-messages.ts";

/** The part of a worker's global scope used here; the DOM types of this project describe a window. */
interface WorkerScope {
  onmessage: ((event: MessageEvent<EvaluationRequest>) => void) | null;
  postMessage(message: WorkerMessage): void;
}
const scope = globalThis as unknown as WorkerScope; // this module is only ever started as a worker

/** Often enough to see it move. */
const PROGRESS_EVERY_MS = 100;
let toldAt = 0;
const core = createEvaluationCore((report) => {
  const now = performance.now();
  if (now - toldAt < PROGRESS_EVERY_MS) return;
  toldAt = now;
  scope.postMessage(report);
});
let waiting: ReturnType<typeof setTimeout> | null = null;

scope.onmessage = ({ data }) => {
  core.hear(data);
  waiting ??= setTimeout(() => {
    waiting = null;
    scope.postMessage(core.answer());
  }, 0);
};
