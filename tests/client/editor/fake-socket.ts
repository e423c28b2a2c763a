/** The other end of a notebook's socket, held by the test: speaks the y-websocket protocol on a document of its own. */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import * as syncProtocol from "y-protocols/sync";
import * as Y from "yjs";
import { messageType, type ServerNotice } from "#contract/collab.ts";
import { contentOf } from "../../../client/editor/saved-count.ts";

export interface ServerEnd {
  /** Give this to the session as its socket class. */
  readonly Socket: typeof WebSocket;
  readonly doc: Y.Doc;
  /** Addresses the client has asked for. */
  readonly addresses: readonly string[];
  /** Content frames of the present connection. */
  contentFrames(): number;
  /** Lets the client in and exchanges step 1 both ways. */
  accept(): void;
  refuse(): void;
  close(code: number): void;
  saved(frames: number): void;
  notify(notice: ServerNotice): void;
  /** The present connection, if any. */
  isOpen(): boolean;
}

export function serverEnd(): ServerEnd {
  const doc = new Y.Doc();
  const addresses: string[] = [];
  let current: FakeSocket | null = null;
  let content = 0;

  class FakeSocket {
    static readonly OPEN = 1;
    readonly OPEN = 1;
    readyState = 0;
    binaryType = "blob";
    onopen: (() => void) | null = null;
    onclose: ((event: { code: number; reason: string }) => void) | null = null;
    onmessage: ((event: { data: ArrayBuffer }) => void) | null = null;
    onerror: (() => void) | null = null;
    constructor(address: string) {
      addresses.push(address);
      content = 0;
      begin(this);
    }
    send(frame: Uint8Array) {
      if (contentOf(frame) !== null) content += 1;
      const decoder = decoding.createDecoder(frame);
      if (decoding.readVarUint(decoder) !== messageType.sync) return;
      const answer = encoding.createEncoder();
      encoding.writeVarUint(answer, messageType.sync);
      syncProtocol.readSyncMessage(decoder, answer, doc, "a client");
      if (encoding.length(answer) > 1) deliver(encoding.toUint8Array(answer));
    }
    close() {
      this.readyState = 3;
      if (current === this) current = null;
    }
  }
  function begin(socket: FakeSocket) {
    current = socket;
  }
  function deliver(bytes: Uint8Array) {
    current?.onmessage?.({ data: bytes.slice().buffer });
  }
  function frame(type: number, write: (encoder: encoding.Encoder) => void) {
    const encoder = encoding.createEncoder();
    encoding.writeVarUint(encoder, type);
    write(encoder);
    return encoding.toUint8Array(encoder);
  }
  return {
    // A stand-in has only the members that the provider uses.
    Socket: FakeSocket as unknown as typeof WebSocket,
    doc,
    addresses,
    contentFrames: () => content,
    isOpen: () => current?.readyState === 1,
    accept() {
      if (!current) throw new Error("no client is waiting");
      current.readyState = 1;
      current.onopen?.();
      deliver(frame(messageType.sync, (encoder) => syncProtocol.writeSyncStep1(encoder, doc)));
    },
    refuse() {
      current?.onerror?.();
      current?.onclose?.({ code: 1006, reason: "" });
    },
    close(code) {
      current?.onclose?.({ code, reason: "" });
    },
    saved(frames) {
      deliver(frame(messageType.saved, (encoder) => encoding.writeVarUint(encoder, frames)));
    },
    notify(notice) {
      deliver(
        frame(messageType.notice, (encoder) => encoding.writeVarString(encoder, JSON.stringify(notice))),
      );
    },
  };
}
