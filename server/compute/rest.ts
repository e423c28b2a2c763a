/** Notebooks that took too long to compute: each rests, longer every time, so that others have the threads. */

const FIRST_REST_MS = 30_000;
const LONGEST_REST_MS = 15 * 60_000;
/** Whoever takes too long again and again makes no list of ours grow. */
const MOST_RESTING = 10_000;

interface Resting {
  readonly until: number;
  readonly forMs: number;
}

export class Rest {
  readonly #resting = new Map<string, Resting>();

  constructor(private readonly now: () => number = Date.now) {}

  /** Outlives the room: closing and opening a notebook is no way around it. */
  begin(notebookId: string): void {
    const before = this.#resting.get(notebookId);
    const forMs = before === undefined ? FIRST_REST_MS : Math.min(before.forMs * 2, LONGEST_REST_MS);
    this.#resting.delete(notebookId);
    this.#resting.set(notebookId, { until: this.now() + forMs, forMs });
    const [oldest] = this.#resting.keys();
    if (this.#resting.size > MOST_RESTING && oldest !== undefined) this.#resting.delete(oldest);
  }

  /** It was computed in time. */
  end(notebookId: string): void {
    this.#resting.delete(notebookId);
  }

  /** In milliseconds; 0 when it may be computed now. */
  remaining(notebookId: string): number {
    return Math.max(0, (this.#resting.get(notebookId)?.until ?? 0) - this.now());
  }
}
