/** The socket of a notebook: the y-websocket protocol with our own messages beside it. */
import * as decoding from "lib0/decoding";
import type { Awareness } from "y-protocols/awareness";
import { WebsocketProvider } from "y-websocket";
import type * as Y from "yjs";
import { closeCode, messageType, type ServerNotice } from "#contract/collab.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { askWhyRefused } from "./ask-why-refused.ts";
import type { ConnectionPhase } from "./connection-words.ts";
import { contentOf } from "./saved-count.ts";

export interface ConnectionOptions {
  readonly notebookId: string;
  readonly ydoc: Y.Doc;
  readonly awareness: Awareness;
  /** Referee token; null for members, whose cookie says who they are. */
  readonly token: string | null;
  readonly socket?: typeof WebSocket | undefined;
  mayWrite(): boolean;
  onPhase(phase: ConnectionPhase): void;
  onOpen(): void;
  onSynced(): void;
  onSent(frame: Uint8Array): void;
  onSaved(frames: number): void;
  onNotice(notice: ServerNotice): void;
}

export interface Connection {
  isOrigin(origin: unknown): boolean;
  destroy(): void;
}

const phaseOfCode: Readonly<Record<number, ConnectionPhase>> = {
  [closeCode.signedOut]: "signed-out",
  [closeCode.forbidden]: "forbidden",
  [closeCode.notFound]: "not-found",
  [closeCode.schemaTooOld]: "schema-too-old",
};

export function connectNotebook(options: ConnectionOptions): Connection {
  const { notebookId, ydoc, awareness, token } = options;
  const scheme = window.location.protocol === "https:" ? "wss:" : "ws:";
  let everOpened = false;
  let openNow = false;
  let destroyed = false;

  const provider = new WebsocketProvider(`${scheme}//${window.location.host}/collab`, notebookId, ydoc, {
    connect: false,
    awareness,
    params: { schema: String(SCHEMA_VERSION), ...(token === null ? {} : { referee: token }) },
    // Between tabs a BroadcastChannel would pass roles and durability by.
    disableBc: true,
    WebSocketPolyfill: watchedSocket(options.socket ?? WebSocket, options),
  });

  provider.messageHandlers[messageType.saved] = (_encoder, decoder) => {
    options.onSaved(decoding.readVarUint(decoder));
  };
  provider.messageHandlers[messageType.notice] = (_encoder, decoder) => {
    // Our own server writes these; their type is the contract.
    options.onNotice(JSON.parse(decoding.readVarString(decoder)) as ServerNotice);
  };
  provider.on("status", ({ status }) => {
    if (status === "connected") {
      everOpened = true;
      openNow = true;
      options.onOpen();
    }
  });
  provider.on("sync", (synced: boolean) => {
    if (synced) options.onSynced();
  });
  provider.on("connection-close", (event) => {
    const wasOpen = openNow;
    openNow = false;
    const code = event?.code ?? 0;
    if (destroyed || (code >= 4400 && code < 4500)) return;
    options.onPhase("offline");
    // A refused upgrade looks like a dead network from here; the API can say which it is.
    if (!wasOpen) void findOut();
  });
  provider.on("closed", ({ code }) => {
    options.onPhase(phaseOfCode[code] ?? "refused");
  });

  async function findOut() {
    const phase = await askWhyRefused(notebookId, token);
    if (destroyed || openNow || phase === null) return;
    provider.disconnect();
    options.onPhase(phase);
  }

  // The browser knows before the socket does, which may take half a minute to notice that nobody answers.
  const goOffline = () => {
    if (provider.shouldConnect) options.onPhase("offline");
  };
  const comeBack = () => {
    if (!provider.shouldConnect) return;
    if (openNow && provider.synced) options.onPhase("connected");
    else if (everOpened && !openNow) provider.connect();
  };
  window.addEventListener("offline", goOffline);
  window.addEventListener("online", comeBack);
  provider.connect();

  return {
    isOrigin: (origin) => origin === provider,
    destroy() {
      destroyed = true;
      window.removeEventListener("offline", goOffline);
      window.removeEventListener("online", comeBack);
      provider.destroy();
    },
  };
}

/** A socket class that counts what is sent, and sends no content while one may only read. */
function watchedSocket(Socket: typeof WebSocket, options: ConnectionOptions): typeof WebSocket {
  return class extends Socket {
    override send(data: Parameters<WebSocket["send"]>[0]): void {
      if (data instanceof Uint8Array) {
        if (contentOf(data) !== null && !options.mayWrite()) return;
        options.onSent(data);
      }
      super.send(data);
    }
  };
}
