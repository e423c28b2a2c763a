/** Frames that build on something not seen yet: kept back, in order and bounded, never stored. */
import type { Connection } from "./connection.ts";
import { HELD_PER_CONNECTION } from "./limits.ts";
import type { QueuedUpdate } from "./writer-reports.ts";

interface Held {
  readonly entry: QueuedUpdate;
  readonly since: number;
}

export class HeldFrames {
  readonly #held = new Map<Connection, Held[]>();

  /** False when the connection has too many already. */
  add(entry: QueuedUpdate, now: number): boolean {
    const list = this.#held.get(entry.connection) ?? [];
    const bytes = list.reduce((sum, held) => sum + held.entry.update.length, entry.update.length);
    if (list.length >= HELD_PER_CONNECTION.frames || bytes > HELD_PER_CONNECTION.bytes) return false;
    list.push({ entry, since: now });
    this.#held.set(entry.connection, list);
    return true;
  }

  connections(): readonly Connection[] {
    return [...this.#held.keys()];
  }

  first(connection: Connection): QueuedUpdate | null {
    return this.#held.get(connection)?.[0]?.entry ?? null;
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
