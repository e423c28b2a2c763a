import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import type { StoredResult } from "#contract/api.ts";
import { ENGINE_VERSION } from "#engine/evaluation.ts";
import { kinds } from "#engine/kinds.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { evaluateNotebook } from "#engine/notebook/evaluate-notebook.ts";
import { createBlockDirectory, type BlockDirectory } from "../../../client/editor/blocks/block-directory.ts";
import { changeInputs, writeField } from "../../../client/editor/blocks/block-writes.ts";
import type { WorkerLike } from "../../../client/editor/evaluation/evaluation-client.ts";
import { createEvaluationCore } from "../../../client/editor/evaluation/evaluation-core.ts";
import type { EvaluationRequest } from "../../../client/editor/evaluation/evaluation-messages.ts";
import { createResultsStore, type ResultsStore } from "../../../client/editor/evaluation/results-store.ts";
import { notebookState, paragraph, row } from "../blocks/two-editors.ts";
import { workerInProcess } from "./worker-in-process.ts";

const orders = ["8.0", "9.1", "9.32"].map((value, index) =>
  row("orders", `o${index}`, `K${index}V`, { order: String(index), value, name: "" }),
);
const content = [
  paragraph("words"),
  {
    type: "premises",
    attrs: { blockId: "premises", d: "4" },
    content: [
      row("fields", "f", "K", { symbol: "phi", kind: "real scalar" }),
      row("terms", "t", "K", { term: "lambda/4! phi^4" }),
    ],
  },
  { type: "scaling", attrs: { blockId: "scaling" } },
  { type: "truncationError", attrs: { blockId: "apart", q: "0.3" }, content: orders },
];

let doc: Y.Doc;
let directory: BlockDirectory;
let store: ResultsStore | null = null;
beforeEach(() => {
  doc = new Y.Doc();
  Y.applyUpdate(doc, notebookState(content));
  directory = createBlockDirectory(doc.getXmlFragment(FRAGMENT));
});
afterEach(() => {
  store?.destroy();
  store = null;
  directory.destroy();
  vi.useRealTimers();
});

function open(startWorker: () => WorkerLike = workerInProcess, timeLimitMs?: number): ResultsStore {
  store = createResultsStore({
    directory,
    startWorker,
    ...(timeLimitMs === undefined ? {} : { timeLimitMs }),
  });
  return store;
}
const settled = (results: ResultsStore) =>
  vi.waitFor(() => {
    for (const { id } of results.blocks()) expect(results.isPending(id), id).toBe(false);
  });
const edit = (blockId: string, field: string, value: string) => {
  const element = directory.element(blockId) ?? expect.fail(`no ${blockId}`);
  changeInputs(element, () => writeField(element, field, value));
};

