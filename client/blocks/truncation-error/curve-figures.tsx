/** What a block along x draws: the bands, the coefficients, and what the correlated model found. */
import type { CurveValue } from "#engine/truncation/curve-value.ts";
import type { Finding } from "#engine/truncation/findings.ts";
import type { Band } from "#engine/truncation/value.ts";
import { BandsAlong } from "./bands-along.tsx";
import { CoefficientsAlong } from "./coefficients-along.tsx";
import { CoverageFigure } from "./coverage-figure.tsx";
import { DistanceFigure } from "./distance-figure.tsx";
import { MethodsAlong } from "./methods-along.tsx";
import { PivotedFigure } from "./pivoted-figure.tsx";
import { PosteriorFigure } from "./posterior-figure.tsx";

interface Props {
  readonly curve: CurveValue;
  readonly highlighted: Band | null;
  readonly unit: string;
  /** The first degree of belief, in percent. */
  readonly degree: string;
}

export function CurveFigures({ curve, highlighted, unit, degree }: Props) {
  const { correlated } = curve;
  const found = (check: Finding["check"]) => correlated?.findings.find((one) => one.check === check);
  return (
    <>
      <BandsAlong curve={curve} highlighted={highlighted} unit={unit} />
      <MethodsAlong curve={curve} unit={unit} degree={degree} />
      <CoefficientsAlong curve={curve} />
      <Said finding={found("coefficients")} />
      {correlated?.breakdown && (
        <PosteriorFigure
          symbol={correlated.breakdown.latex}
          density={correlated.breakdown.posterior}
          stated={correlated.breakdown.stated}
          alone={correlated.breakdown.alone}
        />
      )}
      {correlated?.lengthPosterior && (
        <PosteriorFigure symbol="ℓ" density={{ ...correlated.lengthPosterior, unit: curve.xUnit }} />
      )}
      {correlated && (
        <>
          <CoverageFigure checks={correlated.checks} />
          <Said finding={found("coverage")} />
          <DistanceFigure checks={correlated.checks} />
          <Said finding={found("distance")} />
          <PivotedFigure checks={correlated.checks} />
          <Said finding={found("pivoted")} />
        </>
      )}
    </>
  );
}

/** What a check found, below its drawing; a mark of its own when it speaks against the model. */
function Said({ finding }: { readonly finding: Finding | undefined }) {
  if (!finding) return null;
  return (
    <p className="block-line truncation-finding">
      {finding.against && <strong>Against the model. </strong>}
      {finding.says}
    </p>
  );
}
