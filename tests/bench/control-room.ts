/** A plain in-memory room on the y-websocket protocol, with no store and no roles: what delivery is compared with. */
import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import { WebSocketServer, type WebSocket } from "ws";
import { readSyncMessage } from "y-protocols/sync";
import * as Y from "yjs";

const server = createServer();
const sockets = new WebSocketServer({ server, perMessageDeflate: false });
const document = new Y.Doc();

document.on("update", (update: Uint8Array, origin: unknown) => {
  const encoder = encoding.createEncoder();
  for (const part of [0, 2]) encoding.writeVarUint(encoder, part); // sync, update
  encoding.writeVarUint8Array(encoder, update);
  const frame = encoding.toUint8Array(encoder);
  for (const socket of sockets.clients) if (socket !== origin) socket.send(frame);
});
sockets.on("connection", (socket: WebSocket) => {
  socket.on("error", (error) => console.error(error));
  socket.on("message", (data: Buffer) => {
    const decoder = decoding.createDecoder(data);
    if (decoding.readVarUint(decoder) !== 0) return;
    const answer = encoding.createEncoder();
    encoding.writeVarUint(answer, 0);
    readSyncMessage(decoder, answer, document, socket, (error) => {
      throw error;
    });
    if (encoding.length(answer) > 1) socket.send(encoding.toUint8Array(answer));
  });
});
server.listen(0, "127.0.0.1", () => process.send?.({ port: (server.address() as AddressInfo).port }));
process.on("SIGTERM", () => process.exit(0));
process.on("disconnect", () => process.exit(1));
