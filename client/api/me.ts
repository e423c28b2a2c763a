/** Who is here. */
import type { Me } from "#contract/api.ts";
import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useSyncExternalStore } from "react";
import { RequestRefused } from "./problem.ts";
import { askOrThrow, readMe } from "./request.ts";
import { onSessionChange, sessionHasLapsed, setSessionLapsed } from "./session-state.ts";

export const meKey = ["me"] as const;

export function useMe() {
  const client = useQueryClient();
  return useQuery({
    queryKey: meKey,
    queryFn: async ({ signal }): Promise<Me> => {
      const answer = await readMe(signal);
      if (!answer.ok) throw new RequestRefused(answer.problem);
      const before = client.getQueryData<Me>(meKey);
      if (answer.value.person) {
        // Someone else signed in beside this page: nothing of the one before may stay on it.
        if (before?.person && before.person.id !== answer.value.person.id) window.location.reload();
        setSessionLapsed(false);
      } else if (before?.person) {
        // The session ended while the page was open: keep the person, so that the page stays, and say so.
        setSessionLapsed(true);
        return { ...answer.value, person: before.person };
      }
      return answer.value;
    },
    staleTime: 60_000,
    refetchOnWindowFocus: "always",
  });
}

/** True while the page is kept for a person whose session has ended. */
export function useSessionLapsed(): boolean {
  return useSyncExternalStore(onSessionChange, sessionHasLapsed);
}

/** The address that signs in and comes back to `place` (a path of this site). */
export function signInAddress(place: string): string {
  return `/auth/github?next=${encodeURIComponent(place)}`;
}

/**
 * Signs out and leaves nothing of this person's behind: the local copies go, and the next page is loaded afresh.
 * The copies go only once the server has agreed, so that a failed attempt costs nothing.
 */
export function useSignOut() {
  return useMutation({
    mutationFn: async () => {
      await askOrThrow<undefined>("/auth/sign-out", { method: "POST" });
      const { dropLocalCopies } = await import("../editor/local-copy.ts");
      await dropLocalCopies();
    },
    onSuccess: () => {
      window.location.assign("/");
    },
  });
}
