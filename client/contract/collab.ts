/** Messages beside the y-websocket protocol on /collab/:notebookId, and the codes that close a socket. */

/** y-websocket uses 0 sync, 1 awareness, 2 auth, 3 query awareness. Ours follow, each: varUint type, then as said. */
export const messageType = {
  sync: 0,
  awareness: 1,
  queryAwareness: 3,
  /**
   * Server to client: varUint, how many sync frames with content (step 2 or update) of this connection are committed,
   * counted from the first without a gap. A frame that was rejected is never counted, nor is any after it.
   */
  saved: 100,
  /** Server to client: varString, JSON of a `ServerNotice`. */
  notice: 101,
} as const;

export type ServerNotice =
  /** Results were stored, or title, people or archive state changed: fetch again. */
  | { readonly about: "results" | "notebook" }
  /** The role of this connection is now read-only (demoted, or archived); updates are dropped. */
  | { readonly about: "read-only" }
  | { readonly about: "writable" }
  /** An update of this connection was not accepted; the local copy must be loaded afresh. */
  | { readonly about: "rejected"; readonly reason: string }
  /** The store cannot be reached: what is typed is kept and sent when it returns. */
  | { readonly about: "store-unreachable" }
  | { readonly about: "store-back" };

/** 4400 to 4499 are final: the client does not reconnect by itself. */
export const closeCode = {
  malformed: 4400,
  signedOut: 4401,
  forbidden: 4403,
  notFound: 4404,
  tooLarge: 4413,
  /** The document has moved to a newer schema: reload the page. */
  schemaTooOld: 4426,
  tooFast: 4429,
  /** Not final: the server could not keep the notebook open and loads it afresh; reconnecting is welcome. */
  failed: 4500,
  /** Not final: the reader fell too far behind; reconnecting is welcome. */
  slowReader: 4508,
  /** Not final: the server is stopping. */
  goingAway: 1012,
} as const;

/** The Y.XmlFragment that holds the document. */
export const FRAGMENT = "prose";
