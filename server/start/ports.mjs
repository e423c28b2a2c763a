import { createServer } from "node:net";

function tryPort(port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once("error", () => resolve(null));
    probe.listen(port, "127.0.0.1", () => {
      const { port: taken } = probe.address();
      probe.close(() => resolve(taken));
    });
  });
}

/** The wished port on loopback if it is free, else any free one. */
export async function freePort(wished = 0) {
  const port = (await tryPort(wished)) ?? (await tryPort(0));
  if (port === null) throw new Error("no free port on loopback");
  return port;
}
