/** Keeps what open sockets may do in step with what people may do: announced changes, ends of sessions and links. */
import { IncomingMessage } from "node:http";
import { Socket } from "node:net";
import { setTimeout as sleep } from "node:timers/promises";
import type { Logger } from "pino";
import { closeCode } from "#contract/collab.ts";
import { firstRow, type Database } from "../data/database.ts";
import type { Sessions } from "../http/sessions.ts";
import { accessTo } from "../policies/access.ts";
import type { AccessChange } from "../policies/access-changes.ts";
import { sessionEnd } from "./admission.ts";
import type { Connection } from "./connection.ts";
import type { Room } from "./room.ts";
import { rightsOfMember, type Member, type Referee } from "./visitor.ts";

/** One open socket, with what is needed to ask again whether it may be open. */
export interface Watched {
  readonly connection: Connection;
  readonly room: Room;
  /** Of the upgrade request: names the session, and is kept in memory only. */
  readonly cookie: string | undefined;
  readonly endsAt: Date | null;
}
export interface AccessWatchOptions {
  readonly database: Database;
  readonly sessions: Pick<Sessions, "identify">;
  readonly log: Logger;
}

const LONGEST_TIMER_MS = 2 ** 31 - 1;
const RETRY_MS = 500;

export class AccessWatch {
  readonly #watched = new Map<Watched, NodeJS.Timeout | null>();
  readonly #stop = new AbortController();

  constructor(private readonly options: AccessWatchOptions) {}

  add(watched: Watched): void {
    this.#watched.set(watched, null);
    this.#setTimer(watched, watched.endsAt);
  }

  remove(watched: Watched): void {
    const timer = this.#watched.get(watched);
    if (timer) clearTimeout(timer);
    this.#watched.delete(watched);
  }

  heed(change: AccessChange): void {
    const notebookOf = change.about === "notebook" ? change.notebookId : null;
    for (const watched of this.#watched.keys()) {
      const { connection } = watched;
      const { visitor } = connection;
      const concerned =
        change.about === "everything" ||
        (change.about === "session" && visitor.as === "member" && visitor.sessionId === change.sessionId) ||
        (change.about === "referee-link" &&
          visitor.as === "referee" &&
          visitor.refereeLinkId === change.refereeLinkId) ||
        (change.about === "person" &&
          connection.notebookId === change.notebookId &&
          visitor.as === "member" &&
          visitor.personId === change.personId) ||
        connection.notebookId === notebookOf;
      if (!concerned) continue;
      void this.#recheck(watched);
      if (notebookOf !== null || change.about === "everything") connection.notify({ about: "notebook" });
    }
  }

  /** Once in a while, in case an announcement was missed. */
  recheckAll(): void {
    for (const watched of this.#watched.keys()) void this.#recheck(watched);
  }

  stop(): void {
    this.#stop.abort();
    for (const watched of this.#watched.keys()) this.remove(watched);
  }

  #setTimer(watched: Watched, endsAt: Date | null): void {
    const before = this.#watched.get(watched);
    if (before === undefined) return;
    if (before !== null) clearTimeout(before);
    if (endsAt === null) return;
    const wait = Math.min(Math.max(endsAt.getTime() - Date.now(), 0), LONGEST_TIMER_MS);
    this.#watched.set(
      watched,
      setTimeout(() => void this.#recheck(watched), wait),
    );
  }

  /** Asks until there is an answer: a store that is away neither grants nor takes anything. */
  async #recheck(watched: Watched): Promise<void> {
    while (this.#watched.has(watched) && watched.connection.isOpen) {
      const { visitor } = watched.connection;
      try {
        return await (visitor.as === "member"
          ? this.#recheckMember(watched, visitor)
          : this.#recheckReferee(watched, visitor));
      } catch (error) {
        this.options.log.warn({ err: error }, "access could not be checked; trying again");
      }
      await sleep(RETRY_MS, undefined, { signal: this.#stop.signal }).catch(() => undefined); // stopped: nothing is watched then
    }
  }

  async #recheckMember(watched: Watched, member: Member): Promise<void> {
    const { connection, room, cookie } = watched;
    const { database, sessions } = this.options;
    const request = requestWith(cookie);
    const identity = await sessions.identify(request);
    if (identity?.personId !== member.personId) return connection.close(closeCode.signedOut, "signed out");
    this.#setTimer(watched, laterThanNow(sessionEnd(request)));
    const access = await accessTo(database, member.personId, connection.notebookId);
    if (access === null) return this.#closeAbsent(connection);
    const before = connection.rights;
    connection.rights = rightsOfMember(access.role, access.archived);
    room.rightsChanged(connection, before);
  }

  async #recheckReferee(watched: Watched, referee: Referee): Promise<void> {
    const { connection } = watched;
    const link = await firstRow<{
      revoked: boolean;
      expires_at: Date | null;
      expired: boolean;
      deleted: boolean;
    }>(
      this.options.database,
      `select l.revoked_at is not null as revoked, l.expires_at, n.deleted_at is not null as deleted,
              coalesce(l.expires_at <= now(), false) as expired
         from referee_links l join notebooks n on n.id = l.notebook_id where l.id = ?`,
      [referee.refereeLinkId],
    );
    if (link === undefined || link.deleted) return connection.close(closeCode.notFound, "no longer there");
    if (link.revoked) return connection.close(closeCode.forbidden, "this link was revoked");
    if (link.expired) return connection.close(closeCode.forbidden, "this link has expired");
    this.#setTimer(watched, laterThanNow(link.expires_at));
  }

  async #closeAbsent(connection: Connection): Promise<void> {
    const notebook = await firstRow<{ deleted: boolean }>(
      this.options.database,
      "select deleted_at is not null as deleted from notebooks where id = ?",
      [connection.notebookId],
    );
    if (notebook === undefined || notebook.deleted)
      return connection.close(closeCode.notFound, "the notebook was deleted");
    connection.close(closeCode.forbidden, "you no longer take part in this notebook");
  }
}

/** The clocks of the database and of this process differ a little; asking again at once would only spin. */
function laterThanNow(end: Date | null): Date | null {
  return end === null ? null : new Date(Math.max(end.getTime(), Date.now() + 250));
}

/** A bare request that carries the cookie: the session is looked up afresh, as for a new request. */
function requestWith(cookie: string | undefined): IncomingMessage {
  const request = new IncomingMessage(new Socket());
  request.url = "/";
  request.method = "GET";
  if (cookie !== undefined) request.headers.cookie = cookie;
  return request;
}
