/**
 * What one person (or one referee's link) costs this process, over all notebooks and sockets together. Who works it hard
 * is slowed down, all sockets at once; who goes on sending what no honest page sends is kept out for a while.
 */
import type { Connection } from "./connection.ts";
import { CONNECTIONS_PER_GUEST, EFFORT, OFFENCES } from "./limits.ts";
import type { Visitor } from "./visitor.ts";

interface Guest {
  readonly connections: Set<Connection>;
  /** Milliseconds of work in hand; below zero it is owed. */
  credit: number;
  creditAt: number;
  /** When each was committed, oldest first. */
  offences: number[];
  wakeUp: NodeJS.Timeout | null;
}

export function guestKey(visitor: Visitor): string {
  return visitor.as === "member" ? `person ${visitor.personId}` : `link ${visitor.refereeLinkId}`;
}

export class Guests {
  readonly #guests = new Map<string, Guest>();

  constructor(private readonly now: () => number = Date.now) {}

  mayEnter(visitor: Visitor): boolean {
    const guest = this.#guests.get(guestKey(visitor));
    if (guest === undefined) return true;
    return guest.connections.size < CONNECTIONS_PER_GUEST && !this.#isKeptOut(guest);
  }

  enter(connection: Connection): void {
    this.#guestOf(connection).connections.add(connection);
  }

  leave(connection: Connection): void {
    this.#guestOf(connection).connections.delete(connection);
  }

  /** Work that was done for this connection. What is owed is waited for, by every socket of the guest. */
  spend(connection: Connection, milliseconds: number): void {
    const guest = this.#guestOf(connection);
    this.#refill(guest);
    guest.credit -= milliseconds;
    if (guest.credit >= 0 || guest.wakeUp !== null) return;
    for (const each of guest.connections) each.hold("effort");
    guest.wakeUp = setTimeout(() => {
      guest.wakeUp = null;
      for (const each of guest.connections) each.release("effort");
    }, -guest.credit / EFFORT.perMillisecond);
  }

  offend(connection: Connection): void {
    this.#guestOf(connection).offences.push(this.now());
  }

  /** Called every few seconds: forgets whom there is nothing to remember of. */
  tidy(): void {
    for (const [key, guest] of this.#guests) {
      this.#refill(guest);
      guest.offences = guest.offences.filter((at) => at > this.now() - OFFENCES.rememberedMs);
      if (guest.connections.size === 0 && guest.offences.length === 0 && guest.credit >= EFFORT.most)
        this.#guests.delete(key);
    }
  }

  stop(): void {
    for (const { wakeUp } of this.#guests.values()) if (wakeUp !== null) clearTimeout(wakeUp);
    this.#guests.clear();
  }

  #isKeptOut({ offences }: Guest): boolean {
    const recent = offences.filter((at) => at > this.now() - OFFENCES.rememberedMs);
    const last = recent.at(-1);
    return last !== undefined && recent.length >= OFFENCES.most && this.now() - last < OFFENCES.keptOutMs;
  }

  #refill(guest: Guest): void {
    const now = this.now();
    guest.credit = Math.min(EFFORT.most, guest.credit + (now - guest.creditAt) * EFFORT.perMillisecond);
    guest.creditAt = now;
  }

  #guestOf({ visitor }: Connection): Guest {
    const key = guestKey(visitor);
    const known = this.#guests.get(key);
    if (known !== undefined) return known;
    const guest: Guest = {
      connections: new Set(),
      credit: EFFORT.most,
      creditAt: this.now(),
      offences: [],
      wakeUp: null,
    };
    this.#guests.set(key, guest);
    return guest;
  }
}
