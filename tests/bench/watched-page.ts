/** What a page tells of itself while it is measured: long tasks, its worker's messages, the last change on it. */
import type { Page } from "playwright";

export interface Watched {
  /** Milliseconds from Enter, or else from the beginning, to the worker's last answer and to a page that is still. */
  readonly answered: number | null;
  readonly still: number;
  /** From the request to the worker to its last answer. */
  readonly inWorker: number | null;
  readonly requests: number;
  readonly outcomes: number;
  /** The longest task of the main thread; null when none was over 50 ms, which is what browsers report. */
  readonly longestTask: number | null;
  /** All of them together. */
  readonly longTasks: number;
  /** The longest from an input to the picture that shows it; null when none was over 16 ms. */
  readonly slowestInput: number | null;
}

interface Record_ {
  begin: number;
  asked: number[];
  answers: { at: number; outcomes: number }[];
  changed: number;
  tasks: number[];
  inputs: number[];
}
declare global {
  var watched: Record_;
}

/** To be installed before the page's own code runs. */
export function watch(): void {
  globalThis.watched = { begin: 0, asked: [], answers: [], changed: 0, tasks: [], inputs: [] };
  const Plain = Worker;
  globalThis.Worker = class extends Plain {
    constructor(url: string | URL, options?: WorkerOptions) {
      super(url, options);
      this.addEventListener("message", ({ data }: MessageEvent<{ outcomes?: readonly unknown[] }>) => {
        watched.answers.push({ at: performance.now(), outcomes: data.outcomes?.length ?? 0 });
      });
    }
    override postMessage(message: unknown): void {
      watched.asked.push(performance.now());
      super.postMessage(message);
    }
  };
  new PerformanceObserver((list) => {
    for (const entry of list.getEntries()) watched.tasks.push(entry.duration);
  }).observe({ type: "longtask" });
  new PerformanceObserver((list) => {
    for (const entry of list.getEntries()) watched.inputs.push(entry.duration);
    // The type of this option is not in the library's declarations yet.
  }).observe({ type: "event", durationThreshold: 16 } as PerformanceObserverInit);
  // Enter commits a field: what follows is counted from there.
  addEventListener(
    "keydown",
    ({ key }) => {
      if (key === "Enter") watched.begin = performance.now();
    },
    { capture: true },
  );
  addEventListener("DOMContentLoaded", () => {
    new MutationObserver(() => {
      watched.changed = performance.now();
    }).observe(document.body, { subtree: true, childList: true, characterData: true, attributes: true });
  });
}

const QUIET_MS = 1_200;

/** Does something, waits until nothing changes on the page any more, and reads what was seen. */
export async function measure(page: Page, act: () => Promise<void>): Promise<Watched> {
  await page.evaluate(() => {
    const now = performance.now();
    watched = { begin: now, asked: [], answers: [], changed: now, tasks: [], inputs: [] };
  });
  await act();
  return read(page);
}

/** The same from the beginning of the page on. */
export async function read(page: Page): Promise<Watched> {
  await stillness(page);
  return page.evaluate(() => {
    const { begin, asked, answers, changed, tasks, inputs } = watched;
    const last = answers.at(-1)?.at;
    const [first] = asked;
    const longest = (all: readonly number[]) => (all.length === 0 ? null : Math.max(...all));
    return {
      answered: last === undefined ? null : last - begin,
      still: changed - begin,
      inWorker: last === undefined || first === undefined ? null : last - first,
      requests: asked.length,
      outcomes: answers.reduce((sum, { outcomes }) => sum + outcomes, 0),
      longestTask: longest(tasks),
      longTasks: tasks.length,
      slowestInput: longest(inputs),
    };
  });
}

async function stillness(page: Page): Promise<void> {
  await page.waitForFunction((quiet) => performance.now() - watched.changed > quiet, QUIET_MS, {
    polling: 200,
    timeout: 60_000,
  });
}
