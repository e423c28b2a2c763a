/**
 * Looks at an update before it is stored. A room stores only what is whole: every struct it holds can be integrated
 * into what is stored or queued before it. So the stored document never has pending structs, which Yjs would merge
 * anew with every later update, and a restart never finds a hole.
 */
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { decodeBounded } from "./decode-bounded.ts";

export type Assessment =
  /** Whole and new; `reaches` are the clocks that it brings each of its clients to. */
  | { readonly verdict: "new"; readonly reaches: ReadonlyMap<number, number> }
  /** Holds nothing that is not known already. */
  | { readonly verdict: "known" }
  /** Builds on something not seen yet. Typing before the answer to our step 1 does that, for a moment. */
  | { readonly verdict: "waiting"; readonly missing: readonly Missing[] }
  | { readonly verdict: "malformed"; readonly reason: string };

/** Looking at the update again is of no use before one of these is there. */
export interface Missing {
  readonly client: number;
  readonly clock: number;
}
/** Honest updates miss one thing or two. */
const MOST_MISSING = 64;

export interface KnownContent {
  /** The clock up to which everything of this client is known (stored or queued). */
  clockOf(client: number): number;
  isDeleted(client: number, clock: number, length: number): boolean;
}

type Struct = ReturnType<typeof Y.decodeUpdate>["structs"][number];

/** Far above what typing can reach, far below where clocks lose exactness. */
const HIGHEST_CLOCK = 2 ** 40;

class Malformed extends Error {}

/** Cost: linear in the update. Never throws on hostile bytes. */
export function assessUpdate(update: Uint8Array, known: KnownContent): Assessment {
  let decoded: ReturnType<typeof Y.decodeUpdate>;
  try {
    decoded = decodeBounded(update);
  } catch (error) {
    // Yjs throws plain errors of many kinds on bytes that are no update.
    return { verdict: "malformed", reason: error instanceof Error ? error.message : "not an update" };
  }
  try {
    const integration = new Integration(structsByClient(decoded.structs), known);
    const missing = integration.missing();
    if (missing.length > 0) return { verdict: "waiting", missing };
    let deletesSomething = false;
    for (const [client, ranges] of decoded.ds.clients) {
      for (const { clock, len } of ranges) {
        if (len <= 0 || clock + len > HIGHEST_CLOCK) throw new Malformed("a deletion of nothing");
        if (clock + len > integration.clockOf(client))
          return { verdict: "waiting", missing: [{ client, clock: clock + len - 1 }] };
        deletesSomething ||= !known.isDeleted(client, clock, len);
      }
    }
    if (!deletesSomething && integration.reaches.size === 0) return { verdict: "known" };
    return { verdict: "new", reaches: integration.reaches };
  } catch (error) {
    if (error instanceof Malformed) return { verdict: "malformed", reason: error.message };
    throw error;
  }
}

/** Per client in order of clock, gaps (Skip) left out. */
function structsByClient(structs: readonly Struct[]): ReadonlyMap<number, readonly Struct[]> {
  const byClient = new Map<number, Struct[]>();
  let client = -1;
  let list: Struct[] = [];
  let clock = 0;
  for (const struct of structs) {
    if (struct.id.client !== client) {
      client = struct.id.client;
      if (byClient.has(client)) throw new Malformed("one client in two places");
      list = [];
      byClient.set(client, list);
      clock = struct.id.clock;
    }
    if (struct.length <= 0) throw new Malformed("a struct without length");
    if (struct.id.clock !== clock) throw new Malformed("structs out of order");
    clock += struct.length;
    if (clock > HIGHEST_CLOCK) throw new Malformed("a clock beyond all typing");
    if (struct instanceof Y.Skip) continue;
    if (struct instanceof Y.Item) checkItem(struct);
    list.push(struct);
  }
  return byClient;
}

function checkItem(item: Y.Item): void {
  if (item.content instanceof Y.ContentDoc) throw new Malformed("a document inside the document");
  // While an update is only decoded, the parent of an item at the root is the root's name.
  const parent: unknown = item.parent;
  if (typeof parent === "string" && parent !== FRAGMENT)
    throw new Malformed("a root that is not the document's");
  for (const { client, clock } of dependenciesOf(item))
    if (client === item.id.client && clock >= item.id.clock)
      throw new Malformed("a struct that follows itself");
}

function dependenciesOf(struct: Struct): readonly Y.ID[] {
  if (!(struct instanceof Y.Item)) return [];
  const parent: unknown = struct.parent;
  return [struct.origin, struct.rightOrigin, parent].filter((id) => id instanceof Y.ID);
}

/** Goes through the motions of integrating, with clocks in place of content. */
class Integration {
  /** Clocks reached by clients that gained something. */
  readonly reaches = new Map<number, number>();
  readonly #next = new Map<number, number>();
  readonly #waiting = new Map<number, Set<number>>();

  constructor(
    private readonly lists: ReadonlyMap<number, readonly Struct[]>,
    private readonly known: KnownContent,
  ) {}

  clockOf(client: number): number {
    return this.reaches.get(client) ?? this.known.clockOf(client);
  }

  /** What keeps the integration from completing; of structs that wait for each other in a circle, each other. */
  missing(): readonly Missing[] {
    const ready = [...this.lists.keys()];
    for (let client = ready.pop(); client !== undefined; client = ready.pop()) {
      if (!this.#advance(client)) continue;
      const waiting = this.#waiting.get(client);
      this.#waiting.delete(client);
      if (waiting !== undefined) ready.push(...waiting);
    }
    const missing: Missing[] = [];
    for (const [client, list] of this.lists) {
      const struct = list[this.#next.get(client) ?? 0];
      if (struct === undefined) continue;
      const before = { client, clock: struct.id.clock - 1 };
      missing.push(struct.id.clock > this.clockOf(client) ? before : (this.#missingFor(struct) ?? before));
      if (missing.length >= MOST_MISSING) break;
    }
    return missing;
  }

  #missingFor(struct: Struct): Missing | undefined {
    return dependenciesOf(struct).find(
      (id) => id.client !== struct.id.client && id.clock >= this.clockOf(id.client),
    );
  }

  /** Integrates as many structs of this client as can be; true when there was one at least. */
  #advance(client: number): boolean {
    const list = this.lists.get(client) ?? [];
    const start = this.#next.get(client) ?? 0;
    let next = start;
    for (let struct = list[next]; struct !== undefined; struct = list[next]) {
      const clock = this.clockOf(client);
      if (struct.id.clock > clock) break;
      const missing = this.#missingFor(struct);
      if (missing !== undefined) {
        if (this.lists.has(missing.client)) this.#waitFor(missing.client, client);
        break;
      }
      const end = struct.id.clock + struct.length;
      if (end > clock) this.reaches.set(client, end);
      next += 1;
    }
    this.#next.set(client, next);
    return next > start;
  }

  #waitFor(other: number, client: number): void {
    const waiting = this.#waiting.get(other) ?? new Set();
    this.#waiting.set(other, waiting.add(client));
  }
}

/** Whether every struct in the range is deleted in the document. The range must be known to it. */
export function isDeletedIn(document: Y.Doc, client: number, clock: number, length: number): boolean {
  const structs = document.store.clients.get(client);
  if (structs === undefined || clock + length > Y.getState(document.store, client)) return false;
  for (let index = Y.findIndexSS(structs, clock); index < structs.length; index += 1) {
    const struct = structs[index];
    if (struct === undefined || struct.id.clock >= clock + length) return true;
    if (!struct.deleted) return false;
  }
  return true;
}
