/** A notebook on the page: opens its shared document, then the editor on it. */
import { useEffect, useState, useSyncExternalStore, type ReactNode } from "react";
import type { StoredResult } from "#contract/api.ts";
import type { ServerNotice } from "#contract/collab.ts";
import type { Role } from "#contract/roles.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { Button } from "../ui/button.tsx";
import { say } from "../ui/notices.ts";
import { connectionWords } from "./connection-words.ts";
import "./editor.css";
import { EditorSurface } from "./editor-surface.tsx";
import { announceOpened } from "./notebook-context.ts";
import { openNotebookSession, type NotebookSession, type Source } from "./notebook-session.ts";
import type { PresenceUser } from "./presence.ts";

export interface NotebookEditorProps {
  readonly notebookId: string;
  readonly source: Source;
  /** Null for referees and scratch copies. */
  readonly role: Role | null;
  /** The signed-in person; null for referees and scratch copies. */
  readonly person?: PresenceUser | null;
  /** Version of the stored document, from the API. A newer one is never opened: it would be stripped. */
  readonly schemaVersion?: number;
  /** Results the server has stored, for the first paint; undefined while they are on their way. */
  readonly stored?: readonly StoredResult[] | undefined;
  /** What the server says beside the document: results were stored, title or people changed, … */
  readonly onNotice?: (notice: ServerNotice) => void;
  /** Drawn after the text once the notebook is open; may read its editor, blocks and results. */
  readonly children?: ReactNode;
}

export function NotebookEditor(props: NotebookEditorProps) {
  const { schemaVersion = SCHEMA_VERSION } = props;
  if (schemaVersion > SCHEMA_VERSION) return <PageTooOld />;
  return <OpenedNotebook {...props} />;
}

function OpenedNotebook(props: NotebookEditorProps) {
  const session = useNotebookSession(props);
  if (!session) return <p className="notebook-notice">Opening the notebook…</p>;
  return (
    <SessionView session={session} stored={props.stored}>
      {props.children}
    </SessionView>
  );
}

interface SessionViewProps {
  readonly session: NotebookSession;
  readonly stored: readonly StoredResult[] | undefined;
  readonly children: ReactNode;
}

function SessionView({ session, stored, children }: SessionViewProps) {
  const state = useSyncExternalStore(session.subscribe, session.state);
  useWarningBeforeLeaving(state.unsaved && state.phase !== "scratch");
  switch (state.phase) {
    case "schema-too-old":
      return <PageTooOld />;
    case "forbidden":
    case "not-found":
      return (
        <div className="notebook-notice" role="alert">
          <p>{session.source.mode === "referee" ? refereeEnded : memberEnded[state.phase]}</p>
        </div>
      );
    default:
      break;
  }
  if (!state.loaded) {
    return (
      <p className="notebook-notice" role="status">
        {state.phase === "opening" ? "Opening the notebook…" : notReached(connectionWords(state))}
      </p>
    );
  }
  return (
    <EditorSurface session={session} state={state} stored={stored}>
      {children}
    </EditorSurface>
  );
}

const refereeEnded = "This referee link has expired or was revoked. Ask whoever sent it for a new one.";
const memberEnded = {
  forbidden: "You no longer have access to this notebook. Its owner can give it back.",
  "not-found": "This notebook is no longer there, or you do not have access to it.",
} as const;
const notReached = (words: string) =>
  words.startsWith("offline")
    ? "The notebook cannot be reached. It opens as soon as the connection is back."
    : `${words}.`;

function PageTooOld() {
  return (
    <div className="notebook-notice" role="alert">
      <p>
        This notebook was written with a newer version of Subleading than this page. To keep everything in it,
        reload the page before going on.
      </p>
      <Button
        look="main"
        onClick={() => {
          window.location.reload();
        }}
      >
        Reload the page
      </Button>
    </div>
  );
}

function useNotebookSession(props: NotebookEditorProps): NotebookSession | null {
  const { notebookId, source, role, person = null, onNotice } = props;
  const [session, setSession] = useState<NotebookSession | null>(null);
  // Raised when the local copy had to be given up: the notebook is then opened afresh.
  const [generation, setGeneration] = useState(0);
  const token = source.mode === "referee" ? source.token : null;
  const ydoc = source.mode === "scratch" ? source.ydoc : null;
  const { mode } = source;
  const [personId, personName] = [person?.id ?? null, person?.name ?? null];

  useEffect(() => {
    const opened = openNotebookSession({
      notebookId,
      source:
        mode === "referee"
          ? { mode, token: token ?? "" }
          : mode === "scratch" && ydoc
            ? { mode, ydoc }
            : { mode: "member" },
      role,
      person: personId === null ? null : { id: personId, name: personName ?? "" },
      onNotice: (notice) => onNotice?.(notice),
      onMustReload(words) {
        say(words, "refused");
        setGeneration((before) => before + 1);
      },
    });
    // eslint-disable-next-line react-hooks/set-state-in-effect -- a session is an outside system: opened here, closed below
    setSession(opened);
    announceOpened(opened);
    return () => {
      announceOpened(null);
      setSession(null);
      opened.destroy();
    };
    // `role` and `onNotice` are read when the notebook is opened; a role that changes later comes over the socket.
    // eslint-disable-next-line react-hooks/exhaustive-deps -- see above
  }, [notebookId, mode, token, ydoc, personId, personName, generation]);
  return session;
}

function useWarningBeforeLeaving(unsaved: boolean): void {
  useEffect(() => {
    if (!unsaved) return;
    const warn = (event: BeforeUnloadEvent) => {
      event.preventDefault();
    };
    window.addEventListener("beforeunload", warn);
    return () => {
      window.removeEventListener("beforeunload", warn);
    };
  }, [unsaved]);
}
