import type { ChildProcess } from "node:child_process";
import type { Cluster } from "./postgres.mjs";

export interface Stack {
  /** Where people reach it. */
  readonly url: string;
  readonly databaseUrl: string;
  readonly serverPort: number;
  readonly mailboxUrl: string | null;
  readonly cluster: Cluster | null;
  serverProcess(): ChildProcess;
  /** Ends the server with a signal and starts it again on the same port and data. */
  restartServer(signal?: NodeJS.Signals): Promise<void>;
  stop(): Promise<void>;
}
export function startStack(wish: {
  folder: string;
  testing?: boolean;
  port?: number;
  publicPort?: number;
  output?: "inherit" | "ignore";
  watch?: boolean;
  env?: Record<string, string>;
}): Promise<Stack>;
export function stopOnSignal(stop: () => Promise<void>): void;
