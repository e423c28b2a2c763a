/**
 * Tells every server process that someone's access changed, so that live sockets are cut or demoted at once.
 * The announcement is part of the transaction that makes the change: PostgreSQL delivers it after the commit
 * and drops it with a rollback.
 */
import * as z from "zod";
import type { Logger } from "pino";
import type { Queryable } from "../data/database.ts";
import { listenForNotifications } from "../data/notifications.ts";

const uuid = z.uuid();
const accessChangeSchema = z.discriminatedUnion("about", [
  /** A role was given, changed or taken: ask `accessTo` again for this person. */
  z.strictObject({ about: z.literal("person"), notebookId: uuid, personId: uuid }),
  /** A referee link was revoked. (Expiry needs no word: it is known when the link is opened.) */
  z.strictObject({ about: z.literal("referee-link"), notebookId: uuid, refereeLinkId: uuid }),
  /** Signed out. `sessionId` is the digest that `identify` gives, never the cookie's secret. */
  z.strictObject({ about: z.literal("session"), sessionId: z.string().min(1) }),
  /** Renamed, archived, restored, deleted, or its list of people changed: check everyone in it. */
  z.strictObject({ about: z.literal("notebook"), notebookId: uuid }),
]);
export type AnnouncedChange = z.infer<typeof accessChangeSchema>;
/** "everything": announcements may have been missed while the listener was away; check every socket. */
export type AccessChange = AnnouncedChange | { readonly about: "everything" };
export type AccessListener = (change: AccessChange) => void;

const CHANNEL = "access";

/** Call inside the transaction that changes the access. */
export async function announceAccessChange(transaction: Queryable, change: AnnouncedChange): Promise<void> {
  await transaction.raw("select pg_notify(?, ?)", [CHANNEL, JSON.stringify(change)]);
}

export interface AccessChanges {
  /** Returns a function that ends the subscription. */
  onAccessChange(listener: AccessListener): () => void;
  stop(): Promise<void>;
}

export async function listenForAccessChanges(databaseUrl: string, log: Logger): Promise<AccessChanges> {
  const listeners = new Set<AccessListener>();
  const tell = (change: AccessChange) => {
    for (const listener of listeners) {
      try {
        listener(change);
      } catch (error) {
        // One listener's mistake must not keep the others from cutting their sockets.
        log.error({ err: error, change }, "a listener of access changes failed");
      }
    }
  };
  const notifications = await listenForNotifications({
    databaseUrl,
    channels: [CHANNEL],
    log,
    onNotification: (_channel, payload) => {
      const parsed = accessChangeSchema.safeParse(readJson(payload));
      if (parsed.success) return tell(parsed.data);
      // Not to be understood, perhaps from a newer server: the safe reading is that anything may have changed.
      log.warn("an access change could not be read");
      tell({ about: "everything" });
    },
    onGap: () => tell({ about: "everything" }),
  });
  return {
    onAccessChange: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    stop: () => notifications.stop(),
  };
}

/** Undefined when the text is not JSON; the schema then refuses it. */
function readJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
