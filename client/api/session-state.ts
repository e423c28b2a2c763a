/**
 * Whether this page's session still holds, and the token that changing requests carry.
 * Kept outside the query cache because the fetch wrapper must read it, and because a lapse must not
 * unmount the page a person is typing on.
 */
type Listener = () => void;

let lapsed = false;
let csrfToken: string | null = null;
const listeners = new Set<Listener>();

export function rememberCsrfToken(token: string): void {
  csrfToken = token;
}

export function currentCsrfToken(): string | null {
  return csrfToken;
}

/** True from the first 401 after having been signed in until someone is signed in again. */
export function sessionHasLapsed(): boolean {
  return lapsed;
}

export function setSessionLapsed(value: boolean): void {
  if (lapsed === value) return;
  lapsed = value;
  for (const listener of listeners) listener();
}

export function onSessionChange(listener: Listener): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}
