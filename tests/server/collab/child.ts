/** Starts the server of child-server.ts and kills it. */
import { fork, type ChildProcess } from "node:child_process";
import { once } from "node:events";
import { createRequire } from "node:module";
import { join } from "node:path";
import { pathToFileURL } from "node:url";

export interface Child {
  readonly port: number;
  readonly pid: number;
  /** Resolves when the process is gone; gives its exit code, null after a kill. */
  end(signal: "SIGKILL" | "SIGTERM"): Promise<number | null>;
}

const loader = pathToFileURL(createRequire(import.meta.url).resolve("tsx")).href;

export async function startChild(databaseUrl: string, port = 0): Promise<Child> {
  const process_: ChildProcess = fork(join(import.meta.dirname, "child-server.ts"), {
    execArgv: ["--import", loader],
    env: { ...process.env, DATABASE_URL: databaseUrl, PORT: String(port) },
  });
  const [said] = (await Promise.race([
    once(process_, "message"),
    once(process_, "exit").then(([code]) => {
      throw new Error(`the server ended at its start with ${String(code)}`);
    }),
  ])) as [{ port: number }]; // see child-server.ts
  return {
    port: said.port,
    pid: process_.pid ?? 0, // it has spoken, so it has one
    end: async (signal) => {
      const gone = once(process_, "exit");
      process_.kill(signal);
      const [code] = (await gone) as [number | null];
      return code;
    },
  };
}
