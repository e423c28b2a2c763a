import { classes } from "./classes.ts";

/** Why something was not done. Always in the page, so that its words are read aloud when they come. */
export function Refusal({
  sentence,
  className,
}: {
  readonly sentence: string | null;
  readonly className?: string;
}) {
  return (
    <div role="alert">
      {sentence && (
        <p className={classes("mt-4 border-l-2 border-hairline pl-3 text-body", className)}>{sentence}</p>
      )}
    </div>
  );
}
