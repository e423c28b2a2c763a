/** Who is in which field of which block, and which name belongs to which writer of the shared document. */
import type { Awareness } from "y-protocols/awareness";
import type { Colleague } from "../../blocks/block-handle.ts";
import { personColor } from "../person-color.ts";
import { userOf } from "../presence.ts";

/** The member of a presence state that says where its person is; null outside fields. */
const member = "field";
const LONGEST_KEY = 300;

export interface FieldPresence {
  enter(blockId: string, key: string): void;
  leave(blockId: string): void;
  /** Colleagues in one field; the same array until it changes. */
  inField(blockId: string, key: string): readonly Colleague[];
  /** Colleagues anywhere in a block. */
  inBlock(blockId: string): readonly Colleague[];
  /** The name behind a client of the shared document: null for oneself, "someone" when it has never been seen. */
  nameOf(clientId: number): string | null;
  subscribe(listener: () => void): () => void;
  destroy(): void;
}

const nobody: readonly Colleague[] = [];

export function createFieldPresence(awareness: Awareness): FieldPresence {
  const listeners = new Set<() => void>();
  const names = new Map<number, string>();
  let fields = new Map<string, readonly Colleague[]>();
  let blocks = new Map<string, readonly Colleague[]>();

  function read() {
    const nextFields = new Map<string, Colleague[]>();
    const nextBlocks = new Map<string, Colleague[]>();
    const self = userOf(awareness.getLocalState())?.id;
    for (const [clientId, state] of awareness.getStates()) {
      const user = userOf(state);
      if (!user) continue;
      names.set(clientId, user.name);
      const place = clientId === awareness.clientID ? null : placeOf(state);
      // One's own second tab is no colleague.
      if (!place || user.id === self) continue;
      const colleague = { name: user.name, color: personColor(user.id) };
      add(nextFields, `${place.blockId}/${place.key}`, colleague);
      add(nextBlocks, place.blockId, colleague);
    }
    const before = [fields, blocks] as const;
    fields = keepEqual(fields, nextFields);
    blocks = keepEqual(blocks, nextBlocks);
    // Carets move with every letter, and a long notebook has a thousand fields that would look each time.
    if (isSame(before[0], fields) && isSame(before[1], blocks)) return;
    for (const listener of listeners) listener();
  }

  read();
  awareness.on("change", read);
  let own: string | null = null;
  return {
    enter(blockId, key) {
      own = blockId;
      // Without a state of one's own, as for readers and referees, nothing is told.
      awareness.setLocalStateField(member, { blockId, key });
    },
    leave(blockId) {
      if (own !== blockId) return;
      own = null;
      awareness.setLocalStateField(member, null);
    },
    inField: (blockId, key) => fields.get(`${blockId}/${key}`) ?? nobody,
    inBlock: (blockId) => blocks.get(blockId) ?? nobody,
    nameOf: (clientId) => (clientId === awareness.clientID ? null : (names.get(clientId) ?? "someone")),
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    destroy() {
      awareness.off("change", read);
      listeners.clear();
    },
  };
}

/** Presence is data from strangers: anything but two short texts is no place. */
export function placeOf(state: unknown): { blockId: string; key: string } | null {
  if (typeof state !== "object" || state === null || !(member in state)) return null;
  const place = state[member];
  if (typeof place !== "object" || place === null || !("blockId" in place) || !("key" in place)) return null;
  const { blockId, key } = place;
  if (typeof blockId !== "string" || typeof key !== "string") return null;
  return blockId.length > LONGEST_KEY || key.length > LONGEST_KEY ? null : { blockId, key };
}

function add(map: Map<string, Colleague[]>, key: string, colleague: Colleague): void {
  const present = map.get(key) ?? [];
  if (!present.some(({ name }) => name === colleague.name)) map.set(key, [...present, colleague]);
}

function keepEqual(
  before: Map<string, readonly Colleague[]>,
  next: Map<string, Colleague[]>,
): Map<string, readonly Colleague[]> {
  const merged = new Map<string, readonly Colleague[]>(next);
  for (const [key, people] of next) {
    const old = before.get(key);
    const same =
      old?.length === people.length && people.every((person, index) => person.name === old[index]?.name);
    if (old && same) merged.set(key, old);
  }
  return merged;
}

function isSame(a: ReadonlyMap<string, unknown>, b: ReadonlyMap<string, unknown>): boolean {
  return a.size === b.size && [...a].every(([key, value]) => b.get(key) === value);
}
