import type { TruncationValue } from "#engine/truncation/value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { sizeText } from "../parts/number-text.ts";

/** The coefficients in a line: which were used, which carry no information, which are absent. */
export function Coefficients({ value }: { readonly value: TruncationValue }) {
  if (value.coefficients.length === 0) return null;
  return (
    <p className="block-line truncation-coefficients">
      {value.coefficients.map(({ rowId, order, value: coefficient, used }) => (
        <span key={rowId} className={used ? undefined : "truncation-unused"}>
          <Formula latex={`c_{${order}}`} />{" "}
          {coefficient === null ? (
            "absent"
          ) : (
            <>
              = <Figure scalar={`coefficients/${order}`}>{sizeText(coefficient, 3)}</Figure>
              {!used && " (not used)"}
            </>
          )}
        </span>
      ))}
    </p>
  );
}
