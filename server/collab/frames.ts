/**
 * What travels over a socket, one message per frame: the y-websocket protocol and our own messages beside it.
 * Every `write…` has its `read…` on the other side: in y-websocket, or in the client's connection.
 */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import * as Y from "yjs";
import { messageType, type ServerNotice } from "#contract/collab.ts";

const syncStep1 = 0;
const syncStep2 = 1;
const syncUpdate = 2;

export type StateVector = ReadonlyMap<number, number>;

export type IncomingFrame =
  | { readonly about: "step 1"; readonly stateVector: StateVector; readonly encoded: Uint8Array }
  /** A step 2 or an update: both carry content and are treated alike. */
  | { readonly about: "content"; readonly update: Uint8Array }
  | { readonly about: "presence"; readonly states: Uint8Array }
  | { readonly about: "presence query" }
  | { readonly about: "nothing known"; readonly reason: string };

/** Never throws: what cannot be read is a value too. */
export function readFrame(frame: Uint8Array): IncomingFrame {
  try {
    const decoder = decoding.createDecoder(frame);
    const message = readMessage(decoder);
    if (message.about !== "nothing known" && decoding.hasContent(decoder))
      return { about: "nothing known", reason: "something follows the message" };
    return message;
  } catch (error) {
    // lib0 throws on every kind of broken encoding, and its errors have no type of their own.
    return { about: "nothing known", reason: error instanceof Error ? error.message : "not readable" };
  }
}

function readMessage(decoder: decoding.Decoder): IncomingFrame {
  const type = decoding.readVarUint(decoder);
  if (type === messageType.awareness)
    return { about: "presence", states: decoding.readVarUint8Array(decoder) };
  if (type === messageType.queryAwareness) return { about: "presence query" };
  if (type !== messageType.sync) return { about: "nothing known", reason: `message type ${type}` };
  const step = decoding.readVarUint(decoder);
  if (step === syncStep1) {
    const encoded = decoding.readVarUint8Array(decoder);
    return { about: "step 1", stateVector: Y.decodeStateVector(encoded), encoded };
  }
  if (step === syncStep2 || step === syncUpdate)
    return { about: "content", update: decoding.readVarUint8Array(decoder) };
  return { about: "nothing known", reason: `sync step ${step}` };
}

function writeSync(step: number, bytes: Uint8Array): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.sync);
  encoding.writeVarUint(encoder, step);
  encoding.writeVarUint8Array(encoder, bytes);
  return encoding.toUint8Array(encoder);
}

/** Asks the other side for what this document lacks. */
export function writeStep1(document: Y.Doc): Uint8Array {
  return writeSync(syncStep1, Y.encodeStateVector(document));
}
/** One encoding goes to everybody who joins: its frame, as long as it is itself, is made once. */
const framesOfWhole = new WeakMap<Uint8Array, Uint8Array>();
export function writeStep2(update: Uint8Array): Uint8Array {
  const known = framesOfWhole.get(update);
  if (known !== undefined) return known;
  const frame = writeSync(syncStep2, update);
  framesOfWhole.set(update, frame);
  return frame;
}
export function writeUpdate(update: Uint8Array): Uint8Array {
  return writeSync(syncUpdate, update);
}

export function writePresence(states: Uint8Array): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.awareness);
  encoding.writeVarUint8Array(encoder, states);
  return encoding.toUint8Array(encoder);
}

/** Presence of nobody: changes nothing, and tells a client that drops silent sockets that we are here. */
export const heartbeatFrame: Uint8Array = writePresence(Uint8Array.of(0));

export function writeSaved(frames: number): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.saved);
  encoding.writeVarUint(encoder, frames);
  return encoding.toUint8Array(encoder);
}

export function writeNotice(notice: ServerNotice): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.notice);
  encoding.writeVarString(encoder, JSON.stringify(notice));
  return encoding.toUint8Array(encoder);
}
