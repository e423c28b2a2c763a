import { describe, expect, it, vi } from "vitest";
import type { Evaluation } from "#engine/evaluation.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { NotebookOutcome } from "#engine/notebook/evaluate-notebook.ts";
import type { WorkerLike } from "../../../client/editor/evaluation/evaluation-client.ts";
import type {
  EvaluationRequest,
  WorkerMessage,
} from "../../../client/editor/evaluation/evaluation-messages.ts";
import { createLongWork } from "../../../client/editor/evaluation/long-work.ts";

const evaluation: Evaluation = { value: 1, problems: [], notices: [], scalars: [], working: [] };
const blocks: readonly BlockInstance[] = ["a", "b"].map((id) => ({
  id,
  kind: "truncationError",
  standsOn: null,
  inputs: {},
  title: "",
  problems: [],
}));
const job = (blockId: string, key = `key of ${blockId}`) => ({ blockId, key });
const outcomeOf = ({ blockId, key }: { blockId: string; key: string }): NotebookOutcome => ({
  blockId,
  key,
  kind: "truncationError",
  standsOn: null,
  evaluation,
});

/** Long work whose workers answer only when the test says so. */
function scene() {
  const workers: { worker: WorkerLike; asked: EvaluationRequest[]; ended: boolean }[] = [];
  const done: string[] = [];
  const onChange = vi.fn();
  const work = createLongWork({
    startWorker() {
      const record = { worker: {} as WorkerLike, asked: [] as EvaluationRequest[], ended: false };
      record.worker = {
        onmessage: null,
        onerror: null,
        postMessage: (request) => record.asked.push(request),
        terminate: () => (record.ended = true),
      };
      workers.push(record);
      return record.worker;
    },
    onOutcome: ({ blockId }) => done.push(blockId),
    onMistake: (mistake) => expect.fail(mistake),
    onChange,
  });
  const newest = () => workers.at(-1) ?? expect.fail("no worker was started");
  const say = (message: WorkerMessage) =>
    newest().worker.onmessage?.(new MessageEvent("message", { data: message }));
  const answer = (...jobs: { blockId: string; key: string }[]) =>
    say({ about: "answer", revision: 1, outcomes: jobs.map(outcomeOf), postponed: [], mistakes: [] });
  return { work, workers, done, newest, say, answer };
}

describe("long work", () => {
  it("goes one block after the other, in the same worker", () => {
    const { work, workers, done, answer } = scene();
    work.want([job("a"), job("b")], blocks, []);
    expect([work.stateOf("a")?.state, work.stateOf("b")?.state]).toEqual(["computing", "waiting"]);
    answer(job("a"));
    expect([work.stateOf("a"), work.stateOf("b")?.state]).toEqual([null, "computing"]);
    answer(job("b"));
    expect(done).toEqual(["a", "b"]);
    expect(workers).toHaveLength(1);
  });

  it("leaves what waits for another result until it has a key", () => {
    const { work, workers } = scene();
    work.want([{ blockId: "b", key: null }], blocks, []);
    expect(workers).toEqual([]);
    expect(work.stateOf("b")).toBeNull();
  });

  it("says how far it is", () => {
    const { work, say } = scene();
    work.want([job("a")], blocks, []);
    const progress = { done: 3, of: 8, part: "dimension 12" };
    say({ about: "progress", blockId: "a", progress });
    expect(work.stateOf("a")).toEqual({ state: "computing", progress });
  });

  it("is given up when its inputs change, and an answer that was under way counts no more", () => {
    const { work, workers, done, say } = scene();
    work.want([job("a", "old")], blocks, []);
    const old = workers[0]?.worker.onmessage;
    work.want([job("a", "new")], blocks, []);
    expect(workers.map(({ ended }) => ended)).toEqual([true, false]);
    old?.(
      new MessageEvent<WorkerMessage>("message", {
        data: {
          about: "answer",
          revision: 1,
          outcomes: [outcomeOf(job("a", "old"))],
          postponed: [],
          mistakes: [],
        },
      }),
    );
    expect(done).toEqual([]);
    say({ about: "progress", blockId: "a", progress: { done: 1, of: null, part: "" } });
    expect(work.stateOf("a")?.state).toBe("computing");
  });

  it("goes on undisturbed when something else changes", () => {
    const { work, workers } = scene();
    work.want([job("a")], blocks, []);
    work.want([job("b"), job("a")], blocks, []);
    expect(workers).toHaveLength(1);
    expect(workers[0]?.asked).toHaveLength(1);
    expect(work.stateOf("a")?.state).toBe("computing");
  });

  it("stops when told to, lets the next one go, and goes on when told to", () => {
    const { work, workers, answer } = scene();
    work.want([job("a"), job("b")], blocks, []);
    work.stop("a");
    expect(workers[0]?.ended).toBe(true);
    expect([work.stateOf("a")?.state, work.stateOf("b")?.state]).toEqual(["stopped", "computing"]);
    answer(job("b"));
    expect(work.stateOf("a")?.state).toBe("stopped");
    work.resume("a");
    expect(work.stateOf("a")?.state).toBe("computing");
  });

  it("stays stopped while other blocks change, and begins anew with other inputs", () => {
    const { work } = scene();
    work.want([job("a")], blocks, []);
    work.stop("a");
    work.want([job("a"), job("b")], blocks, []);
    expect(work.stateOf("a")?.state).toBe("stopped");
    work.want([job("a", "other"), job("b")], blocks, []);
    expect(work.stateOf("a")?.state).toBe("waiting");
  });

  it("says when the worker crashed, and tries again only when asked", () => {
    const { work, workers, newest } = scene();
    work.want([job("a")], blocks, []);
    newest().worker.onerror?.(new ErrorEvent("error", { message: "out of memory", cancelable: true }));
    expect(work.stateOf("a")).toEqual({ state: "failed", reason: "out of memory" });
    work.want([job("a")], blocks, []);
    expect(workers).toHaveLength(1);
    work.resume("a");
    expect(workers).toHaveLength(2);
  });
});
