/** Asking someone to join, by account name or e-mail address. */
import type { InvitationOutcome, invitationCreate } from "#contract/api.ts";
import { useMutation, useQueryClient } from "@tanstack/react-query";
import type { z } from "zod/mini";
import { peopleKey } from "./people.ts";
import { askOrThrow } from "./request.ts";

export function useInvite(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof invitationCreate>) =>
      askOrThrow<InvitationOutcome>(`/api/notebooks/${notebookId}/invitations`, { method: "POST", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleKey(notebookId) }),
  });
}

export function useWithdrawInvitation(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (invitationId: string) =>
      askOrThrow<undefined>(`/api/notebooks/${notebookId}/invitations/${invitationId}`, { method: "DELETE" }),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleKey(notebookId) }),
  });
}
