/**
 * A line between one browser and the server that can be cut like a network cable. Chromium's own offline switch leaves
 * sockets open that are already there, so what is typed would still be sent.
 */
import { createServer, request, type IncomingMessage, type ServerResponse } from "node:http";
import { connect, type AddressInfo, type Socket } from "node:net";

export interface Line {
  /** To be given to a browser as its HTTP proxy. */
  readonly address: string;
  /** Ends everything that is under way; nothing gets through until `restore`. */
  cut(): void;
  restore(): void;
  remove(): Promise<void>;
}

export async function layLine(): Promise<Line> {
  let whole = true;
  const open = new Set<Socket>();
  const keep = (socket: Socket) => {
    open.add(socket);
    socket.once("close", () => open.delete(socket));
    // A cut line is what is being played here; its broken ends are no failure.
    socket.on("error", () => socket.destroy());
  };
  const server = createServer((asked, answer) => {
    if (whole) passOn(asked, answer);
    else asked.socket.destroy();
  });
  server.on("connection", (socket: Socket) => {
    if (whole) keep(socket);
    else socket.destroy();
  });
  // WebSockets come this way.
  server.on("connect", (asked: IncomingMessage, near: Socket, head: Buffer) => {
    const { hostname, port } = new URL(`http://${asked.url ?? ""}`);
    const far = connect(Number(port), hostname, () => {
      near.write("HTTP/1.1 200 Connection established\r\n\r\n");
      far.write(head);
      far.pipe(near).pipe(far);
    });
    keep(far);
    near.once("close", () => far.destroy());
    far.once("close", () => near.destroy());
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  // A server that listens on a port has an address with one.
  const { port } = server.address() as AddressInfo;
  const cut = () => {
    whole = false;
    for (const socket of open) socket.destroy();
  };
  return {
    address: `http://127.0.0.1:${port}`,
    cut,
    restore: () => {
      whole = true;
    },
    remove: () =>
      new Promise((resolve) => {
        cut();
        server.close(() => resolve());
      }),
  };
}

function passOn(asked: IncomingMessage, answer: ServerResponse): void {
  const onward = request(asked.url ?? "", { method: asked.method, headers: asked.headers }, (given) => {
    answer.writeHead(given.statusCode ?? 502, given.rawHeaders);
    given.pipe(answer);
  });
  onward.on("error", () => answer.destroy());
  asked.pipe(onward);
}
