/** How much of a queue one insert takes. */
import { BATCH } from "./limits.ts";
import type { QueuedUpdate } from "./writer-reports.ts";

/** From the first on; one at least, however large it is. */
export function nextBatch(queue: readonly QueuedUpdate[]): readonly QueuedUpdate[] {
  let bytes = 0;
  let count = 0;
  for (const { update } of queue) {
    if (count > 0 && (count >= BATCH.frames || bytes + update.length > BATCH.bytes)) break;
    bytes += update.length;
    count += 1;
  }
  return queue.slice(0, count);
}
