/** Bounds on what one socket or one notebook may cost. */

/** A content frame above this closes its sender with a reason. */
export const LARGEST_FRAME_BYTES = 4 * 1024 * 1024;
/** Above this `ws` ends the connection while the frame still arrives. */
export const LARGEST_PAYLOAD_BYTES = 8 * 1024 * 1024;
/** What may wait in memory for a reader that does not read. */
export const LARGEST_BACKLOG_BYTES = 16 * 1024 * 1024;
/** Presence is not worth queueing behind this much. */
export const PRESENCE_BACKLOG_BYTES = 256 * 1024;

/** Structs and deletions in one change: reading so many takes a fifth of a second. */
export const PARTS_PER_UPDATE = 300_000;

/** Of a whole notebook as stored: a thousand times what a long paper takes. Above it only deletions are taken. */
export const LARGEST_DOCUMENT_BYTES = 32 * 1024 * 1024;
/** Measuring a large document takes a tenth of a second. */
export const MEASURE_AGAIN_AFTER_MS = 10_000;

/** A connection with more than this in the writer's queue is not read from until it is stored. */
export const QUEUED_PER_CONNECTION = { frames: 256, bytes: 4 * 1024 * 1024 };
/** The same for all connections of a notebook together. */
export const QUEUED_PER_ROOM = { frames: 2_048, bytes: 16 * 1024 * 1024 };
/** One insert. */
export const BATCH = { frames: 512, bytes: 2 * 1024 * 1024 };

/** Frames kept back until what they build on arrives. */
export const HELD_PER_CONNECTION = { frames: 128, bytes: 1024 * 1024, milliseconds: 10_000, looks: 20 };

export const PRESENCE = {
  stateCharacters: 4_096,
  statesPerRoom: 400,
  /** An honest client sends its own state, and at worst all that it has seen. */
  statesPerMessage: 1_000,
  /** Clients renew every 15 s and give up after 30 s. */
  expiresAfterMs: 35_000,
  /** Changes are gathered this long and sent together. */
  gatherMs: 40,
};

export const CONNECTIONS_PER_VISITOR = 32;
/** Of one person or link, in all notebooks together. */
export const CONNECTIONS_PER_GUEST = 128;
/** Milliseconds of this process's main thread that one guest may use: at once, and from then on per millisecond. */
export const EFFORT = { most: 400, perMillisecond: 0.25 };
/** Frames that no honest page sends: who sends more is not let in for a while. */
export const OFFENCES = { most: 10, rememberedMs: 10 * 60_000, keptOutMs: 60_000 };
export const CONNECTIONS_PER_NOTEBOOK = 1_000;
/** Handshakes and full encodings are the dear ones: per connection and ten seconds. */
export const STEP_1_PER_TEN_SECONDS = 20;
export const PRESENCE_FRAMES_PER_SECOND = 150;

/** y-websocket drops a socket that is silent for 30 s. */
export const HEARTBEAT = { silentForMs: 10_000, checkEveryMs: 2_500, deadAfterMs: 45_000 };
/** How long a peer may take to answer a close before its socket is destroyed. */
export const CLOSING_PATIENCE_MS = 1_500;
