/** A socket driven by hand, frame by frame, as someone would who does not use our page. */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import WebSocket from "ws";
import { messageType, type ServerNotice } from "#contract/collab.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import type { Actor, Scene, Verdict } from "./roles-scene.ts";

/** Sub-types of a sync message, from y-protocols. */
export const syncType = { step1: 0, step2: 1, update: 2 } as const;

const refusals: Readonly<Record<number, Verdict>> = { 401: "signed-out", 403: "forbidden", 404: "not-found" };

export class HandSocket {
  readonly frames: Uint8Array[] = [];
  readonly #socket: WebSocket;
  /** The code with which the server closed. */
  closedWith: number | null = null;

  private constructor(socket: WebSocket) {
    this.#socket = socket;
    socket.on("close", (code) => (this.closedWith = code));
    socket.on("message", (data: Buffer) => this.frames.push(new Uint8Array(data)));
  }

  /** The socket, or the verdict with which the upgrade was refused. */
  static open(actor: Actor, { world, notebookId }: Scene): Promise<HandSocket | Verdict> {
    const holdsLink = actor.who === "referee link" || actor.who === "revoked link";
    const query = new URLSearchParams({
      schema: String(SCHEMA_VERSION),
      ...(holdsLink ? { referee: actor.token } : {}),
    });
    const { address } = world.server;
    const cookie = actor.browser.cookieHeader();
    const socket = new WebSocket(
      `${address.replace(/^http/, "ws")}/collab/${notebookId}?${query.toString()}`,
      {
        headers: { origin: address, ...(cookie === "" ? {} : { cookie }) },
      },
    );
    const hand = new HandSocket(socket);
    return new Promise((resolve, reject) => {
      socket.once("open", () => resolve(hand));
      socket.once("unexpected-response", (_request, response) => {
        const verdict = refusals[response.statusCode ?? 0];
        socket.terminate();
        if (verdict === undefined) reject(new Error(`No verdict for ${response.statusCode}`));
        else resolve(verdict);
      });
      // After an unexpected response the socket also reports that it was ended; the promise is settled by then.
      socket.on("error", reject);
    });
  }

  /** A message of a type, written by `write`. */
  send(type: number, write: (encoder: encoding.Encoder) => void): void {
    const encoder = encoding.createEncoder();
    encoding.writeVarUint(encoder, type);
    write(encoder);
    this.#socket.send(encoding.toUint8Array(encoder));
  }

  sendSync(type: number, content: Uint8Array): void {
    this.send(messageType.sync, (encoder) => {
      encoding.writeVarUint(encoder, type);
      encoding.writeVarUint8Array(encoder, content);
    });
  }

  /** Bodies of the frames of a type that have arrived. */
  received(type: number): decoding.Decoder[] {
    return this.frames
      .map((frame) => decoding.createDecoder(frame))
      .filter((decoder) => decoding.readVarUint(decoder) === type);
  }

  savedCount(): number {
    return Math.max(0, ...this.received(messageType.saved).map((decoder) => decoding.readVarUint(decoder)));
  }

  notices(): ServerNotice[] {
    return this.received(messageType.notice).map((decoder) => JSON.parse(decoding.readVarString(decoder)));
  }

  step2(): Uint8Array | null {
    for (const decoder of this.received(messageType.sync))
      if (decoding.readVarUint(decoder) === syncType.step2) return decoding.readVarUint8Array(decoder);
    return null;
  }

  close(): Promise<void> {
    return new Promise((resolve) => {
      if (this.#socket.readyState === WebSocket.CLOSED) return resolve();
      this.#socket.once("close", () => resolve());
      this.#socket.close();
    });
  }
}
