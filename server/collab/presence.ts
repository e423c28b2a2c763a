/**
 * Who is in a notebook and where. Presence states are data from strangers: a connection has one state, under one
 * client id, and the server writes into it who the person is, so nobody can appear as someone else. The clocks that
 * clients see are the server's (milliseconds), so a state after a reconnect or a restart is never taken for an old one.
 */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import type { Connection } from "./connection.ts";
import { writePresence } from "./frames.ts";
import { PRESENCE, PRESENCE_BACKLOG_BYTES } from "./limits.ts";
import type { NeighbourState } from "./neighbour-messages.ts";

interface State {
  readonly client: number;
  clock: number;
  /** JSON; null once the person has left. */
  json: string | null;
  owner: Connection | null;
  /** The other process that it comes from; null when it is from here. */
  process: string | null;
  personId: string;
  renewedAt: number;
}

export interface PresenceOptions {
  /** Who is to be told of changes. */
  readonly audience: () => Iterable<Connection>;
  /** Hears of those that are from here, for other processes. */
  readonly onChange?: (state: NeighbourState) => void;
  readonly now?: () => number;
}

export class Presence {
  readonly #states = new Map<number, State>();
  readonly #changed = new Set<number>();
  readonly #now: () => number;
  #timer: NodeJS.Timeout | null = null;

  constructor(private readonly options: PresenceOptions) {
    this.#now = options.now ?? Date.now;
  }

