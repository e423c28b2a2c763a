import { useQueryClient } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { meKey, useSessionLapsed } from "../../api/me.ts";
import { useConnection } from "../../editor/notebook-context.ts";

/**
 * Counts how often the person has signed in again beside this page. The socket's refusal was final, so the editor is
 * opened afresh then; what was typed meanwhile lies in the copy on this device and is sent.
 */
export function useReturnsAfterLapse(): number {
  const client = useQueryClient();
  const lapsed = useSessionLapsed();
  const socketSignedOut = useConnection()?.phase === "signed-out";
  const [returns, setReturns] = useState(0);
  const [wasLapsed, setWasLapsed] = useState(lapsed);
  if (lapsed !== wasLapsed) {
    setWasLapsed(lapsed);
    if (!lapsed) setReturns(returns + 1);
  }
  // The socket may hear of the end of a session first: the page then asks who is here, and says so in its banner.
  useEffect(() => {
    if (socketSignedOut) void client.invalidateQueries({ queryKey: meKey });
  }, [socketSignedOut, client]);
  return returns;
}
