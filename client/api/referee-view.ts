/** What a referee link opens, for whoever holds it. */
import type { RefereeView } from "#contract/api.ts";
import { useQuery } from "@tanstack/react-query";
import { RequestRefused } from "./problem.ts";
import { askOrThrow } from "./request.ts";

export const refereeViewKey = (token: string) => ["referee", token] as const;

/** `follow` is false while nothing is to be asked of the server. */
export function useRefereeView(token: string, follow: boolean) {
  return useQuery({
    queryKey: refereeViewKey(token),
    queryFn: ({ signal }) => askOrThrow<RefereeView>(`/api/referee/${encodeURIComponent(token)}`, { signal }),
    enabled: follow,
  });
}

/** The sentence of a link that opens nothing any more, or never did; null for any other failure. */
export function endOfLink(error: unknown): string | null {
  if (!(error instanceof RequestRefused)) return null;
  return [404, 410].includes(error.problem.status) ? error.problem.sentence : null;
}
