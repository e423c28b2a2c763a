import type { ComponentProps, ReactNode } from "react";
import { classes } from "./classes.ts";

export type ButtonLook = "main" | "plain" | "quiet" | "danger";

const looks: Readonly<Record<ButtonLook, string>> = {
  main: "min-h-9 px-4 border border-ink bg-ink text-paper hover:bg-ink-2 hover:border-ink-2 font-medium",
  plain: "min-h-9 px-4 border border-tick bg-field text-ink hover:border-ink hover:bg-highlight",
  quiet: "min-h-6 px-0.5 border-b border-tick text-ink hover:border-ink",
  danger: "min-h-9 px-4 border border-hairline bg-field text-hairline hover:bg-highlight font-medium",
};

export function buttonClasses(look: ButtonLook): string {
  return classes(
    "inline-flex items-center justify-center gap-2 text-body leading-tight whitespace-nowrap no-underline",
    "disabled:opacity-100 disabled:text-ink-3 disabled:border-line disabled:bg-transparent aria-disabled:cursor-default",
    looks[look],
  );
}

export interface ButtonProps extends ComponentProps<"button"> {
  readonly look?: ButtonLook;
  /** While the request is under way the button keeps its place and its focus, and does nothing more. */
  readonly busy?: boolean;
  readonly busyLabel?: ReactNode;
}

export function Button({
  look = "plain",
  busy = false,
  busyLabel,
  className,
  children,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      type="button"
      {...rest}
      className={classes(buttonClasses(look), className)}
      aria-disabled={busy || undefined}
      onClick={
        busy
          ? (event) => {
              event.preventDefault();
            }
          : onClick
      }
    >
      {busy && busyLabel ? busyLabel : children}
    </button>
  );
}
