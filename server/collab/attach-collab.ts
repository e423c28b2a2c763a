/** Live co-editing on an HTTP server: WebSockets at /collab/:notebookId. */
import { once } from "node:events";
import { STATUS_CODES, type IncomingMessage, type Server } from "node:http";
import type { Duplex } from "node:stream";
import type { Logger } from "pino";
import { WebSocketServer } from "ws";
import { closeCode } from "#contract/collab.ts";
import type { Configuration } from "../configuration.ts";
import type { Database } from "../data/database.ts";
import type { Sessions } from "../http/sessions.ts";
import type { AccessChanges } from "../policies/access-changes.ts";
import { measureStore } from "../metrics/collab-metrics.ts";
import { Metrics } from "../metrics/metrics.ts";
import { AccessWatch } from "./access-watch.ts";
import type { RetryTimes } from "./append-until-answered.ts";
import { admit, type Admitted } from "./admission.ts";
import { compactHere, createCompaction, type Compact } from "./compaction.ts";
import { Connection } from "./connection.ts";
import { openDocumentStore, type DocumentStore } from "./document-store.ts";
import { Guests } from "./guests.ts";
import { hearNeighbour } from "./hear-neighbour.ts";
import {
  CONNECTIONS_PER_NOTEBOOK,
  CONNECTIONS_PER_VISITOR,
  HEARTBEAT,
  LARGEST_PAYLOAD_BYTES,
} from "./limits.ts";
import { Neighbours } from "./neighbours.ts";
import { receiveFrames } from "./receive-frames.ts";
import { RoomNotFound, type RoomObserver } from "./room-state.ts";
import type { Lease } from "./room-parts.ts";
import { Rooms } from "./rooms.ts";

export interface CollabDependencies {
  readonly configuration: Pick<Configuration, "databaseUrl">;
  readonly database: Database;
  readonly log: Logger;
  /** Where the work is counted; nobody reads it when left out. */
  readonly metrics?: Metrics;
  readonly sessions: Pick<Sessions, "identify">;
  readonly accessChanges: Pick<AccessChanges, "onAccessChange">;
  /** Its origin is the only one that pages may come from. */
  readonly publicUrl: string;
  readonly observers?: readonly RoomObserver[];
  /** Done in another thread where there is one. */
  readonly compact?: Compact;
  /** For tests: a store that is slow or fails on purpose. Stopped with the rest. */
  readonly store?: DocumentStore;
  readonly lingerMs?: number;
  readonly retry?: RetryTimes;
}
export interface Collab {
  readonly rooms: Rooms;
  /** Takes no more frames, stores what is queued, closes every socket (1012) and ends. */
  stop(): Promise<void>;
}

const LINGER_MS = 5_000;
const LOAD_PATIENCE_MS = 20_000;
const STOP_PATIENCE_MS = 10_000;
const RECHECK_EVERY_MS = 30_000;
/** Ours, and those of RFC 6455: going, leaving, and gone without a word. A stranger may send any number. */
const codesToCount: ReadonlySet<number> = new Set([...Object.values(closeCode), 1000, 1001, 1005, 1006]);

/** What no honest page brings about. */
const offences: ReadonlySet<number> = new Set([closeCode.malformed, closeCode.tooLarge, closeCode.tooFast]);

