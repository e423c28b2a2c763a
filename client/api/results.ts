/** Stored results of a notebook's blocks: what the first paint shows before the worker has answered. */
import type { NotebookResults } from "#contract/api.ts";
import { useQuery } from "@tanstack/react-query";
import { askOrThrow } from "./request.ts";

export const resultsKey = (notebookId: string) => ["results", notebookId] as const;

export function useStoredResults(notebookId: string) {
  return useQuery({
    queryKey: resultsKey(notebookId),
    queryFn: ({ signal }) => askOrThrow<NotebookResults>(`/api/notebooks/${notebookId}/results`, { signal }),
  });
}
