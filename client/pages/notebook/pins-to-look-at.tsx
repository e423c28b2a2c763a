import { usePinCounts } from "../../editor/pins/use-pin-counts.ts";
import { Button } from "../../ui/button.tsx";
import { classes } from "../../ui/classes.ts";

/** How many pinned numbers no longer agree with their blocks; a press goes to the next of them. */
export function PinsToLookAt() {
  const { moved, loose, goToNext } = usePinCounts();
  const words = sayPins(moved, loose);
  return (
    <>
      {words !== "" && (
        <Button
          look="quiet"
          className={classes("text-small", moved > 0 && "border-hairline! text-hairline!")}
          title="Go to the next one"
          onClick={goToNext}
        >
          {words}
        </Button>
      )}
      <span role="status" className="sr-only">
        {words}
      </span>
    </>
  );
}

export function sayPins(moved: number, loose: number): string {
  const counted = (count: number, state: string) => (count === 0 ? [] : [`${count} ${state}`]);
  const states = [...counted(moved, "moved"), ...counted(loose, "loose")];
  if (states.length === 0) return "";
  return `${moved + loose === 1 ? "pin" : "pins"}: ${states.join(", ")}`;
}
