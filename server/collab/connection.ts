/** One socket: what it may do, what it has been told, and the one place that closes it. */
import type { Logger } from "pino";
import type { WebSocket } from "ws";
import { closeCode, type ServerNotice } from "#contract/collab.ts";
import { heartbeatFrame, writeNotice, writeSaved } from "./frames.ts";
import { CLOSING_PATIENCE_MS, LARGEST_BACKLOG_BYTES } from "./limits.ts";
import { SavedPrefix } from "./saved-prefix.ts";
import type { Rights, Visitor } from "./visitor.ts";

export interface ConnectionOptions {
  readonly socket: WebSocket;
  readonly notebookId: string;
  readonly visitor: Visitor;
  readonly rights: Rights;
  readonly schemaVersion: number;
  readonly log: Logger;
}

/** Why a socket is not read from: too much of it waits to be stored, or its sender has worked us hard. */
export type HoldReason = "queue" | "effort";

export interface KeepAlive {
  readonly silentForMs: number;
  readonly deadAfterMs: number;
}

export class Connection {
  readonly notebookId: string;
  readonly visitor: Visitor;
  readonly schemaVersion: number;
  rights: Rights;
  /** Content reaches a client only after the answer to its step 1, so it never sees a change before what it changes. */
  joined = false;
  readonly saved = new SavedPrefix();
  lastHeardAt = Date.now();

  readonly #socket: WebSocket;
  readonly #log: Logger;
  #lastSentAt = Date.now();
  #closing: { readonly code: number; readonly reason: string } | null = null;
  #ended = false;
  #onClosing: ((code: number) => void) | null = null;
  readonly #heldFor = new Set<HoldReason>();
  #wholeBytes = 0;
  #savedSent = 0;

  constructor(options: ConnectionOptions) {
    this.#socket = options.socket;
    this.#log = options.log;
    this.notebookId = options.notebookId;
    this.visitor = options.visitor;
    this.rights = options.rights;
    this.schemaVersion = options.schemaVersion;
    // Without a listener one malformed frame would end the process; `ws` closes the socket itself.
    this.#socket.on("error", (error) => this.#log.info({ err: error }, "a socket failed"));
    this.#socket.on("pong", () => (this.lastHeardAt = Date.now()));
  }

  get isOpen(): boolean {
    return this.#closing === null && this.#socket.readyState === this.#socket.OPEN;
  }

  get backlogBytes(): number {
    return this.#socket.bufferedAmount;
  }

  onFrame(listener: (frame: Uint8Array) => void): void {
    this.#socket.on("message", (data, isBinary) => {
      this.lastHeardAt = Date.now();
      if (this.#closing !== null) return;
      if (!isBinary) return this.close(closeCode.malformed, "text is not spoken here");
      listener(data as Buffer); // binaryType stays "nodebuffer", the default
    });
  }

  /** Told of the code with which we close. */
  onClosing(listener: (code: number) => void): void {
    this.#onClosing = listener;
  }

  /** Called once, whoever closes and however abruptly. */
  onEnd(listener: () => void): void {
    const end = () => {
      if (this.#ended) return;
      this.#ended = true;
      listener();
    };
    this.#socket.on("close", end);
    if (this.#socket.readyState === this.#socket.CLOSED) end();
  }

  send(frame: Uint8Array): void {
    if (!this.isOpen) return;
    if (this.backlogBytes - this.#wholeBytes > LARGEST_BACKLOG_BYTES)
      return this.close(closeCode.slowReader, "the reader fell too far behind");
    this.#lastSentAt = Date.now();
    this.#socket.send(frame, { binary: true });
  }

  /** A whole document may be larger than the backlog that is allowed; until it is out it does not count. */
  sendWhole(frame: Uint8Array): void {
    if (!this.isOpen) return;
    if (this.#wholeBytes > LARGEST_BACKLOG_BYTES)
      return this.close(closeCode.slowReader, "the reader asks for more than it reads");
    this.#wholeBytes += frame.length;
    this.#lastSentAt = Date.now();
    this.#socket.send(frame, { binary: true }, () => (this.#wholeBytes -= frame.length));
  }

  notify(notice: ServerNotice): void {
    this.send(writeNotice(notice));
  }

  /** Tells the author how far their frames are committed, when that has changed. */
  sendSaved(): void {
    if (this.saved.count === this.#savedSent) return;
    this.#savedSent = this.saved.count;
    this.send(writeSaved(this.#savedSent));
  }

  keepAlive(now: number, { silentForMs, deadAfterMs }: KeepAlive): void {
    if (!this.isOpen) return;
    // A socket that we do not read from cannot answer; its silence is ours.
    const unheardForMs = this.#heldFor.size > 0 ? 0 : now - this.lastHeardAt;
    if (unheardForMs > deadAfterMs) return this.#socket.terminate();
    // Someone who only reads never speaks by themselves, however much they are told.
    if (unheardForMs > silentForMs) this.#socket.ping();
    if (now - this.#lastSentAt > silentForMs) this.send(heartbeatFrame);
  }

  /** Slows the writer down: what it sends stays in the network until its earlier frames are stored. */
  hold(reason: HoldReason = "queue"): void {
    if (!this.isOpen) return;
    if (this.#heldFor.size === 0) this.#socket.pause();
    this.#heldFor.add(reason);
  }

  release(reason: HoldReason = "queue"): void {
    if (!this.#heldFor.delete(reason) || this.#heldFor.size > 0) return;
    this.lastHeardAt = Date.now();
    this.#socket.resume();
  }

  /** The one way out. Nothing that arrives afterwards is looked at. */
  close(code: number, reason: string): void {
    if (this.#closing !== null) return;
    this.#closing = { code, reason };
    this.#log.info({ code, reason }, "closing a socket");
    this.#onClosing?.(code);
    for (const held of this.#heldFor) this.release(held);
    this.#socket.close(code, reason);
    // A peer that does not answer, or that does not read, is not waited for.
    const patience = setTimeout(() => this.#socket.terminate(), CLOSING_PATIENCE_MS);
    patience.unref();
    this.#socket.once("close", () => clearTimeout(patience));
  }
}
