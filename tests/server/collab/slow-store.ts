/** A document store that can be made to wait or to fail at each of its doors. */
import type { DocumentStore } from "../../../server/collab/document-store.ts";

export type Door = Exclude<keyof DocumentStore, "stop" | "processId">;
export interface SlowStore extends DocumentStore {
  /** From now on calls of this door wait until it is opened. */
  shut(door: Door): void;
  open(door: Door): void;
  /** From now on calls of this door fail, until `null`. `after`: the work is done and only its answer is lost. */
  fail(door: Door, how: { readonly error: Error; readonly after?: boolean } | null): void;
  /** Calls so far, also waiting ones. */
  calls(door: Door): number;
}

export function makeSlow(store: DocumentStore): SlowStore {
  const gates = new Map<Door, { readonly opened: Promise<void>; readonly open: () => void }>();
  const failures = new Map<Door, { readonly error: Error; readonly after?: boolean }>();
  const counts = new Map<Door, number>();
  const pass =
    <Arguments extends unknown[], Answer>(door: Door, work: (...given: Arguments) => Promise<Answer>) =>
    async (...given: Arguments): Promise<Answer> => {
      counts.set(door, (counts.get(door) ?? 0) + 1);
      await gates.get(door)?.opened;
      const failure = failures.get(door);
      if (failure !== undefined && !failure.after) throw failure.error;
      const answer = await work(...given);
      if (failure?.after) throw failure.error;
      return answer;
    };
  return {
    processId: store.processId,
    newest: pass("newest", store.newest.bind(store)),
    load: pass("load", store.load.bind(store)),
    append: pass("append", store.append.bind(store)),
    readAfter: pass("readAfter", store.readAfter.bind(store)),
    saveState: pass("saveState", store.saveState.bind(store)),
    quarantine: pass("quarantine", store.quarantine.bind(store)),
    stop: () => store.stop(),
    shut(door) {
      let open: () => void = () => undefined;
      const opened = new Promise<void>((resolve) => (open = resolve));
      gates.set(door, { opened, open });
    },
    open(door) {
      gates.get(door)?.open();
      gates.delete(door);
    },
    fail(door, how) {
      if (how === null) failures.delete(door);
      else failures.set(door, how);
    },
    calls: (door) => counts.get(door) ?? 0,
  };
}
