import type { ComponentProps } from "react";
import { Link } from "react-router-dom";
import { buttonClasses, type ButtonLook } from "./button.tsx";
import { classes } from "./classes.ts";

export interface TextLinkProps extends ComponentProps<typeof Link> {
  /** Set as running text by default; as a button's look where it stands among buttons. */
  readonly look?: ButtonLook;
}

/** A link within the site. */
export function TextLink({ look, className, ...rest }: TextLinkProps) {
  return <Link {...rest} className={classes(look ? buttonClasses(look) : linkClasses, className)} />;
}

/** Also for plain anchors that leave the site. */
export const linkClasses = "underline decoration-tick underline-offset-[0.2em] hover:decoration-ink";
