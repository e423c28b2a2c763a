/** Builds one server from its configuration: used by main.ts, by tests and by the benchmarks. */
import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import type { DestinationStream } from "pino";
import { attachCollab } from "./collab/attach-collab.ts";
import { startHousekeeping } from "./commands/keep-house.ts";
import { openCompute } from "./compute/open-compute.ts";
import type { Configuration } from "./configuration.ts";
import { openDatabase } from "./data/database.ts";
import { createApp } from "./http/app.ts";
import { openHttpServer } from "./http/http-server.ts";
import { openLog } from "./http/request-log.ts";
import { openSessions } from "./http/sessions.ts";
import { startMailSender } from "./mail/sender.ts";
import { Metrics } from "./metrics/metrics.ts";
import { measureProcess } from "./metrics/process-metrics.ts";
import { listenForAccessChanges } from "./policies/access-changes.ts";
import type { Services } from "./services.ts";

export interface RunningServer {
  readonly httpServer: Server;
  /** Where people reach it, without a closing slash. */
  readonly address: string;
  readonly services: Services;
  /** Lets requests end, closes sockets, writes what is queued, then lets go of the database. */
  stop(): Promise<void>;
}

/** How long a request may take to end after the server was asked to stop. */
const PATIENCE_MS = 5_000;

function listen(httpServer: Server, { port, host }: Configuration): Promise<number> {
  return new Promise((resolve, reject) => {
    httpServer.once("error", reject);
    httpServer.listen(port, host, () => {
      httpServer.off("error", reject);
      // A server that listens on a port has an address of this kind, not a pipe's name.
      resolve((httpServer.address() as AddressInfo).port);
    });
  });
}

function closeHttp(httpServer: Server): Promise<void> {
  return new Promise((resolve) => {
    const force = setTimeout(() => httpServer.closeAllConnections(), PATIENCE_MS);
    httpServer.close(() => {
      clearTimeout(force);
      resolve();
    });
    httpServer.closeIdleConnections();
  });
}

/** The database must have been migrated. `logDestination` is for tests that read the log. */
export async function createServer(
  configuration: Configuration,
  { logDestination }: { readonly logDestination?: DestinationStream } = {},
): Promise<RunningServer> {
  const log = openLog(configuration, logDestination);
  const accessChanges = await listenForAccessChanges(configuration.databaseUrl, log);
  const httpServer = openHttpServer(log);
  let port: number;
  try {
    port = await listen(httpServer, configuration);
  } catch (error) {
    await accessChanges.stop();
    throw error;
  }
  // From here to the handlers nothing waits, so no request comes in between.
  const publicUrl = configuration.publicUrl ?? `http://${configuration.host}:${port}`;
  const database = openDatabase(configuration.databaseUrl, { log });
  const sessions = openSessions(configuration, publicUrl, log);
  const metrics = new Metrics();
  const stopMeasuring = measureProcess(metrics, database);
  const stopping = new AbortController();
  const services: Services = {
    ...{ configuration, publicUrl, database, log, metrics, sessions, accessChanges },
    stopping: stopping.signal,
  };
  const compute = openCompute({ database, log });
  httpServer.on("request", createApp(services, compute));
  const collab = attachCollab(httpServer, {
    ...services,
    observers: [compute.observer],
    compact: compute.compact,
  });
  const mail = startMailSender(services);
  const housekeeping = startHousekeeping(services);

  const stop = async () => {
    stopping.abort();
    const closed = closeHttp(httpServer);
    // Open sockets would keep the HTTP server from closing; what they sent is stored first.
    await collab.stop();
    await closed;
    await compute.stop();
    await housekeeping.stop();
    await mail.stop();
    await accessChanges.stop();
    await sessions.stop();
    stopMeasuring();
    await database.destroy();
  };
  return { httpServer, address: publicUrl, services, stop };
}
