/** Sends one and the same document to everyone who asks, and nothing else: what a storm of reconnects is compared with. */
import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { WebSocketServer, type WebSocket } from "ws";

const server = createServer();
const sockets = new WebSocketServer({ server, perMessageDeflate: false });
let frame = Buffer.alloc(0);

process.on("message", (bytes: string) => {
  frame = Buffer.from(bytes, "base64");
  process.send?.({ port: (server.address() as AddressInfo).port }); // it listens on a port by then
});
sockets.on("connection", (socket: WebSocket) => {
  socket.on("error", (error) => console.error(error));
  socket.once("message", () => socket.send(frame));
});
server.listen(0, "127.0.0.1", () => process.send?.("ready"));
process.on("SIGTERM", () => process.exit(0));
process.on("disconnect", () => process.exit(1));
