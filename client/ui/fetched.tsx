/** Parts of a page whose code is fetched when it is first wanted, or made ready before. */
import {
  createElement,
  useEffect,
  useEffectEvent,
  useState,
  type ComponentType,
  type ReactNode,
} from "react";
import { say } from "./notices.ts";

export interface Fetched<Props extends object> {
  /** Fetches the code ahead of its use; false when it could not be. A failure is said only when the part is wanted. */
  prepare(): Promise<boolean>;
  isReady(): boolean;
  /** Draws the part as soon as its code is there; at once when it was made ready. */
  readonly Part: ComponentType<Props & FetchedProps>;
}
interface FetchedProps {
  /** Stands in the part's place until it is there. */
  readonly meanwhile?: ReactNode;
  /** Told when the code could not be fetched; it is tried again when the part is next wanted, or the network is back. */
  readonly onMissing?: () => void;
}

/**
 * Unlike React's own lazy components this one does not fail for good when the network was away for a moment, and it
 * is drawn without a gap once its code is there.
 */
export function fetched<Props extends object>(load: () => Promise<ComponentType<Props>>): Fetched<Props> {
  let component: ComponentType<Props> | null = null;
  let fetching: Promise<boolean> | null = null;

  function fetchOnce(): Promise<boolean> {
    fetching ??= load().then(
      (found) => {
        component = found;
        return true;
      },
      (reason: unknown) => {
        console.warn("A part of the page could not be fetched.", reason);
        fetching = null;
        return false;
      },
    );
    return fetching;
  }

  function Part({ meanwhile = null, onMissing, ...props }: Props & FetchedProps) {
    const [shown, setShown] = useState(component !== null);
    const tellMissing = useEffectEvent(() => onMissing?.());
    useEffect(() => {
      if (shown) return;
      let wanted = true;
      const fetchNow = () =>
        void fetchOnce().then((there) => {
          if (!wanted) return;
          if (there) setShown(true);
          else {
            say(missingWords, "refused");
            tellMissing();
          }
        });
      fetchNow();
      window.addEventListener("online", fetchNow);
      return () => {
        wanted = false;
        window.removeEventListener("online", fetchNow);
      };
    }, [shown]);
    if (!shown || component === null) return meanwhile;
    // Without the two members of FetchedProps these are the part's own properties.
    return createElement(component, props as unknown as Props);
  }

  return { prepare: fetchOnce, isReady: () => component !== null, Part };
}

const missingWords =
  "This part of the page could not be fetched. Try again when the connection is back; what you wrote is kept.";
