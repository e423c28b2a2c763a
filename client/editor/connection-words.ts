/** The state of the connection, in words a person can act on. */

export type ConnectionPhase =
  /** Reading the local copy, or waiting for the first answer. */
  | "opening"
  | "connected"
  | "offline"
  | "store-unreachable"
  | "signed-out"
  | "forbidden"
  | "not-found"
  | "schema-too-old"
  /** The server refused for another final reason. */
  | "refused"
  /** Nothing is sent anywhere. */
  | "scratch";

export interface ConnectionState {
  readonly phase: ConnectionPhase;
  /** Something typed here is not known to be committed. */
  readonly unsaved: boolean;
  readonly readOnly: boolean;
  /** Something can be shown: the server has answered, or this device had a copy. */
  readonly loaded: boolean;
}

export function connectionWords({ phase, unsaved, readOnly }: ConnectionState): string {
  switch (phase) {
    case "opening":
      return "opening…";
    case "connected":
      if (readOnly) return "reading only";
      return unsaved ? "saving…" : "all changes saved";
    case "offline":
      if (readOnly) return "offline: what you read may have changed";
      return "offline: what you type is kept on this device and sent later";
    case "store-unreachable":
      return "the store cannot be reached: what you type is kept and sent when it returns";
    case "signed-out":
      return unsaved
        ? "signed out: what you typed is kept on this device until you sign in again"
        : "signed out: sign in again to go on";
    case "forbidden":
      return "you may no longer open this notebook";
    case "not-found":
      return "this notebook is no longer there";
    case "schema-too-old":
      return "this page is older than the notebook: reload it to go on";
    case "refused":
      return "the connection was refused: reload the page to try again";
    case "scratch":
      return "a scratch copy: nothing here is kept or sent";
  }
}

/** True when nothing more will be sent from this page. */
export function isFinal(phase: ConnectionPhase): boolean {
  return ["signed-out", "forbidden", "not-found", "schema-too-old", "refused"].includes(phase);
}
