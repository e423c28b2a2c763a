import { useConnection } from "../../editor/notebook-context.ts";

/**
 * The state of the connection as text. Saving comes and goes with every word typed, so only what interrupts the work
 * is read aloud.
 */
export function ConnectionWords() {
  const connection = useConnection();
  if (!connection) return null;
  const calm = connection.phase === "connected" || connection.phase === "opening";
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
