/**
 * The copy of a notebook on this device (IndexedDB), one per person and notebook, for members only. It is dropped at
 * sign-out and when access ends; an expired session keeps it as long as it holds typing that was not sent.
 */
import { clearDocument, IndexeddbPersistence } from "y-indexeddb";
import type * as Y from "yjs";

const prefix = "subleading.copy.";
const unsavedPrefix = "subleading.unsaved.";

export interface LocalCopy {
  /** Resolves when the copy has been read into the document; also when this device keeps none. */
  readonly ready: Promise<void>;
  /** Whether an earlier page left typing here that was not known to be committed. */
  readonly unsavedBefore: boolean;
  isOrigin(origin: unknown): boolean;
  markUnsaved(): void;
  markSaved(): void;
  close(): Promise<void>;
  drop(): Promise<void>;
}

export function openLocalCopy(personId: string, notebookId: string, doc: Y.Doc): LocalCopy {
  const name = `${prefix}${personId}.${notebookId}`;
  const flag = `${unsavedPrefix}${personId}.${notebookId}.`;
  const flagsBefore = storedKeys().filter((key) => key.startsWith(flag));
  const ownFlag = flag + String(doc.clientID);
  const persistence = hasIndexedDb() ? new IndexeddbPersistence(name, doc) : null;
  rememberName(name);

  const forgetFlags = () => {
    for (const key of [...flagsBefore, ownFlag]) storage()?.removeItem(key);
  };
  return {
    ready: persistence ? readyOrGivenUp(persistence) : Promise.resolve(),
    unsavedBefore: flagsBefore.length > 0,
    isOrigin: (origin) => persistence !== null && origin === persistence,
    markUnsaved: () => storage()?.setItem(ownFlag, "1"),
    markSaved: forgetFlags,
    async close() {
      await persistence?.destroy();
    },
    async drop() {
      forgetFlags();
      await persistence?.destroy();
      if (persistence) await clearDocument(name);
      forgetName(name);
    },
  };
}

/** Drops every copy on this device; called at sign-out. */
export async function dropLocalCopies(): Promise<void> {
  for (const key of storedKeys()) if (key.startsWith(unsavedPrefix)) storage()?.removeItem(key);
  for (const name of rememberedNames()) {
    if (hasIndexedDb()) await clearDocument(name);
    forgetName(name);
  }
}

/** Whether any notebook on this device holds typing that was not sent; to be asked before signing out. */
export function holdsUnsavedTyping(): boolean {
  return storedKeys().some((key) => key.startsWith(unsavedPrefix));
}

/** A browser that refuses IndexedDB (a private window, a full disk) still edits, only without a copy. */
async function readyOrGivenUp(persistence: IndexeddbPersistence): Promise<void> {
  const patienceMilliseconds = 3000;
  let timer: ReturnType<typeof setTimeout> | undefined;
  const givenUp = new Promise<void>((resolve) => {
    timer = setTimeout(resolve, patienceMilliseconds);
  });
  await Promise.race([persistence.whenSynced, givenUp]);
  clearTimeout(timer);
}

function hasIndexedDb(): boolean {
  return typeof indexedDB !== "undefined";
}

/** Null where the reader's privacy settings block storage. */
function storage(): Storage | null {
  try {
    return window.localStorage;
  } catch {
    return null;
  }
}

function storedKeys(): string[] {
  const store = storage();
  return store ? Array.from({ length: store.length }, (_, index) => store.key(index) ?? "") : [];
}

// Not every browser lists its databases, so their names are written down.
function rememberName(name: string): void {
  storage()?.setItem(name, "1");
}
function forgetName(name: string): void {
  storage()?.removeItem(name);
}
function rememberedNames(): string[] {
  return storedKeys().filter((key) => key.startsWith(prefix));
}
