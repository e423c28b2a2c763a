import type { ClassRange } from "#engine/scaling/value.ts";
import { ClassMark } from "../parts/class-mark.tsx";
import { Figure } from "../parts/figure.tsx";

interface Props {
  readonly ranges: readonly ClassRange[];
  readonly marginalAt: string | null;
  readonly symbol: string;
  readonly rowId: string;
}

/** The class as it depends on the dimension left symbolic: "▲ d < 4, ◆ d = 4, ▼ d > 4". */
export function ClassRanges({ ranges, marginalAt, symbol, rowId }: Props) {
  return (
    <span className="scaling-ranges">
      {ranges.map(({ from, to, scalingClass }) => (
        <span key={`${from ?? ""} ${to ?? ""}`}>
          <ClassMark scalingClass={scalingClass} word={false} /> {rangeWords(symbol, from, to)}
        </span>
      ))}
      {marginalAt !== null && (
        <span>
          <ClassMark scalingClass="marginal" word={false} /> {symbol} ={" "}
          <Figure scalar={`${rowId}/marginal-at`}>{marginalAt}</Figure>
        </span>
      )}
    </span>
  );
}

export function rangeWords(symbol: string, from: string | null, to: string | null): string {
  if (from === null && to === null) return `any ${symbol}`;
  if (from === null) return `${symbol} < ${to ?? ""}`;
  return to === null ? `${symbol} > ${from}` : `${from} < ${symbol} < ${to}`;
}
