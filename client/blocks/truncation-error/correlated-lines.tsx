import type { CorrelatedValue } from "#engine/truncation/curve-value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { sizeText, withUnit } from "../parts/number-text.ts";

interface Props {
  readonly model: CorrelatedValue;
  readonly variable: string;
  readonly unit: string;
}

/** The scales that the correlated model found, as sentences whose numbers can be pinned. */
export function CorrelatedLines({ model, variable, unit }: Props) {
  const { breakdown, length, lengthPosterior, points, findings } = model;
  const against = findings.filter((one) => one.against);
  const [first] = breakdown?.posterior.intervals ?? [];
  const [firstLength] = lengthPosterior?.intervals ?? [];
  return (
    <>
      {breakdown && first && (
        <p className="block-line">
          From the data, <Formula latex={breakdown.latex} /> is{" "}
          <Figure scalar={`breakdown/${first.degree}/low`}>{sizeText(first.low, 3)}</Figure> to{" "}
          <Figure scalar={`breakdown/${first.degree}/high`}>
            {withUnit(sizeText(first.high, 3), breakdown.posterior.unit)}
          </Figure>{" "}
          at {first.degree} %, median{" "}
          <Figure scalar="breakdown/median">
            {withUnit(sizeText(breakdown.posterior.median, 3), breakdown.posterior.unit)}
          </Figure>
          ; stated is {withUnit(sizeText(breakdown.stated, 3), breakdown.posterior.unit)}, which the bands
          use.
        </p>
      )}
      <p className="block-line">
        Coefficients stay alike over <Formula latex={"\\ell"} /> ={" "}
        <Figure scalar="length">{withUnit(sizeText(length, 3), unit)}</Figure> in <Formula latex={variable} />
        {lengthPosterior && firstLength ? (
          <>
            {" "}
            (<Figure scalar={`length/${firstLength.degree}/low`}>
              {sizeText(firstLength.low, 3)}
            </Figure> to{" "}
            <Figure scalar={`length/${firstLength.degree}/high`}>{sizeText(firstLength.high, 3)}</Figure> at{" "}
            {firstLength.degree} %)
          </>
        ) : (
          " (given)"
        )}
        , fitted at {points} points.{" "}
        {against.length === 0
          ? "No consistency check speaks against the model."
          : `${against.length === 1 ? "One consistency check speaks" : `${against.length} consistency checks speak`} against it; what they found stands below the plots.`}
      </p>
    </>
  );
}
