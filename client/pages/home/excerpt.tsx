import { lazy, Suspense, useEffect, useRef, useState, type RefObject } from "react";
import { Button } from "../../ui/button.tsx";
import { Loading } from "../../ui/loading.tsx";
import "./excerpt.css";

const ExcerptLive = lazy(async () => ({ default: (await import("./excerpt-live.tsx")).ExcerptLive }));

/** A notebook to try without an account. The editor is fetched when a reader comes near it, not with the first page. */
export function Excerpt() {
  const place = useRef<HTMLDivElement>(null);
  const near = useNear(place);
  const [attempt, setAttempt] = useState(0);
  return (
    <section aria-labelledby="excerpt-title" className="tick-rule mt-16 pt-6">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2">
        <h2 id="excerpt-title" className="font-prose text-section leading-tight">
          Try it here
        </h2>
        <Button
          look="quiet"
          className="text-small"
          onClick={() => {
            setAttempt(attempt + 1);
          }}
        >
          Start over
        </Button>
      </div>
      <p className="mt-2 max-w-(--measure) text-body text-ink-2">
        Change the threshold <i className="font-prose">Λ</i> from 3.2 TeV to 2.5 TeV and look at the two
        numbers in the sentence. The sector is invented; what you type stays on this page and is neither kept
        nor sent.
      </p>
      <div ref={place} className="excerpt mt-6 min-h-[40rem]">
        {near && (
          <Suspense fallback={<Loading what="Opening the excerpt" />}>
            <ExcerptLive key={attempt} />
          </Suspense>
        )}
      </div>
    </section>
  );
}

/** True from the first time the element is within a screen of being seen. */
function useNear(element: RefObject<Element | null>): boolean {
  const [near, setNear] = useState(false);
  useEffect(() => {
    if (near || !element.current) return;
    const watch = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting)) setNear(true);
      },
      { rootMargin: "100% 0px" },
    );
    watch.observe(element.current);
    return () => {
      watch.disconnect();
    };
  }, [near, element]);
  return near;
}
