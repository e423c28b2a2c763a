/** Files that a notebook keeps as they were read in. */
import type { Attachment } from "#contract/attachments.ts";
import { readProblem, unreachable } from "./problem.ts";
import { ask, type Answer } from "./request.ts";

/** @param address of the notebook's files, as a block's handle gives it */
export function keepFile(address: string, file: File): Promise<Answer<Attachment>> {
  const query = new URLSearchParams({ name: file.name.slice(-200) });
  return ask<Attachment>(`${address}?${query.toString()}`, { method: "POST", bytes: file });
}

export async function fetchFile(address: string, id: string): Promise<Answer<Blob>> {
  try {
    const response = await fetch(`${address}/${encodeURIComponent(id)}`, { credentials: "same-origin" });
    if (!response.ok) return { ok: false, problem: await readProblem(response) };
    return { ok: true, value: await response.blob() };
  } catch {
    // No answer, or half of one: `fetch` tells both by throwing.
    return { ok: false, problem: unreachable };
  }
}
