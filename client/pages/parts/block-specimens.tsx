import "../../blocks/blocks.css";
import { ClassMark } from "../../blocks/parts/class-mark.tsx";
import { Decimal, decimalWidths } from "../../blocks/parts/decimal.tsx";
import { Plot } from "../../blocks/parts/plot.tsx";
import { Family, Specimen } from "./specimen.tsx";

const numbers = ["0.109(14)", "12.5", "1.43(72) × 10⁻⁴", "350 GeV"];
const sizes = [100, 200, 500, 1000, 3200] as const;

/** What results are drawn with. Invented numbers. */
export function BlockSpecimens() {
  const widths = decimalWidths(numbers);
  return (
    <Family title="In blocks">
      <Specimen name="classes, by shape, colour and word">
        <span className="block-view contents">
          <ClassMark scalingClass="relevant" />
          <ClassMark scalingClass="marginal" />
          <ClassMark scalingClass="irrelevant" />
        </span>
      </Specimen>
      <Specimen name="numbers on their decimal mark">
        <span className="block-view grid [content-visibility:visible]">
          {numbers.map((text) => (
            <Decimal key={text} text={text} widths={widths} />
          ))}
        </span>
      </Specimen>
      <Specimen name="plot">
        <div className="block-view max-w-96 grow [content-visibility:visible]">
          <Plot
            name="Sizes of two invented terms against the probe scale"
            x={{ label: "p in GeV", kind: "log", domain: [100, 3200] }}
            y={{ label: "size", kind: "log", domain: [1e-4, 1] }}
            curves={[1, 2].map((power) => ({
              key: String(power),
              label: `Q${power === 1 ? "" : "²"}`,
              style: power - 1,
              color: power === 1 ? "irrelevant" : "marginal",
              points: sizes.map((p) => [p, (p / 3200) ** power] as const),
            }))}
            guides={[{ axis: "y", value: 1e-2, label: "target", color: "hairline" }]}
            table={{ x: "p in GeV" }}
          />
        </div>
      </Specimen>
    </Family>
  );
}
