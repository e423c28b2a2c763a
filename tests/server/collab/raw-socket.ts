/** A socket driven by hand, frame by frame. */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import WebSocket from "ws";
import * as Y from "yjs";
import { messageType, type ServerNotice } from "../../../client/contract/collab.ts";
import { SCHEMA_VERSION } from "../../../client/schema/version.ts";
import { publicUrl } from "./collab-server.ts";
import { until } from "./until.ts";

export interface RawOptions {
  readonly port: number;
  readonly notebookId: string;
  readonly cookie?: string | undefined;
  readonly token?: string;
  /** Null: does not say. */
  readonly schema?: number | string | null;
  readonly origin?: string | null;
  readonly path?: string;
}
export interface Frame {
  readonly type: number;
  /** For sync frames. */
  readonly step?: number;
  readonly bytes: Uint8Array;
}
export interface RawSocket {
  readonly socket: WebSocket;
  readonly frames: Frame[];
  /** What the server said of it by content: applied to this document. */
  readonly document: Y.Doc;
  send(frame: Uint8Array): void;
  notices(): ServerNotice[];
  saved(): number;
  /** Code and reason once it is closed. */
  closed(): { readonly code: number; readonly reason: string } | null;
  closedWith(): Promise<number>;
  stop(): void;
}

export function sync(step: 0 | 1 | 2, bytes: Uint8Array): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.sync);
  encoding.writeVarUint(encoder, step);
  encoding.writeVarUint8Array(encoder, bytes);
  return encoding.toUint8Array(encoder);
}
export const step1 = (document = new Y.Doc()) => sync(0, Y.encodeStateVector(document));
export const step2 = (update: Uint8Array) => sync(1, update);
export const update = (bytes: Uint8Array) => sync(2, bytes);

export function presence(
  ...states: readonly (readonly [client: number, clock: number, state: unknown])[]
): Uint8Array {
  const inner = encoding.createEncoder();
  encoding.writeVarUint(inner, states.length);
  for (const [client, clock, state] of states) {
    encoding.writeVarUint(inner, client);
    encoding.writeVarUint(inner, clock);
    encoding.writeVarString(inner, JSON.stringify(state));
  }
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.awareness);
  encoding.writeVarUint8Array(encoder, encoding.toUint8Array(inner));
  return encoding.toUint8Array(encoder);
}

function addressOf({ port, notebookId, schema = SCHEMA_VERSION, token, path }: RawOptions): string {
  const query = new URLSearchParams({
    ...(schema === null ? {} : { schema: String(schema) }),
    ...(token === undefined ? {} : { referee: token }),
  });
  return `ws://127.0.0.1:${port}${path ?? `/collab/${notebookId}`}?${query.toString()}`;
}

function newSocket(options: RawOptions): WebSocket {
  const { origin = publicUrl, cookie } = options;
  return new WebSocket(addressOf(options), {
    headers: { ...(origin === null ? {} : { origin }), ...(cookie === undefined ? {} : { cookie }) },
  });
}

/** The HTTP status that an upgrade is refused with; 101 when it is not. */
export async function upgradeStatus(options: RawOptions): Promise<number> {
  const socket = newSocket(options);
  socket.on("error", () => undefined); // refused upgrades are also reported as errors
  return await new Promise((resolve) => {
    socket.once("open", () => {
      resolve(101);
      socket.terminate();
    });
    socket.once("unexpected-response", (request, response) => {
      resolve(response.statusCode ?? 0);
      request.destroy();
    });
  });
}

export async function openRaw(options: RawOptions): Promise<RawSocket> {
  const socket = newSocket(options);
  const frames: Frame[] = [];
  const document = new Y.Doc();
  let closed: { code: number; reason: string } | null = null;
  const failures: Error[] = [];
  socket.on("message", (data: Buffer) => frames.push(readFrame(data, document)));
  socket.on("close", (code, reason) => (closed = { code, reason: reason.toString() }));
  socket.on("error", (error) => failures.push(error));
  await until("the socket is open or refused", () => socket.readyState !== WebSocket.CONNECTING);
  if (failures[0] !== undefined) throw failures[0];
  return {
    socket,
    frames,
    document,
    send: (frame) => socket.send(frame),
    notices: () =>
      frames
        .filter(({ type }) => type === messageType.notice)
        .map(({ bytes }) => JSON.parse(new TextDecoder().decode(bytes)) as ServerNotice),
    saved: () => {
      const last = frames.findLast(({ type }) => type === messageType.saved);
      return last === undefined ? 0 : decoding.readVarUint(decoding.createDecoder(last.bytes));
    },
    closed: () => closed,
    closedWith: async () => {
      await until("the socket is closed", () => closed !== null);
      return closed!.code;
    },
    stop: () => socket.terminate(),
  };
}

function readFrame(data: Uint8Array, document: Y.Doc): Frame {
  const decoder = decoding.createDecoder(data);
  const type = decoding.readVarUint(decoder);
  if (type === messageType.saved) return { type, bytes: data.subarray(decoder.pos) };
  if (type !== messageType.sync) return { type, bytes: decoding.readVarUint8Array(decoder) };
  const step = decoding.readVarUint(decoder);
  const bytes = decoding.readVarUint8Array(decoder);
  if (step !== 0) Y.applyUpdate(document, bytes);
  return { type, step, bytes };
}

/** States in the presence frames received so far: the last of each client. */
export function presenceIn({ frames }: RawSocket): Map<number, { clock: number; state: unknown }> {
  const states = new Map<number, { clock: number; state: unknown }>();
  for (const { type, bytes } of frames) {
    if (type !== messageType.awareness) continue;
    const decoder = decoding.createDecoder(bytes);
    for (let left = decoding.readVarUint(decoder); left > 0; left -= 1) {
      const client = decoding.readVarUint(decoder);
      const clock = decoding.readVarUint(decoder);
      states.set(client, { clock, state: JSON.parse(decoding.readVarString(decoder)) });
    }
  }
  return states;
}
