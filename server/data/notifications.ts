/** One connection that listens to PostgreSQL channels and comes back by itself when it is lost. */
import pg from "pg";
import type { Logger } from "pino";

export interface NotificationOptions {
  readonly databaseUrl: string;
  readonly channels: readonly string[];
  readonly log: Logger;
  readonly onNotification: (channel: string, payload: string) => void;
  /** Called after the connection was lost and is back: notifications in between are gone for ever. */
  readonly onGap: () => void;
}
export interface Notifications {
  stop(): Promise<void>;
}

const FIRST_RETRY_MS = 100;
const LONGEST_RETRY_MS = 5_000;
/** A dead network path shows itself only when something is sent. */
const PROBE_EVERY_MS = 30_000;

/** Resolves once the first connection listens, so nothing announced afterwards is missed. */
export async function listenForNotifications(options: NotificationOptions): Promise<Notifications> {
  let stopped = false;
  let client: pg.Client | null = null;
  let retry: NodeJS.Timeout | null = null;

  async function connect(): Promise<void> {
    const fresh = new pg.Client({
      connectionString: options.databaseUrl,
      application_name: `subleading listens to ${options.channels.join(", ")}`,
      connectionTimeoutMillis: 5_000,
      keepAlive: true,
    });
    let lost = false;
    const lose = (error?: Error) => {
      if (lost) return;
      lost = true;
      clearInterval(probe);
      if (client === fresh) client = null;
      fresh
        .end()
        .catch((reason: unknown) =>
          options.log.debug({ err: reason }, "a lost listener did not close cleanly"),
        );
      if (!stopped && error !== undefined)
        options.log.warn({ err: error }, "the notification listener was lost");
    };
    const probe = setInterval(() => {
      fresh.query("select 1").catch((error: unknown) => loseAndReconnect(error as Error)); // pg rejects with Error
    }, PROBE_EVERY_MS);
    probe.unref();
    const loseAndReconnect = (error: Error) => {
      const first = !lost;
      lose(error);
      if (first) reconnectAfter(FIRST_RETRY_MS);
    };
    fresh.on("error", (error) => (client === fresh ? loseAndReconnect(error) : lose(error)));
    fresh.on("end", () => {
      if (client === fresh) loseAndReconnect(new Error("PostgreSQL ended the connection."));
    });
    fresh.on("notification", ({ channel, payload }) => options.onNotification(channel, payload ?? ""));
    try {
      await fresh.connect();
      for (const channel of options.channels) await fresh.query(`listen ${pg.escapeIdentifier(channel)}`);
    } catch (error) {
      lose();
      throw error;
    }
    client = fresh;
    if (stopped) lose();
  }

  function reconnectAfter(delay: number): void {
    if (stopped) return;
    retry = setTimeout(() => {
      connect().then(
        () => options.onGap(),
        (error: unknown) => {
          options.log.warn({ err: error }, "the notification listener cannot connect yet");
          reconnectAfter(Math.min(delay * 2, LONGEST_RETRY_MS));
        },
      );
    }, delay);
  }

  await connect();
  return {
    stop: async () => {
      stopped = true;
      if (retry !== null) clearTimeout(retry);
      const open = client;
      client = null;
      await open?.end();
    },
  };
}
