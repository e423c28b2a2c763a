/** A person's page without the page: y-websocket's own provider, and a paragraph to type in. */
import * as decoding from "lib0/decoding";
import WebSocket from "ws";
import { Awareness } from "y-protocols/awareness";
import { WebsocketProvider } from "y-websocket";
import * as Y from "yjs";
import { FRAGMENT, messageType, type ServerNotice } from "../../../client/contract/collab.ts";
import { SCHEMA_VERSION } from "../../../client/schema/version.ts";
import { publicUrl } from "./collab-server.ts";
import { until } from "./until.ts";

export interface WriterOptions {
  readonly port: number;
  readonly notebookId: string;
  readonly cookie?: string | undefined;
  readonly token?: string;
  readonly schema?: number;
  /** A document that was typed in before, offline. */
  readonly document?: Y.Doc;
  readonly connect?: boolean;
}

export interface Writer {
  readonly document: Y.Doc;
  readonly awareness: Awareness;
  readonly provider: WebsocketProvider;
  readonly notices: ServerNotice[];
  readonly closes: { readonly code: number; readonly reason: string }[];
  saved(): number;
  /** Sockets so far; frames are counted anew on each. */
  sockets(): number;
  /** Frames that were said to be committed, by number of the socket from 1. */
  savedOn(socket: number): number;
  /** Content frames sent over the present socket. */
  sent(): number;
  text(): string;
  type(text: string): void;
  /** Deletes characters from the start of the text. */
  erase(count: number): void;
  synced(): Promise<void>;
  allSaved(): Promise<void>;
  stop(): void;
}

export function paragraphOf(document: Y.Doc): Y.XmlText {
  const fragment = document.getXmlFragment(FRAGMENT);
  const [first] = fragment.toArray();
  if (first instanceof Y.XmlElement) {
    const [text] = first.toArray();
    if (text instanceof Y.XmlText) return text;
  }
  const paragraph = new Y.XmlElement("paragraph");
  const text = new Y.XmlText();
  paragraph.insert(0, [text]);
  fragment.insert(0, [paragraph]);
  return text;
}

/** All text of all paragraphs, without marks. */
export function textOf(document: Y.Doc): string {
  return document
    .getXmlFragment(FRAGMENT)
    .toArray()
    .flatMap((node) => (node instanceof Y.XmlElement ? node.toArray() : []))
    .map((text) => (text instanceof Y.XmlText ? text.toString() : ""))
    .join("\n");
}

export function socketClass(
  cookie: string | undefined,
  onSend: (frame: Uint8Array) => void = () => undefined,
) {
  return class extends WebSocket {
    constructor(address: string | URL, protocols?: string | string[]) {
      super(address, protocols, {
        headers: { origin: publicUrl, ...(cookie === undefined ? {} : { cookie }) },
      });
    }
    override send(data: Uint8Array): void {
      onSend(data);
      super.send(data);
    }
  } as unknown as typeof globalThis.WebSocket; // close enough for the provider
}

export function openWriter(options: WriterOptions): Writer {
  const document = options.document ?? new Y.Doc();
  const awareness = new Awareness(document);
  const notices: ServerNotice[] = [];
  const closes: { code: number; reason: string }[] = [];
  const savedOn: number[] = [0];
  let sent = 0;
  const provider = new WebsocketProvider(
    `ws://127.0.0.1:${options.port}/collab`,
    options.notebookId,
    document,
    {
      awareness,
      connect: options.connect ?? true,
      disableBc: true,
      maxBackoffTime: 300,
      params: {
        schema: String(options.schema ?? SCHEMA_VERSION),
        ...(options.token === undefined ? {} : { referee: options.token }),
      },
      WebSocketPolyfill: socketClass(options.cookie, (frame) => {
        if (frame[0] === messageType.sync && frame[1] !== 0) sent += 1;
      }),
    },
  );
  provider.messageHandlers[messageType.saved] = (_encoder, decoder) => {
    savedOn[savedOn.length - 1] = decoding.readVarUint(decoder);
  };
  provider.messageHandlers[messageType.notice] = (_encoder, decoder) => {
    notices.push(JSON.parse(decoding.readVarString(decoder)) as ServerNotice);
  };
  provider.on("status", ({ status }) => {
    if (status !== "connecting") return;
    savedOn.push(0);
    sent = 0;
  });
  provider.on("connection-close", (event) => {
    if (event !== null) closes.push({ code: event.code, reason: event.reason });
  });
  const saved = () => savedOn.at(-1) ?? 0;
  return {
    document,
    awareness,
    provider,
    notices,
    closes,
    saved,
    sockets: () => savedOn.length - 1,
    savedOn: (socket) => savedOn[socket] ?? 0,
    sent: () => sent,
    text: () => textOf(document),
    type: (text) => paragraphOf(document).insert(paragraphOf(document).length, text),
    erase: (count) => paragraphOf(document).delete(0, count),
    synced: () => until("the document is synced", () => provider.synced),
    allSaved: () => until("everything sent is saved", () => sent > 0 && saved() === sent),
    stop: () => {
      provider.destroy();
      awareness.destroy();
    },
  };
}