export function attachCollab(server: Server, dependencies: CollabDependencies): Collab {
  const { configuration, database, log, sessions, accessChanges } = dependencies;
  const metrics = dependencies.metrics ?? new Metrics();
  const store = measureStore(
    dependencies.store ?? openDocumentStore({ database, databaseUrl: configuration.databaseUrl, log }),
    metrics,
  );
  const neighbours = new Neighbours({
    database,
    databaseUrl: configuration.databaseUrl,
    log,
    processId: store.processId,
    onRows: (notebookId) => rooms.find(notebookId)?.lookForMore(),
    onMessage(message, from) {
      const room = rooms.find(message.notebookId);
      if (room !== undefined) hearNeighbour(room, message, from, neighbours);
    },
    onGap: () => {
      for (const room of rooms.all()) room.lookForMore();
    },
  });
  const rooms: Rooms = new Rooms({
    store,
    log,
    neighbours,
    observers: [
      ...(dependencies.observers ?? []),
      createCompaction({ store, log, compact: dependencies.compact ?? compactHere }),
    ],
    lingerMs: dependencies.lingerMs ?? LINGER_MS,
    ...(dependencies.retry === undefined ? {} : { retry: dependencies.retry }),
  });
  const watch = new AccessWatch({ database, sessions, log });
  const sockets = new WebSocketServer({
    noServer: true,
    maxPayload: LARGEST_PAYLOAD_BYTES,
    perMessageDeflate: false,
    clientTracking: true,
  });
  sockets.on("error", (error) => log.error({ err: error }, "the socket server failed"));
  const connections = new Set<Connection>();
  const guests = new Guests();
  const closes = metrics.counter(
    "subleading_sockets_closed_total",
    "Sockets that ended, by the code of their end.",
  );
  metrics.gauge("subleading_sockets", "Open sockets.", () => connections.size);
  metrics.gauge("subleading_notebooks_open", "Notebooks that are open here.", () => rooms.all().length);
  const ending = new AbortController();
  const isStopping = () => ending.signal.aborted;

  async function upgrade(request: IncomingMessage, socket: Duplex, head: Buffer): Promise<void> {
    if (isStopping()) return refuse(socket, 503);
    const admission = await admit(request, dependencies);
    if (!admission.admitted) return refuse(socket, admission.status);
    if (admission.editorSchema < admission.storedSchema) return refuseOldSchema(request, socket, head);
    if (!guests.mayEnter(admission.visitor) || isCrowded(admission)) return refuse(socket, 429);
    const lease = await enterRoom(admission.notebookId);
    if (typeof lease === "number") return refuse(socket, lease);
    if (isStopping() || socket.destroyed) {
      lease.release();
      return refuse(socket, 503);
    }
    sockets.handleUpgrade(request, socket, head, (accepted) => {
      accepted.once("close", (code) => closes.add({ code: codesToCount.has(code) ? String(code) : "other" }));
      const connection = new Connection({
        ...admission,
        socket: accepted,
        schemaVersion: admission.editorSchema,
        log: log.child({ notebookId: admission.notebookId }),
      });
      begin(connection, lease, admission, request.headers.cookie);
    });
    // `ws` answers a broken handshake by itself and then calls nobody; the lease must not outlive the socket.
    socket.once("close", () => lease.release());
  }

  /** The document is loaded before the upgrade completes, so that no early message is lost. */
  async function enterRoom(notebookId: string): Promise<Lease | 404 | 503> {
    let isLate = false;
    const entered = rooms.enter(notebookId).then((lease) => {
      if (isLate) lease.release();
      return lease;
    });
    let timer: NodeJS.Timeout | undefined;
    const late = new Promise<503>((resolve) => {
      timer = setTimeout(() => {
        isLate = true;
        resolve(503);
      }, LOAD_PATIENCE_MS);
    });
    try {
      return await Promise.race([entered, late]);
    } catch (error) {
      log.warn({ err: error, notebookId }, "a notebook could not be opened");
      return error instanceof RoomNotFound ? 404 : 503;
    } finally {
      clearTimeout(timer);
    }
  }

  function begin(
    connection: Connection,
    lease: Lease,
    admission: Admitted,
    cookie: string | undefined,
  ): void {
    const { room } = lease;
    const watched = { connection, room, cookie, endsAt: admission.endsAt };
    connections.add(connection);
    guests.enter(connection);
    connection.onClosing((code) => {
      if (offences.has(code)) guests.offend(connection);
    });
    connection.onEnd(() => {
      connections.delete(connection);
      guests.leave(connection);
      watch.remove(watched);
      room.leave(connection);
      lease.release();
    });
    watch.add(watched);
    receiveFrames(room, connection, guests);
    room.join(connection);
    // Raised while this editor was on its way in.
    if (connection.schemaVersion < (room.taking?.document.schemaVersion ?? 0))
      connection.close(closeCode.schemaTooOld, "the notebook needs a newer page");
  }

  function isCrowded({ notebookId, visitor }: Admitted): boolean {
    const isSame = (other: Connection) =>
      visitor.as === "member"
        ? other.visitor.as === "member" && other.visitor.personId === visitor.personId
        : other.visitor.as === "referee" && other.visitor.refereeLinkId === visitor.refereeLinkId;
    const inNotebook = [...connections].filter((connection) => connection.notebookId === notebookId);
    return (
      inNotebook.length >= CONNECTIONS_PER_NOTEBOOK ||
      inNotebook.filter(isSame).length >= CONNECTIONS_PER_VISITOR
    );
  }

  function refuseOldSchema(request: IncomingMessage, socket: Duplex, head: Buffer): void {
    sockets.handleUpgrade(request, socket, head, (accepted) => {
      accepted.on("error", (error) => log.info({ err: error }, "a socket failed"));
      accepted.close(closeCode.schemaTooOld, "the notebook needs a newer page");
    });
  }

  const onUpgrade = (request: IncomingMessage, socket: Duplex, head: Buffer) => {
    socket.on("error", (error) => log.info({ err: error }, "a socket failed before or while it was opened"));
    upgrade(request, socket, head).catch((error: unknown) => {
      log.error({ err: error }, "an upgrade failed");
      refuse(socket, 503);
    });
  };
  server.on("upgrade", onUpgrade);

  const stopListening = accessChanges.onAccessChange((change) => watch.heed(change));
  const beat = setInterval(() => {
    const now = Date.now();
    for (const connection of connections) connection.keepAlive(now, HEARTBEAT);
    for (const room of rooms.all()) room.tick(now);
    guests.tidy();
  }, HEARTBEAT.checkEveryMs);
  const recheck = setInterval(() => watch.recheckAll(), RECHECK_EVERY_MS);

  return {
    rooms,
    stop: async () => {
      ending.abort();
      stopListening();
      clearInterval(beat);
      clearInterval(recheck);
      watch.stop();
      guests.stop();
      await rooms.stop(STOP_PATIENCE_MS);
      server.off("upgrade", onUpgrade);
      // Each is being closed with a word why; one that does not answer is cut after `CLOSING_PATIENCE_MS`.
      await Promise.all([...sockets.clients].map((socket) => once(socket, "close")));
      await new Promise<void>((resolve, reject) =>
        sockets.close((error) => (error === undefined ? resolve() : reject(error))),
      );
      await neighbours.stop();
      await store.stop();
    },
  };
}

function refuse(socket: Duplex, status: number): void {
  if (socket.destroyed) return;
  const retry = status === 503 || status === 429 ? "Retry-After: 2\r\n" : "";
  socket.end(
    `HTTP/1.1 ${status} ${STATUS_CODES[status] ?? ""}\r\n${retry}Connection: close\r\nContent-Length: 0\r\n\r\n`,
    () => socket.destroy(),
  );
}
