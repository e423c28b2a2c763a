import type { CSSProperties } from "react";

/** The least width of a field, in characters; it grows with what is typed. */
export function sizeStyle(size = 8): CSSProperties {
  // A custom property is no member of React's type for styles.
  return { "--size": `${size}ch` } as CSSProperties;
}
