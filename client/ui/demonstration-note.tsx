import { classes } from "./classes.ts";
import { linkClasses } from "./text-link.tsx";

/** Said wherever one signs in or invites while the local stand-ins are in use. */
export function DemonstrationNote(props: {
  readonly mailboxUrl: string | null;
  readonly className?: string;
}) {
  const { mailboxUrl, className } = props;
  return (
    <p className={classes("max-w-(--measure) border-l-2 border-tick pl-3 text-small text-ink-2", className)}>
      This is a demonstration: the accounts are invented, and so is everything in their notebooks. No mail
      leaves this machine
      {mailboxUrl ? (
        <>
          ; what would have been sent lies in{" "}
          <a className={linkClasses} href={mailboxUrl}>
            the demonstration mailbox
          </a>
          .
        </>
      ) : (
        "."
      )}
    </p>
  );
}
