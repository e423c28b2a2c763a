/** Keeps a worker at the state of the notebook: sends what changed, starts it again when it crashes, ends it when it hangs. */
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import type { EvaluationAnswer, EvaluationRequest, WorkerMessage } from "./evaluation-messages.ts";

/** The part of a Worker used here, so that a test can stand in for one. */
export interface WorkerLike {
  postMessage(message: EvaluationRequest): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<WorkerMessage>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

export type EvaluatorState =
  | { readonly state: "working" }
  /** Ended because it did not answer in time; the next change is tried afresh. */
  | { readonly state: "timed-out"; readonly seconds: number }
  /** Crashed several times in a row; the next change is tried afresh. */
  | { readonly state: "crashed"; readonly reason: string };

export interface EvaluationClientOptions {
  readonly startWorker: () => WorkerLike;
  readonly onAnswer: (answer: EvaluationAnswer) => void;
  readonly onState: (state: EvaluatorState) => void;
  readonly timeLimitMs?: number;
}

const TIME_LIMIT_MS = 20_000;
const CRASHES_IN_A_ROW = 3;
/** Results of long work: more than a notebook has blocks of such kinds. */
const MOST_REMEMBERED = 200;

export interface EvaluationClient {
  /** Sends the difference to what was sent last; gives the revision that an answer to it will have reached. */
  send(blocks: readonly BlockInstance[]): number;
  /** A result of long work that need not be computed again; goes with what is sent next. */
  remember(key: string, evaluation: Evaluation): void;
  destroy(): void;
}

export function createEvaluationClient(options: EvaluationClientOptions): EvaluationClient {
  const { startWorker, onAnswer, onState, timeLimitMs = TIME_LIMIT_MS } = options;
  let worker: WorkerLike | null = null;
  let sent = new Map<string, BlockInstance>();
  const remembered = new Map<string, Evaluation>();
  let known = new Set<string>();
  let latest: readonly BlockInstance[] = [];
  let revision = 0;
  let deadline: ReturnType<typeof setTimeout> | null = null;
  let crashes = 0;

  function end() {
    if (deadline !== null) clearTimeout(deadline);
    deadline = null;
    worker?.terminate();
    worker = null;
    sent = new Map();
    known = new Set();
  }

  function start(): WorkerLike {
    const started = startWorker();
    started.onmessage = ({ data }) => {
      // This worker postpones what takes long, so it has nothing to say of progress.
      if (data.about !== "answer") return;
      crashes = 0;
      if (data.revision === revision && deadline !== null) {
        clearTimeout(deadline);
        deadline = null;
      }
      onState({ state: "working" });
      onAnswer(data);
    };
    started.onerror = (event) => {
      event.preventDefault();
      end();
      crashes += 1;
      if (crashes < CRASHES_IN_A_ROW) post();
      else onState({ state: "crashed", reason: event.message });
    };
    return started;
  }

  function post() {
    worker ??= start();
    const changed = latest.filter((block) => sent.get(block.id) !== block);
    sent = new Map(latest.map((block) => [block.id, block]));
    const fresh = [...remembered].filter(([key]) => !known.has(key));
    known = new Set(remembered.keys());
    worker.postMessage({ revision, order: latest.map(({ id }) => id), changed, known: fresh });
    deadline ??= setTimeout(() => {
      end();
      onState({ state: "timed-out", seconds: timeLimitMs / 1000 });
    }, timeLimitMs);
  }

  return {
    send(blocks) {
      if (worker === null) crashes = 0;
      latest = blocks;
      revision += 1;
      post();
      return revision;
    },
    remember(key, evaluation) {
      remembered.delete(key);
      remembered.set(key, evaluation);
      const [oldest] = remembered.keys();
      if (remembered.size > MOST_REMEMBERED && oldest !== undefined) remembered.delete(oldest);
    },
    destroy: end,
  };
}

/** The real worker. Vite bundles it apart, so the parser of formulas is never in the page's own code. */
export function startEvaluationWorker(): WorkerLike {
  return new Worker(new URL("./evaluation.worker.ts", import.meta.url), {
    type: "module",
    name: "evaluation",
  });
}
