/** A co-editing server as a process of its own, to be killed. PORT 0 asks for a free one; it says which it got. */
import { openCompute } from "../../../server/compute/open-compute.ts";
import { pino } from "pino";
import { startCollabServer } from "./collab-server.ts";

const url = process.env["DATABASE_URL"];
if (url === undefined) throw new Error("Set DATABASE_URL.");
const log = pino({ level: process.env["TEST_LOG_LEVEL"] ?? "silent" });
const server = await startCollabServer(url, {
  port: Number(process.env["PORT"] ?? "0"),
  log,
  with: (database) => {
    const compute = openCompute({ database, log });
    return { observers: [compute.observer], compact: (task) => compute.compact(task) };
  },
});
process.send?.({ port: server.port });
process.on("SIGTERM", () => void server.stop().then(() => process.exit(0)));
process.on("disconnect", () => process.exit(1));
