import { useEffect, useSyncExternalStore } from "react";
import { currentNotices, onNoticesChange, putAway, type Notice } from "./notices.ts";
import { classes } from "./classes.ts";

const SHOWN_FOR_MS = 8_000;

/** Always in the page, so that screen readers know the region before its first sentence. */
export function NoticeRegion() {
  const notices = useSyncExternalStore(onNoticesChange, currentNotices);
  return (
    <div
      role="status"
      aria-live="polite"
      aria-label="Notices"
      className="fixed bottom-4 left-4 right-4 z-50 flex flex-col items-start gap-2 pointer-events-none"
    >
      {notices.map((notice) => (
        <NoticeLine key={notice.id} notice={notice} />
      ))}
    </div>
  );
}

function NoticeLine({ notice }: { readonly notice: Notice }) {
  const { id, tone } = notice;
  useEffect(() => {
    if (tone === "refused") return;
    const timer = setTimeout(() => {
      putAway(id);
    }, SHOWN_FOR_MS);
    return () => {
      clearTimeout(timer);
    };
  }, [id, tone]);
  return (
    <p
      className={classes(
        "pointer-events-auto flex max-w-[36rem] items-baseline gap-4 border border-tick border-l-2 bg-field px-3 py-2 text-body text-ink",
        tone === "refused" ? "border-l-hairline" : "border-l-ink",
      )}
    >
      <span>{notice.sentence}</span>
      <button
        type="button"
        className="min-h-6 shrink-0 border-b border-tick px-0.5 text-small text-ink-2 hover:border-ink"
        onClick={() => {
          putAway(id);
        }}
      >
        Put away
      </button>
    </p>
  );
}
