/** What the parts of one running server share. Built once, in create-server.ts, and handed down. */
import type { Logger } from "pino";
import type { Configuration } from "./configuration.ts";
import type { Database } from "./data/database.ts";
import type { Sessions } from "./http/sessions.ts";
import type { Metrics } from "./metrics/metrics.ts";
import type { AccessChanges } from "./policies/access-changes.ts";

export interface Services {
  readonly configuration: Configuration;
  /** Where people reach the server, without a closing slash. Its origin is the only one let in. */
  readonly publicUrl: string;
  readonly database: Database;
  readonly log: Logger;
  readonly metrics: Metrics;
  readonly sessions: Sessions;
  readonly accessChanges: AccessChanges;
  /** Aborted once the server is asked to stop. */
  readonly stopping: AbortSignal;
}
