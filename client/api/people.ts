/** Who belongs to a notebook, in which role. */
import type { NotebookPeople } from "#contract/api.ts";
import type { Role } from "#contract/roles.ts";
import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { notebookKey } from "./notebooks.ts";
import { askOrThrow } from "./request.ts";

export const peopleKey = (notebookId: string) => ["people", notebookId] as const;

export function useNotebookPeople(notebookId: string) {
  return useQuery({
    queryKey: peopleKey(notebookId),
    queryFn: ({ signal }) => askOrThrow<NotebookPeople>(`/api/notebooks/${notebookId}/people`, { signal }),
  });
}

export function useChangeRole(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ personId, role }: { readonly personId: string; readonly role: Role }) =>
      askOrThrow<unknown>(`/api/notebooks/${notebookId}/people/${personId}`, {
        method: "PUT",
        body: { role },
      }),
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: peopleKey(notebookId) }),
        client.invalidateQueries({ queryKey: notebookKey(notebookId) }),
      ]),
  });
}

/** Takes a person off the notebook; also how one leaves. */
export function useRemovePerson(notebookId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (personId: string) =>
      askOrThrow<undefined>(`/api/notebooks/${notebookId}/people/${personId}`, { method: "DELETE" }),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleKey(notebookId) }),
  });
}
