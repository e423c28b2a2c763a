import type { CSSProperties } from "react";

/** Where the decimal mark of a shown number is: the digits before it, and everything from it on. */
export function splitDecimal(text: string): readonly [before: string, after: string] {
  // "0.109(14)", "1.2 × 10⁻²", "350 GeV", "(1.2 ± 0.3) × 10⁴".
  const whole = /^[^0-9]*[0-9]+/.exec(text)?.[0] ?? text;
  return [whole, text.slice(whole.length)];
}

/** Widths that make a column of numbers stand on its decimal mark, in digits. */
export function decimalWidths(texts: readonly string[]): readonly [before: number, after: number] {
  const parts = texts.map(splitDecimal);
  return [
    Math.max(0, ...parts.map(([before]) => before.length)),
    Math.max(0, ...parts.map(([, after]) => after.length)),
  ];
}

/** One number of a column that stands on its decimal mark. Digits of the face are equally wide. */
export function Decimal({
  text,
  widths,
}: {
  readonly text: string;
  readonly widths: readonly [number, number];
}) {
  const [before, after] = splitDecimal(text);
  // Custom properties are no members of React's type for styles.
  const style = { "--before": `${widths[0]}ch`, "--after": `${widths[1]}ch` } as CSSProperties;
  return (
    <span className="block-decimal" style={style}>
      <span>{before}</span>
      <span>{after}</span>
    </span>
  );
}