describe("results", () => {
  it("are the engine's own for the same document", async () => {
    const results = open();
    await settled(results);
    const direct = evaluateNotebook(directory.blocks(), {
      memo: new Map(),
      onInternalError: (error) => expect.fail(String(error)),
    });
    for (const { blockId, key, evaluation } of direct) {
      expect(results.result(blockId).key).toBe(key);
      expect(results.result(blockId).evaluation).toEqual(evaluation);
    }
  });

  it("of other blocks stay the same objects when one block changes, so that only its readers draw again", async () => {
    const results = open();
    await settled(results);
    const [premises, scaling, apart] = ["premises", "scaling", "apart"].map((id) => results.result(id));
    edit("apart", "q", "0.2");
    await settled(results);
    expect(results.result("premises")).toBe(premises);
    expect(results.result("scaling")).toBe(scaling);
    expect(results.result("apart").key).not.toBe(apart?.key);
  });

  it("follow the premises they stand on", async () => {
    const results = open();
    await settled(results);
    const before = results.result("scaling");
    edit("premises", "d", "6");
    expect(results.isPending("scaling")).toBe(true);
    await settled(results);
    expect(results.result("scaling").key).not.toBe(before.key);
  });

  it("send the worker only what changed", async () => {
    const requests: EvaluationRequest[] = [];
    const results = open(() => {
      const worker = workerInProcess();
      const post = worker.postMessage.bind(worker);
      worker.postMessage = (request) => {
        requests.push(request);
        post(request);
      };
      return worker;
    });
    await settled(results);
    edit("scaling", "probe", "1 TeV");
    await settled(results);
    expect(requests.map(({ changed }) => changed.map(({ id }) => id))).toEqual([
      ["premises", "scaling", "apart"],
      ["scaling"],
    ]);
  });

  it("keep the last good one beside an error", async () => {
    const results = open();
    await settled(results);
    const good = results.result("apart").evaluation;
    edit("apart", "q", "wide");
    await settled(results);
    expect(results.result("apart").evaluation?.value).toBeNull();
    expect(results.result("apart").lastGood).toBe(good);
  });

  it("are the server's until the worker has answered, and say who changed them as long as they are the same result", async () => {
    const { blocks } = readDocument({ type: "doc", content });
    const stored = evaluateNotebook(blocks, { memo: new Map(), onInternalError: () => undefined }).map(
      ({ blockId, key, evaluation }): StoredResult => ({
        blockId,
        key,
        evaluation,
        engineVersion: ENGINE_VERSION,
        settledAt: "2026-12-01T14:02:00Z",
        changedBy: "Otto",
      }),
    );
    const silent: WorkerLike = {
      onmessage: null,
      onerror: null,
      postMessage: () => undefined,
      terminate: () => undefined,
    };
    const early = open(() => silent);
    early.setStored(stored);
    expect(early.result("apart").evaluation).toEqual(
      stored.find(({ blockId }) => blockId === "apart")?.evaluation,
    );
    expect(early.settled("apart")).toEqual({ by: "Otto", at: "2026-12-01T14:02:00Z" });
    early.destroy();

    const results = open();
    results.setStored(stored);
    const shown = results.result("scaling");
    await settled(results);
    // The same key is the same result: nothing is drawn again when the worker agrees.
    expect(results.result("scaling")).toBe(shown);
    expect(results.settled("apart")?.by).toBe("Otto");
    edit("apart", "q", "0.2");
    await settled(results);
    expect(results.settled("apart")).toBeNull();
  });

  it("forget a block that is gone", async () => {
    const results = open();
    await settled(results);
    doc.getXmlFragment(FRAGMENT).delete(3, 1);
    await settled(results);
    expect(results.result("apart").evaluation).toBeNull();
    expect(results.blocks().map(({ id }) => id)).toEqual(["premises", "scaling"]);
  });
});

describe("long work", () => {
  const withCount = [
    ...content,
    {
      type: "basisCount",
      attrs: { blockId: "count", from: "5", to: "7" },
      content: [row("fields", "f", "K", { symbol: "phi" })],
    },
    {
      type: "errorBudget",
      attrs: { blockId: "budget" },
      content: [row("sources", "b", "K", { name: "x", from: "count", scalar: "total/5" })],
    },
  ];
  beforeEach(() => {
    directory.destroy();
    doc = new Y.Doc();
    Y.applyUpdate(doc, notebookState(withCount));
    directory = createBlockDirectory(doc.getXmlFragment(FRAGMENT));
  });

  it("comes after what is quick, and what uses it comes then", async () => {
    let workers = 0;
    const results = open(() => {
      workers += 1;
      return workerInProcess();
    });
    await vi.waitFor(() => expect(results.result("scaling").evaluation).not.toBeNull());
    await settled(results);
    expect(results.result("count").evaluation?.value).not.toBeNull();
    expect(results.result("budget").evaluation?.problems).toEqual([]);
    expect(workers).toBe(2);
    expect(results.longWork("count")).toBeNull();
  });

  it("is stopped and resumed by hand, and what is quick goes on meanwhile", async () => {
    const silent: WorkerLike[] = [];
    let quick = true;
    const results = open(() => {
      // The second worker is the one for long work.
      if (quick) {
        quick = false;
        return workerInProcess();
      }
      const worker = {
        onmessage: null,
        onerror: null,
        postMessage: () => undefined,
        terminate: () => undefined,
      };
      silent.push(worker);
      return worker;
    });
    await vi.waitFor(() => expect(results.longWork("count")?.state).toBe("computing"));
    results.stopLongWork("count");
    expect(results.longWork("count")?.state).toBe("stopped");
    edit("apart", "q", "0.2");
    await vi.waitFor(() => expect(results.isPending("apart")).toBe(false));
    expect(results.longWork("count")?.state).toBe("stopped");
    expect(results.isPending("budget")).toBe(true);
    results.resumeLongWork("count");
    expect(results.longWork("count")?.state).toBe("computing");
    expect(silent).toHaveLength(2);
  });

  it("need not be done here when the server has its result", async () => {
    const { blocks } = readDocument({ type: "doc", content: withCount });
    const stored = evaluateNotebook(blocks, { memo: new Map(), onInternalError: () => undefined }).map(
      ({ blockId, key, evaluation }): StoredResult => ({
        blockId,
        key,
        evaluation,
        engineVersion: ENGINE_VERSION,
        settledAt: "2026-12-01T14:02:00Z",
        changedBy: null,
      }),
    );
    let workers = 0;
    const results = open(() => {
      workers += 1;
      return workerInProcess();
    });
    results.setStored(stored);
    await settled(results);
    expect(results.result("budget").evaluation?.problems).toEqual([]);
    expect(workers).toBe(1);
  });
});

