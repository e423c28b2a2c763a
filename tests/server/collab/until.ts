/** Polls for a condition. The only waiting in these tests. */
import { setTimeout as sleep } from "node:timers/promises";

export async function until(
  what: string,
  holds: () => boolean | Promise<boolean>,
  patienceMs = 20_000,
): Promise<void> {
  const end = Date.now() + patienceMs;
  while (!(await holds())) {
    if (Date.now() > end) throw new Error(`waited ${patienceMs} ms in vain until ${what}`);
    await sleep(5);
  }
}
