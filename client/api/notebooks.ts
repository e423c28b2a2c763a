/** The shelf, and one notebook's own facts. */
import type {
  Notebook,
  NotebookList,
  notebookCreate,
  notebookListQuery,
  notebookPatch,
} from "#contract/api.ts";
import {
  keepPreviousData,
  useInfiniteQuery,
  useMutation,
  useQuery,
  useQueryClient,
} from "@tanstack/react-query";
import type { z } from "zod/mini";
import { askOrThrow } from "./request.ts";

export type ShelfView = Omit<z.output<typeof notebookListQuery>, "cursor">;

export const shelfKey = ["shelf"] as const;
export const notebookKey = (id: string) => ["notebook", id] as const;

export function useShelf(view: ShelfView, enabled = true) {
  return useInfiniteQuery({
    queryKey: [...shelfKey, view],
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams({ ...view, ...(pageParam === null ? {} : { cursor: pageParam }) });
      return askOrThrow<NotebookList>(`/api/notebooks?${query.toString()}`, { signal });
    },
    initialPageParam: null as string | null, // The first page has no cursor.
    getNextPageParam: (last) => last.nextCursor,
    placeholderData: keepPreviousData,
    // Colleagues share notebooks and move pins meanwhile: whoever comes back to the shelf sees it as it is now.
    refetchOnMount: "always",
    enabled,
  });
}

export function useNotebook(id: string) {
  return useQuery({
    queryKey: notebookKey(id),
    queryFn: ({ signal }) => askOrThrow<Notebook>(`/api/notebooks/${id}`, { signal }),
  });
}

export function useCreateNotebook() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof notebookCreate>) =>
      askOrThrow<Notebook>("/api/notebooks", { method: "POST", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: shelfKey }),
  });
}

export interface NotebookChange {
  readonly id: string;
  readonly change: z.input<typeof notebookPatch>;
}

export function useChangeNotebook() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, change }: NotebookChange) =>
      askOrThrow<Notebook>(`/api/notebooks/${id}`, { method: "PATCH", body: change }),
    onSuccess: (_answer, { id }) =>
      Promise.all([
        client.invalidateQueries({ queryKey: notebookKey(id) }),
        client.invalidateQueries({ queryKey: shelfKey }),
      ]),
  });
}

export function useDeleteNotebook() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => askOrThrow<undefined>(`/api/notebooks/${id}`, { method: "DELETE" }),
    onSuccess: (_answer, id) => {
      client.removeQueries({ queryKey: notebookKey(id) });
      return client.invalidateQueries({ queryKey: shelfKey });
    },
  });
}

/** A copy of one's own. */
export function useDuplicateNotebook() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => askOrThrow<Notebook>(`/api/notebooks/${id}/copies`, { method: "POST" }),
    onSuccess: () => client.invalidateQueries({ queryKey: shelfKey }),
  });
}

/** Brings back a deleted notebook. */
export function useRestoreNotebook() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => askOrThrow<Notebook>(`/api/notebooks/${id}/restoration`, { method: "POST" }),
    onSuccess: () => client.invalidateQueries({ queryKey: shelfKey }),
  });
}
