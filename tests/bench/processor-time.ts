/** Processor time and memory of processes, as Linux counts them (proc(5)). */
import { readdirSync, readFileSync } from "node:fs";
import { rows, type Database } from "../../server/data/database.ts";

const TICKS_PER_SECOND = 100;

interface Stat {
  readonly parent: number;
  readonly milliseconds: number;
  readonly childrenMilliseconds: number;
}

/** Null for a process that has just ended. */
function statOf(pid: number): Stat | null {
  let text: string;
  try {
    text = readFileSync(`/proc/${pid}/stat`, "utf8");
  } catch (error) {
    if (error instanceof Error && "code" in error && (error.code === "ENOENT" || error.code === "ESRCH"))
      return null;
    throw error;
  }
  // The name in brackets may hold anything; fields are counted from behind it, and the state is the third.
  const fields = text.slice(text.lastIndexOf(")") + 2).split(" ");
  const field = (number: number) => Number(fields[number - 3]);
  const inMilliseconds = (ticks: number) => (ticks * 1_000) / TICKS_PER_SECOND;
  return {
    parent: field(4),
    milliseconds: inMilliseconds(field(14) + field(15)),
    childrenMilliseconds: inMilliseconds(field(16) + field(17)),
  };
}

export function processorTime(pid: number): number {
  return statOf(pid)?.milliseconds ?? 0;
}

export function memoryMegabytes(pid: number): number {
  const found = /^VmRSS:\s+(\d+) kB/m.exec(readFileSync(`/proc/${pid}/status`, "utf8"));
  return Number(found?.[1]) / 1024;
}

/** Of the database server with all its processes, also those that have ended. */
export async function databaseProcessorTime(database: Database): Promise<number> {
  const [own] = await rows<{ pid: number }>(database, "select pg_backend_pid() as pid");
  const main = statOf(own?.pid ?? 0)?.parent ?? 0;
  const pids = readdirSync("/proc").filter((name) => /^\d+$/.test(name));
  const children = pids.flatMap((pid) => statOf(Number(pid)) ?? []).filter(({ parent }) => parent === main);
  const whole = statOf(main);
  return (
    children.reduce((sum, { milliseconds }) => sum + milliseconds, 0) +
    (whole === null ? 0 : whole.milliseconds + whole.childrenMilliseconds)
  );
}
