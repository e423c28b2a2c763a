/** What goes by itself with time. Several processes may do it at once: each finds what the other has left. */
import type { Services } from "../services.ts";
import { removeDeletedForGood } from "./deleted-notebooks.ts";
import { prune } from "./prune.ts";

export interface Housekeeping {
  stop(): Promise<void>;
}

const EVERY_MS = 6 * 60 * 60_000;
/** A server that has just started has people waiting for it. */
const FIRST_MS = 60_000;

export function startHousekeeping({ database, log }: Pick<Services, "database" | "log">): Housekeeping {
  let running: Promise<void> = Promise.resolve();
  const tidy = async () => {
    try {
      const count = await removeDeletedForGood(database);
      if (count > 0) log.info({ count }, "deleted notebooks have gone for good");
      const pruned = await prune(database);
      if (Object.values(pruned).some((count) => count > 0))
        log.info(pruned, "what nobody needs any more has gone");
    } catch (error) {
      log.error({ err: error }, "what has gone by time could not be removed; it is tried again later");
    }
  };
  const begin = () => {
    running = tidy();
  };
  const first = setTimeout(begin, FIRST_MS);
  const later = setInterval(begin, EVERY_MS);
  return {
    async stop() {
      clearTimeout(first);
      clearInterval(later);
      await running;
    },
  };
}
