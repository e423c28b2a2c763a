/**
 * A part of the stack in a process of its own. It tells us over IPC when it is ready, and ends by itself
 * when we are gone, so that a killed start leaves nothing running.
 */
import { spawn } from "node:child_process";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { root } from "./place.mjs";
import { Advice } from "./say.mjs";

const loader = pathToFileURL(join(root, "node_modules/tsx/dist/loader.mjs")).href;

/**
 * @param {string} name  for messages
 * @param {string} entry  TypeScript file, from the root
 * @param {{ env: Record<string, string>, output?: "inherit" | "ignore", watch?: boolean }} options
 * @returns {Promise<{ ready: any, process: import("node:child_process").ChildProcess, stop: (signal?: NodeJS.Signals) => Promise<void> }>}
 */
export function startChild(name, entry, { env, output = "inherit", watch = false }) {
  const args = watch
    ? [join(root, "node_modules/tsx/dist/cli.mjs"), "watch", "--clear-screen=false", entry]
    : ["--import", loader, entry];
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: { ...process.env, ...env },
    stdio: ["ignore", output, output === "ignore" ? "ignore" : "inherit", "ipc"],
    // A process group of its own: Ctrl-C reaches us, and we end the parts in the right order.
    detached: true,
  });
  const ended = new Promise((resolve) => child.once("exit", resolve));
  const stop = async (signal = "SIGTERM") => {
    if (child.exitCode === null && child.signalCode === null) child.kill(signal);
    await ended;
  };
  return new Promise((resolve, reject) => {
    child.once("error", reject);
    child.once("exit", (code, signal) =>
      reject(new Advice(`${name} ended before it was ready (${signal ?? `exit ${code}`}).`)),
    );
    // The watcher keeps its child's messages to itself; the server is then waited for by whoever asks it.
    if (watch) resolve({ ready: null, process: child, stop });
    child.on("message", (message) => {
      if (message && typeof message === "object" && "ready" in message)
        resolve({ ready: message.ready, process: child, stop });
    });
  });
}
