/**
 * Evaluates blocks off the main thread. Requests that arrive while it is busy are taken together: only the newest state
 * is computed. The code of a kind is fetched when the notebook first has a block of it.
 */
import { kindLoaders } from "#engine/kind-loaders.ts";
import type { BlockKind, KindName } from "#engine/kind.ts";
import { createEvaluationCore } from "./evaluation-core.ts";
import type { EvaluationRequest, ProgressReport, WorkerMessage } from "./evaluation-messages.ts";

/** The part of a worker's global scope used here; the DOM types of this project describe a window. */
interface WorkerScope {
  onmessage: ((event: MessageEvent<EvaluationRequest>) => void) | null;
  postMessage(message: WorkerMessage): void;
}
const scope = globalThis as unknown as WorkerScope; // this module is only ever started as a worker

/** Often enough to see it move. */
const PROGRESS_EVERY_MS = 100;
let toldAt = 0;
function tell(report: ProgressReport): void {
  const now = performance.now();
  if (now - toldAt < PROGRESS_EVERY_MS) return;
  toldAt = now;
  scope.postMessage(report);
}

const kinds = new Map<KindName, BlockKind>();
function kindOf(name: KindName): BlockKind {
  const kind = kinds.get(name);
  if (!kind) throw new Error(`${name} was asked for before it was fetched`);
  return kind;
}
const core = createEvaluationCore({ kindOf, onProgress: tell });

/** More may be needed by the time these are there. */
async function fetchKinds(): Promise<void> {
  for (;;) {
    const missing = [...core.kindsNeeded()].filter((name) => !kinds.has(name));
    if (missing.length === 0) return;
    await Promise.all(missing.map(async (name) => kinds.set(name, await kindLoaders[name]())));
  }
}

let isAtIt = false;
async function answerNewest(): Promise<void> {
  await fetchKinds();
  isAtIt = false;
  scope.postMessage(core.answer());
}

scope.onmessage = ({ data }) => {
  core.hear(data);
  if (isAtIt) return;
  isAtIt = true;
  // A task of its own: what has arrived meanwhile is heard first.
  setTimeout(() => {
    answerNewest().catch((error: unknown) => {
      // Out of the promise: only what nobody catches reaches the page, which starts another worker.
      setTimeout(() => {
        throw error;
      });
    });
  });
};
