/** Addresses that open a notebook read-only, without an account. */
import type { RefereeLink, refereeLinkCreate, RefereeLinkCreated } from "#contract/api.ts";
import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import type { z } from "zod/mini";
import { askOrThrow } from "./request.ts";

const refereeLinksKey = (notebookId: string) => ["referee-links", notebookId] as const;

export function useRefereeLinks(notebookId: string, enabled: boolean) {
  return useQuery({
    queryKey: refereeLinksKey(notebookId),
    queryFn: ({ signal }) =>
      askOrThrow<readonly RefereeLink[]>(`/api/notebooks/${notebookId}/referee-links`, {
        signal,
      }),
    enabled,
  });
}

/** The answer holds the token, shown once and kept nowhere. */
export function useCreateRefereeLink(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof refereeLinkCreate>) =>
      askOrThrow<RefereeLinkCreated>(`/api/notebooks/${notebookId}/referee-links`, { method: "POST", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: refereeLinksKey(notebookId) }),
    gcTime: 0,
  });
}

export function useRevokeRefereeLink(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (linkId: string) =>
      askOrThrow<undefined>(`/api/notebooks/${notebookId}/referee-links/${linkId}`, { method: "DELETE" }),
    onSuccess: () => client.invalidateQueries({ queryKey: refereeLinksKey(notebookId) }),
  });
}