  /** False when the bytes are no presence message. States of others, which y-websocket echoes, are passed over. */
  receive(connection: Connection, bytes: Uint8Array): boolean {
    const entries = readEntries(bytes);
    if (entries === null) return false;
    if (!connection.rights.maySendPresence || connection.visitor.as !== "member") return true;
    for (const { client, json } of entries) {
      if (!this.#mayClaim(connection, client, connection.visitor.personId)) continue;
      const stamped = stamp(json, connection.visitor);
      if (stamped === undefined) continue;
      if (stamped === null) this.#remove(client);
      else this.#put(client, connection.visitor.personId, stamped, { owner: connection, process: null });
    }
    return true;
  }

  /** A state that another process shows; it has checked and stamped it. */
  receiveFrom(process: string, { client, personId, json }: NeighbourState): void {
    const state = this.#states.get(client);
    const isHere = state !== undefined && state.process === null && state.owner?.isOpen === true;
    if (isHere || (json !== null && json.length > PRESENCE.stateCharacters * 2)) return;
    if (json === null) {
      if (state?.process === process) this.#remove(client);
      return;
    }
    if (state === undefined ? this.#states.size >= PRESENCE.statesPerRoom : state.personId !== personId)
      return;
    this.#put(client, personId, json, { owner: null, process });
  }

  /** The other process has closed the notebook. */
  leaveAllOf(process: string): void {
    for (const state of this.#states.values()) if (state.process === process) this.#remove(state.client);
  }

  /** For a process that has just opened the notebook. */
  statesFromHere(): readonly NeighbourState[] {
    return [...this.#states.values()]
      .filter(({ process, json }) => process === null && json !== null)
      .map(({ client, personId, json }) => ({ client, personId, json }));
  }

  /** Ends what this connection showed; also when it may no longer send presence. */
  leave(connection: Connection): void {
    for (const state of this.#states.values()) if (state.owner === connection) this.#remove(state.client);
  }

  expire(): void {
    const oldest = this.#now() - PRESENCE.expiresAfterMs;
    for (const state of this.#states.values()) {
      if (state.renewedAt >= oldest) continue;
      if (state.json === null) this.#states.delete(state.client);
      else this.#remove(state.client);
    }
  }

  /** All present states, for someone who joins; null when nobody is there. */
  snapshotFor(connection: Connection): Uint8Array | null {
    if (!connection.rights.maySeePresence) return null;
    const present = [...this.#states.values()].filter(
      (state) => state.json !== null && state.owner !== connection,
    );
    return present.length === 0 ? null : writeStates(present);
  }

  stop(): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
  }

  /** A client id belongs to whom it came from first; only the same person may go on with it over a new socket. */
  #mayClaim(connection: Connection, client: number, personId: string): boolean {
    const state = this.#states.get(client);
    if (state?.owner === connection) return true;
    for (const other of this.#states.values()) if (other.owner === connection) return false;
    if (state === undefined) return this.#states.size < PRESENCE.statesPerRoom;
    if (state.personId !== personId) return false;
    // Another tab of this person may merely be echoing: it may take over only what a dead socket left behind.
    return state.owner === null || !state.owner.isOpen;
  }

  #put(client: number, personId: string, json: string, from: Pick<State, "owner" | "process">): void {
    const now = this.#now();
    const clock = Math.max((this.#states.get(client)?.clock ?? 0) + 1, now);
    this.#states.set(client, { client, clock, json, ...from, personId, renewedAt: now });
    this.#change(client);
  }

  /** Kept for a while without content, so that a late echo of it is recognised. */
  #remove(client: number): void {
    const state = this.#states.get(client);
    if (state === undefined || state.json === null) return;
    const now = this.#now();
    Object.assign(state, { json: null, owner: null, clock: Math.max(state.clock + 1, now), renewedAt: now });
    this.#change(client);
  }

  #change(client: number): void {
    this.#changed.add(client);
    this.#timer ??= setTimeout(() => this.#tell(), PRESENCE.gatherMs);
  }

  #tell(): void {
    this.#timer = null;
    const changed = [...this.#changed].flatMap((client) => this.#states.get(client) ?? []);
    this.#changed.clear();
    if (changed.length === 0) return;
    for (const { client, personId, json, process } of changed)
      if (process === null) this.options.onChange?.({ client, personId, json });
    const forMost = writeStates(changed);
    for (const connection of this.options.audience()) {
      if (!connection.rights.maySeePresence || connection.backlogBytes > PRESENCE_BACKLOG_BYTES) continue;
      // One's own state must not come back: its clock is the server's and would outrun the client's.
      const others = changed.filter(({ owner }) => owner !== connection);
      if (others.length === changed.length) connection.send(forMost);
      else if (others.length > 0) connection.send(writeStates(others));
    }
  }
}

/** Undefined: not acceptable. Null: the person leaves. */
function stamp(
  json: string,
  person: { readonly personId: string; readonly name: string },
): string | null | undefined {
  if (json.length > PRESENCE.stateCharacters) return undefined;
  let state: unknown;
  try {
    state = JSON.parse(json);
  } catch (error) {
    if (error instanceof SyntaxError) return undefined;
    throw error;
  }
  if (state === null) return null;
  if (typeof state !== "object" || Array.isArray(state)) return undefined;
  return JSON.stringify({ ...state, user: { id: person.personId, name: person.name } });
}

interface Entry {
  readonly client: number;
  readonly json: string;
}

function readEntries(bytes: Uint8Array): readonly Entry[] | null {
  try {
    const decoder = decoding.createDecoder(bytes);
    const count = decoding.readVarUint(decoder);
    if (count > PRESENCE.statesPerMessage) return null;
    const entries: Entry[] = [];
    for (let index = 0; index < count; index += 1) {
      const client = decoding.readVarUint(decoder);
      decoding.readVarUint(decoder); // the client's own clock: frames of a connection arrive in order
      entries.push({ client, json: decoding.readVarString(decoder) });
    }
    return entries;
  } catch (error) {
    // lib0's errors for broken encodings have no type of their own.
    if (error instanceof Error) return null;
    throw error;
  }
}

function writeStates(states: readonly State[]): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, states.length);
  for (const { client, clock, json } of states) {
    encoding.writeVarUint(encoder, client);
    encoding.writeVarUint(encoder, clock);
    encoding.writeVarString(encoder, json ?? "null");
  }
  return writePresence(encoding.toUint8Array(encoder));
}
