/** A notebook's socket driven by hand, as someone would who writes their own client. */
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import { expect } from "playwright/test";
import WebSocket from "ws";
import * as Y from "yjs";
import { FRAGMENT, messageType } from "../client/contract/collab.ts";
import { SCHEMA_VERSION } from "../client/schema/version.ts";
import type { Stack } from "../server/start/stack.mjs";
import { idOf } from "./notebook.ts";

const steps = { stateVector: 0, missing: 1, update: 2 } as const;

export interface HandSocket {
  /** What the server has said of the text so far. */
  text(): string;
  /** Adds a paragraph to the own copy and sends it in every way that the protocol knows. */
  forge(words: string): void;
  closedWith(): number | null;
  close(): void;
}

/** Opens the socket with a referee's token and waits until the server has sent the document. */
export async function openByHand(stack: Stack, notebook: string, token: string): Promise<HandSocket> {
  const address = `${stack.url.replace(/^http/, "ws")}/collab/${idOf(notebook)}`;
  const socket = new WebSocket(`${address}?schema=${SCHEMA_VERSION}&referee=${token}`, {
    headers: { origin: stack.url },
  });
  const ydoc = new Y.Doc();
  let code: number | null = null;
  let answered = false;
  socket.on("close", (given) => (code = given));
  socket.on("error", () => (code ??= 0));
  socket.on("open", () => socket.send(sync(steps.stateVector, Y.encodeStateVector(ydoc))));
  socket.on("message", (data: Buffer) => {
    const decoder = decoding.createDecoder(data);
    if (decoding.readVarUint(decoder) !== messageType.sync) return;
    const step = decoding.readVarUint(decoder);
    if (step === steps.stateVector) return;
    Y.applyUpdate(ydoc, decoding.readVarUint8Array(decoder));
    answered = true;
  });
  await expect.poll(() => answered || code !== null, { message: "the server answers" }).toBe(true);
  const fragment = ydoc.getXmlFragment(FRAGMENT);
  return {
    text: () => fragment.toJSON(),
    forge(words) {
      const before = Y.encodeStateVector(ydoc);
      const paragraph = new Y.XmlElement("paragraph");
      paragraph.insert(0, [new Y.XmlText(words)]);
      // Into a document of its own, so that only the server can bring the words back into this one.
      const own = new Y.Doc();
      Y.applyUpdate(own, Y.encodeStateAsUpdate(ydoc));
      own.getXmlFragment(FRAGMENT).push([paragraph]);
      const change = Y.encodeStateAsUpdate(own, before);
      socket.send(sync(steps.update, change));
      socket.send(sync(steps.missing, Y.encodeStateAsUpdate(own)));
      socket.send(presence(own.clientID, { user: { id: "forged", name: words } }));
    },
    closedWith: () => code,
    close: () => socket.terminate(),
  };
}

function sync(step: number, bytes: Uint8Array): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.sync);
  encoding.writeVarUint(encoder, step);
  encoding.writeVarUint8Array(encoder, bytes);
  return encoding.toUint8Array(encoder);
}

function presence(client: number, state: unknown): Uint8Array {
  const inner = encoding.createEncoder();
  encoding.writeVarUint(inner, 1);
  encoding.writeVarUint(inner, client);
  encoding.writeVarUint(inner, 1);
  encoding.writeVarString(inner, JSON.stringify(state));
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.awareness);
  encoding.writeVarUint8Array(encoder, encoding.toUint8Array(inner));
  return encoding.toUint8Array(encoder);
}
