import type { RefereeView } from "#contract/api.ts";
import type { ServerNotice } from "#contract/collab.ts";
import { useQueryClient } from "@tanstack/react-query";
import { lazy, Suspense, useCallback, useEffect, useState } from "react";
import { useParams } from "react-router-dom";
import type * as Y from "yjs";
import { sentenceOf } from "../../api/problem.ts";
import { endOfLink, refereeViewKey, useRefereeView } from "../../api/referee-view.ts";
import { useConnection, useOpenedSession } from "../../editor/notebook-context.ts";
import { Button } from "../../ui/button.tsx";
import { Loading } from "../../ui/loading.tsx";
import { say } from "../../ui/notices.ts";
import { PageFrame } from "../../ui/page-frame.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { ReadingStrip } from "./reading-strip.tsx";
import "./referee.css";
import { copyDocument } from "./scratch-copy.ts";
import { ScratchStrip } from "./scratch-strip.tsx";
import { useExpiryWatch } from "./until-expiry.ts";

// Asked for as soon as this page is, beside what the link opens and not after it.
const notebookModule = import("./referee-notebook.tsx");
const RefereeNotebook = lazy(async () => ({ default: (await notebookModule).RefereeNotebook }));

/** What a referee link opens: the live notebook to read, its check sheet, and a scratch copy to try things in. */
export function RefereePage() {
  const { token = "" } = useParams();
  const [scratch, setScratch] = useState<Y.Doc | null>(null);
  const view = useRefereeView(token, scratch === null);
  const ended = endOfLink(view.error);

  if (ended !== null) {
    return (
      <PageFrame title="Referee link" width="measure">
        <h1 className="font-prose text-title leading-tight">This link opens nothing</h1>
        <Refusal sentence={ended} />
      </PageFrame>
    );
  }
  if (view.data) {
    return <OpenedPage key={token} token={token} view={view.data} scratch={scratch} onScratch={setScratch} />;
  }
  return (
    <PageFrame title="Referee link" width={view.isPending ? "page" : "measure"}>
      {view.isPending ? (
        <Loading what="Opening the notebook" />
      ) : (
        <>
          <h1 className="font-prose text-title leading-tight">The notebook could not be opened</h1>
          <Refusal sentence={sentenceOf(view.error)} />
          <Button className="mt-6" onClick={() => void view.refetch()}>
            Try again
          </Button>
        </>
      )}
    </PageFrame>
  );
}

interface OpenedProps {
  readonly token: string;
  readonly view: RefereeView;
  readonly scratch: Y.Doc | null;
  readonly onScratch: (scratch: Y.Doc | null) => void;
}

function OpenedPage({ token, view, scratch, onScratch }: OpenedProps) {
  const session = useOpenedSession();
  const heedNotice = useNoticeFromServer(token);
  useWordsAtTheEnd(token);
  // The live page is cut by the server. A copy has no way to hear of it, so its time is kept here.
  useExpiryWatch(scratch ? view.expiresAt : null, () => {
    onScratch(null);
    say("The time of this link is up, and the scratch copy with it.", "refused");
  });
  return (
    <PageFrame
      title={view.title}
      heading={<h1 className="referee-title">{view.title}</h1>}
      instruments={<ReadingWords />}
    >
      {scratch ? (
        <ScratchStrip onDiscard={() => onScratch(null)} />
      ) : (
        <ReadingStrip view={view} onVary={() => session && onScratch(copyDocument(session.ydoc))} />
      )}
      <Suspense fallback={<Loading what="Opening the notebook" />}>
        <RefereeNotebook token={token} view={view} scratch={scratch} onNotice={heedNotice} />
      </Suspense>
    </PageFrame>
  );
}

/** The state of the connection; only what interrupts the reading is read aloud. */
function ReadingWords() {
  const connection = useConnection();
  if (!connection) return null;
  const calm = ["connected", "opening", "scratch"].includes(connection.phase);
  return (
    <>
      <span
        className={calm ? "text-ink-2" : "border-l-2 border-hairline pl-2"}
        data-connection={connection.phase}
      >
        {connection.words}
      </span>
      <span role="status" className="sr-only">
        {calm ? "" : connection.words}
      </span>
    </>
  );
}

/** What changed on the server, told over the socket, is fetched again. */
function useNoticeFromServer(token: string): (notice: ServerNotice) => void {
  const client = useQueryClient();
  return useCallback(
    ({ about }) => {
      if (about === "results" || about === "notebook")
        void client.invalidateQueries({ queryKey: refereeViewKey(token) });
    },
    [client, token],
  );
}

/** A socket that was closed for good says little; the address itself says why. */
function useWordsAtTheEnd(token: string): void {
  const client = useQueryClient();
  const phase = useConnection()?.phase;
  useEffect(() => {
    if (phase === "forbidden" || phase === "not-found" || phase === "signed-out")
      void client.invalidateQueries({ queryKey: refereeViewKey(token) });
  }, [client, token, phase]);
}