describe("the worker", () => {
  it("computes only the newest of several states that arrive together", () => {
    const core = createEvaluationCore({ kindOf: (kind) => kinds[kind], onProgress: () => undefined });
    const blocks = directory.blocks();
    core.hear({ revision: 1, order: blocks.map(({ id }) => id), changed: blocks, known: [] });
    edit("apart", "q", "0.2");
    const newest = directory.block("apart") ?? expect.fail("gone");
    core.hear({ revision: 2, order: blocks.map(({ id }) => id), changed: [newest], known: [] });
    const answer = core.answer();
    expect(answer.revision).toBe(2);
    expect(answer.outcomes).toHaveLength(3);
    expect(core.answer().outcomes).toEqual([]);
  });

  it("is started again when it crashes, and told everything anew", async () => {
    const started: WorkerLike[] = [];
    const results = open(() => {
      const worker =
        started.length === 0
          ? { onmessage: null, onerror: null, postMessage: () => undefined, terminate: () => undefined }
          : workerInProcess();
      started.push(worker);
      return worker;
    });
    await vi.waitFor(() => expect(started).toHaveLength(1));
    started[0]?.onerror?.(new ErrorEvent("error", { message: "out of memory", cancelable: true }));
    await settled(results);
    expect(started).toHaveLength(2);
    expect(results.evaluator()).toEqual({ state: "working" });
  });

  it("is given up after crashing three times in a row, and tried again at the next change", async () => {
    let starts = 0;
    let broken = true;
    const results = open(() => {
      starts += 1;
      if (!broken) return workerInProcess();
      const worker: WorkerLike = {
        onmessage: null,
        onerror: null,
        terminate: () => undefined,
        postMessage: () =>
          setTimeout(() => worker.onerror?.(new ErrorEvent("error", { message: "no", cancelable: true })), 0),
      };
      return worker;
    });
    await vi.waitFor(() => expect(results.evaluator()).toEqual({ state: "crashed", reason: "no" }));
    expect(starts).toBe(3);
    broken = false;
    edit("apart", "q", "0.2");
    await settled(results);
    expect(results.evaluator()).toEqual({ state: "working" });
  });

  it("is ended when it does not answer in time", async () => {
    let ended = 0;
    const results = open(
      () => ({ onmessage: null, onerror: null, postMessage: () => undefined, terminate: () => (ended += 1) }),
      30,
    );
    await vi.waitFor(() => expect(results.evaluator()).toEqual({ state: "timed-out", seconds: 0.03 }));
    expect(ended).toBe(1);
  });
});
