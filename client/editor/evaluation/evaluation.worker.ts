/** Evaluates blocks off the main thread. Requests that arrive while it is busy are taken together: only the newest state is computed. */
import { createEvaluationCore } from "./evaluation-core.ts";
import type { EvaluationAnswer, EvaluationRequest } from "./evaluation-messages.ts";

/** The part of a worker's global scope used here; the DOM types of this project describe a window. */
interface WorkerScope {
  onmessage: ((event: MessageEvent<EvaluationRequest>) => void) | null;
  postMessage(message: EvaluationAnswer): void;
}
const scope = globalThis as unknown as WorkerScope; // this module is only ever started as a worker
const core = createEvaluationCore();
let waiting: ReturnType<typeof setTimeout> | null = null;

scope.onmessage = ({ data }) => {
  core.hear(data);
  waiting ??= setTimeout(() => {
    waiting = null;
    scope.postMessage(core.answer());
  }, 0);
};
