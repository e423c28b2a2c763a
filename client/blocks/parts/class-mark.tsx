import type { ScalingClass } from "#engine/scaling/value.ts";

const shapes: Readonly<Record<ScalingClass, string>> = {
  relevant: "M5 1 9.5 9h-9z",
  marginal: "M5 .5 9.5 5 5 9.5.5 5z",
  irrelevant: "M.5 1h9L5 9z",
};

/** A class by shape and colour and word, so that none of them is needed to tell the others apart. */
export function ClassMark({
  scalingClass,
  word = true,
  says = scalingClass,
}: {
  readonly scalingClass: ScalingClass;
  readonly word?: boolean;
  /** A finer word for the class: "marginally irrelevant". */
  readonly says?: string;
}) {
  return (
    <span className={`block-class block-class-${scalingClass}`}>
      <svg width="10" height="10" viewBox="0 0 10 10" aria-hidden="true" focusable="false">
        <path d={shapes[scalingClass]} fill="currentColor" />
      </svg>
      {word ? says : <span className="sr-only">{says}</span>}
    </span>
  );
}
