/** What the process itself uses. */
import { monitorEventLoopDelay } from "node:perf_hooks";
import type { Database } from "../data/database.ts";
import type { Metrics } from "./metrics.ts";

/** What knex's pool says of itself; its types leave it out. */
interface Pool {
  numUsed(): number;
  numPendingAcquires(): number;
}

/** Returns what ends the measuring. */
export function measureProcess(metrics: Metrics, database: Database): () => void {
  const delay = monitorEventLoopDelay({ resolution: 10 });
  delay.enable();
  const pool = (database.client as { pool: Pool }).pool; // see above
  metrics.total("process_cpu_seconds_total", "Processor time, of all threads.", () => {
    const { user, system } = process.cpuUsage();
    return (user + system) / 1e6;
  });
  metrics.gauge("process_resident_memory_bytes", "Memory that is in use.", () => process.memoryUsage.rss());
  metrics.gauge(
    "subleading_heap_bytes",
    "Memory of objects in the main thread.",
    () => process.memoryUsage().heapUsed,
  );
  metrics.gauge(
    "subleading_event_loop_delay_seconds",
    "The longest wait of the main thread since the last look.",
    () => {
      const longest = delay.max / 1e9;
      delay.reset();
      return longest;
    },
  );
  metrics.gauge("subleading_database_connections", "Connections in use for pages.", () => pool.numUsed());
  metrics.gauge("subleading_database_waiting", "Requests that wait for a connection.", () =>
    pool.numPendingAcquires(),
  );
  return () => delay.disable();
}
