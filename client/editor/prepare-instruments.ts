/** Fetches what a writer will want next once the page is quiet, so that it opens at once, also offline. */
import { blockFrame } from "./blocks/block-in-editor.tsx";
import { formulaEditor } from "./mathematics/mathematics-editor.tsx";
import { placementPanel } from "./placing/margin-tick.tsx";
import { linkPanel } from "./writing/link-editor.tsx";

const LATEST_MS = 4_000;

/** Returns the way to give it up. */
export function prepareInstruments(): () => void {
  const fetchAll = () => {
    for (const { prepare } of [blockFrame, formulaEditor, placementPanel, linkPanel]) void prepare();
  };
  // Safari has no idle callback.
  if (typeof requestIdleCallback === "undefined") {
    const timer = setTimeout(fetchAll, LATEST_MS);
    return () => {
      clearTimeout(timer);
    };
  }
  const idle = requestIdleCallback(fetchAll, { timeout: LATEST_MS });
  return () => {
    cancelIdleCallback(idle);
  };
}
