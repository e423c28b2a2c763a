/** Stores updates however long the store is away; only a complaint that never passes ends it. */
import { setTimeout as sleep } from "node:timers/promises";
import type { Logger } from "pino";
import type { AppendOutcome, AppendRequest, DocumentStore } from "./document-store.ts";
import { isPassing } from "./store-errors.ts";

export interface RetryTimes {
  readonly firstMs: number;
  readonly longestMs: number;
}
export const usualRetry: RetryTimes = { firstMs: 100, longestMs: 2_000 };

export interface AppendOptions {
  readonly signal: AbortSignal;
  readonly retry: RetryTimes;
  readonly log: Logger;
  readonly onUnreachable: () => void;
  readonly onBack: () => void;
}
export type StubbornOutcome =
  AppendOutcome | null | { readonly abandoned: true } | { readonly hopeless: unknown };

const ATTEMPTS_WHEN_HOPELESS = 3;

/**
 * An attempt whose answer was lost may have been committed. The next one then finds rows it does not know and stores
 * nothing: the writer reads them and finds its own among them.
 */
export async function appendUntilAnswered(
  store: DocumentStore,
  request: AppendRequest,
  { signal, retry, log, onUnreachable, onBack }: AppendOptions,
): Promise<StubbornOutcome> {
  const isAbandoned = () => signal.aborted;
  let delay = retry.firstMs;
  let hopeless = 0;
  for (let attempt = 1; ; attempt += 1) {
    try {
      const outcome = await store.append(attempt === 1 ? request : { ...request, evenIfBehind: false });
      if (isAbandoned()) return { abandoned: true };
      if (attempt > 1) onBack();
      return outcome;
    } catch (error) {
      if (isAbandoned()) return { abandoned: true };
      log.error({ err: error, attempt }, "updates could not be stored");
      if (!isPassing(error)) hopeless += 1;
      if (hopeless >= ATTEMPTS_WHEN_HOPELESS) return { hopeless: error };
      if (attempt === 1) onUnreachable();
    }
    await sleep(delay, undefined, { signal }).catch(() => undefined); // abandoned: looked at on the next line
    if (isAbandoned()) return { abandoned: true };
    delay = Math.min(delay * 2, retry.longestMs);
  }
}
