/** What co-editing does. */
import type { DocumentStore } from "../collab/document-store.ts";
import type { Metrics } from "./metrics.ts";

const SECONDS = [0.001, 0.002, 0.005, 0.01, 0.02, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 5, 10];

/** The same store, with its work counted. */
export function measureStore(store: DocumentStore, metrics: Metrics): DocumentStore {
  const rows = metrics.counter("subleading_updates_stored_total", "Changes that were committed.");
  const flushes = metrics.histogram(
    "subleading_flush_seconds",
    "Committing changes, one statement each time.",
    SECONDS,
  );
  const loads = metrics.histogram("subleading_load_seconds", "Reading a stored document.", SECONDS);
  const failures = metrics.counter("subleading_store_failures_total", "Work of the store that failed.");
  async function timed<Answer>(
    work: string,
    perform: () => Promise<Answer>,
    took: (seconds: number, answer: Answer) => void,
  ): Promise<Answer> {
    const start = performance.now();
    try {
      const answer = await perform();
      took((performance.now() - start) / 1_000, answer);
      return answer;
    } catch (error) {
      failures.add({ work });
      throw error;
    }
  }
  return {
    ...store,
    append: (request) =>
      timed(
        "append",
        () => store.append(request),
        (seconds, outcome) => {
          flushes.observe(seconds, { stored: outcome?.stored === true ? "yes" : "no" });
          if (outcome?.stored === true) rows.add({}, request.updates.length);
        },
      ),
    load: (notebookId) =>
      timed(
        "load",
        () => store.load(notebookId),
        (seconds) => loads.observe(seconds),
      ),
  };
}
