import { useEffect, useRef } from "react";

/** The longest wait a timer takes: about 24.8 days. */
const LONGEST_MS = 2 ** 31 - 1;

/**
 * Calls back when the link's time is up while the page looks at `expiresAt`. A time already past when the watch begins
 * is left alone: the server has just let the reader in, so this device's clock is the one that is wrong.
 */
export function useExpiryWatch(expiresAt: string | null, onExpired: () => void): void {
  const callback = useRef(onExpired);
  useEffect(() => {
    callback.current = onExpired;
  });
  useEffect(() => {
    if (expiresAt === null) return;
    const end = Date.parse(expiresAt);
    let timer: ReturnType<typeof setTimeout> | null = null;
    const wait = () => {
      const left = end - Date.now();
      timer = left > 0 ? setTimeout(wait, Math.min(left, LONGEST_MS)) : null;
      if (left <= 0) callback.current();
    };
    if (end > Date.now()) wait();
    return () => {
      if (timer !== null) clearTimeout(timer);
    };
  }, [expiresAt]);
}
