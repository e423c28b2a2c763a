/** Frames that build on something not seen yet: kept back, in order and bounded, never stored. */
import type { Connection } from "./connection.ts";
import { HELD_PER_CONNECTION } from "./limits.ts";
import type { KnownContent, Missing } from "./update-check.ts";
import type { QueuedUpdate } from "./writer-reports.ts";

interface Held {
  readonly entry: QueuedUpdate;
  readonly since: number;
  missing: readonly Missing[];
  looks: number;
}

export class HeldFrames {
  readonly #held = new Map<Connection, Held[]>();

  /** False when the connection has too many already. */
  add(entry: QueuedUpdate, missing: readonly Missing[], now: number): boolean {
    const list = this.#held.get(entry.connection) ?? [];
    const bytes = list.reduce((sum, held) => sum + held.entry.update.length, entry.update.length);
    if (list.length >= HELD_PER_CONNECTION.frames || bytes > HELD_PER_CONNECTION.bytes) return false;
    list.push({ entry, since: now, missing, looks: 0 });
    this.#held.set(entry.connection, list);
    return true;
  }

  connections(): readonly Connection[] {
    return [...this.#held.keys()];
  }

  /** The first of a connection, if something that it waited for is there. */
  first(connection: Connection, known: Pick<KnownContent, "clockOf">): QueuedUpdate | null {
    const held = this.#held.get(connection)?.[0];
    const isWorthALook = held?.missing.some(({ client, clock }) => known.clockOf(client) > clock) === true;
    return held !== undefined && isWorthALook ? held.entry : null;
  }

  /** The first still waits, for something else. False when it has been looked at too often for one honest update. */
  waitOn(connection: Connection, missing: readonly Missing[]): boolean {
    const held = this.#held.get(connection)?.[0];
    if (held === undefined) return true;
    held.missing = missing;
    held.looks += 1;
    return held.looks <= HELD_PER_CONNECTION.looks;
  }

  takeFirst(connection: Connection): void {
    const list = this.#held.get(connection);
    list?.shift();
    if (list?.length === 0) this.#held.delete(connection);
  }

  takeExpired(now: number): readonly QueuedUpdate[] {
    const expired: QueuedUpdate[] = [];
    for (const [connection, list] of this.#held) {
      if (now - (list[0]?.since ?? now) < HELD_PER_CONNECTION.milliseconds) continue;
      expired.push(...list.map(({ entry }) => entry));
      this.#held.delete(connection);
    }
    return expired;
  }

  drop(connection: Connection): void {
    this.#held.delete(connection);
  }
}
